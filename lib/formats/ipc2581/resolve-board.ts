import { findAnchors } from "./anchors";
import { areaOf } from "./area";
import type { BoardFile, BoardLayer, BoardNet } from "./document";
import type { BoardDraft, DraftHole, DraftPad, DraftStep, DraftTrace } from "./draft";
import { BoardFileError } from "./errors";
import { routeNet } from "./net-route";
import { pinPlaces, resolveParts } from "./resolve-parts";

const MAX_NET_NAME = 120;
/** A net that covers this share of the board on a layer makes it a plane. */
const PLANE_SHARE = 0.5;

/** What was read, put together: nets with their sections, parts, layers. */
export function resolveBoard(draft: BoardDraft, tolerance: number): BoardFile {
  const step = chooseStep(draft);
  const layers = copperLayers(draft, step);
  const copper = layers.filter((layer) => layer.copper).map(({ name }) => name);
  const order = copperOrder(draft, copper);
  const nets = resolveNets(draft, step, new Set(copper), spans(layers, order), tolerance);
  markPlanes(layers, nets, step);
  return {
    revision: draft.revision,
    unit: draft.unit?.name ?? "mm",
    step: step.name,
    layers,
    stackup: draft.stackup,
    specs: draft.specs,
    parts: resolveParts(draft, step),
    nets,
    profile: step.profile,
    holeCount: step.holes.length,
    problems: draft.problems,
    problemCount: draft.problemCount,
  };
}

/** The board itself, not the panel that repeats it: the step with most on it. */
function chooseStep(draft: BoardDraft): DraftStep {
  const weight = ({ traces, pads, components, holes, pours }: DraftStep) =>
    traces.length + pads.length + components.length + holes.length + pours.length;
  const full = draft.steps.filter((step) => weight(step) > 0);
  const best =
    full.find(({ name }) => name === draft.wantedStep) ??
    full.reduce<DraftStep | undefined>((a, b) => (a && weight(a) >= weight(b) ? a : b), undefined);
  if (!best)
    throw new BoardFileError(
      "nothing",
      "This file holds no lines, pads, holes or parts. Export it with its conductor layers.",
    );
  for (const step of full)
    if (step !== best)
      draft.problem(
        1,
        "Step",
        `${step.name} is another board or panel in this file; only ${best.name} is read.`,
      );
  return best;
}

/** Layers as declared, and those that lines lie on without being declared. */
function copperLayers(draft: BoardDraft, step: DraftStep): BoardLayer[] {
  const known = new Set(draft.layers.map(({ name }) => name));
  for (const { layer, line } of step.traces)
    if (layer !== "" && !known.has(layer)) {
      known.add(layer);
      draft.problem(
        line,
        "LayerFeature",
        `names layer ${layer}, which the file does not declare; taken as copper.`,
      );
      draft.layers.push({
        name: layer,
        function: "",
        side: "",
        copper: true,
        plane: false,
        span: null,
        specs: [],
      });
    }
  return draft.layers;
}

/** Copper from top to bottom: as the stackup has it, else as declared, with a side BOTTOM last. */
function copperOrder(draft: BoardDraft, copper: readonly string[]): string[] {
  const plies = draft.stackup?.plies.map(({ layer }) => layer).filter((name) => copper.includes(name)) ?? [];
  if (copper.every((name) => plies.includes(name))) return [...new Set(plies)];
  const sides = new Map(draft.layers.map(({ name, side }) => [name, side]));
  const rank = (name: string) => ({ TOP: 0, BOTTOM: 2 })[sides.get(name) ?? ""] ?? 1;
  return [...copper].sort((a, b) => rank(a) - rank(b));
}

/** Layers that a hole joins; all copper where its span is not known. */
function spans(
  layers: readonly BoardLayer[],
  order: readonly string[],
): (hole: DraftHole) => readonly string[] {
  const byName = new Map(layers.map((layer) => [layer.name, layer.span]));
  const known = new Map<string, readonly string[]>();
  return (hole) => {
    const span = hole.span ?? byName.get(hole.layer);
    if (!span) return order;
    const key = `${span.from}\u0000${span.to}`;
    let through = known.get(key);
    if (!through) {
      const ends = [order.indexOf(span.from), order.indexOf(span.to)].sort((a, b) => a - b);
      const [first = -1, last = -1] = ends;
      known.set(key, (through = first < 0 ? order : order.slice(first, last + 1)));
    }
    return through;
  };
}

