import { spawn } from "node:child_process";
import path from "node:path";

/**
 * Lets a process of its own work on a database file and kills it, -9, some time after it began.
 * @param script name in tests/support, without its ending
 * @param wait   [ms]; null: let it finish
 */
export function workAndKill(script: string, file: string, wait: number | null): Promise<void> {
  return new Promise((resolve, reject) => {
    const child = spawn(
      process.execPath,
      ["--conditions=react-server", "--import", "tsx", path.resolve(`tests/support/${script}.ts`)],
      { env: { ...process.env, DATABASE_URL: `file:${file}` }, stdio: ["ignore", "pipe", "pipe"] },
    );
    let errors = "";
    child.stderr.on("data", (chunk: Buffer) => (errors += chunk.toString()));
    child.stdout.on("data", (chunk: Buffer) => {
      if (wait !== null && chunk.toString().includes("working"))
        setTimeout(() => child.kill("SIGKILL"), wait);
    });
    child.on("error", reject);
    child.on("exit", (code, signal) => {
      if (signal === "SIGKILL" || code === 0) resolve();
      else reject(new Error(`${script} ended with ${code}: ${errors.slice(0, 800)}`));
    });
  });
}
