/** The import table of the architecture: who may know whom. */

/** Everything of ours that a folder may not import, given what it may. */
function mayOnlyImport(from, allowed, { name = from, packages } = {}) {
  const rules = [
    {
      name: `${name.replaceAll("/", "-")}-knows-only-its-kin`,
      severity: "error",
      from: { path: `^${from}/` },
      to: {
        path: "^(lib|components|app|scripts|tests)/",
        pathNot: [from, ...allowed].map((folder) => `^${folder}/`),
      },
    },
  ];
  if (packages) {
    rules.push({
      name: `${name.replaceAll("/", "-")}-packages`,
      severity: "error",
      from: { path: `^${from}/` },
      to: { dependencyTypes: ["npm", "npm-dev", "core"], pathNot: packages },
    });
  }
  return rules;
}

const pure = ["lib/si", "lib/schemas"];
const shown = [...pure, "lib/formats", "lib/drawings"];
const stored = [...pure, "lib/resolve", "lib/db"];

module.exports = {
  forbidden: [
    {
      name: "no-cycles",
      severity: "error",
      from: {},
      to: { circular: true, viaOnly: { dependencyTypesNot: ["type-only"] } },
    },
    {
      name: "no-unresolved",
      severity: "error",
      from: {},
      to: { couldNotResolve: true, pathNot: "^(server-only|bun:|cloudflare:)" },
    },
    {
      name: "engine-imports-nothing-but-decimals-in-units",
      severity: "error",
      from: { path: "^lib/si/", pathNot: "^lib/si/units/" },
      to: { pathNot: "^lib/si/" },
    },
    {
      name: "units-import-decimals-only",
      severity: "error",
      from: { path: "^lib/si/units/" },
      to: { pathNot: "^(lib/si/|node_modules/decimal\\.js/)" },
    },
    ...mayOnlyImport("lib/schemas", ["lib/si"], { packages: "^node_modules/zod/" }),
    ...mayOnlyImport("lib/resolve", [...pure, "lib/formats"]),
    ...mayOnlyImport("lib/formats", pure),
    ...mayOnlyImport("lib/drawings", pure),
    ...mayOnlyImport("lib/client", [...pure, "lib/formats", "lib/resolve"]),
    ...mayOnlyImport("components", [...shown, "lib/resolve", "lib/client"]),
    ...mayOnlyImport("lib/db", [...pure, "lib/resolve"]),
    ...mayOnlyImport("lib/auth", [...stored, "lib/email"]),
    ...mayOnlyImport("lib/email", stored),
    ...mayOnlyImport("lib/reports", [...stored, "lib/formats", "lib/drawings"]),
    ...mayOnlyImport("lib/jobs", [...stored, "lib/formats", "lib/drawings"]),
    {
      name: "pages-never-touch-the-database-package",
      severity: "error",
      from: { path: "^(app|components|lib/client)/" },
      to: { path: "^node_modules/(drizzle-orm|@libsql)/" },
    },
    {
      name: "nothing-imports-pages",
      severity: "error",
      from: { path: "^(lib|components|scripts)/" },
      to: { path: "^app/" },
    },
    {
      name: "no-test-code-in-the-product",
      severity: "error",
      from: { path: "^(app|components|lib)/" },
      to: { path: "^(tests|scripts)/" },
    },
  ],
  options: {
    doNotFollow: { path: "node_modules" },
    exclude: { path: "^(\\.next|node_modules/.*/node_modules)" },
    tsConfig: { fileName: "tsconfig.json" },
    tsPreCompilationDeps: true,
    enhancedResolveOptions: {
      exportsFields: ["exports"],
      conditionNames: ["react-server", "import", "node", "default", "types"],
      mainFields: ["module", "main", "types"],
    },
  },
};
