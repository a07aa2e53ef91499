/**
 * Runs every check in sequence and stops at the first that fails. The last line is `N passed, N failed`.
 * Uses nothing but Node to begin with: what the checks need is installed first.
 */
import { existsSync, mkdirSync, readFileSync, rmSync } from "node:fs";
import path from "node:path";
import { buildWorkers, ensureBuild } from "./setup/build.mjs";
import { ensureChromium } from "./setup/chromium.mjs";
import { checkNode, ensurePackages } from "./setup/packages.mjs";
import { runNode, SetupError } from "./setup/run.mjs";

process.chdir(path.resolve(import.meta.dirname, ".."));

const REPORTS = ".cache/reports";
const UNIT_REPORT = `${REPORTS}/unit.json`;
const BROWSER_REPORT = `${REPORTS}/browser.json`;
const inCi = process.env.CI === "true";
const env = { ...process.env, NEXT_TELEMETRY_DISABLED: "1" };

const counts = { passed: 0, failed: 0 };

try {
  checkNode();
  rmSync(REPORTS, { recursive: true, force: true });
  mkdirSync(REPORTS, { recursive: true });
  await ensurePackages();
  process.exitCode = (await runAll()) ? 0 : 1;
} catch (error) {
  if (!(error instanceof SetupError)) throw error;
  console.error(error.message);
  counts.failed += 1;
  process.exitCode = 1;
}
console.log(`${counts.passed} passed, ${counts.failed} failed`);

async function runAll() {
  const steps = [
    ["format", () => tool("prettier/bin/prettier.cjs", ["--check", "--log-level", "warn", "."])],
    ["route types", () => tool("next/dist/bin/next", ["typegen"], { quiet: true })],
    ["lint", () => tool("eslint/bin/eslint.js", [".", "--max-warnings", "0"])],
    ["types", () => tool("typescript/bin/tsc", ["--noEmit"])],
    ["types of the engine", () => tool("typescript/bin/tsc", ["--noEmit", "-p", "lib/si/tsconfig.json"])],
    ["imports", () => runNpmScript("imports")],
    ["unused code", () => runNpmScript("knip")],
    ["migrations", () => runNpmScript("db:check")],
    ["workers", async () => (await buildWorkers({ env }), 0)],
    ["unit tests", unitTests],
    ["build", async () => (await ensureBuild({ env }), 0)],
    ["browser tests", browserTests],
  ];
  for (const [name, step] of steps) {
    const begun = performance.now();
    console.log(`\n— ${name}`);
    const before = counts.failed;
    const code = await step();
    const seconds = ((performance.now() - begun) / 1000).toFixed(1);
    console.log(`— ${name}: ${code === 0 ? "done" : "failed"} in ${seconds} s`);
    if (code !== 0) {
      // A step that is no test, or died before its report, still counts as a failure.
      if (counts.failed === before) counts.failed += 1;
      return false;
    }
  }
  console.log("");
  return true;
}

async function unitTests() {
  const code = await tool("vitest/vitest.mjs", [
    "run",
    "--reporter=default",
    "--reporter=json",
    `--outputFile.json=${UNIT_REPORT}`,
  ]);
  const report = readReport(UNIT_REPORT);
  counts.passed += report?.numPassedTests ?? 0;
  counts.failed += report?.numFailedTests ?? 0;
  return code;
}

async function browserTests() {
  const chromium = await ensureChromium();
  if (!chromium) {
    console.log(
      "No Chromium or Chrome was found and none could be installed: the browser tests are skipped. " +
        "Install one, or set CHROMIUM_PATH to it.",
    );
    return inCi ? 1 : 0;
  }
  const code = await tool("@playwright/test/cli.js", ["test"], {
    env: { ...env, CHROMIUM_PATH: chromium, PLAYWRIGHT_JSON_OUTPUT_FILE: BROWSER_REPORT },
  });
  const stats = readReport(BROWSER_REPORT)?.stats;
  counts.passed += (stats?.expected ?? 0) + (stats?.flaky ?? 0);
  counts.failed += stats?.unexpected ?? 0;
  return code;
}

async function tool(file, args, options = {}) {
  const { code, output } = await runNode([`node_modules/${file}`, ...args], { env, ...options });
  if (code !== 0 && output) console.error(output);
  return code;
}

/** Runs a script of package.json, so that its command is written in one place. */
async function runNpmScript(name) {
  const command = JSON.parse(readFileSync("package.json", "utf8")).scripts[name];
  const [bin, ...args] = command.split(" ");
  const { code } = await runNode([binOf(bin), ...args], { env });
  return code;
}

/** The file behind a package's command; links in node_modules/.bin are shell scripts on some systems. */
function binOf(bin) {
  const owner = bin === "depcruise" ? "dependency-cruiser" : bin;
  const entry = JSON.parse(readFileSync(`node_modules/${owner}/package.json`, "utf8")).bin;
  return path.join("node_modules", owner, typeof entry === "string" ? entry : entry[bin]);
}

function readReport(file) {
  return existsSync(file) ? JSON.parse(readFileSync(file, "utf8")) : null;
}
