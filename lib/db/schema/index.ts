export * from "./auth";
export * from "./project";
export * from "./material";
export * from "./net";
export * from "./run";
export * from "./review";
export * from "./release";
export * from "./ops";
