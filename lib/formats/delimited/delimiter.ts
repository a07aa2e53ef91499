export const delimiters = [",", ";", "\t"] as const;
export type Delimiter = (typeof delimiters)[number];

/** Lines looked at; enough to see a pattern, few enough for any size of file. */
const SAMPLE_LINES = 60;
/** A tie goes to the one that seldom stands inside a cell. */
const PREFERENCE: readonly Delimiter[] = ["\t", ";", ","];

/**
 * The character between cells: the one of which most lines have the same number, the header among them. A comma that
 * is a decimal point (`0,127;12,5`) does not stand in the header and so loses to the semicolon.
 */
export function detectDelimiter(text: string): Delimiter {
  let best: Delimiter = ",";
  let bestScore = 0;
  for (const candidate of PREFERENCE) {
    const counts = countPerLine(text, candidate);
    const usual = mostFrequent(counts.filter((count) => count > 0));
    if (usual === null) continue;
    const same = counts.filter((count) => count === usual).length / counts.length;
    // A title above the header may have none; a header that has some speaks for it. Of equals, more cells.
    const score = same + ((counts[0] ?? 0) > 0 ? 0.3 : 0) + Math.min(usual, 99) / 1e4;
    if (score > bestScore) {
      best = candidate;
      bestScore = score;
    }
  }
  return best;
}

function mostFrequent(values: readonly number[]): number | null {
  const times = new Map<number, number>();
  for (const value of values) times.set(value, (times.get(value) ?? 0) + 1);
  let best: number | null = null;
  for (const [value, count] of times) if (best === null || count > (times.get(best) ?? 0)) best = value;
  return best;
}

/** Delimiters outside quotes in each of the first lines that are not blank. */
function countPerLine(text: string, delimiter: Delimiter): number[] {
  const counts: number[] = [];
  let count = 0;
  let quoted = false;
  let blank = true;
  let cellStart = true;
  // A cell of megabytes must not make detection slow.
  const end = Math.min(text.length, 1_000_000);
  for (let i = 0; i < end && counts.length < SAMPLE_LINES; i++) {
    const char = text[i];
    if (char === '"') {
      if (quoted) {
        if (text[i + 1] === '"') i++;
        else quoted = false;
      } else if (cellStart) quoted = true;
      blank = false;
      cellStart = false;
    } else if (!quoted && char === "\n") {
      if (!blank) counts.push(count);
      count = 0;
      blank = true;
      cellStart = true;
    } else if (!quoted && char === delimiter) {
      count++;
      blank = false;
      cellStart = true;
    } else {
      if (char !== " " && char !== "\t") blank = false;
      cellStart = false;
    }
  }
  if (!blank && counts.length < SAMPLE_LINES) counts.push(count);
  return counts;
}
