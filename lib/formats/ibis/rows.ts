import type { TableRow, Triple } from "./document";
import { readNumber } from "./number";
import { excerpt, type ProblemList } from "./problem";
import type { IbisBlock, IbisLine } from "./scan";

/** Reads the cells of one block and reports under its keyword. */
export class BlockReader {
  constructor(
    readonly block: IbisBlock,
    readonly problems: ProblemList,
  ) {}

  refuse(line: number, reason: string): null {
    this.problems.add("error", line, this.block.shown, reason);
    return null;
  }

  warn(line: number, reason: string): void {
    this.problems.add("warning", line, this.block.shown, reason);
  }

  /** Null for NA, and for what is no number (then it is reported). */
  number(token: string | undefined, line: number): number | null {
    if (token === undefined || token === "") return null;
    const reading = readNumber(token);
    if (reading.kind === "slip")
      return this.refuse(line, `'${excerpt(token)}' ${reading.reason}. The value counts as missing.`);
    return reading.kind === "na" ? null : reading.value;
  }

  /** "typ min max"; typ may not be NA. */
  triple(tokens: readonly string[], line: number): Triple | null {
    if (tokens.length === 0)
      return this.refuse(line, "Has no values. Write the typical, minimum and maximum value, or NA.");
    const [typ, min, max] = [0, 1, 2].map((i) => this.number(tokens[i], line));
    if (typ === null || typ === undefined)
      this.refuse(line, "The typical value is missing. It may not be NA; take it from the data sheet.");
    return { typ: typ ?? null, min: min ?? null, max: max ?? null, line };
  }

  /** The triple beside the keyword or on the first line below. */
  ownTriple(): Triple | null {
    const tokens = split(this.block.rest);
    const below = this.block.lines[0];
    return tokens.length > 0 || !below
      ? this.triple(tokens, this.block.line)
      : this.triple(split(below.text), below.number);
  }

  /** A table's row: x, then three columns. Null where x is no number. */
  row({ text, number: line }: IbisLine): TableRow | null {
    const tokens = split(text);
    const x = this.number(tokens[0], line);
    if (x === null) {
      if (/^na$/i.test(tokens[0] ?? ""))
        this.refuse(
          line,
          "A row begins with NA. Its voltage or time must be a number; the row was left out.",
        );
      return null;
    }
    if (tokens.length < 2) return this.refuse(line, "A row has one number only; it was left out.");
    if (tokens.length < 4)
      this.warn(line, "A row has fewer than four columns; the missing ones count as NA.");
    return {
      x,
      typ: this.number(tokens[1], line),
      min: this.number(tokens[2], line),
      max: this.number(tokens[3], line),
      line,
    };
  }

  /** Rows in ascending order of x, one for each x. */
  table(lines: readonly IbisLine[], what: "voltage" | "time"): TableRow[] {
    const rows: TableRow[] = [];
    for (const line of lines) {
      const row = this.row(line);
      if (row) rows.push(row);
    }
    if (rows.length > 1 && (rows[0]?.x ?? 0) > (rows.at(-1)?.x ?? 0)) rows.reverse();
    const isSorted = rows.every((row, i) => i === 0 || row.x >= (rows[i - 1]?.x ?? row.x));
    if (!isSorted) {
      const at = rows.findIndex((row, i) => i > 0 && row.x < (rows[i - 1]?.x ?? row.x));
      this.warn(
        rows[at]?.line ?? this.block.line,
        `The ${what} turns back here; the rows were put in order.`,
      );
      rows.sort((a, b) => a.x - b.x);
    }
    const distinct = rows.filter((row, i) => i === 0 || row.x !== rows[i - 1]?.x);
    if (distinct.length < rows.length)
      this.warn(
        this.block.line,
        `${rows.length - distinct.length} rows repeat a ${what}; the first of each was kept.`,
      );
    return distinct;
  }
}

/** "Vinl = 0.8V", "Vinl=0.8V" and "Vinl 0.8V" → ["Vinl", "0.8V"] */
export function split(text: string): string[] {
  return text.split(/[\s=]+/).filter(Boolean);
}
