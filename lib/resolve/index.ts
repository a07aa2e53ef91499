export { resolvePaths, type OutOfScopeNet, type ResolvedBoard } from "./resolve-paths";
export { controlledLines } from "./controlled-lines";
export { LineTable, type LineOnLayer } from "./line-table";
export { looksLikeRail, railVoltage } from "./rails";
export { stackupToSi } from "./stackup-to-si";
