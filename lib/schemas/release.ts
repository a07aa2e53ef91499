import { z } from "zod";
import { id, nameText } from "./common";

export const recipient = z.object({
  name: nameText(80),
  email: z.email().max(200),
  company: z.string().trim().max(120).default(""),
});
export const releaseInput = z.object({
  runId: id,
  title: nameText(120),
  /** Text on the impedance-control note. */
  remarks: z.string().trim().max(4000).default(""),
  recipients: z.array(recipient).min(1, "Name at least one recipient.").max(20),
});
export type ReleaseInput = z.infer<typeof releaseInput>;

/** One line of the impedance-control note: a structure on a layer, by its width. */
export interface NoteLine {
  line: number;
  layer: string;
  layerLineageId: string;
  kind: "single" | "differential";
  className: string[];
  /** finished foot width, as typed */
  width: { value: string; unit: string };
  gap: { value: string; unit: string } | null;
  targetOhms: number;
  tolerancePercent: number;
  predictedOhms: number | null;
  method: string;
  /** the published formula's value beside it; left out of notes from before it was stated */
  closedForm?: { ohms: number; title: string; inRange: boolean } | null;
  /** predicted share of production within the tolerance, and 0.5 to 99.5 % of it [Ω]; likewise */
  spread?: { yield: number; low: number; high: number; method: string } | null;
  references: string;
  /** how many routed nets use it; null when not known */
  routedNets: number | null;
}
export interface ImpedanceNote {
  project: string;
  revision: string;
  title: string;
  remarks: string;
  releasedAt: number;
  signedBy: string;
  team: string;
  totalThickness_m: number;
  stackup: {
    name: string;
    kind: string;
    material: string;
    thickness_m: number;
    dk: string | null;
    df: string | null;
    copper: string | null;
  }[];
  lines: NoteLine[];
  caution: string;
}

/** What stands in the way of a release, each with a way out. */
export interface ReleaseBlocker {
  kind:
    | "no run"
    | "stale run"
    | "unfinished run"
    | "nothing judged"
    | "lines"
    | "failures"
    | "no data"
    | "editor signs"
    | "flags";
  text: string;
  count: number | null;
}

/** A recipient's answer to a note: they have it, with a word if they like. */
export const acknowledgement = z.object({ words: z.string().trim().max(2000).default("") });
/** 32 random bytes, base64url: what a recipient's link holds. */
export const linkToken = z.string().regex(/^[\w-]{43}$/);
