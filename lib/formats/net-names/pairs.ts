export interface PairProposal {
  name: string;
  positive: string;
  negative: string;
  /** How the two names differ, such as "_P / _N". */
  how: string;
}

/** From the surest habit to the least; group 1 and 2 stand around the mark of the positive side. */
const HABITS: readonly { positive: RegExp; mark: string; others: readonly string[] }[] = [
  { positive: /^(.+)\+(.{0,4})$/, mark: "+", others: ["-"] },
  { positive: /^(.*[_.\-/])DP((?:[_.\-/<[(\d].*)?)$/i, mark: "DP", others: ["DM", "DN"] },
  { positive: /^(.*[_.\-/])P((?:[_.\-/<[(\d].*)?)$/i, mark: "P", others: ["N", "M"] },
  { positive: /^(.+[_.\-/])POS((?:[_.\-/<[(\d].*)?)$/i, mark: "POS", others: ["NEG"] },
  { positive: /^(.*CAN[_\d]*)H((?:[_.\-/<[(\d].*)?)$/i, mark: "H", others: ["L"] },
  { positive: /^(.*)DP(\d*)$/i, mark: "DP", others: ["DM", "DN"] },
  { positive: /^(.+)P((?:[<[(]?\d+[>\])]?)?)$/i, mark: "P", others: ["N"] },
];

/** Differential pairs: two names that differ by a mark of polarity alone and both exist. */
export function proposePairs(names: readonly string[]): PairProposal[] {
  const all = new Set(names);
  const taken = new Set<string>();
  const pairs: PairProposal[] = [];
  for (const { positive, mark, others } of HABITS)
    for (const name of names) {
      const match = positive.exec(name);
      if (!match || taken.has(name)) continue;
      const [, before = "", after = ""] = match;
      const written = name.slice(before.length, name.length - after.length);
      for (const other of others) {
        const counterpart = `${before}${written === written.toLowerCase() ? other.toLowerCase() : other}${after}`;
        if (counterpart === name || !all.has(counterpart) || taken.has(counterpart)) continue;
        taken.add(name);
        taken.add(counterpart);
        const stem = before.replace(/[_.\-/]$/, "");
        pairs.push({
          name: `${stem}${after}`,
          positive: name,
          negative: counterpart,
          how: `${mark} / ${other}`,
        });
        break;
      }
    }
  return pairs;
}
