import { fitBoard, type BoardFit } from "./fit";
import type { Measurements } from "./measurement";
import { boardInTime, boardScattering, type BoardName } from "./simulation";
import { stepResponse } from "./step-response";

export interface MeasuredLinesFigures {
  origin: string;
  made: string;
  fit: BoardFit;
  steps: StepFigures[];
}

/** How a step response compares with the measured one, as shares of the step. */
export interface StepFigures {
  board: BoardName;
  wave: "reflected" | "passing";
  /** lines over frequency, then the step from them; lines in time, by the network engine */
  method: "frequency" | "time";
  rms: number;
  worst: number;
}

const WINDOW = { from: -0.2e-9, to: 3.8e-9, step: 10e-12 };

/** Everything the measured lines say about the engine. */
export function measuredLinesFigures(measured: Measurements): MeasuredLinesFigures {
  const fit = fitBoard(measured);
  const count = Math.round((WINDOW.to - WINDOW.from) / WINDOW.step);
  const times = Array.from({ length: count + 1 }, (_, i) => WINDOW.from + i * WINDOW.step);
  const steps = (["open", "stepped"] as const).flatMap((board) => {
    const data = measured[board];
    const scattering = boardScattering(board, fit, data.frequencies);
    const inTime = boardInTime(board, fit, times);
    const compared = (wave: StepFigures["wave"], row: number): StepFigures[] => {
      const truth = stepResponse(data, row, 0, times);
      const time = wave === "reflected" ? inTime.reflected : inTime.passing;
      return [
        { board, wave, method: "frequency", ...misses(stepResponse(scattering, row, 0, times), truth) },
        ...(time ? [{ board, wave, method: "time" as const, ...misses(time, truth) }] : []),
      ];
    };
    return [...compared("reflected", 0), ...(board === "stepped" ? compared("passing", 1) : [])];
  });
  return {
    origin:
      "Derived from measured microstrips on FR-4, 1 MHz to 10 GHz, that an open radio-frequency library publishes as examples under the BSD-3 licence; the measurements themselves are not part of this project. Widths, lengths and the nominal substrate are as stated with them; the open line's length is the one its own file names.",
    made: "scripts/make-measured-lines.ts",
    fit,
    steps,
  };
}

function misses(values: Float64Array, truth: Float64Array): { rms: number; worst: number } {
  const miss = Array.from(values, (value, i) => Math.abs(value - truth[i]!));
  return {
    rms: Math.sqrt(miss.reduce((sum, value) => sum + value * value, 0) / miss.length),
    worst: Math.max(...miss),
  };
}
