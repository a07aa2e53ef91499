/** A logarithmic axis of errors as shares, from 10⁻¹⁰ to 1. */
const DECADES = 10;

/** Where an error lies on the axis, 0 at 10⁻¹⁰ or less, 1 at one. */
export function placeOf(error: number): number {
  if (!(error > 0)) return 0;
  return Math.min(1, Math.max(0, (Math.log10(error) + DECADES) / DECADES));
}

/** "0.012 %" from a millionth on, "2·10⁻⁹" below. */
export function errorText(error: number): string {
  if (error === 0) return "0";
  if (error < 1e-6) {
    const [digits, power] = error.toExponential(0).split("e-");
    return `${digits}·10⁻${[...(power ?? "")].map((digit) => "⁰¹²³⁴⁵⁶⁷⁸⁹"[Number(digit)]).join("")}`;
  }
  return `${Number((error * 100).toPrecision(2))}\u2009%`;
}
