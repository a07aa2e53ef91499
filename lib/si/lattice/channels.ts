import type { Circuit, Port } from "./circuit";
import { dcState, type DcState } from "./dc";

/** Something that is reported over time: a node, or a wave at a line end. */
export type Channel =
  | { kind: "node"; node: number }
  | { kind: "fixed"; fixed: number }
  | { kind: "outgoing" | "incident"; end: number };

export function nodeChannel(ref: number): Channel {
  return ref >= 0 ? { kind: "node", node: ref } : { kind: "fixed", fixed: -1 - ref };
}

/** Every wave of every line end: outgoing and incident of end 0, of end 1, … */
export function waveChannels(circuit: Circuit): Channel[] {
  return circuit.lines.flatMap((_, i) =>
    [2 * i, 2 * i + 1].flatMap((end): Channel[] => [
      { kind: "outgoing", end },
      { kind: "incident", end },
    ]),
  );
}

export function recordedNodes(channels: readonly Channel[]): Set<number> {
  const nodes = new Set<number>();
  for (const channel of channels) if (channel.kind === "node") nodes.add(channel.node);
  return nodes;
}

/** Each channel's value before t = 0. */
export function restLevels(circuit: Circuit, channels: readonly Channel[]): Float64Array {
  const levels = circuit.fixed.map((item) => item.rest);
  const isQuiet = levels.every((level) => level === 0) && circuit.elements.length === 0;
  const rest = new Float64Array(channels.length);
  if (isQuiet) return rest;
  const state = dcState(circuit, levels);
  return rest.map((_, i) => restOf(channels[i]!, circuit, state, levels));
}

function restOf(channel: Channel, circuit: Circuit, state: DcState, levels: readonly number[]): number {
  if (channel.kind === "node") return state.volts[channel.node]!;
  if (channel.kind === "fixed") return levels[channel.fixed]!;
  const index = channel.end >> 1;
  const line = circuit.lines[index]!;
  const isB = (channel.end & 1) === 1;
  const volts = portLevel(isB ? line.b : line.a, state, levels);
  const into = (isB ? -1 : 1) * state.current[index]! * line.impedance;
  return (channel.kind === "outgoing" ? volts + into : volts - into) / 2;
}

function portLevel(port: Port, { volts }: DcState, levels: readonly number[]): number {
  const at = (ref: number) => (ref >= 0 ? volts[ref]! : levels[-1 - ref]!);
  return port.second === null ? at(port.node) : (at(port.node) + port.sign * at(port.second)) / 2;
}
