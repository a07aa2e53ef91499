import "server-only";
import type { Client } from "@libsql/client";
import { isBusy, isCutOff } from "./busy";

const MAX_ATTEMPTS = 60;
const FIRST_WAIT_MS = 2;
const LONGEST_WAIT_MS = 250;

/** A statement that only reads may run beside the queue. */
const READS = /^\s*(select|explain|pragma\s+\w+\s*;?\s*$)/i;

/**
 * The client with every write in one queue and BUSY met by a reconnect and a retry of the whole unit.
 *
 * On a file database the bare client loses an acknowledged write after one SQLITE_BUSY and blocks the event
 * loop while it waits. Here one unit (a statement, or a batch in one immediate transaction) runs at a time;
 * when the file is locked by another process the connection is dropped, the unit waits without blocking and
 * runs again from its beginning. What cannot be run again whole is refused: interactive transactions, and
 * scripts of several statements outside a transaction. Units of work are batches.
 */
export function withWriteQueue(
  client: Client,
  onRetry: (attempt: number) => void = () => undefined,
  { attempts = MAX_ATTEMPTS }: { attempts?: number } = {},
): Client {
  let tail: Promise<unknown> = Promise.resolve();
  let closed = false;

  const whole = async <T>(unit: () => Promise<T>): Promise<T> => {
    for (let attempt = 1; ; attempt++) {
      try {
        return await unit();
      } catch (error) {
        // After close() nothing runs again, and nothing opens the file anew.
        if (closed || !(isBusy(error) || isCutOff(error))) throw error;
        // Also when giving up: on the connection that met BUSY the next acknowledged write would vanish.
        if (isBusy(error)) await reconnect(client);
        if (attempt >= attempts) throw error;
        // A read whose connection a reconnect took away has done nothing yet, and is no retry.
        if (isBusy(error)) onRetry(attempt);
        await pause(attempt);
      }
    }
  };

  const enqueue = <T>(unit: () => Promise<T>): Promise<T> => {
    const result = tail.then(() => whole(unit));
    tail = result.catch(() => undefined);
    return result;
  };

  return new Proxy(client, {
    get(target, property) {
      switch (property) {
        case "execute":
          return (statement: never, args?: never) => {
            const unit = () => target.execute(statement, args as never);
            return READS.test(sqlOf(statement)) ? whole(unit) : enqueue(unit);
          };
        case "batch":
          return (statements: never, mode?: "write" | "read" | "deferred") =>
            mode === "read"
              ? whole(() => target.batch(statements, "read"))
              : enqueue(() => target.batch(statements, "write"));
        case "migrate":
          return (statements: never) => enqueue(() => target.migrate(statements));
        case "executeMultiple":
          return () => refuse("Scripts of several statements are not used here. Send them as one batch.");
        case "transaction":
          return () => refuse("Interactive transactions are not used here. Send the unit as one batch.");
        case "close":
          return () => {
            closed = true;
            target.close();
          };
        default: {
          const value: unknown = Reflect.get(target, property, target);
          return typeof value === "function" ? (value as (...a: unknown[]) => unknown).bind(target) : value;
        }
      }
    },
  });
}

function sqlOf(statement: unknown): string {
  if (typeof statement === "string") return statement;
  const named =
    statement !== null && typeof statement === "object" && "sql" in statement ? statement.sql : "";
  return typeof named === "string" ? named : "";
}

function refuse(message: string): Promise<never> {
  return Promise.reject(new Error(message));
}

async function reconnect(client: Client): Promise<void> {
  // Its type says it returns nothing; for a file it returns a promise.
  await Promise.resolve(client.reconnect());
}

/** Doubles up to a quarter of a second, with jitter so that two processes do not keep step. */
function pause(attempt: number): Promise<void> {
  const longest = Math.min(LONGEST_WAIT_MS, FIRST_WAIT_MS * 2 ** Math.min(attempt, 10));
  return new Promise((resolve) => setTimeout(resolve, longest * (0.5 + Math.random() / 2)));
}
