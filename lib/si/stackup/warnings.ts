import { DomainError } from "../errors";
import { formatSi } from "../units";
import { isCopper, isDielectric, isSignal, type Stackup, type StackLayer } from "./model";
import { builtThickness, finishedCopper } from "./thickness";

export interface StackupWarning {
  code:
    | "no plane"
    | "no plane beside"
    | "facing signals"
    | "asymmetric"
    | "odd copper count"
    | "copper balance"
    | "copper on copper"
    | "cores unbonded"
    | "missing input"
    | "illegal input"
    | "implausible thickness"
    | "mask inside"
    | "mask covers copper";
  /** error: impedance cannot be computed; warning: unusual or harmful; info: worth knowing */
  severity: "error" | "warning" | "info";
  /** index of the layer, or null for the whole stackup */
  layer: number | null;
  message: string;
}

/** Mirrored layers may differ by this share of thickness, and mirrored coverages by these points, without notice. */
const THICKNESS_SHARE = 0.02;
const COVERAGE_POINTS = 0.25;

/** Beyond these a typed unit is the likelier error [m]; common practice, no source. */
const PLAUSIBLE = {
  copper: { least: 3e-6, most: 0.5e-3 },
  dielectric: { least: 10e-6, most: 4e-3 },
  mask: { least: 3e-6, most: 0.2e-3 },
} as const;

/** What is wrong, missing or unusual in a stackup; empty for a sound one. Never throws. */
export function stackupWarnings(stackup: Stackup): StackupWarning[] {
  if (stackup.layers.length === 0) return [];
  return [
    ...inputWarnings(stackup),
    ...planeWarnings(stackup),
    ...orderWarnings(stackup),
    ...symmetryWarnings(stackup),
  ];
}

function inputWarnings(stackup: Stackup): StackupWarning[] {
  const found: StackupWarning[] = [];
  stackup.layers.forEach((layer, index) => {
    const thickness = thicknessOf(stackup, index);
    if (thickness instanceof DomainError) {
      const code = thickness.message.includes("has no") ? "missing input" : "illegal input";
      found.push({ code, severity: "error", layer: index, message: thickness.message });
    }
    if (typeof thickness === "number") found.push(...plausibility(layer, index, thickness));
    if (isCopper(layer)) return;
    if (layer.dk === null) {
      found.push({
        code: "missing input",
        severity: "error",
        layer: index,
        message: `${layer.name} has no Dk.`,
      });
    } else if (!(layer.dk >= 1)) {
      const message = `The Dk of ${layer.name} is ${layer.dk}; it must be at least 1 (air).`;
      found.push({ code: "illegal input", severity: "error", layer: index, message });
    }
  });
  return found;
}

function plausibility(layer: StackLayer, index: number, thickness: number): StackupWarning[] {
  const kind = isCopper(layer) ? "copper" : layer.kind === "mask" ? "mask" : "dielectric";
  const { least, most } = PLAUSIBLE[kind];
  if (thickness >= least && thickness <= most) return [];
  // what the number would be in the other units, where that is plausible
  const read = [
    { unit: "µm", factor: 1e-6 },
    { unit: "mil", factor: 25.4e-6 },
    { unit: "mm", factor: 1e-3 },
  ];
  const number = (factor: number) => Number((thickness / factor).toPrecision(6));
  const likely = read.flatMap(({ unit, factor: typed }) =>
    read.flatMap(({ unit: meant, factor }) => {
      const value = number(typed) * factor;
      const round = number(typed) <= 1000 && number(typed) >= 0.001;
      return meant !== unit && round && value >= least && value <= most ? [`${number(typed)} ${meant}`] : [];
    }),
  );
  const hint = likely.length > 0 ? ` Was ${[...new Set(likely)].slice(0, 2).join(" or ")} meant?` : "";
  const message = `${layer.name} is ${formatSi(thickness, "length", { unit: "mm", digits: 3 })} thick, which hardly any ${kind === "mask" ? "solder mask" : kind} is.${hint}`;
  return [{ code: "implausible thickness", severity: "warning", layer: index, message }];
}

function planeWarnings(stackup: Stackup): StackupWarning[] {
  const copper = copperIndices(stackup);
  if (copper.length > 0 && !copper.some((index) => stackup.layers[index]?.kind === "plane")) {
    const message = "No layer is a plane: no trace has a reference, and no impedance can be told.";
    return [{ code: "no plane", severity: "error", layer: null, message }];
  }
  const found: StackupWarning[] = [];
  copper.forEach((index, order) => {
    const layer = stackup.layers[index];
    if (!layer || !isSignal(layer)) return;
    const above = neighbour(stackup, copper[order - 1]);
    const below = neighbour(stackup, copper[order + 1]);
    if (above?.kind === "plane" || below?.kind === "plane") {
      if (below && isSignal(below)) {
        const message = `${layer.name} and ${below.name} face each other without a plane between: route them crosswise.`;
        found.push({ code: "facing signals", severity: "info", layer: index, message });
      }
      return;
    }
    const sides = [above && `above it lies ${above.name}`, below && `below it ${below.name}`]
      .filter(Boolean)
      .join(", ");
    const message = `${layer.name} has no plane next to it${sides ? ` (${sides})` : ""}: its return current spreads and it couples.`;
    found.push({ code: "no plane beside", severity: "warning", layer: index, message });
  });
  return found;
}

