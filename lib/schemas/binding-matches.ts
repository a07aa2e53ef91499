/** Pins of one part that lack the same thing. */
export interface PinWithoutModel {
  reference: string;
  partNumber: string;
  /** "role": nobody says whether they drive or receive */
  needs: "driver" | "receiver" | "role";
  pins: number;
  /** A few of them: "U7.3 on SD_DQ4". */
  examples: string[];
}

/** What the bindings of a revision reach on its board. */
export interface BindingMatches {
  /** pins that could drive or receive */
  pins: number;
  /** by the position of the binding: pins that its patterns fit, and those of them that no earlier one takes */
  lines: { fits: number; takes: number }[];
  pinsWithoutModel: number;
  withoutModel: PinWithoutModel[];
}

/** With the version of the list that was counted. */
export type CountedBindings = BindingMatches & { version: number };
