export * from "./errors";
export * from "./units";
