export { neighbourSolver, solveCrossSection, type FieldParameters } from "./solve-cross-section";
