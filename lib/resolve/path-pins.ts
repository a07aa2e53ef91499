import type { PathPin } from "@/lib/si/path/types";
import type { StoredNet } from "@/lib/schemas/net";
import type { StoredNetClass } from "@/lib/schemas/net-class";
import type { BoardIndex } from "./board-index";
import type { PathGroup } from "./path-groups";
import { byName, pathNode } from "./pin-names";
import { withEdge } from "./si-models";

export interface MissingInput {
  input: string;
  detail: string;
}

export interface GroupPins {
  drivers: PathPin[];
  receivers: PathPin[];
  missing: MissingInput[];
}

/**
 * The pins of a path that drive and that receive, with their models: the bound one, else the class's (its driver at
 * the class's edge). A pin that nobody gave a role receives when another drives; when none does, who drives is asked.
 */
export function resolvePins(group: PathGroup, netClass: StoredNetClass | null, board: BoardIndex): GroupPins {
  const result: GroupPins = { drivers: [], receivers: [], missing: [] };
  const unsaid: { pin: PathPin; reference: string }[] = [];
  const ask = (input: string, detail: string) => {
    if (!result.missing.some((entry) => entry.input === input)) result.missing.push({ input, detail });
  };
  for (const { net, pin } of pinsOf(group.nets)) {
    if (board.twoTerminals.arrays.has(pin.reference)) {
      ask(
        `pin pairs of ${pin.reference}`,
        `${pin.reference} has more than two pins; which belong together is not known.`,
      );
      continue;
    }
    if (board.twoTerminals.references.has(pin.reference)) continue;
    const said = board.roles.of(pin, net.name);
    if (said.role === "passive") continue;
    const bound = board.model(said.modelLineageId);
    const classDriver = board.model(netClass?.driverModelLineageId ?? null)?.driver ?? null;
    const driver =
      bound?.driver ??
      (classDriver && withEdge(classDriver, board.si.orNull(netClass?.edge ?? null, "time")));
    const receiver =
      bound?.receiver ?? board.model(netClass?.receiverModelLineageId ?? null)?.receiver ?? null;
    const drives = said.role === "driver" || said.role === "either";
    const receives = said.role !== "driver";
    const entry: PathPin = {
      pin: pin.node,
      node: pathNode(net, pin.node, board.pinNodes),
      net: net.name,
      driver: drives ? driver : null,
      receiver: receives ? receiver : null,
    };
    if (said.role === null) unsaid.push({ pin: entry, reference: pin.reference });
    if (drives) {
      result.drivers.push(entry);
      if (!driver)
        ask(
          `driver model of ${pin.reference}`,
          `${pin.node} drives ${net.name}, and neither a binding nor the class gives it a driver model.`,
        );
    }
    if (receives) {
      result.receivers.push(entry);
      if (!receiver && said.role !== null)
        ask(
          `receiver model of ${pin.reference}`,
          `${pin.node} receives ${net.name}, and neither a binding nor the class gives it a receiver model.`,
        );
    }
  }
  if (result.drivers.length === 0) askWhoDrives(result, unsaid, ask);
  else {
    for (const { pin, reference } of unsaid)
      if (!pin.receiver)
        ask(
          `receiver model of ${reference}`,
          `${pin.pin} receives ${pin.net}, and neither a binding nor the class gives it a receiver model.`,
        );
    const onlyDriver = result.drivers.length === 1 ? result.drivers[0] : undefined;
    const listening = result.receivers.some((pin) => pin !== onlyDriver);
    const name = group.nets[0]?.name ?? "the path";
    if (!listening)
      ask(
        `receiver of ${name}`,
        `Only ${result.drivers.map((pin) => pin.pin).join(", ")} is on ${name}; no pin receives.`,
      );
  }
  return result;
}

function askWhoDrives(
  result: GroupPins,
  unsaid: { reference: string }[],
  ask: (input: string, detail: string) => void,
) {
  const references = [...new Set(unsaid.map(({ reference }) => reference))].sort(byName);
  const listed = references.length > 6 ? [...references.slice(0, 6), "others"] : references;
  if (listed.length === 0) {
    const pins = result.receivers.map((pin) => pin.pin);
    ask(
      "a driving pin",
      pins.length > 0
        ? `${pins.join(", ")} only ${pins.length === 1 ? "receives" : "receive"}. Say which pin drives, or put the net out of scope.`
        : "No pin that drives or receives is on this route. Import its pins, or put the net out of scope.",
    );
  } else ask(`which of ${listed.join(", ")} drives`, "No role or binding says which pin drives.");
}

function* pinsOf(nets: StoredNet[]) {
  for (const net of nets) {
    const seen = new Set<string>();
    for (const pin of [...net.topology.pins].sort((a, b) => byName(a.node, b.node))) {
      if (seen.has(pin.node)) continue;
      seen.add(pin.node);
      yield { net, pin };
    }
  }
}
