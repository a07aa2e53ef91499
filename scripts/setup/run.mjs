import { spawn } from "node:child_process";

/**
 * Runs a command and waits for it.
 *
 * @param {string} command
 * @param {string[]} args
 * @param {{ env?: NodeJS.ProcessEnv, quiet?: boolean }} [options] quiet: what it prints is shown only if it fails
 * @returns {Promise<{ code: number, output: string }>} its exit code and, when quiet, what it printed
 */
export function run(command, args, { env = process.env, quiet = false } = {}) {
  return new Promise((resolve, reject) => {
    const child = spawn(command, args, { env, stdio: quiet ? ["ignore", "pipe", "pipe"] : "inherit" });
    let output = "";
    for (const stream of [child.stdout, child.stderr]) {
      stream?.on("data", (chunk) => {
        output += chunk;
      });
    }
    child.on("error", reject);
    child.on("close", (code, signal) => resolve({ code: code ?? (signal ? 1 : 0), output }));
  });
}

/** Runs Node itself on a script or a package's command. */
export function runNode(args, options) {
  return run(process.execPath, args, options);
}

/** Runs one of our TypeScript scripts, outside Next but by its rules for server-only files. */
export function runScript(script, options) {
  return runNode(["--conditions=react-server", "--import", "tsx", script], options);
}

/** Ends the process with one sentence for a person. */
export class SetupError extends Error {}

/** Runs a step that must succeed; what it printed is shown where it does not. */
export async function must(sentence, running) {
  const { code, output } = await running;
  if (code !== 0) throw new SetupError(output ? `${output.trimEnd()}\n\n${sentence}` : sentence);
}
