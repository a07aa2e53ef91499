import type { ProblemList } from "./problem";

export interface IbisLine {
  /** counted from 1 */
  number: number;
  /** without comment, trimmed, never empty */
  text: string;
}

/** A keyword, what stands beside it, and the lines up to the next one. */
export interface IbisBlock {
  /** lower case, words joined by single spaces: "voltage range" */
  keyword: string;
  /** as the file writes it, with brackets */
  shown: string;
  line: number;
  /** beside the keyword, without comment */
  rest: string;
  lines: IbisLine[];
}

/** Longer lines hold no table row and no name: the file is not what it says. */
export const LONGEST_LINE = 20_000;
/** What the newest versions of the standard allow. */
const STANDARD_LINE = 1024;

/**
 * Cuts text into keyword blocks. A comment runs from the comment character (`|` until [Comment Char] changes it) to the
 * end of its line; keywords stand in brackets in the first column, in any case, spaces and underscores alike.
 * One pass, no back-tracking.
 */
export function scanBlocks(text: string, problems: ProblemList): IbisBlock[] {
  const blocks: IbisBlock[] = [];
  let comment = "|";
  let current: IbisBlock | null = null;
  let number = 0;
  let isLongToldOf = false;
  for (const raw of linesOf(text)) {
    number++;
    if (raw.length > STANDARD_LINE && !isLongToldOf) {
      isLongToldOf = true;
      problems.add(
        "warning",
        number,
        current?.shown ?? "",
        `The line has ${raw.length} characters, more than the ${STANDARD_LINE} of the standard. It was read all the same.`,
      );
    }
    const start = raw.indexOf(comment);
    const isCommentChar = /^\s*\[\s*comment[ _]+char\s*\]/i.test(raw.slice(0, 60));
    const line = (start < 0 || isCommentChar ? raw : raw.slice(0, start)).trim();
    if (line === "") continue;
    const close = line.startsWith("[") ? line.indexOf("]") : -1;
    if (close < 0 || !isKeyword(line, close)) {
      current?.lines.push({ number, text: line });
      continue;
    }
    const shown = line.slice(0, close + 1);
    const keyword = normalise(line.slice(1, close));
    const rest = line.slice(close + 1).trim();
    if (!/^\[/.test(raw))
      problems.add(
        "warning",
        number,
        shown,
        "The keyword does not stand in the first column. It was read all the same.",
      );
    if (keyword === "comment char") {
      comment = readCommentChar(rest, number, problems) ?? comment;
      continue;
    }
    current = { keyword, shown, line: number, rest, lines: [] };
    blocks.push(current);
    if (keyword === "end") break;
  }
  return blocks;
}

/** "[GND_clamp]", "[ gnd  Clamp ]" → "gnd clamp" */
function normalise(name: string): string {
  return name
    .toLowerCase()
    .split(/[\s_]+/)
    .filter(Boolean)
    .join(" ");
}

/** `[a]` in column one of a pin list is a keyword by the standard; a bracket after data is not looked at. */
function isKeyword(line: string, close: number): boolean {
  return close > 1 && close < 80;
}

function readCommentChar(rest: string, line: number, problems: ProblemList): string | null {
  const token = rest.split(/\s+/)[0] ?? "";
  if (/^[!"#$%&'()*,:;<>?@\\^`{|}~]_char$/i.test(token)) return token.charAt(0);
  problems.add(
    "error",
    line,
    "[Comment Char]",
    "Names no comment character; the old one was kept. Write it as [Comment Char] #_char.",
  );
  return null;
}

function* linesOf(text: string): Generator<string> {
  let from = 0;
  while (from < text.length) {
    let to = from;
    while (to < text.length) {
      const code = text.charCodeAt(to);
      if (code === 10 || code === 13) break;
      to++;
    }
    yield text.slice(from, to);
    from = to + (text.charCodeAt(to) === 13 && text.charCodeAt(to + 1) === 10 ? 2 : 1);
  }
}
