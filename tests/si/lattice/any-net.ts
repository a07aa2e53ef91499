import fc from "fast-check";
import type { LinearPart, Network, Part, Pwl, Section } from "@/lib/si";
import { edge } from "./nets";

const PS = 1e-12;

/** Which kinds of section and part a net may hold. */
export interface Kinds {
  coils?: boolean;
  pairs?: boolean;
  skin?: boolean;
  lossy?: boolean;
  clamps?: boolean;
  rings?: boolean;
  capacitors?: boolean;
}

interface Piece {
  /** where it hangs, by number of earlier nodes; and, of a ring, where it ends */
  from: number;
  to: number;
  kind: number;
  impedance: number;
  delay: number;
  part: number;
  size: number;
}

/** A net as it was drawn by lot; `netOf` makes it with any source and scale. */
export interface AnyNet {
  pieces: Piece[];
  resistance: number;
  ramp: number;
  kinds: Kinds;
}

export function anyNets(most: number, kinds: Kinds): fc.Arbitrary<AnyNet> {
  return fc.record({
    pieces: fc.array(
      fc.record({
        from: fc.nat(1000),
        to: fc.nat(1000),
        kind: fc.nat(99),
        impedance: fc.double({ min: 25, max: 120, noNaN: true }),
        delay: fc.oneof(fc.integer({ min: 20, max: 400 }), fc.double({ min: 15, max: 400, noNaN: true })),
        part: fc.nat(99),
        size: fc.double({ min: 0.3, max: 5, noNaN: true }),
      }),
      { minLength: 1, maxLength: most },
    ),
    resistance: fc.double({ min: 3, max: 120, noNaN: true }),
    ramp: fc.integer({ min: 80, max: 600 }),
    kinds: fc.constant(kinds),
  });
}

/**
 * @param scale  of impedances, of times, and of the source
 */
export function netOf(
  { pieces, resistance, ramp, kinds }: AnyNet,
  { ohms = 1, time = 1, wave }: { ohms?: number; time?: number; wave?: Pwl } = {},
): Network {
  const net: Network = {
    rails: kinds.clamps ? [{ name: "vdd", node: "vdd", volts: 1 }] : [],
    drivers: [
      {
        name: "U1",
        kind: "thevenin",
        node: "n0",
        resistance: resistance * ohms,
        wave: wave ?? edge(1, ramp * PS * time),
      },
    ],
    sections: [],
    parts: [],
    probes: [],
  };
  let nodes = 1;
  pieces.forEach((piece, i) => {
    const a = `n${piece.from % nodes}`;
    const isRing = kinds.rings && piece.kind % 10 === 0 && nodes > 1;
    const b = isRing ? `n${piece.to % nodes}` : `n${nodes++}`;
    net.sections.push(...sectionOf(piece, `s${i}`, a, b, kinds, ohms, time));
    if (net.sections[net.sections.length - 1]!.kind === "pair")
      for (const end of ["x", "y"])
        net.parts.push({ name: `q${i}${end}`, kind: "R", a: `${end}${i}`, b: "0", value: 55 * ohms });
    net.parts.push(...partsOf(piece, i, b, kinds, ohms, time));
  });
  for (let k = 0; k < nodes; k++) net.probes.push({ name: `n${k}`, node: `n${k}` });
  return net;
}

function sectionOf(
  piece: Piece,
  name: string,
  a: string,
  b: string,
  kinds: Kinds,
  ohms: number,
  time: number,
): Section[] {
  const impedance = piece.impedance * ohms;
  const delay = piece.delay * PS * time;
  const lot = piece.kind % 8;
  if (kinds.pairs && lot === 1)
    return [
      {
        name,
        kind: "pair",
        a1: a,
        a2: `x${name.slice(1)}`,
        b1: b,
        b2: `y${name.slice(1)}`,
        even: { impedance: impedance * 1.2, delay: delay * 1.05 },
        odd: { impedance: impedance * 0.9, delay },
      },
    ];
  if (kinds.lossy && lot === 2)
    return [
      {
        name,
        kind: "rlc",
        a,
        b,
        l: impedance * 6e-9,
        c: 6e-9 / impedance,
        r: 8 * ohms * (6e-9 / delay),
        length: delay / 6e-9,
      },
    ];
  const skin = kinds.skin && lot === 3 ? piece.size * 5e-7 * Math.sqrt(time) : 0;
  return [{ name, kind: "line", a, b, impedance, delay, skin }];
}

function partsOf(piece: Piece, i: number, node: string, kinds: Kinds, ohms: number, time: number): Part[] {
  const lot = piece.part % 6;
  const to = (kind: LinearPart["kind"], value: number): Part => ({
    name: `p${i}`,
    kind,
    a: node,
    b: "0",
    value,
  });
  if (kinds.capacitors && lot < 2) return [to("C", (piece.size * PS * time) / ohms)];
  if (lot === 2) return [to("R", 40 * piece.size * ohms)];
  if (kinds.coils && lot === 3)
    return [
      { name: `l${i}`, kind: "L", a: node, b: `m${i}`, value: piece.size * 1e-9 * ohms * time },
      { name: `r${i}`, kind: "R", a: `m${i}`, b: "0", value: 60 * ohms },
    ];
  if (kinds.clamps && lot === 4)
    return [
      ["h", node, "vdd"],
      ["l", "0", node],
    ].map(([end, a, b]): Part => ({
      name: `d${end}${i}`,
      kind: "diode",
      a: a!,
      b: b!,
      saturationCurrent: 1e-13,
      emission: 1.1,
      thermalVoltage: 0.0259,
      seriesResistance: 4,
    }));
  return [];
}
