import {
  requirePermittivity,
  requirePositive,
  requireNotNegative,
  requireSensible,
  type FormulaNote,
  type SingleLineResult,
} from "./formula";

/** The logarithmic forms in circulation since IPC-2141, with their printed constants; rough, shown for comparison only. */

const SOURCE = "Trade formula in the style of IPC-2141, from memory";

export const tradeMicrostripNote: FormulaNote = {
  id: "ipc2141-microstrip",
  title: "Trade logarithm, outer",
  range: "width 0.1 to 2 heights, Dk 1 to 15; up to 10 % off inside it",
  source: `${SOURCE}: 87/√(εr+1.41) ln(5.98h/(0.8w+t))`,
};
export const tradeEmbeddedNote: FormulaNote = {
  id: "ipc2141-embedded-microstrip",
  title: "Trade logarithm, outer under a cover",
  range: "width 0.1 to 2 heights; two variants circulate, each about 10 % off",
  source: `${SOURCE}: εr′ = εr (1 − exp(−1.55 H/h)) in 60/√εr′ or 87/√(εr′+1.41)`,
};
export const tradeStriplineNote: FormulaNote = {
  id: "ipc2141-stripline",
  title: "Trade logarithm, inner",
  range: "width below 0.35 (spacing − copper), copper below a quarter of the spacing; up to 9 % off outside",
  source: `${SOURCE}: 60/√εr ln(1.9b/(0.8w+t))`,
};
export const tradeOffsetNote: FormulaNote = {
  id: "offset-stripline-approximations",
  title: "Trade logarithm, inner off-centre",
  range: "width below 0.35 of twice the nearer height; two variants circulate, up to 16 % off",
  source: `${SOURCE}: 80/√εr ln(1.9(2h1+t)/(0.8w+t)) (1 − h1/4H)`,
};
export const tradeDifferentialMicrostripNote: FormulaNote = {
  id: "ipc2141-differential-microstrip",
  title: "Trade logarithm, outer pair",
  range: "width 0.1 to 2 heights, Dk 1 to 15; up to 11 % off",
  source: `${SOURCE}: 2 Z0 (1 − 0.48 exp(−0.96 s/h))`,
};
export const tradeDifferentialStriplineNote: FormulaNote = {
  id: "ipc2141-differential-stripline",
  title: "Trade logarithm, inner pair",
  range: "width below 0.35 (spacing − copper), copper below a quarter of the spacing",
  source: `${SOURCE}: 2 Z0 (1 − 0.347 exp(−2.9 s/b))`,
};

/** Outer trace; width w, height h, thickness t [m], er [1] → Z0 [Ω]. Throws DomainError where the logarithm is not positive. */
export function tradeMicrostrip(
  width: number,
  height: number,
  thickness: number,
  er: number,
): SingleLineResult {
  check(width, height, thickness, er);
  const impedance = (87 / Math.sqrt(er + 1.41)) * Math.log((5.98 * height) / (0.8 * width + thickness));
  const u = width / height;
  return {
    impedance: requireSensible(impedance, tradeMicrostripNote.title),
    inRange: u > 0.1 && u < 2 && er < 15,
  };
}

/** Outer trace under a flat cover of the same material; `top` is from plane to the cover's surface [m]. Both variants [Ω]. */
export function tradeEmbeddedMicrostrip(
  width: number,
  height: number,
  top: number,
  thickness: number,
  er: number,
): { form60: SingleLineResult; form87: SingleLineResult } {
  check(width, height, thickness, er);
  requirePositive(top, "layers", "height of the cover");
  const covered = er * (1 - Math.exp((-1.55 * top) / height));
  const logarithm = Math.log((5.98 * height) / (0.8 * width + thickness));
  const inRange = width / height > 0.1 && width / height < 2;
  const result = (impedance: number): SingleLineResult => ({
    impedance: requireSensible(impedance, tradeEmbeddedNote.title),
    inRange,
  });
  return {
    form60: result((60 / Math.sqrt(covered)) * logarithm),
    form87: result((87 / Math.sqrt(covered + 1.41)) * logarithm),
  };
}

/** Centred inner trace; spacing is plane to plane [m]. Throws DomainError where the logarithm is not positive. */
export function tradeStripline(
  width: number,
  spacing: number,
  thickness: number,
  er: number,
): SingleLineResult {
  check(width, spacing, thickness, er);
  const impedance = (60 / Math.sqrt(er)) * Math.log((1.9 * spacing) / (0.8 * width + thickness));
  return {
    impedance: requireSensible(impedance, tradeStriplineNote.title),
    effectivePermittivity: er,
    inRange: width / (spacing - thickness) < 0.35 && thickness < 0.25 * spacing,
  };
}

/** Off-centre inner trace; nearer and farther are the heights to the planes [m]. Variants by what H is. */
export function tradeOffsetStripline(
  width: number,
  nearer: number,
  farther: number,
  thickness: number,
  er: number,
): { total: SingleLineResult; farther: SingleLineResult } {
  check(width, nearer, thickness, er);
  requirePositive(farther, "layers", "height to the farther plane");
  const spacing = 2 * nearer + thickness;
  const head = (80 / Math.sqrt(er)) * Math.log((1.9 * spacing) / (0.8 * width + thickness));
  const inRange = width / (2 * nearer) < 0.35 && thickness < 0.25 * spacing;
  const result = (height: number): SingleLineResult => ({
    impedance: requireSensible(head * (1 - nearer / (4 * height)), tradeOffsetNote.title),
    effectivePermittivity: er,
    inRange,
  });
  return { total: result(nearer + farther + thickness), farther: result(farther) };
}

/** Z_diff ÷ (2 Z0) of an outer pair by gap and height [m]. */
export function tradeMicrostripPairFactor(gap: number, height: number): number {
  return 1 - 0.48 * Math.exp((-0.96 * gap) / height);
}

/** Z_diff ÷ (2 Z0) of an inner pair by gap and plane distance [m]. */
export function tradeStriplinePairFactor(gap: number, spacing: number): number {
  return 1 - 0.347 * Math.exp((-2.9 * gap) / spacing);
}

function check(width: number, height: number, thickness: number, er: number): void {
  requirePositive(width, "width", "width");
  requirePositive(height, "height", "height");
  requireNotNegative(thickness, "thickness", "copper thickness");
  requirePermittivity(er);
}
