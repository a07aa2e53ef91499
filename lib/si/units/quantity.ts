/** What a person typed: a decimal number as text, and the unit it was typed in. The truth; SI numbers derive from it. */
export interface Quantity {
  /** Decimal text, such as "0.127", "-3", "1e-9": never NaN or infinite. */
  value: string;
  unit: string;
}

export const dimensions = [
  "length",
  "time",
  "resistance",
  "capacitance",
  "inductance",
  "voltage",
  "current",
  "frequency",
  "bitRate",
  "ratio",
  "power",
  "delayPerLength",
  "slewRate",
  "voltageTime",
] as const;

/** What kind of thing a quantity is. */
export type Dimension = (typeof dimensions)[number];
