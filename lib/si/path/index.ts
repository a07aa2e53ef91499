export * from "./types";
export { PathNetwork, RAMP_SHARE, type CornerNetwork, type PathProbe } from "./network";
export { cannotSimulate } from "./simulable";
export { mainSection, PathTrace, type Route, type RouteStep } from "./trace";
