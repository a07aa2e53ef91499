import { execFileSync } from "node:child_process";

/** The worker threads' bundle, as npm start builds it. */
export default function setup(): void {
  execFileSync(process.execPath, ["scripts/build-workers.mjs"], { stdio: "inherit" });
}
