import { mergeConfig, type ViteUserConfig } from "vitest/config";
import base from "./vitest.config";

/** The campaigns of which CI runs a slice: fuzzing, kills, sizes. */
const long: ViteUserConfig = {
  test: { include: ["tests/**/*.long.test.ts"], exclude: ["node_modules/**"], testTimeout: 3_600_000 },
};

export default mergeConfig({ ...base, test: { ...base.test, include: [], exclude: [] } }, long);
