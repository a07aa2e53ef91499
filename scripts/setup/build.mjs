import { createHash } from "node:crypto";
import { existsSync, mkdirSync, readdirSync, readFileSync, statSync, writeFileSync } from "node:fs";
import path from "node:path";
import { must, runNode, runScript } from "./run.mjs";

const STAMP = ".next/built-from";

/** All that a build depends on. */
const INPUTS = [
  "app",
  "components",
  "lib",
  "public",
  "scripts/build-workers.mjs",
  "scripts/make-validation.ts",
  "scripts/validation",
  "tests/reference",
  "tests/support/reference-cross-section.ts",
  "tests/si/network/reference-case.ts",
  "instrumentation.ts",
  "instrumentation-client.ts",
  "proxy.ts",
  "next.config.mjs",
  "postcss.config.mjs",
  "tailwind.config.ts",
  "tsconfig.json",
  "package-lock.json",
  ".env",
];

/** Builds the workers and the app unless they were built from exactly these sources. */
export async function ensureBuild({ env = process.env } = {}) {
  const fingerprint = fingerprintOf(INPUTS);
  if (existsSync(".next/BUILD_ID") && readStamp() === fingerprint) return false;
  await buildWorkers({ env });
  await must(
    "The engine could not be measured against the reference data; the reason stands above.",
    runScript("scripts/make-validation.ts", { env, quiet: true }),
  );
  console.log("Building the app (about a minute, only when its sources changed) …");
  await must(
    "The app could not be built; the reason stands above.",
    runNode(["node_modules/next/dist/bin/next", "build"], {
      env: { ...env, NODE_ENV: "production" },
      quiet: true,
    }),
  );
  mkdirSync(path.dirname(STAMP), { recursive: true });
  writeFileSync(STAMP, fingerprint);
  return true;
}

/** Bundles the worker threads' entry points. */
export async function buildWorkers({ env = process.env } = {}) {
  if (!existsSync("scripts/build-workers.mjs")) return;
  await must(
    "The workers could not be built; the reason stands above.",
    runNode(["scripts/build-workers.mjs"], { env, quiet: true }),
  );
}

function readStamp() {
  return existsSync(STAMP) ? readFileSync(STAMP, "utf8") : null;
}

function fingerprintOf(inputs) {
  const hash = createHash("sha256").update(process.versions.node);
  for (const file of inputs.filter((input) => existsSync(input)).flatMap(filesUnder)) {
    hash.update(file).update("\0").update(readFileSync(file)).update("\0");
  }
  return hash.digest("hex");
}

function filesUnder(input) {
  if (!statSync(input).isDirectory()) return [input];
  return readdirSync(input)
    .sort()
    .flatMap((name) => filesUnder(`${input}/${name}`));
}
