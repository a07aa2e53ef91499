export interface BusProposal {
  /** Without its index: "L_DQ". */
  name: string;
  /** By rising index. */
  members: { net: string; index: number }[];
  /** "L_DQ[0..127]", gaps named. */
  label: string;
}

const BRACKETED = /^(.+?)\s*(?:<(\d{1,4})>|\[(\d{1,4})\]|\((\d{1,4})\))([_.-][\p{L}\d]+)?$/u;
/** A bare index: at most three digits, so that hashes and dates make no bus. */
const BARE = /^(.*?\p{L}[_-]?)(\d{1,3})([_.-]?[\p{L}*#]*)$/u;

/** Least members of a bus: two where an index stands in brackets, three where it is a bare number. */
const LEAST_BRACKETED = 2;
const LEAST_BARE = 3;

/** Buses: names that differ by an index alone ("DQ<7>", "A12", "D_7", "DQ3_S"). */
export function proposeBuses(names: readonly string[]): BusProposal[] {
  const found = new Map<string, { name: string; least: number; members: Map<number, string> }>();
  for (const net of names) {
    const read = readIndex(net);
    if (!read) continue;
    const key = `${read.least} ${read.name}`;
    const bus = found.get(key) ?? { name: read.name, least: read.least, members: new Map<number, string>() };
    // "D1" and "D01" are two nets of one index: the second stays outside.
    if (!bus.members.has(read.index)) bus.members.set(read.index, net);
    found.set(key, bus);
  }
  return [...found.values()]
    .filter(({ members, least }) => members.size >= least)
    .map(({ name, members }) => {
      const sorted = [...members].map(([index, net]) => ({ net, index })).sort((a, b) => a.index - b.index);
      return { name, members: sorted, label: `${name}[${ranges(sorted.map(({ index }) => index))}]` };
    });
}

function readIndex(net: string): { name: string; index: number; least: number } | null {
  const bracketed = BRACKETED.exec(net);
  if (bracketed) {
    const [, stem = "", a, b, c, tail = ""] = bracketed;
    return { name: `${stem}${tail}`, index: Number(a ?? b ?? c), least: LEAST_BRACKETED };
  }
  const bare = BARE.exec(net);
  if (!bare) return null;
  const [, stem = "", digits = "", tail = ""] = bare;
  return { name: `${stem.replace(/[_-]$/, "")}${tail}`, index: Number(digits), least: LEAST_BARE };
}

/** 0, 1, 2, 5 → "0..2, 5" */
function ranges(sorted: readonly number[]): string {
  const parts: string[] = [];
  for (let start = 0; start < sorted.length;) {
    let end = start;
    while (sorted[end + 1] === (sorted[end] ?? 0) + 1) end++;
    parts.push(end === start ? `${sorted[start]}` : `${sorted[start]}..${sorted[end]}`);
    start = end + 1;
  }
  return parts.length > 6 ? `${sorted[0]}..${sorted.at(-1)}` : parts.join(", ");
}
