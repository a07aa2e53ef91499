import { existsSync } from "node:fs";
import path from "node:path";
import { run } from "./run.mjs";

const NAMES = ["chromium", "chromium-browser", "google-chrome", "google-chrome-stable", "chrome"];

const USUAL_PLACES = [
  "/Applications/Google Chrome.app/Contents/MacOS/Google Chrome",
  "/Applications/Chromium.app/Contents/MacOS/Chromium",
  "C:/Program Files/Google/Chrome/Application/chrome.exe",
  "C:/Program Files (x86)/Google/Chrome/Application/chrome.exe",
  "/snap/bin/chromium",
];

/** The browser that the browser tests drive, or null: CHROMIUM_PATH, then the path, then the usual places. */
export function findChromium() {
  const given = process.env.CHROMIUM_PATH;
  if (given) return existsSync(given) ? given : null;
  const folders = (process.env.PATH ?? "").split(path.delimiter).filter(Boolean);
  const onPath = NAMES.flatMap((name) => folders.map((folder) => path.join(folder, name)));
  return [...onPath, ...USUAL_PLACES].find((place) => existsSync(place)) ?? null;
}

/** As findChromium, after installing Debian's where there is none and this user may. */
export async function ensureChromium() {
  const found = findChromium();
  if (found || process.env.CHROMIUM_PATH) return found;
  const mayInstall = process.getuid?.() === 0 && existsSync("/usr/bin/apt-get");
  if (!mayInstall) return null;
  console.log("Installing Chromium for the browser tests …");
  const env = { ...process.env, DEBIAN_FRONTEND: "noninteractive" };
  await run("apt-get", ["update"], { env, quiet: true });
  const { code } = await run("apt-get", ["install", "-y", "--no-install-recommends", "chromium"], {
    env,
    quiet: true,
  });
  return code === 0 ? findChromium() : null;
}
