import { TouchstoneError, type TouchstoneProblem } from "./document";
import type { Scanned } from "./scan";

export interface Head {
  version: "1" | "2.0" | "2.1";
  ports: number;
  references: Float64Array;
  /** rows of the matrix that a record holds */
  matrix: "full" | "lower" | "upper";
  /** S21 before S12, as two-ports of version 1 always have it */
  isTransposed: boolean;
  /** frequencies the file promises; null where it does not */
  frequencies: number | null;
  mixedMode: string[] | null;
}

const MOST_PORTS = 256;

/** Ports, references and order of the numbers. @throws TouchstoneError where they cannot be known */
export function headOf(scanned: Scanned, name: string, problems: TouchstoneProblem[]): Head {
  return scanned.isVersionTwo ? versionTwo(scanned, problems) : versionOne(scanned, name, problems);
}

function versionOne(scanned: Scanned, name: string, problems: TouchstoneProblem[]): Head {
  const stated = Number(/\.[syzgh](\d{1,3})p(\.gz)?$/i.exec(name)?.[1] ?? NaN);
  const counted = countPorts(scanned);
  const first = scanned.starts[0]?.line ?? 1;
  if (Number.isFinite(stated) && counted !== null && stated !== counted)
    problems.push({
      severity: "warning",
      line: first,
      reason: `The name speaks of ${stated} ports, the lines of ${counted}. It was read with ${stated}.`,
    });
  const ports = Number.isFinite(stated) ? stated : counted;
  if (ports === null || !(ports >= 1 && ports <= MOST_PORTS))
    throw new TouchstoneError(
      first,
      "How many ports the file has cannot be told from its lines. Name it so that it ends in .s2p or the like.",
    );
  return {
    version: "1",
    ports,
    references: new Float64Array(ports).fill(scanned.options.resistance),
    matrix: "full",
    isTransposed: ports === 2,
    frequencies: null,
    mixedMode: null,
  };
}

/** A record begins with a frequency, so its first line has an odd number of numbers and the others an even one. */
function countPorts({ starts, numbers }: Scanned): number | null {
  const next = starts.findIndex(
    ({ at }, i) => i > 0 && ((starts[i + 1]?.at ?? numbers.length) - at) % 2 === 1,
  );
  const length = next < 0 ? numbers.length : (starts[next]?.at ?? 0);
  const ports = Math.sqrt((length - 1) / 2);
  return Number.isInteger(ports) && ports >= 1 ? ports : null;
}

function versionTwo(scanned: Scanned, problems: TouchstoneProblem[]): Head {
  const { keywords, options } = scanned;
  const version = keywords.get("version");
  const text = version?.text ?? "";
  if (text !== "2.0" && text !== "2.1")
    problems.push({
      severity: "warning",
      line: version?.line ?? 1,
      reason: `Version '${text.slice(0, 20)}' is not known here; the file was read as 2.1.`,
    });
  const count = (keyword: string, least: number): number | null => {
    const entry = keywords.get(keyword);
    if (!entry) return null;
    const value = Number(entry.text);
    if (!(Number.isInteger(value) && value >= least))
      throw new TouchstoneError(
        entry.line,
        `[${keyword}] must be a whole number, ${least} or more. Mend it.`,
      );
    return value;
  };
  const ports = count("number of ports", 1);
  if (ports === null || ports > MOST_PORTS)
    throw new TouchstoneError(
      version?.line ?? 1,
      `[Number of Ports] is missing or above ${MOST_PORTS}. Version 2 needs it; add it.`,
    );
  const order = keywords.get("two-port data order");
  if (ports === 2 && order?.text !== "12_21" && order?.text !== "21_12")
    throw new TouchstoneError(
      order?.line ?? version?.line ?? 1,
      "[Two-Port Data Order] must be 12_21 or 21_12. Without it S12 and S21 cannot be told apart; add it.",
    );
  const matrix = (keywords.get("matrix format")?.text ?? "Full").toLowerCase();
  if (matrix !== "full" && matrix !== "lower" && matrix !== "upper")
    throw new TouchstoneError(
      keywords.get("matrix format")?.line ?? 1,
      "[Matrix Format] must be Full, Lower or Upper. Mend it.",
    );
  return {
    version: text === "2.0" ? "2.0" : "2.1",
    ports,
    references: references(scanned, ports, options.resistance),
    matrix,
    isTransposed: ports === 2 && order?.text === "21_12",
    frequencies: count("number of frequencies", 1),
    mixedMode: mixedMode(scanned, ports, problems),
  };
}

function references({ keywords }: Scanned, ports: number, usual: number): Float64Array {
  const entry = keywords.get("reference");
  if (!entry) return new Float64Array(ports).fill(usual);
  const values = Float64Array.from(entry.text.split(/\s+/).filter(Boolean), Number);
  if (values.length !== ports || values.some((value) => !(value > 0 && Number.isFinite(value))))
    throw new TouchstoneError(
      entry.line,
      `[Reference] needs ${ports} resistances above zero, one a port. Mend it.`,
    );
  return values;
}

function mixedMode({ keywords }: Scanned, ports: number, problems: TouchstoneProblem[]): string[] | null {
  const entry = keywords.get("mixed-mode order");
  if (!entry) return null;
  const order = entry.text.split(/\s+/).filter(Boolean);
  if (order.length !== ports || order.some((one) => !/^([DC]\d{1,3},\d{1,3}|S\d{1,3})$/i.test(one)))
    throw new TouchstoneError(
      entry.line,
      `[Mixed-Mode Order] needs ${ports} entries such as D2,1 C2,1 S3. Mend it.`,
    );
  problems.push({
    severity: "notice",
    line: entry.line,
    reason: `The rows are mixed modes (${order.slice(0, 8).join(" ")}), not single ports. They were read in the file's order.`,
  });
  return order;
}
