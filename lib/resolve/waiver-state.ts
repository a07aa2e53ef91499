import type { WaiverState } from "@/lib/schemas/review";

/** What a waiver waived, per rule, at the run it was granted on. Values in the rule's unit. */
export interface WaivedValue {
  rule: string;
  value: number;
  limit: number;
  unit: string;
  margin: number;
  corner: string | null;
}

export interface WaiverRecord {
  waived: WaivedValue[];
  expiresAt: number;
  revokedAt: number | null;
}

/** A finding of the run that is looked at now, of the same path and mechanism. */
export interface CurrentValue {
  rule: string;
  verdict: "near" | "fail" | "no data";
  margin: number | null;
}

export interface JudgedWaiver {
  state: WaiverState;
  /** whether the failures it covers still count as waived */
  covers: boolean;
  /** one sentence: what changed since it was granted */
  reason: string;
}

/** Share of the limit, and volts, by which a value may be worse before a waiver is void. */
const LOOK_AGAIN_SHARE = 0.02;
const LOOK_AGAIN_VOLTS = 0.005;

/**
 * Holds a waiver against the findings of a later run.
 *
 * The same or a better margin keeps it; worse by at most 2 % of the limit or 5 mV asks for another look;
 * worse than that, or a rule that it did not waive, voids it. A failure it never saw is never covered.
 *
 * @param waiver  what was granted
 * @param current findings of the same path and mechanism now
 * @param sameInputs whether the path's input hash is the one it was granted on
 * @param now     ms UTC
 */
export function judgeWaiver(
  waiver: WaiverRecord,
  current: CurrentValue[],
  sameInputs: boolean,
  now: number,
): JudgedWaiver {
  if (waiver.revokedAt !== null) return { state: "revoked", covers: false, reason: "It was revoked." };
  if (now >= waiver.expiresAt) return { state: "expired", covers: false, reason: "It has expired." };
  const failing = current.filter((finding) => finding.verdict === "fail");
  let lookAgain: string | null = null;
  for (const finding of failing) {
    const granted = waiver.waived.find((value) => value.rule === finding.rule);
    if (!granted)
      return {
        state: "void",
        covers: false,
        reason: `It never covered the rule "${finding.rule}", which fails now.`,
      };
    if (finding.margin === null) continue;
    const worse = granted.margin - finding.margin;
    if (worse <= 0) continue;
    const allowance = Math.max(
      Math.abs(granted.limit) * LOOK_AGAIN_SHARE,
      granted.unit === "V" ? LOOK_AGAIN_VOLTS : granted.unit === "mV" ? LOOK_AGAIN_VOLTS * 1000 : 0,
    );
    if (worse > allowance)
      return { state: "void", covers: false, reason: `"${finding.rule}" is worse than what was waived.` };
    lookAgain = `"${finding.rule}" is slightly worse than what was waived.`;
  }
  if (lookAgain) return { state: "look again", covers: false, reason: lookAgain };
  if (sameInputs) return { state: "active", covers: true, reason: "The inputs are those it was granted on." };
  return { state: "carried", covers: true, reason: "The inputs changed; the value is the same or better." };
}