interface NetCopper {
  traces: DraftTrace[];
  pads: DraftPad[];
  holes: DraftHole[];
  pins: Set<string>;
}

function resolveNets(
  draft: BoardDraft,
  step: DraftStep,
  copper: ReadonlySet<string>,
  through: (hole: DraftHole) => readonly string[],
  tolerance: number,
): BoardNet[] {
  const byName = new Map<string, NetCopper>();
  const refused = new Set<string>();
  const of = (name: string, line: number): NetCopper | null => {
    if (name.length > MAX_NET_NAME || /\p{Cc}/u.test(name)) {
      if (!refused.has(name))
        draft.problem(
          line,
          "Set",
          `names net '${name.slice(0, 40)}…' with more than ${MAX_NET_NAME} characters or with control characters; left out.`,
        );
      refused.add(name);
      return null;
    }
    let net = byName.get(name);
    if (!net) byName.set(name, (net = { traces: [], pads: [], holes: [], pins: new Set() }));
    return net;
  };
  const netOfPin = new Map<string, string>();
  for (const [name, pins] of step.logicalNets)
    for (const pin of pins) {
      netOfPin.set(pin, name);
      of(name, 1)?.pins.add(pin);
    }
  for (const trace of step.traces) if (copper.has(trace.layer)) of(trace.net, trace.line)?.traces.push(trace);
  for (const pad of step.pads) {
    const name = pad.net ?? pad.pins.map((pin) => netOfPin.get(pin)).find((net) => net !== undefined);
    if (name === undefined || !copper.has(pad.layer)) continue;
    const net = of(name, pad.line);
    net?.pads.push(pad);
    for (const pin of pad.pins) net?.pins.add(pin);
  }
  for (const hole of step.holes) if (hole.net) of(hole.net, hole.line)?.holes.push(hole);
  for (const { net, layer } of step.pours) if (net && copper.has(layer)) of(net, 1);

  const places = pinPlaces(step);
  const pours = poursByNet(step, copper);
  return [...byName].map(([name, net]) => {
    const placedPins = [...net.pins].flatMap((pin) => places.get(pin) ?? []);
    const anchors = findAnchors(net.pads, net.holes, placedPins, through, tolerance);
    const route = routeNet(net.traces, anchors, tolerance);
    for (const { line, layer } of route.within.slice(0, 3))
      draft.problem(
        line,
        "Polyline",
        `of net ${name} on ${layer} begins and ends in one place, so it joins nothing; left out.`,
      );
    return {
      name,
      pins: [...net.pins],
      vias: anchors.filter(({ plated, pin }) => plated && pin === null).length,
      sections: route.sections,
      pours: pours.get(name) ?? [],
      specs: [...(step.netSpecs.get(name) ?? [])],
    };
  });
}

function poursByNet(step: DraftStep, copper: ReadonlySet<string>): Map<string, BoardNet["pours"]> {
  const byNet = new Map<string, BoardNet["pours"]>();
  for (const { net, layer, outline, cutout } of step.pours) {
    if (!net || cutout || !copper.has(layer)) continue;
    const pours = byNet.get(net) ?? [];
    pours.push({ layer, area_m2: areaOf(outline), outline });
    byNet.set(net, pours);
  }
  return byNet;
}

function markPlanes(layers: BoardLayer[], nets: readonly BoardNet[], step: DraftStep): void {
  const board = Math.max(0, ...step.profile.map(areaOf));
  if (board === 0) return;
  for (const layer of layers)
    layer.plane ||= nets.some(
      ({ pours }) =>
        pours.reduce((sum, pour) => sum + (pour.layer === layer.name ? pour.area_m2 : 0), 0) >
        PLANE_SHARE * board,
    );
}
