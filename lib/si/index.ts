export * from "./errors";
export * from "./units";
export * from "./network";
