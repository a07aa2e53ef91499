import type { Client } from "@libsql/client";

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
 * runs again from its beginning. Interactive transactions are refused: units of work are batches.
 */
export function withWriteQueue(client: Client, onRetry: (attempt: number) => void = () => undefined): Client {
  let tail: Promise<unknown> = Promise.resolve();

  const enqueue = <T>(unit: () => Promise<T>): Promise<T> => {
    const result = tail.then(() => retryWhole(client, unit, onRetry));
    tail = result.catch(() => undefined);
    return result;
  };

  const sqlOf = (statement: unknown): string =>
    typeof statement === "string" ? statement : String((statement as { sql?: unknown } | null)?.sql ?? "");

  return new Proxy(client, {
    get(target, property) {
      switch (property) {
        case "execute":
          return (statement: never, args?: never) => {
            const unit = () => target.execute(statement, args as never);
            return READS.test(sqlOf(statement)) ? retryWhole(target, unit, onRetry) : enqueue(unit);
          };
        case "batch":
          return (statements: never, mode?: "write" | "read" | "deferred") =>
            mode === "read"
              ? retryWhole(target, () => target.batch(statements, "read"), onRetry)
              : enqueue(() => target.batch(statements, "write"));
        case "migrate":
          return (statements: never) => enqueue(() => target.migrate(statements));
        case "executeMultiple":
          return (sql: string) => enqueue(() => target.executeMultiple(sql));
        case "transaction":
          return () =>
            Promise.reject(new Error("Interactive transactions are not used here. Send the unit as one batch."));
        default: {
          const value: unknown = Reflect.get(target, property, target);
          return typeof value === "function" ? (value as (...a: unknown[]) => unknown).bind(target) : value;
        }
      }
    },
  });
}

async function retryWhole<T>(client: Client, unit: () => Promise<T>, onRetry: (attempt: number) => void): Promise<T> {
  for (let attempt = 1; ; attempt++) {
    try {
      return await unit();
    } catch (error) {
      if (!isBusy(error) || attempt >= MAX_ATTEMPTS) throw error;
      onRetry(attempt);
      await reconnect(client);
      await pause(attempt);
    }
  }
}

/** SQLITE_BUSY, SQLITE_LOCKED and the client's own "statements in progress" that follows them. */
export function isBusy(error: unknown): boolean {
  for (let cause: unknown = error; cause instanceof Error; cause = cause.cause) {
    const code = (cause as { code?: unknown }).code;
    if (typeof code === "string" && /^SQLITE_(BUSY|LOCKED)/.test(code)) return true;
    if (/database (table )?is locked|statements in progress/i.test(cause.message)) return true;
  }
  return false;
}

async function reconnect(client: Client): Promise<void> {
  if ("reconnect" in client && typeof client.reconnect === "function") await client.reconnect();
}

/** Doubles up to a quarter of a second, with jitter so that two processes do not keep step. */
function pause(attempt: number): Promise<void> {
  const longest = Math.min(LONGEST_WAIT_MS, FIRST_WAIT_MS * 2 ** Math.min(attempt, 10));
  return new Promise((resolve) => setTimeout(resolve, longest * (0.5 + Math.random() / 2)));
}
