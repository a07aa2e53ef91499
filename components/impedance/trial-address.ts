import { createParser } from "nuqs";
import type { TrialChange } from "@/lib/resolve/trial-stackup";

/** Micrometres in the address, metres in the page: "width=152.4". */
const micrometres = createParser({
  parse: (text) => {
    const value = Number(text);
    return text !== "" && value > 0 && value < 1e5 ? Number((value * 1e-6).toPrecision(12)) : null;
  },
  serialize: (metres: number) => String(Number((metres * 1e6).toPrecision(9))),
});

const permittivity = createParser({
  parse: (text) => {
    const value = Number(text);
    return value >= 1 && value <= 100 ? value : null;
  },
  serialize: (dk: number) => String(Number(dk.toPrecision(6))),
});

/** What is tried in the panel; absent: as class and stackup have it. */
export const trialParsers = {
  width: micrometres,
  gap: micrometres,
  below: micrometres,
  above: micrometres,
  dkBelow: permittivity,
  dkAbove: permittivity,
  mask: micrometres,
};

/** Width and gap as tried, and the changes of the layers around. */
export type TrialAddress = { width: number | null; gap: number | null } & TrialChange;

export const NO_TRIAL: TrialAddress = {
  width: null,
  gap: null,
  below: null,
  above: null,
  dkBelow: null,
  dkAbove: null,
  mask: null,
};
