import type { NetDoc, NetPinDoc, NetSectionDoc, RouteGap } from "@/lib/schemas/net";
import { toSi } from "@/lib/si/units";
import { globMatcher } from "../glob";
import { buildRoute, readPinName } from "../route-graph";
import type { GoodRow } from "./list-field";
import type { NetRow } from "./net-list";
import type { SectionRow } from "./section-list";

/** What the project already knows when a list comes in. */
export interface ProjectContext {
  /** Layer name in the list → layer of the stackup. */
  layers: Readonly<Record<string, string | null>>;
  classes: readonly { lineageId: string; name: string; netPatterns: readonly string[] }[];
  /** References of the parts list, for pins whose reference has no digit. */
  references?: ReadonlySet<string>;
}

/** Nets of a section list: one graph a net, in the order in which they first appear. */
export function netsFromSections(rows: readonly GoodRow<SectionRow>[], context: ProjectContext): NetDoc[] {
  const byNet = new Map<string, NetSectionDoc[]>();
  for (const { value, duplicateOf } of rows) {
    // A row given twice is one piece of copper; as two it would be a loop that is not there.
    if (duplicateOf !== null) continue;
    const sections = byNet.get(value.net);
    const section = {
      from: value.from,
      to: value.to,
      layer: value.layer,
      layerLineageId: context.layers[value.layer] ?? null,
      width: value.width,
      length: value.length,
      at: value.at,
    };
    if (sections) sections.push(section);
    else byNet.set(value.net, [section]);
  }
  const classOf = classByName(context);
  return [...byNet].map(([name, sections]) => {
    const route = buildRoute(sections, context.references);
    return netDoc(name, "section list", classOf(name, ""), route.gaps, {
      sections,
      pins: route.pins,
      viaCount: route.viaCount,
      shapeKnown: true,
    });
  });
}

/** Nets of a net list: one straight section where two pins are named; with more the shape stays unknown. */
export function netsFromNetList(rows: readonly GoodRow<NetRow>[], context: ProjectContext): NetDoc[] {
  const classOf = classByName(context);
  return rows
    .filter(({ duplicateOf }) => duplicateOf === null)
    .map(({ value: row }) => {
      const pins = pinsOf(row, context.references);
      const [first, second] = pins;
      const known = row.width !== null && row.length !== null && row.layer !== "";
      const sections: NetSectionDoc[] =
        first && second && row.width && row.length && row.layer !== ""
          ? [
              {
                from: first.node,
                to: second.node,
                layer: row.layer,
                layerLineageId: context.layers[row.layer] ?? null,
                width: row.width,
                length: row.length,
                at: null,
              },
            ]
          : [];
      return netDoc(row.net, "net list", classOf(row.net, row.className), netListGaps(row, pins, known), {
        sections,
        pins,
        viaCount: row.vias ?? 0,
        shapeKnown: pins.length <= 2,
      });
    });
}

/** Class names in a net list that the project does not have, with how many rows name them. */
export function unknownClasses(
  rows: readonly GoodRow<NetRow>[],
  classes: readonly { name: string }[],
): { name: string; rows: number }[] {
  const known = new Set(classes.map(({ name }) => name.toLowerCase()));
  const counts = new Map<string, number>();
  for (const { value } of rows)
    if (value.className !== "" && !known.has(value.className.toLowerCase()))
      counts.set(value.className, (counts.get(value.className) ?? 0) + 1);
  return [...counts].map(([name, count]) => ({ name, rows: count }));
}

function netDoc(
  name: string,
  source: NetDoc["source"],
  classLineageId: string | null,
  gaps: RouteGap[],
  topology: NetDoc["topology"],
): NetDoc {
  return {
    name,
    classLineageId,
    scope: gaps.length === 0 ? "in" : "incomplete",
    scopeKind: "signal",
    scopeReason: "",
    source,
    topology,
    gaps,
    pair: null,
    bus: null,
    matchGroup: null,
    limits: {},
  };
}

/** By the name the list gives, else by the first class whose pattern fits the net. */
function classByName(context: ProjectContext): (net: string, className: string) => string | null {
  const byName = new Map(context.classes.map(({ name, lineageId }) => [name.toLowerCase(), lineageId]));
  const patterns = context.classes.flatMap(({ lineageId, netPatterns }) =>
    netPatterns.map((pattern) => ({ lineageId, fits: globMatcher(pattern) })),
  );
  return (net, className) =>
    byName.get(className.toLowerCase()) ?? patterns.find(({ fits }) => fits(net))?.lineageId ?? null;
}

function pinsOf(row: NetRow, references: ReadonlySet<string> | undefined): NetPinDoc[] {
  const pins: NetPinDoc[] = [];
  const add = (node: string, role: NetPinDoc["role"]) => {
    const name = readPinName(node, references);
    if (name && !pins.some((pin) => pin.node === node)) pins.push({ node, ...name, role });
  };
  if (row.driver !== null) add(row.driver, "driver");
  for (const receiver of row.receivers) add(receiver, row.driver === null ? null : "receiver");
  return pins;
}

function netListGaps(row: NetRow, pins: readonly NetPinDoc[], known: boolean): RouteGap[] {
  const gaps: RouteGap[] = [];
  if (pins.length === 0)
    gaps.push({ kind: "no pins", text: "The list names neither a driver nor a receiver." });
  if (pins.length === 1)
    gaps.push({ kind: "one pin", text: `${pins[0]?.node} is the only pin that the list names.` });
  if (!known) {
    const missing = [
      row.layer === "" && "layer",
      row.width === null && "width",
      row.length === null && "length",
    ].filter(Boolean);
    gaps.push({ kind: "no sections", text: `The list gives no ${missing.join(" and no ")} for this net.` });
  } else if (row.length && !(toSi(row.length, "length") > 0))
    gaps.push({
      kind: "no sections",
      text: "The list gives this net a length of 0, as one that is not routed. Route it or give its length.",
    });
  return gaps;
}
