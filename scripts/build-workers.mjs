// Bundles the worker threads' entry points: dist/workers/*.mjs. Plain ESM, engine included.
import { build } from "esbuild";
import { fileURLToPath } from "node:url";

const root = fileURLToPath(new URL("..", import.meta.url));

await build({
  absWorkingDir: root,
  entryPoints: { "check-worker": "lib/jobs/check-worker.ts" },
  outdir: "dist/workers",
  outExtension: { ".js": ".mjs" },
  bundle: true,
  platform: "node",
  target: "node20",
  format: "esm",
  sourcemap: "linked",
  alias: { "server-only": "./node_modules/server-only/empty.js", "@": root.replace(/[\\/]$/, "") },
  banner: {
    js: 'import { createRequire as __createRequire } from "node:module"; const require = __createRequire(import.meta.url);',
  },
  logLevel: "warning",
});
