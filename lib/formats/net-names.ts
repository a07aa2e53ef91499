import { proposeBuses, type BusProposal } from "./net-names/buses";
import { proposeMatchGroups, type MatchGroupProposal } from "./net-names/match-groups";
import { proposePairs, type PairProposal } from "./net-names/pairs";
import { proposeOutOfScope, type ScopeProposal } from "./net-names/supplies";

export type { BusProposal, MatchGroupProposal, PairProposal, ScopeProposal };

/** What names suggest; nothing of it holds until a person has confirmed it. */
export interface NameProposals {
  outOfScope: ScopeProposal[];
  pairs: PairProposal[];
  buses: BusProposal[];
  matchGroups: MatchGroupProposal[];
}

/** Reads the habits of naming: supplies, pairs, buses, and groups whose lengths are matched. */
export function proposeFromNames(names: readonly string[]): NameProposals {
  const outOfScope = proposeOutOfScope(names);
  const out = new Set(outOfScope.filter(({ sure }) => sure).map(({ net }) => net));
  const signals = names.filter((name) => !out.has(name));
  const pairs = proposePairs(signals);
  const paired = new Set(pairs.flatMap(({ positive, negative }) => [positive, negative]));
  const buses = proposeBuses(signals.filter((name) => !paired.has(name)));
  return { outOfScope, pairs, buses, matchGroups: proposeMatchGroups(buses, pairs, signals) };
}
