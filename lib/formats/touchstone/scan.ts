import { TouchstoneError, type TouchstoneProblem } from "./document";
import { DEFAULT_OPTIONS, readOptionLine, type Options } from "./option-line";

export interface Scanned {
  /** keywords of version 2 in lower case, with what stands beside them and below */
  keywords: Map<string, { text: string; line: number }>;
  options: Options;
  /** numbers of the network data, and for each line that holds some, where it begins and which line it is */
  numbers: Float64Array;
  starts: { at: number; line: number }[];
  comments: string[];
  isVersionTwo: boolean;
}

const LONGEST_LINE = 200_000;
const MOST_COMMENTS = 200;
const NUMBER = /^[+-]?(\d{1,60}\.?\d{0,60}|\.\d{1,60})([eEdD][+-]?\d{1,4})?$/;

/** Splits a file into keywords, option line and numbers, in one pass. @throws TouchstoneError where it is none */
export function scan(text: string, problems: TouchstoneProblem[]): Scanned {
  const found: Scanned = {
    keywords: new Map(),
    options: DEFAULT_OPTIONS,
    numbers: new Float64Array(1024),
    starts: [],
    comments: [],
    isVersionTwo: false,
  };
  let count = 0;
  let hasOptions = false;
  let section: "head" | "network" | "noise" | "information" | "end" = "head";
  let keyword = "";
  let number = 0;
  for (const raw of text.split(/\r\n|\n|\r/)) {
    number++;
    if (raw.length > LONGEST_LINE)
      throw new TouchstoneError(
        number,
        `The line has more than ${LONGEST_LINE} characters. The file is damaged or something else; choose another.`,
      );
    const mark = raw.indexOf("!");
    if (mark >= 0 && found.comments.length < MOST_COMMENTS) found.comments.push(raw.slice(mark + 1).trim());
    const line = (mark < 0 ? raw : raw.slice(0, mark)).trim();
    if (line === "" || section === "end") continue;
    if (line.startsWith("[")) {
      const close = line.indexOf("]");
      if (close < 0) throw new TouchstoneError(number, "The keyword has no closing bracket. Add it.");
      keyword = line.slice(1, close).trim().toLowerCase().replace(/\s+/g, " ");
      if (keyword === "version") found.isVersionTwo = true;
      if (keyword === "end information") section = "head";
      else if (keyword === "begin information") section = "information";
      else if (keyword === "network data") section = "network";
      else if (keyword === "noise data") section = "noise";
      else if (keyword === "end") section = "end";
      else if (section !== "information")
        found.keywords.set(keyword, { text: line.slice(close + 1).trim(), line: number });
      continue;
    }
    if (section === "information" || section === "noise") continue;
    if (line.startsWith("#")) {
      if (hasOptions)
        problems.push({ severity: "notice", line: number, reason: "A second option line; the first holds." });
      else found.options = readOptionLine(line, number);
      hasOptions = true;
      continue;
    }
    const beside = found.keywords.get(keyword);
    if (found.isVersionTwo && section === "head" && beside) {
      beside.text = `${beside.text} ${line}`;
      continue;
    }
    if (!hasOptions && found.starts.length === 0)
      problems.push({
        severity: "warning",
        line: number,
        reason: "No option line; GHz, S, MA and 50 Ω were taken. See whether that is so.",
      });
    found.starts.push({ at: count, line: number });
    for (const token of line.split(/\s+/)) {
      if (!NUMBER.test(token))
        throw new TouchstoneError(
          number,
          `'${token.slice(0, 40)}' is not a number. A line of data holds numbers only; mend it.`,
        );
      const value = Number(token.replace(/[dD]/, "e"));
      if (!Number.isFinite(value))
        throw new TouchstoneError(number, `'${token.slice(0, 40)}' is too large for a number.`);
      if (count === found.numbers.length) {
        const wider = new Float64Array(2 * count);
        wider.set(found.numbers);
        found.numbers = wider;
      }
      found.numbers[count++] = value;
    }
  }
  found.numbers = found.numbers.subarray(0, count);
  return found;
}
