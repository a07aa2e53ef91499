export {
  simulate,
  type EndWaves,
  type SectionWaves,
  type SimulateOptions,
  type Simulation,
} from "./simulate";
export type { Accuracy } from "./step-size";
export { bounceTable, type Bounce } from "./bounce-table";
export { wavesAlong, type WavesAt } from "./along-line";
export { nodeSpectrum, standingWave, type NodeSpectrum, type StandingWavePoint } from "./standing-wave";
