import { globMatcher } from "@/lib/formats/glob";
import type { BindingMatches, PinWithoutModel } from "@/lib/schemas/binding-matches";
import type { NetPinDoc } from "@/lib/schemas/net";
import type { RevisionInputs } from "@/lib/schemas/snapshot";
import { byName } from "./pin-names";
import { PinRoles } from "./pin-roles";
import { findTwoTerminals } from "./two-terminal";

type Inputs = Pick<RevisionInputs, "bindings" | "nets" | "parts" | "models" | "classes">;

/** How many of the pins without a model are named; the rest are counted. */
const NAMED = 500;

/**
 * What each binding reaches: pins that its patterns fit, and those that no earlier one takes. Pins of series and end
 * parts (two-terminal) count nowhere: they neither drive nor receive. Then the pins of nets in scope that drive or
 * receive without a model, bound or of their class.
 */
export function matchBindings(inputs: Inputs): BindingMatches {
  const parts = new Map(inputs.parts.map((part) => [part.reference, part]));
  const roles = new PinRoles(inputs.bindings, parts);
  const { references, arrays } = findTwoTerminals(inputs.nets, parts);
  const models = new Map(inputs.models.map((model) => [model.lineageId, model]));
  const classes = new Map(inputs.classes.map((entry) => [entry.lineageId, entry]));
  const lines = inputs.bindings.map((binding) => ({
    reference: globMatcher(binding.referencePattern),
    partNumber: globMatcher(binding.partNumberPattern),
    pin: globMatcher(binding.pinPattern),
    net: globMatcher(binding.netPattern),
    counts: { fits: 0, takes: 0 },
  }));
  const forReference = new Map<string, typeof lines>();
  const linesOf = (reference: string) => {
    let found = forReference.get(reference);
    if (!found) {
      const partNumber = parts.get(reference)?.partNumber ?? "";
      found = lines.filter((line) => line.reference(reference) && line.partNumber(partNumber));
      forReference.set(reference, found);
    }
    return found;
  };
  let pins = 0;
  let without = 0;
  const groups = new Map<string, PinWithoutModel>();

  const lack = (pin: NetPinDoc, net: string, needs: PinWithoutModel["needs"]) => {
    without++;
    const key = `${pin.reference} ${needs}`;
    const group = groups.get(key);
    if (group) {
      group.pins++;
      if (group.examples.length < 3) group.examples.push(`${pin.node} on ${net}`);
    } else
      groups.set(key, {
        reference: pin.reference,
        partNumber: parts.get(pin.reference)?.partNumber ?? "",
        needs,
        pins: 1,
        examples: [`${pin.node} on ${net}`],
      });
  };

  for (const net of inputs.nets) {
    const netClass = net.classLineageId ? classes.get(net.classLineageId) : undefined;
    const seen = new Set<string>();
    for (const pin of net.topology.pins) {
      if (seen.has(pin.node) || references.has(pin.reference) || arrays.has(pin.reference)) continue;
      seen.add(pin.node);
      pins++;
      let taken = false;
      for (const line of linesOf(pin.reference)) {
        if (!line.pin(pin.pin) || !line.net(net.name)) continue;
        line.counts.fits++;
        if (!taken) line.counts.takes++;
        taken = true;
      }
      if (net.scope === "out") continue;
      const { role, modelLineageId } = roles.of(pin, net.name);
      if (role === "passive") continue;
      const bound = modelLineageId ? models.get(modelLineageId) : undefined;
      const classModel = (lineageId: string | null | undefined) =>
        lineageId ? models.get(lineageId) : undefined;
      const drives = bound?.driver ?? classModel(netClass?.driverModelLineageId)?.driver ?? null;
      const receives = bound?.receiver ?? classModel(netClass?.receiverModelLineageId)?.receiver ?? null;
      if (role === null) {
        if (!taken) lack(pin, net.name, "role");
      } else {
        if (role !== "receiver" && !drives) lack(pin, net.name, "driver");
        if (role !== "driver" && !receives) lack(pin, net.name, "receiver");
      }
    }
  }
  const listed = [...groups.values()].sort((a, b) => b.pins - a.pins || byName(a.reference, b.reference));
  return {
    pins,
    lines: lines.map(({ counts }) => counts),
    pinsWithoutModel: without,
    withoutModel: listed.slice(0, NAMED),
  };
}
