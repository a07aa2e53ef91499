export * from "./errors";
export * from "./units";
export * from "./network";
export * from "./formulas";
export * from "./cross-section";
export * from "./physical-constants";
export * from "./line";
