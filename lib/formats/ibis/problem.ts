/** What the reader found at a line; `reason` says what is wrong and what to do about it. */
export interface IbisProblem {
  severity: "error" | "warning" | "notice";
  /** counted from 1 */
  line: number;
  /** as the standard writes it, "[Voltage Range]"; empty before the first keyword */
  keyword: string;
  reason: string;
}

const LISTED = 500;

/** Collects problems up to a bound, so that a broken file of any size makes a list that can be read. */
export class ProblemList {
  readonly listed: IbisProblem[] = [];
  private left = 0;

  add(severity: IbisProblem["severity"], line: number, keyword: string, reason: string): void {
    if (this.listed.length < LISTED) this.listed.push({ severity, line, keyword, reason });
    else this.left++;
  }

  /** All that was collected, in order of lines, with one more that counts what was left out. */
  all(): IbisProblem[] {
    const sorted = this.listed.toSorted((a, b) => a.line - b.line);
    if (this.left === 0) return sorted;
    const line = sorted.at(-1)?.line ?? 1;
    const reason = `${this.left} more problems are not listed. Mend the ones above and read the file again.`;
    return [...sorted, { severity: "warning", line, keyword: "", reason }];
  }
}

/** What a person typed, short enough for a message. */
export function excerpt(text: string): string {
  return text.length > 40 ? `${text.slice(0, 39)}…` : text;
}
