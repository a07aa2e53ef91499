/**
 * Serves what the browser tests drive: a new data folder with the demo team, without limits on the rate, the
 * large board smaller than that of a first start but long enough for virtual rows.
 */
import { rmSync } from "node:fs";
import path from "node:path";

const root = path.resolve(import.meta.dirname, "../..");
const dataDir = path.join(root, ".cache/browser-tests");
rmSync(dataDir, { recursive: true, force: true });

delete process.env.DATABASE_URL;
delete process.env.SMTP_URL;
delete process.env.BASE_URL;
Object.assign(process.env, { DATA_DIR: dataDir, DEMO: "1", RATE_LIMITS: "off", DEMO_LARGE_NETS: "1500" });

await import("../../scripts/start.mjs");