function orderWarnings(stackup: Stackup): StackupWarning[] {
  const found: StackupWarning[] = [];
  const copper = copperIndices(stackup);
  if (copper.length % 2 === 1 && copper.length > 1) {
    const message = `${copper.length} copper layers: an odd number makes boards bow.`;
    found.push({ code: "odd copper count", severity: "warning", layer: null, message });
  }
  stackup.layers.forEach((layer, index) => {
    const next = stackup.layers[index + 1];
    if (next && isCopper(layer) && isCopper(next)) {
      const message = `${layer.name} and ${next.name} have no dielectric between them.`;
      found.push({ code: "copper on copper", severity: "error", layer: index, message });
    }
    if (next && layer.kind === "core" && bondingMissing(stackup, index)) {
      const message = `Nothing bonds ${layer.name} to the core below it: put prepreg between them.`;
      found.push({ code: "cores unbonded", severity: "warning", layer: index, message });
    }
    if (layer.kind === "mask") found.push(...maskWarnings(stackup, layer, index, copper));
  });
  return found;
}

function maskWarnings(
  stackup: Stackup,
  layer: StackLayer,
  index: number,
  copper: number[],
): StackupWarning[] {
  const inside =
    stackup.layers.slice(0, index).some((other) => other.kind !== "mask") &&
    stackup.layers.slice(index + 1).some((other) => other.kind !== "mask");
  if (inside) {
    const message = `${layer.name} lies inside the board; solder mask belongs outside.`;
    return [{ code: "mask inside", severity: "error", layer: index, message }];
  }
  const beside = index === 0 ? copper[0] : copper[copper.length - 1];
  const thickness = beside === undefined ? null : thicknessOf(stackup, beside);
  if (typeof thickness === "number" && layer.thickness !== null && layer.thickness >= thickness) {
    const message = `${layer.name} is as thick as the copper under it; it is computed as a flat cover.`;
    return [{ code: "mask covers copper", severity: "info", layer: index, message }];
  }
  return [];
}

function symmetryWarnings(stackup: Stackup): StackupWarning[] {
  const found: StackupWarning[] = [];
  const last = stackup.layers.length - 1;
  for (let index = 0; index < last - index; index++) {
    const upper = stackup.layers[index];
    const lower = stackup.layers[last - index];
    if (!upper || !lower) continue;
    const difference = differenceOf(stackup, index, last - index);
    if (difference) {
      const message = `${upper.name} and its mirror ${lower.name} differ in ${difference}: the board may bow.`;
      found.push({ code: "asymmetric", severity: "warning", layer: index, message });
    }
    if (isCopper(upper) && isCopper(lower) && upper.coverage !== null && lower.coverage !== null) {
      if (Math.abs(upper.coverage - lower.coverage) > COVERAGE_POINTS) {
        const shares = `${percent(upper.coverage)} and ${percent(lower.coverage)}`;
        const message = `${upper.name} and its mirror ${lower.name} carry unequal copper (${shares}): the board may bow.`;
        found.push({ code: "copper balance", severity: "warning", layer: index, message });
      }
    }
  }
  return found;
}

function differenceOf(stackup: Stackup, a: number, b: number): string | null {
  const upper = stackup.layers[a];
  const lower = stackup.layers[b];
  if (!upper || !lower) return null;
  const bothCopper = isCopper(upper) && isCopper(lower);
  if (!bothCopper && upper.kind !== lower.kind) return `kind (${upper.kind}, ${lower.kind})`;
  const one = thicknessOf(stackup, a);
  const other = thicknessOf(stackup, b);
  if (
    typeof one === "number" &&
    typeof other === "number" &&
    Math.abs(one - other) > THICKNESS_SHARE * Math.max(one, other)
  ) {
    return "thickness";
  }
  return upper.dk !== lower.dk && !bothCopper ? "Dk" : null;
}

/** true where the next dielectric below, past copper, is a core as well. */
function bondingMissing(stackup: Stackup, index: number): boolean {
  const next = stackup.layers.slice(index + 1).find(isDielectric);
  return next?.kind === "core";
}

function thicknessOf(stackup: Stackup, index: number): number | DomainError {
  const layer = stackup.layers[index];
  try {
    return layer && isCopper(layer) ? finishedCopper(stackup, index) : builtThickness(stackup, index);
  } catch (error) {
    if (error instanceof DomainError) return error;
    throw error;
  }
}

function copperIndices(stackup: Stackup): number[] {
  return stackup.layers.flatMap((layer, index) => (isCopper(layer) ? [index] : []));
}

function neighbour(stackup: Stackup, index: number | undefined): StackLayer | undefined {
  return index === undefined ? undefined : stackup.layers[index];
}

function percent(share: number): string {
  return `${Math.round(share * 100)} %`;
}
