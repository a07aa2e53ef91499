import { existsSync, readFileSync } from "node:fs";
import { must, run, runNode, SetupError } from "./run.mjs";

const OLDEST_NODE = [20, 11];

/** Refuses a Node that is too old, before anything fails in a less readable way. */
export function checkNode() {
  const [major = 0, minor = 0] = process.versions.node.split(".").map(Number);
  const [needMajor, needMinor] = OLDEST_NODE;
  if (major < needMajor || (major === needMajor && minor < needMinor)) {
    throw new SetupError(
      `Ringfence needs Node ${needMajor}.${needMinor} or later; this is ${process.versions.node}. Install a later one and try again.`,
    );
  }
}

/** Installs the packages of the lock file unless exactly those are there. */
export async function ensurePackages() {
  if (packagesAreCurrent()) return;
  console.log("Installing packages (a minute or two, the first time only) …");
  const npm = process.env.npm_execpath;
  const args = ["ci", "--no-audit", "--no-fund"];
  const installing = npm?.endsWith(".js")
    ? runNode([npm, ...args], { quiet: true })
    : run(process.platform === "win32" ? "npm.cmd" : "npm", args, { quiet: true });
  await must(
    "The packages could not be installed. Check the connection to the package registry and try again.",
    installing,
  );
}

/** Compares the lock with npm's own record of what it installed last; packages of other platforms may be absent. */
function packagesAreCurrent() {
  const record = "node_modules/.package-lock.json";
  if (!existsSync(record)) return false;
  const wanted = JSON.parse(readFileSync("package-lock.json", "utf8")).packages;
  const installed = JSON.parse(readFileSync(record, "utf8")).packages;
  return Object.entries(wanted).every(
    ([name, entry]) => name === "" || entry.optional || installed[name]?.version === entry.version,
  );
}
