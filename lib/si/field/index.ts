export { solveCrossSection } from "./solve-cross-section";
