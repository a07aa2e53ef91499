import type { PathPart, ResolvedPath } from "@/lib/si/path/types";
import type { Corner } from "@/lib/si/rules/types";
import { ohmsText, quantityText } from "./number-text";
import type { StripEdge, StripPin, StripTermination, Topology } from "./topology-graph";
import type { ShownVerdict } from "./verdict-mark";

const NOMINAL: Corner = { driver: "typical", impedance: "nominal" };
/** Which of a receiver's capacitances goes with a driver's speed, as in the check. */
const LOAD = { slow: "max", typical: "typical", fast: "min" } as const;

/**
 * The strip of a resolved path with the values that a corner has; nominal ones where none is named.
 *
 * @param path     what is simulated
 * @param driver   the driving pin; the first driver, if left out
 * @param verdicts by receiving pin
 */
export function topologyFromPath(
  path: ResolvedPath,
  driver?: string,
  verdicts: ReadonlyMap<string, ShownVerdict> = new Map(),
  corner: Corner = NOMINAL,
): Topology {
  const sections = path.sections.map((s): StripEdge => ({
    kind: "line",
    id: s.id,
    a: s.a,
    b: s.b,
    impedance: s.impedance?.[corner.impedance] ?? null,
    delay: s.delayPerMeter === null ? null : s.delayPerMeter * s.length,
    layer: s.layer,
  }));
  const series = path.parts
    .filter((p) => p.role === "series")
    .map((p): StripEdge => ({
      kind: "part",
      id: p.reference,
      a: p.a,
      b: p.b,
      part: p.kind,
      value: p.value,
      reference: p.reference,
    }));

  const driving = driver ?? path.drivers[0]?.pin ?? "";
  const pins = new Map<string, StripPin>();
  for (const { pin, node, driver: model } of path.drivers)
    pins.set(pin, {
      pin,
      node,
      role: "driver",
      detail: model ? ohmsText(model.resistance[corner.driver]) : "no model",
    });
  for (const { pin, node, receiver: model } of path.receivers) {
    if (pin === driving) continue;
    const detail = model ? quantityText(model.capacitance[LOAD[corner.driver]], "F") : "no model";
    pins.set(pin, {
      pin,
      node,
      role: pins.has(pin) ? "either" : "receiver",
      detail,
      verdict: verdicts.get(pin) ?? null,
    });
  }
  return {
    driver: driving,
    edges: [...sections, ...series],
    pins: [...pins.values()],
    terminations: terminations(path),
  };
}

/** Termination parts, followed from the line to the rail they end at. */
function terminations(path: ResolvedPath): StripTermination[] {
  const rails = new Map(path.rails.map((r) => [r.node, r.name]));
  rails.set("0", rails.get("0") ?? "GND");
  const parts = path.parts.filter((p) => p.role === "termination");
  const onLine = new Set([
    ...path.sections.flatMap((s) => [s.a, s.b]),
    ...path.parts.filter((p) => p.role === "series").flatMap((p) => [p.a, p.b]),
    ...[...path.drivers, ...path.receivers].map((p) => p.node),
  ]);
  return parts
    .filter((p) => onLine.has(p.a) !== onLine.has(p.b))
    .map((first) => {
      const node = onLine.has(first.a) ? first.a : first.b;
      const chain: PathPart[] = [first];
      let at = node === first.a ? first.b : first.a;
      while (!rails.has(at)) {
        const next = parts.find((p) => !chain.includes(p) && (p.a === at || p.b === at));
        if (!next) break;
        chain.push(next);
        at = next.a === at ? next.b : next.a;
      }
      return {
        id: first.reference,
        node,
        parts: chain.map((p) => ({ part: p.kind, value: p.value, reference: p.reference })),
        rail: rails.get(at) ?? at,
      };
    });
}
