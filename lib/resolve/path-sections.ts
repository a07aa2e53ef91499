import type { PathSection, ResolvedPath, Spread } from "@/lib/si/path/types";
import type { StoredNet } from "@/lib/schemas/net";
import type { StoredNetClass } from "@/lib/schemas/net-class";
import type { BoardIndex } from "./board-index";
import type { MissingInput } from "./path-pins";
import { pathNode } from "./pin-names";

/** Spread of a line that no class bounds, of its nominal impedance: common practice, no source. */
const UNCONTROLLED_SPREAD = 0.1;
/** How a section is named whose impedance is its class's target. */
const AT_TARGET = "class target";
/** Widths this close are one width: CAM tells lines apart from 2.5 µm. */
const SAME_WIDTH_M = 1.25e-6;

/**
 * The sections of a path with their impedance spread: the class's target ± its tolerance where the line is controlled
 * (a coupon enforces it), else the nominal of the closed form ± the class's tolerance, or ± 10 % without a class.
 */
export function resolveSections(
  nets: StoredNet[],
  netClass: StoredNetClass | null,
  target: ResolvedPath["target"],
  board: BoardIndex,
) {
  const sections: PathSection[] = [];
  const missing: MissingInput[] = [];
  for (const net of nets)
    net.topology.sections.forEach((section, index) => {
      const width = board.si.of(section.width, "length");
      const line = board.lines.line(section.layerLineageId, section.layer, width);
      const controlled =
        target?.kind === "single" &&
        width > 0 &&
        isClassWidth(netClass, section.layerLineageId, width, board);
      const nominal = controlled && target ? target.ohms : line.impedance;
      const resolved: PathSection = {
        id: `${net.name}#${index + 1}`,
        net: net.name,
        a: pathNode(net, section.from, board.pinNodes),
        b: pathNode(net, section.to, board.pinNodes),
        layer: line.layerName,
        width,
        length: board.si.of(section.length, "length"),
        impedance:
          line.missing || nominal === null ? null : spread(nominal, target?.tolerance ?? UNCONTROLLED_SPREAD),
        delayPerMeter: line.delayPerMeter,
        method: controlled ? `${AT_TARGET}; delay from ${line.method ?? "no formula"}` : line.method,
        missing: line.missing?.input ?? null,
      };
      sections.push(resolved);
      if (line.missing && !missing.some((entry) => entry.input === line.missing?.input))
        missing.push(line.missing);
    });
  return { sections, missing };
}

/** Whether a section is judged at its class's target, which a coupon enforces, and not at what its width gives. */
export function isAtTarget({ method }: Pick<PathSection, "method">): boolean {
  return method?.startsWith(AT_TARGET) ?? false;
}

function isClassWidth(
  netClass: StoredNetClass | null,
  layerLineageId: string | null,
  width: number,
  board: BoardIndex,
): boolean {
  const entry = netClass?.layers.find((layer) => layer.layerLineageId === layerLineageId);
  return !!entry?.width && Math.abs(board.si.of(entry.width, "length") - width) < SAME_WIDTH_M;
}

function spread(nominal: number, tolerance: number): Spread {
  return { low: nominal * (1 - tolerance), nominal, high: nominal * (1 + tolerance) };
}
