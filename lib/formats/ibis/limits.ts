import { byProcess, type IbisCorner } from "./corners";
import type { IbisModel } from "./document";

/** What a part asks of its signal [V, s, F, Ω]; null where its file does not say. */
export interface IbisLimits {
  vil: number | null;
  vih: number | null;
  vilAc: number | null;
  vihAc: number | null;
  /** where timing is measured, of a driver into its test load */
  vmeas: number | null;
  /** test load for timing */
  cref: number | null;
  rref: number | null;
  vref: number | null;
  /** absolute volts the pin may reach at any time, above and below */
  staticHigh: number | null;
  staticLow: number | null;
  /** absolute volts it may reach for `dynamicTime` */
  dynamicHigh: number | null;
  dynamicLow: number | null;
  dynamicTime: number | null;
  /** hysteresis: levels of the rising and the falling edge */
  hysteresis: {
    risingHigh: number | null;
    risingLow: number | null;
    fallingHigh: number | null;
    fallingLow: number | null;
  };
  /** least differential swing, AC and DC */
  differentialAc: number | null;
  differentialDc: number | null;
  /** where each value that is not null stands, by its name here */
  lines: Partial<Record<string, number>>;
}

/** Names in [Model Spec], [Receiver Thresholds] and below [Model], in order of precedence. */
const LEVELS = {
  vil: { threshold: "vinl_dc", spec: "vinl", own: "vinl" },
  vih: { threshold: "vinh_dc", spec: "vinh", own: "vinh" },
  vilAc: { threshold: "vinl_ac", spec: null, own: null },
  vihAc: { threshold: "vinh_ac", spec: null, own: null },
  vmeas: { threshold: null, spec: "vmeas", own: "vmeas" },
  cref: { threshold: null, spec: "cref", own: "cref" },
  rref: { threshold: null, spec: "rref", own: "rref" },
  vref: { threshold: null, spec: "vref", own: "vref" },
  staticHigh: { threshold: null, spec: "s_overshoot_high", own: null },
  staticLow: { threshold: null, spec: "s_overshoot_low", own: null },
  dynamicHigh: { threshold: null, spec: "d_overshoot_high", own: null },
  dynamicLow: { threshold: null, spec: "d_overshoot_low", own: null },
  dynamicTime: { threshold: null, spec: "d_overshoot_time", own: null },
} as const;

/**
 * Limits of a model for the rules. [Receiver Thresholds] come before [Model Spec], that before the lines below [Model],
 * as the standard ranks them. Levels of [Receiver Thresholds] count from its Vth.
 *
 * The standard has Vinl 0.8 V and Vinh 2.0 V stand in where a file is silent. Here that is no data: a limit nobody gave
 * would pass or fail nets for no reason.
 */
export function ibisLimits(model: IbisModel, corner: IbisCorner = "typical"): IbisLimits {
  const lines: IbisLimits["lines"] = {};
  const vth = model.thresholds.vth?.value ?? null;
  const find = (name: keyof typeof LEVELS): number | null => {
    const { threshold, spec, own } = LEVELS[name];
    const level = threshold === null ? undefined : model.thresholds[threshold];
    if (level && vth !== null) {
      lines[name] = level.line;
      return vth + level.value;
    }
    const specified = spec === null ? undefined : model.spec[spec];
    const value = byProcess(specified, corner);
    if (specified && value !== null) {
      lines[name] = specified.line;
      return value;
    }
    const plain = own === null ? undefined : model.levels[own];
    if (!plain) return null;
    lines[name] = plain.line;
    return plain.value;
  };
  const spec = (name: string) => byProcess(model.spec[name], corner);
  return {
    vil: find("vil"),
    vih: find("vih"),
    vilAc: find("vilAc"),
    vihAc: find("vihAc"),
    vmeas: find("vmeas"),
    cref: find("cref"),
    rref: find("rref"),
    vref: find("vref"),
    staticHigh: find("staticHigh"),
    staticLow: find("staticLow"),
    dynamicHigh: find("dynamicHigh"),
    dynamicLow: find("dynamicLow"),
    dynamicTime: find("dynamicTime"),
    hysteresis: {
      risingHigh: spec("vinh+"),
      risingLow: spec("vinl+"),
      fallingHigh: spec("vinh-"),
      fallingLow: spec("vinl-"),
    },
    differentialAc: model.thresholds.vdiff_ac?.value ?? null,
    differentialDc: model.thresholds.vdiff_dc?.value ?? null,
    lines,
  };
}
