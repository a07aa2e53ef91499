export { neighbourSolver, solveCrossSection, type FieldParameters } from "./solve-cross-section";
export { fieldSolution, type Excitation, type FieldSolution } from "./field-solution";
export { equipotentials, type Equipotential, type FieldWindow } from "./equipotentials";
