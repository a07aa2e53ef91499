import type { BusProposal } from "./buses";
import type { PairProposal } from "./pairs";

export interface MatchGroupProposal {
  name: string;
  nets: string[];
  reason: string;
}

const LEAST_MEMBERS = 4;

/**
 * Nets whose lengths are usually matched: a data bus with strobes by byte lane (eight bits, their strobe, their
 * mask), every other bus as a whole.
 */
export function proposeMatchGroups(
  buses: readonly BusProposal[],
  pairs: readonly PairProposal[],
  names: readonly string[],
): MatchGroupProposal[] {
  return buses
    .filter(({ members }) => members.length >= LEAST_MEMBERS)
    .flatMap((bus) => {
      const lanes = byteLanes(bus, pairs, names);
      return (
        lanes ?? [{ name: bus.name, nets: bus.members.map(({ net }) => net), reason: `bus ${bus.label}` }]
      );
    });
}

function byteLanes(
  bus: BusProposal,
  pairs: readonly PairProposal[],
  names: readonly string[],
): MatchGroupProposal[] | null {
  const data = /^(.*?)(DQ|D|DATA)$/i.exec(bus.name);
  if (!data) return null;
  const prefix = data[1] ?? "";
  const laneOf = (name: string, stem: string): number | null => {
    if (!name.toLowerCase().startsWith(`${prefix}${stem}`.toLowerCase())) return null;
    const digits = /^[_<[(]*(?:[pn][_<[(]*)?(\d{1,2})(?!\d)/i.exec(name.slice(prefix.length + stem.length));
    return digits ? Number(digits[1]) : null;
  };
  const lanes = new Map<number, string[]>();
  const put = (lane: number, net: string) => lanes.set(lane, [...(lanes.get(lane) ?? []), net]);
  for (const { positive, negative } of pairs) {
    const lane = laneOf(positive, "DQS");
    if (lane !== null) {
      put(lane, positive);
      put(lane, negative);
    }
  }
  const paired = new Set(pairs.flatMap(({ positive, negative }) => [positive, negative]));
  for (const name of names) {
    if (paired.has(name)) continue;
    const lane = laneOf(name, "DQS") ?? laneOf(name, "DM") ?? laneOf(name, "DQM");
    if (lane !== null) put(lane, name);
  }
  if (lanes.size === 0) return null;
  for (const { net, index } of bus.members) put(Math.floor(index / 8), net);
  return [...lanes]
    .sort(([a], [b]) => a - b)
    .filter(([, nets]) => nets.length >= LEAST_MEMBERS)
    .map(([lane, nets]) => ({
      name: `${bus.name} lane ${lane}`,
      nets,
      reason: `byte ${lane} of ${bus.label} with its strobe`,
    }));
}
