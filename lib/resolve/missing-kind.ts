/** What a route lacks, by the words of `lib/formats/route-graph.ts` and of the resolved path; the gravest first. */
const ROUTE_KINDS: readonly (readonly [RegExp, string])[] = [
  [/are not joined: islands|No routed copper joins/i, "Route in islands"],
  [/no node is a pin|neither a driver nor a receiver/i, "Route without pins"],
  [/no routed section|but no routed|a length of 0|no length between|The list gives no /i, "Route not given"],
  [/is the only pin/i, "Route with one pin"],
  [/\bloops?\b/i, "Route with a loop"],
];

/**
 * The kind of a missing input: what is wrong with a route, else what it is apart from whose it is, so that many of one
 * kind can be judged at once.
 *
 * @param missing as the run names it: "route of CLK", "driver model of U1"
 * @param cause   the sentence that goes with it; null where none is kept
 */
export function missingKind(missing: string, cause: string | null): string {
  const [kind = missing] = missing.split(/ of (?!coupled)/, 1);
  if (kind === "route")
    return ROUTE_KINDS.find(([words]) => words.test(cause ?? ""))?.[1] ?? "Route not complete";
  return kind.charAt(0).toUpperCase() + kind.slice(1);
}
