/**
 * Starts Ringfence from a bare checkout: installs, makes secrets, migrates, seeds the demo, builds, serves.
 * Each step is skipped when there is nothing to do. Uses nothing but Node, for at first there is nothing else.
 *
 *     npm start            serve what is built         PORT, HOST, BASE_URL, DATA_DIR, DATABASE_URL, DEMO=0
 *     npm run dev          serve while editing
 */
import { existsSync, rmSync, writeFileSync } from "node:fs";
import path from "node:path";
import { buildWorkers, ensureBuild } from "./setup/build.mjs";
import { makeDemoAccounts, readDemoAccounts } from "./setup/demo-accounts.mjs";
import { checkNode, ensurePackages } from "./setup/packages.mjs";
import { must, runScript, SetupError } from "./setup/run.mjs";
import { checkPort, serve } from "./setup/server.mjs";
import { childEnvironment, readSettings } from "./setup/settings.mjs";

process.chdir(path.resolve(import.meta.dirname, ".."));

try {
  process.exitCode = await start(process.argv.includes("--dev"));
} catch (error) {
  if (!(error instanceof SetupError)) throw error;
  console.error(error.message);
  process.exitCode = 1;
}

async function start(dev) {
  checkNode();
  const settings = readSettings();
  await checkPort(settings.port, settings.host);
  await ensurePackages();

  await must(
    "The database could not be brought up to date; the reason stands above.",
    runScript("scripts/db-migrate.ts", { env: childEnvironment(settings, { demo: false }), quiet: true }),
  );
  await seedDemo(settings);
  const accounts = settings.demoWanted ? readDemoAccounts(settings.demoFile) : [];
  const env = childEnvironment(settings, { demo: accounts.length > 0 });
  if (!dev) await ensureBuild({ env });

  return serve({
    mode: dev ? "dev" : "start",
    port: settings.port,
    host: settings.host,
    env: dev ? env : { ...env, NODE_ENV: "production" },
    onReady: () => announce(settings, accounts),
  });
}

/**
 * Fills a new database with the demo team. Should that be cut short, the half-made database goes, with its
 * passwords, and the next start makes it anew.
 */
async function seedDemo(settings) {
  const script = "scripts/seed-demo.ts";
  if (!settings.fresh || !settings.demoWanted || !existsSync(script)) return;
  console.log("Making the demo team …");
  const env = childEnvironment(settings, { demo: true });
  // The demo's runs are worked by the same threads as everybody's.
  await buildWorkers({ env });
  writeFileSync(settings.seedingMark, "");
  makeDemoAccounts(settings.demoFile);
  await must(
    "The demo data could not be made; the reason stands above. Start with DEMO=0 to do without.",
    runScript(script, { env, quiet: true }),
  );
  rmSync(settings.seedingMark);
}

function announce(settings, accounts) {
  const lines = ["", `Ringfence is at ${settings.url}`];
  if (accounts.length > 0) {
    lines.push("", "Demo accounts (made for this installation; also offered on the sign-in page):");
    for (const { role, email, password } of accounts) {
      lines.push(`  ${role.padEnd(13)} ${email.padEnd(30)} ${password}`);
    }
  }
  lines.push(
    "",
    process.env.SMTP_URL
      ? "Mail goes out over SMTP."
      : settings.local
        ? `No mail leaves this computer (SMTP_URL is not set): read it at ${settings.url}/dev/outbox`
        : "SMTP_URL is not set, so no mail is sent. Nobody can confirm an address until it is.",
    "",
  );
  console.log(lines.join("\n"));
}
