import type { WaiverState } from "./review";

type Reported = "near" | "fail" | "no data";

/** A problem as the table of a run lists it. */
export interface ProblemEntry {
  pathId: string;
  path: string;
  className: string | null;
  driver: string | null;
  layers: string;
  mechanism: string;
  title: string;
  verdict: Reported;
  severity: string;
  /** The rule that is worst, with its numbers in its own unit. */
  rule: string;
  value: number | null;
  limit: number | null;
  unit: string | null;
  margin: number | null;
  /** margin ÷ limit, to put rules of different units in one order */
  share: number | null;
  corner: string | null;
  failsAt: number;
  ofCorners: number;
  failsAtNominal: boolean;
  missing: string | null;
  assumed: boolean;
  /** every rule that it touches, by id, with commas between */
  rules: string;
}

/** A selector's finding: shown, but no failure. */
export type SelectorEntry = Pick<
  ProblemEntry,
  "pathId" | "path" | "className" | "rule" | "verdict" | "value" | "limit" | "unit" | "margin" | "missing"
>;

/** The key of a problem, which its flags and waivers carry from run to run. */
export const problemKey = (problem: { pathId: string; mechanism: string }) =>
  `${problem.pathId} ${problem.mechanism}`;

/** What else is known of a problem: who looks after it, whether it is excused. */
export interface ProblemReview {
  flag: { id: string; version: number; assigneeUserId: string | null; assigneeName: string | null } | null;
  waiver: { id: string; state: WaiverState; covers: boolean; reason: string } | null;
  /** the reason with which its missing input was accepted */
  accepted: string | null;
}

type Cell = string | number | boolean | null;

/** Rows as arrays, each text named by its place in `words`: a fraction of the size of plain JSON. */
export interface PackedRows {
  columns: { name: string; text: boolean }[];
  words: string[];
  rows: (number | boolean | null)[][];
}

const DIGITS = 6;

/** Packs rows of one shape. Numbers keep six significant digits, which is more than any of them is worth. */
export function packRows<Row extends object>(rows: readonly Row[]): PackedRows {
  const places = new Map<string, number>();
  const place = (text: string) => {
    const known = places.get(text);
    if (known !== undefined) return known;
    places.set(text, places.size);
    return places.size - 1;
  };
  const cellsOf = rows as readonly Record<string, Cell>[];
  const columns = Object.keys(rows[0] ?? {}).map((name) => ({
    name,
    text: cellsOf.some((row) => typeof row[name] === "string"),
  }));
  const packed = cellsOf.map((row) =>
    columns.map(({ name }) => {
      const cell = row[name] ?? null;
      if (typeof cell === "string") return place(cell);
      return typeof cell === "number" ? Number(cell.toPrecision(DIGITS)) : cell;
    }),
  );
  return { columns, words: [...places.keys()], rows: packed };
}

/** The rows that were packed; the type is the caller's to name. */
export function unpackRows<Row>({ columns, words, rows }: PackedRows): Row[] {
  return rows.map((row) => {
    const made: Record<string, Cell> = {};
    columns.forEach(({ name, text }, index) => {
      const cell = row[index] ?? null;
      made[name] = text && typeof cell === "number" ? (words[cell] ?? null) : cell;
    });
    return made as Row;
  });
}
