import { spawn } from "node:child_process";
import { createServer } from "node:net";
import { SetupError } from "./run.mjs";

/** Refuses a port that something else holds, before a minute is spent on building. */
export function checkPort(port, host) {
  return new Promise((resolve, reject) => {
    const probe = createServer();
    probe.once("error", (error) => {
      reject(
        error.code === "EADDRINUSE"
          ? new SetupError(
              `Port ${port} is in use. Stop what uses it, or choose another: PORT=${port + 1} npm start`,
            )
          : new SetupError(`Port ${port} on ${host} cannot be opened: ${error.message}.`),
      );
    });
    probe.listen(port, host, () => probe.close(() => resolve()));
  });
}

/**
 * Serves until told to stop. SIGINT and SIGTERM are passed on and waited for; a second one ends it at once.
 *
 * @returns {Promise<number>} the exit code: 0 where it was asked to stop
 */
export async function serve({ mode, port, host, env, onReady }) {
  const child = spawn(
    process.execPath,
    ["node_modules/next/dist/bin/next", mode, "--port", String(port), "--hostname", host],
    { env, stdio: ["ignore", "pipe", "inherit"] },
  );
  // Next's own banner names another address; ours follows. What comes after is shown.
  let ready = false;
  child.stdout.on("data", (chunk) => {
    const text = String(chunk);
    if (ready) process.stdout.write(text.replace(/^.*Running next\.config.*\n?/gm, ""));
    else if (/Ready in/.test(text)) {
      ready = true;
      onReady();
    }
  });

  let stopping = false;
  const stop = (signal) => {
    if (stopping) return child.kill("SIGKILL");
    stopping = true;
    child.kill(signal);
    setTimeout(() => child.kill("SIGKILL"), 10_000).unref();
  };
  process.on("SIGINT", stop);
  process.on("SIGTERM", stop);
  process.on("SIGHUP", stop);

  return new Promise((resolve, reject) => {
    child.once("error", reject);
    child.once("close", (code) => resolve(stopping ? 0 : (code ?? 1)));
  });
}
