/** The names of the palette's colours that drawings use; the page switches their values by theme. */
export type Ink =
  | "ink"
  | "ink-soft"
  | "copper"
  | "violet"
  | "pass"
  | "near"
  | "fail"
  | "waived"
  | "paper"
  | "sheet"
  | "rule-line";

/** The same colours on light paper, for files that leave the page (SVG, PNG, reports). */
export const LIGHT: Record<Ink, string> = {
  ink: "#1B1F2A",
  "ink-soft": "#5B6170",
  copper: "#A84A15",
  violet: "#5A45C6",
  pass: "#1F6F4E",
  near: "#8A5A00",
  fail: "#B3261E",
  waived: "#6B6478",
  paper: "#FAF8F3",
  sheet: "#FFFFFF",
  "rule-line": "#DFDACE",
};

/** Fills that are drawn as a pattern, so that they survive a black-and-white print. */
export const HATCHES = ["hatch-fail", "hatch-waived", "hatch-core", "hatch-soft"] as const;
export type Hatch = (typeof HATCHES)[number];

/** The lines of a hatch: colour, spacing, angle in degrees and weight in pixels. */
export const HATCH_LINES: Record<
  Hatch,
  { ink: Ink; spacing: number; angle: number; weight: number; opacity: number }
> = {
  "hatch-fail": { ink: "fail", spacing: 5, angle: 45, weight: 1.4, opacity: 0.7 },
  "hatch-waived": { ink: "waived", spacing: 5, angle: 45, weight: 1.2, opacity: 0.8 },
  "hatch-core": { ink: "ink-soft", spacing: 6, angle: 45, weight: 0.6, opacity: 0.3 },
  "hatch-soft": { ink: "ink-soft", spacing: 5, angle: -45, weight: 0.8, opacity: 0.45 },
};
