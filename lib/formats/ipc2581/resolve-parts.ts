import type { PlacedPin } from "./anchors";
import type { BoardPart } from "./document";
import type { BoardDraft, DraftStep } from "./draft";
import { placed } from "./xform";

/** The parts of a board, with number and value from its bill of material and pins from its packages or pads. */
export function resolveParts(draft: BoardDraft, step: DraftStep): BoardPart[] {
  const padPins = new Map<string, Set<string>>();
  for (const { pins } of step.pads)
    for (const pin of pins) {
      const dot = pin.indexOf(".");
      const names = padPins.get(pin.slice(0, dot)) ?? new Set();
      padPins.set(pin.slice(0, dot), names.add(pin.slice(dot + 1)));
    }
  const seen = new Set<string>();
  return step.components.flatMap((part) => {
    if (seen.has(part.reference)) {
      draft.problem(1, "Component", `${part.reference} stands on the board twice; the first one counts.`);
      return [];
    }
    seen.add(part.reference);
    const bom = draft.boms.get(part.reference);
    const named = step.packages.get(part.package)?.pins.map(({ name }) => name) ?? [];
    const pins = named.length > 0 ? named : [...(padPins.get(part.reference) ?? [])];
    return [
      {
        reference: part.reference,
        partNumber: part.part || (bom?.partNumber ?? ""),
        value: bom?.value ?? "",
        package: part.package,
        layer: part.layer,
        pins: [...new Set(pins)],
      },
    ];
  });
}

/** Where each pin stands by its part's place and its package, for pins whose pads do not say. */
export function pinPlaces(step: DraftStep): Map<string, PlacedPin> {
  const places = new Map<string, PlacedPin>();
  for (const part of step.components) {
    if (Number.isNaN(part.x)) continue;
    const form = { rotation: part.rotation, mirror: part.mirror, scale: 1, dx: 0, dy: 0 };
    for (const pin of step.packages.get(part.package)?.pins ?? []) {
      const [x, y] = placed(form, part, pin.x, pin.y);
      const name = `${part.reference}.${pin.name}`;
      places.set(name, { pin: name, x, y, layer: part.layer });
    }
  }
  return places;
}
