/**
 * Version of the engine: part of every input hash and record. Raise the second number when a change moves
 * a result by more than its stated accuracy, the first when a quantity changes its meaning.
 */
export const engineVersion = "3.0";
