import { microseconds, type BenchSection } from "../section";

/** A fixed piece of arithmetic: divide other figures by it to compare machines. */
export const calibration: BenchSection = {
  title: "Calibration",
  run: () => {
    const history = new Float64Array(100_000);
    let kept = 0;
    const loop = () => {
      let v = 0;
      for (let i = 4; i < history.length; i++) {
        v = 0.9 * v + 0.1 * (history[i - 4]! + 1);
        history[i] = v;
      }
      kept += v;
    };
    const value = microseconds(loop);
    return [
      {
        what: "100,000 steps of a recursion with a delay",
        value,
        unit: "µs",
        note: kept > 0 ? "" : "no result",
      },
    ];
  },
};
