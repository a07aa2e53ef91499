import { readBlocks } from "./read-blocks";
import type { IbisDocument } from "./document";
import { ProblemList, excerpt, type IbisProblem } from "./problem";
import { LONGEST_LINE, scanBlocks } from "./scan";

export interface IbisReading {
  /** Null where the file is refused; then the problems say why. */
  document: IbisDocument | null;
  /** in order of lines */
  problems: IbisProblem[];
}

/** Files of the largest parts have some 20 MB. */
export const MAX_IBIS_BYTES = 32 * 1024 * 1024;

/**
 * Reads an IBIS file, versions 1.0 to 7.x: components, packages, pins, selectors, models with their tables, waveforms
 * and limits. What the standard has and we do not simulate is named, not passed over.
 *
 * Never throws for what a file holds. Time and memory grow in proportion to its size; larger files than MAX_IBIS_BYTES
 * and lines longer than LONGEST_LINE are refused unread.
 *
 * @see "IBIS (I/O Buffer Information Specification)", version 7.2, IBIS Open Forum, 2023 (sections 3 to 6; the wording
 *   of rules named here is from memory)
 */
export function readIbis(source: string | Uint8Array): IbisReading {
  const refuse = (line: number, reason: string, keyword = ""): IbisReading => ({
    document: null,
    problems: [{ severity: "error", line, keyword, reason }],
  });
  const size = typeof source === "string" ? source.length : source.byteLength;
  if (size > MAX_IBIS_BYTES)
    return refuse(
      1,
      `The file has ${Math.ceil(size / 1048576)} MB; at most 32 MB can be read. Split it by component.`,
    );
  const text = (typeof source === "string" ? source : decode(source)).replace(/^\uFEFF/, "");
  const wrong = firstWrong(text);
  if (wrong) return refuse(wrong.line, wrong.reason);
  const problems = new ProblemList();
  const blocks = scanBlocks(text, problems);
  const [first] = blocks;
  if (!first) {
    const line = text.trim() === "" ? "Nothing is in it" : "No [keyword] is in it";
    return refuse(1, `${line}, so this is no IBIS file. Choose a file that begins with [IBIS Ver].`);
  }
  if (first.keyword !== "ibis ver")
    return refuse(
      first.line,
      `The first keyword is ${excerpt(first.shown)} and not [IBIS Ver], so this is no IBIS file. Choose a file that begins with [IBIS Ver].`,
      first.shown,
    );
  const document = readBlocks(blocks, problems);
  return { document, problems: problems.all() };
}

/** UTF-8 where it is that, else the Western code page older files were written in. */
function decode(bytes: Uint8Array): string {
  try {
    return new TextDecoder("utf-8", { fatal: true }).decode(bytes);
  } catch {
    return new TextDecoder("windows-1252").decode(bytes); // every byte means something there
  }
}

/** The first line that no text of this kind can have. */
function firstWrong(text: string): { line: number; reason: string } | null {
  let line = 1;
  let from = 0;
  let controls = 0;
  for (let i = 0; i < text.length; i++) {
    const code = text.charCodeAt(i);
    if (code === 10 || (code === 13 && text.charCodeAt(i + 1) !== 10)) {
      line++;
      from = i + 1;
    } else if (code === 0)
      return {
        line,
        reason:
          "The file holds a zero byte, so it is not text. Unpack or export it, and choose the .ibs file.",
      };
    else if (code < 32 && code !== 9 && code !== 13 && code !== 12 && code !== 26) controls++;
    if (i - from > LONGEST_LINE)
      return {
        line,
        reason: `The line has more than ${LONGEST_LINE} characters, which no table or name needs. The file is damaged or something else; choose another.`,
      };
    if (controls > 50 && controls * 100 > i)
      return {
        line,
        reason:
          "The file holds control characters that no text has. Unpack or export it, and choose the .ibs file.",
      };
  }
  return null;
}
