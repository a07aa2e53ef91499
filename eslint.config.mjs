import next from "eslint-config-next";
import nextTypescript from "eslint-config-next/typescript";
import tseslint from "typescript-eslint";

export default tseslint.config(
  {
    ignores: [
      "node_modules/**",
      ".next/**",
      "dist/**",
      "data/**",
      "drizzle/**",
      ".cache/**",
      "coverage/**",
      "next-env.d.ts",
      "tests/reference/**",
      "playwright-report/**",
      "test-results/**",
    ],
  },
  ...next,
  ...nextTypescript,
  {
    files: ["**/*.{ts,tsx}"],
    extends: [tseslint.configs.recommendedTypeChecked],
    languageOptions: { parserOptions: { projectService: true, tsconfigRootDir: import.meta.dirname } },
    rules: {
      "@typescript-eslint/no-unused-vars": ["error", { argsIgnorePattern: "^_", varsIgnorePattern: "^_" }],
      "@typescript-eslint/consistent-type-imports": ["error", { fixStyle: "inline-type-imports" }],
      // Forms and effects hand promises to places that return nothing; the void operator is then noise.
      "@typescript-eslint/no-misused-promises": ["error", { checksVoidReturn: { attributes: false } }],
      // Interfaces ask for promises of things that need none.
      "@typescript-eslint/require-await": "off",
    },
  },
  {
    rules: {
      "no-console": ["error", { allow: ["warn", "error"] }],
      eqeqeq: ["error", "always", { null: "ignore" }],
      // Tables and virtual rows come from packages whose functions the compiler cannot remember.
      "react-hooks/incompatible-library": "off",
    },
  },
  {
    files: ["scripts/**", "tests/bench/**", "*.config.*"],
    rules: { "no-console": "off" },
  },
);
