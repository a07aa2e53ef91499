import { z } from "zod";
import { origin } from "./common";
import { decimalText, positiveLength } from "./quantity";

const percent = decimalText.refine((t) => Number(t) >= 0 && Number(t) <= 50, "Write 0 to 50 %.");

/** What the fabricator's process holds: tolerances as ± percent, and what it can still etch. */
export const processDoc = z.object({
  /** finished foot width */
  widthPercent: percent,
  /** finished copper thickness, where a layer names no own tolerance */
  copperPercent: percent,
  /** thickness of cores and prepregs, likewise */
  dielectricPercent: percent,
  dkPercent: percent,
  maskPercent: percent,
  distribution: z.enum(["normal", "uniform"]),
  /** null: by finished copper, common practice */
  minWidth: positiveLength.nullable(),
  minGap: positiveLength.nullable(),
  origin,
});
export type ProcessDoc = z.infer<typeof processDoc>;

/** Until a fabricator's own are entered; common practice, no source. */
export const usualProcess: ProcessDoc = {
  widthPercent: "10",
  copperPercent: "10",
  dielectricPercent: "10",
  dkPercent: "5",
  maskPercent: "30",
  distribution: "normal",
  minWidth: null,
  minGap: null,
  origin: "assumed",
};
