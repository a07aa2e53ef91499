import { pathLimit, type StaticRule } from "./rule";
import { millimetres, number } from "./words";
import type { RuleDefinition } from "./types";

const definition: RuleDefinition = {
  id: "spacing",
  title: "Spacing",
  measures: "Gap to the nearest parallel neighbour over the height above the reference plane.",
  unit: "1",
  direction: "min",
  defaultLimit: 3,
  near: null,
  severity: "warning",
  selector: true,
  enabledByDefault: true,
  source: "Common practice, no source.",
};

/**
 * Edge to edge gap ÷ distance to the nearer plane [1], the smallest over all neighbours; the class's own least spacing,
 * divided by the same height, is the limit where it has one. It only chooses what to look at; crosstalk itself is
 * another rule's. Without a neighbour list there is no data.
 */
export const spacing: StaticRule = {
  kind: "static",
  definition,
  read(path) {
    if (!path.geometryKnown)
      return { input: "neighbour list", detail: "Which traces run beside this one is not known." };
    let worst: { ratio: number; height: number; index: number } | null = null;
    for (const [index, { gap, heightOverPlane: height }] of path.neighbours.entries())
      if (height && (!worst || gap / height < worst.ratio)) worst = { ratio: gap / height, height, index };
    const neighbour = path.neighbours[worst?.index ?? 0];
    if (!neighbour) return null;
    if (!worst)
      return {
        input: `reference plane of layer ${neighbour.layer}`,
        detail: `The height of ${neighbour.layer} over a plane is not known.`,
      };
    const { ratio, height } = worst;
    const set = pathLimit(path, definition);
    const ofClass = path.spacing !== null && set.origin !== "net" && set.origin !== "class";
    return {
      corners: [{ corner: { driver: "typical", impedance: "nominal" }, value: ratio }],
      limit: ofClass && path.spacing !== null ? { limit: path.spacing / height, origin: "class" } : set,
      pin: null,
      mechanism: "spacing",
      restsOnAssumed: false,
      cause: () =>
        `${neighbour.neighbour} runs ${millimetres(neighbour.gap)} away for ${millimetres(neighbour.parallelLength)} on ${neighbour.layer}, ${number(ratio, 2)} times the ${millimetres(height)} to the plane.`,
    };
  },
};
