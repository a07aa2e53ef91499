import type { PathPin } from "../path/types";
import { cornerName, NOMINAL } from "./corners";
import type { EdgeRule, Limit, Missing, Observation, Reading } from "./rule";
import type { Corner, CornerName, CornerValue, RuleDefinition, Verdict } from "./types";

/** Digits that differ by less than this share are equal: a value that equals its limit passes. */
const EQUAL = 1e-9;

export interface Judged {
  verdict: Verdict;
  margin: number | null;
}

/** Value = limit passes; near is a band on the passing side, and hides nothing. */
export function judge(definition: RuleDefinition, value: number | null, limit: number | null): Judged {
  if (limit === null) return { verdict: "pass", margin: null };
  if (value === null) return { verdict: "no data", margin: null };
  const margin = definition.direction === "max" ? limit - value : value - limit;
  if (margin < -EQUAL * Math.max(1, Math.abs(limit))) return { verdict: "fail", margin };
  const near = definition.near;
  const band = near === null ? 0 : "absolute" in near ? near.absolute : near.share * Math.abs(limit);
  return { verdict: band > 0 && margin < band ? "near" : "pass", margin };
}

interface Worst extends Judged {
  value: number | null;
  time: number | null;
  limit: Limit;
  seen: Observation | null;
}

/** The worst of one rule over pins, edges and corners, and at how many corners it fails. */
export class Tally {
  worst: Worst | null = null;
  missing: Missing | null = null;
  private readonly byCorner = new Map<
    CornerName,
    { badness: number; value: number | null; verdict: Verdict }
  >();

  constructor(readonly rule: EdgeRule) {}

  add(seen: Observation, reading: Reading, limit: Limit): void {
    const { definition } = this.rule;
    const judged: Judged = reading.fails
      ? { verdict: "fail", margin: failMargin(definition, reading.value, limit.limit) }
      : judge(definition, reading.value, limit.limit);
    if (judged.verdict === "no data") return;
    const badness = reading.fails ? Infinity : -(judged.margin ?? Infinity);
    const corner = cornerName(seen.corner);
    const held = this.byCorner.get(corner);
    if (!held) this.byCorner.set(corner, { badness, value: reading.value, verdict: judged.verdict });
    else if (badness > held.badness)
      Object.assign(held, { badness, value: reading.value, verdict: judged.verdict });
    if (this.worst && badness <= this.worstBadness) return;
    this.worstBadness = badness;
    this.worst = {
      ...judged,
      value: reading.value,
      time: reading.time,
      limit,
      seen: { ...seen, corner: { ...seen.corner } },
    };
  }

  lack(missing: Missing): void {
    this.missing ??= missing;
  }

  get failing(): CornerName[] {
    return [...this.byCorner].filter(([, entry]) => entry.verdict === "fail").map(([name]) => name);
  }

  get failsAtNominal(): boolean {
    return this.byCorner.get(NOMINAL)?.verdict === "fail";
  }

  values(corners: readonly Corner[]): CornerValue[] {
    return corners.map((corner) => {
      const name = cornerName(corner);
      const entry = this.byCorner.get(name);
      return {
        rule: this.rule.definition.id,
        corner: name,
        value: entry?.value ?? null,
        verdict: entry?.verdict ?? "no data",
      };
    });
  }

  private worstBadness = -Infinity;
}

function failMargin(definition: RuleDefinition, value: number | null, limit: number | null): number | null {
  if (value === null || limit === null) return null;
  return definition.direction === "max" ? limit - value : value - limit;
}

/** Whether a finding rests on a model that nobody took from a source. */
export function restsOnAssumed(driver: PathPin | null, receiver: PathPin | null): boolean {
  return !!driver?.driver?.assumed || !!receiver?.receiver?.assumed;
}
