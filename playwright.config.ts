import { defineConfig } from "@playwright/test";
import { findChromium } from "./scripts/setup/chromium.mjs";

const PORT = 3100;

export default defineConfig({
  testDir: "tests/e2e",
  outputDir: "test-results",
  workers: 2,
  timeout: 90_000,
  expect: { timeout: 10_000 },
  // A second try on a machine that stumbled; what fails twice is a fault. The report names what needed it.
  retries: process.env.CI === "true" ? 1 : 0,
  forbidOnly: process.env.CI === "true",
  reporter: [["list"], ...(process.env.PLAYWRIGHT_JSON_OUTPUT_FILE ? ([["json"]] as const) : [])],
  use: {
    baseURL: `http://localhost:${PORT}`,
    trace: "retain-on-failure",
    launchOptions: {
      executablePath: findChromium() ?? undefined,
      args: ["--no-sandbox", "--disable-dev-shm-usage"],
    },
  },
  projects: [
    { name: "wide", use: { viewport: { width: 1440, height: 900 }, colorScheme: "light" } },
    {
      name: "narrow, dark",
      // The story is long and changes what it works on: once is enough. Its screens are looked at by screens.spec.ts.
      testIgnore: "story.spec.ts",
      use: { viewport: { width: 390, height: 844 }, colorScheme: "dark", hasTouch: true },
    },
  ],
  webServer: {
    command: "node tests/support/serve-browser-tests.mjs",
    url: `http://localhost:${PORT}/sign-in`,
    reuseExistingServer: false,
    timeout: 300_000,
    stdout: "ignore",
    stderr: "pipe",
    gracefulShutdown: { signal: "SIGTERM", timeout: 10_000 },
    env: { PORT: String(PORT) },
  },
});
