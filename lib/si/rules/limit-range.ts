import { ruleCatalogue } from "./catalogue";

interface Range {
  min: number;
  max: number;
  /** the smallest value itself is refused */
  above?: boolean;
}

/** What a limit can mean, in each rule's own unit. */
const ranges: Readonly<Record<string, Range>> = {
  "above-rail": { min: 0, max: 10 },
  "below-rail": { min: 0, max: 10 },
  overshoot: { min: 0, max: 200 },
  ringback: { min: -2000, max: 5000 },
  settling: { min: 0, max: 1000, above: true },
  "level-margin": { min: 0, max: 100 },
  "flight-time": { min: 0, max: 1e6, above: true },
  "termination-value": { min: 0, max: 1000 },
  "critical-length": { min: 0, max: 100, above: true },
  spacing: { min: 0, max: 100, above: true },
  "impedance-centring": { min: 0, max: 100, above: true },
  "impedance-yield": { min: 0, max: 100, above: true },
};

/**
 * Why a limit cannot hold for a rule, as a sentence with the way out; null where it can.
 * @param limit decimal text in the rule's unit; null: the class or the part sets it
 */
export function limitProblem(ruleId: string, limit: string | null): string | null {
  const rule = ruleCatalogue.find(({ id }) => id === ruleId);
  if (!rule)
    return `There is no rule '${ruleId}'. Name one of ${ruleCatalogue.map(({ id }) => id).join(", ")}.`;
  const range = ranges[ruleId];
  if (limit === null || !range) return null;
  const value = Number(limit);
  if (value <= range.max && (range.above ? value > range.min : value >= range.min)) return null;
  const unit = rule.unit === "1" ? "" : ` ${rule.unit}`;
  const least = range.above ? `above ${range.min}` : `from ${range.min}`;
  return `${rule.title}: a limit of ${limit}${unit} makes no sense. Write one ${least} to ${range.max}${unit}.`;
}
