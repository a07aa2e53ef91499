export { measureEdge, type EdgeMeasures, type EdgeWindow } from "./measure-edge";
export { measureExcursion, type Excursion } from "./measure-excursion";
export { bitWave, patternResponse, pseudoRandomBits } from "./bit-pattern";
export { patternEye, type PatternEye, type PatternEyeOptions } from "./pattern-eye";
export { pulseResponse, worstEye, type WorstEye } from "./worst-eye";
export type { Waveform } from "./waveform";
