"use client";

import { useState } from "react";
import type { RowSelectionState } from "@/components/ui/data-table";
import type { ConfirmedProposals, DraftProposals } from "@/lib/schemas/name-proposals";

type Kind = "outOfScope" | "pairs" | "buses" | "matchGroups";

const all = (ids: readonly string[]): RowSelectionState => Object.fromEntries(ids.map((id) => [id, true]));

/** What is ticked of the proposals: at first all that the names leave little doubt of. */
export function useProposals(proposals: DraftProposals) {
  const [ticked, setTicked] = useState<Record<Kind, RowSelectionState>>(() => ({
    outOfScope: all(proposals.outOfScope.filter(({ sure }) => sure).map(({ id }) => id)),
    pairs: all(proposals.pairs.map(({ positive }) => positive.id)),
    buses: all(proposals.buses.map(({ name }) => name)),
    matchGroups: {},
  }));
  const confirmed: Omit<ConfirmedProposals, "bindings"> = {
    outOfScope: proposals.outOfScope
      .filter(({ id }) => ticked.outOfScope[id])
      .map(({ id, kind, reason }) => ({
        id,
        kind,
        reason: `${reason[0]?.toUpperCase() ?? ""}${reason.slice(1)}.`,
      })),
    pairs: proposals.pairs
      .filter(({ positive }) => ticked.pairs[positive.id])
      .map(({ positive, negative }) => ({ positive: positive.id, negative: negative.id })),
    buses: proposals.buses
      .filter(({ name }) => ticked.buses[name])
      .map(({ name, members }) => ({ name, members })),
    matchGroups: proposals.matchGroups
      .filter(({ name }) => ticked.matchGroups[name])
      .map(({ name, ids }) => ({ name, ids })),
  };
  return {
    ticked,
    setTicked: (kind: Kind) => (next: RowSelectionState) => setTicked((now) => ({ ...now, [kind]: next })),
    confirmed,
  };
}

/** "4 nets out of scope, 25 pairs, 5 buses"; empty where nothing is ticked. */
export function confirmedWords({
  outOfScope,
  pairs,
  buses,
  matchGroups,
}: Omit<ConfirmedProposals, "bindings">): string {
  const say = (count: number, one: string, many: string) =>
    count === 0 ? [] : [`${count.toLocaleString("en")} ${count === 1 ? one : many}`];
  return [
    ...say(outOfScope.length, "net out of scope", "nets out of scope"),
    ...say(pairs.length, "pair", "pairs"),
    ...say(buses.length, "bus", "buses"),
    ...say(matchGroups.length, "match group", "match groups"),
  ].join(", ");
}
