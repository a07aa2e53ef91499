export * from "./types";
export * from "./validate";
