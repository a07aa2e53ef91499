export * from "./types";
export { mechanismTitles, ruleCatalogue } from "./catalogue";
export { checkImpedance, type ControlledLine } from "./check-impedance";
export { checkPath } from "./check-path";
export { allCorners, cornerName, driverSpeeds, impedanceSides, parseCorner } from "./corners";
export { defaultRuleSet, type DefaultRuleSetting } from "./defaults";
