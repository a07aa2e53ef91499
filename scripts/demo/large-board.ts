/**
 * A large board from a seed: for tables, screenshots and speed. The same seed and count give the same
 * bytes. About one net in twelve is drawn so that it fails or lacks something.
 */

import type { DemoBoard, DemoWidths } from "./tide-gauge-board";

const CLASSES = ["Memory data", "Memory address", "Ethernet", "Flash", "Control"] as const;
const LAYERS = ["L1 Top", "L3 Inner", "L4 Inner", "L6 Bottom"] as const;

/** Small, fast, repeatable: mulberry32 on a 32-bit state, from memory; uniform in [0, 1). */
function randomFrom(seed: number): () => number {
  let state = seed >>> 0;
  return () => {
    state = (state + 0x6d2b79f5) >>> 0;
    let t = state;
    t = Math.imul(t ^ (t >>> 15), t | 1);
    t ^= t + Math.imul(t ^ (t >>> 7), t | 61);
    return ((t ^ (t >>> 14)) >>> 0) / 4294967296;
  };
}

/**
 * @param count number of signal nets, each its own path, 1…100,000
 * @param seed  32-bit integer
 */
export function largeBoard(count: number, seed: number, widths: DemoWidths): DemoBoard {
  const random = randomFrom(seed);
  const pick = <T>(list: readonly T[]): T => list[Math.floor(random() * list.length)] as T;
  const sections: string[] = ["net,from,to,layer,width_mm,length_mm"];
  const parts: string[] = ["reference,part number,value,pins"];
  const devices = Math.max(2, Math.ceil(count / 400));
  for (let d = 0; d < devices; d++) {
    parts.push(`U${2 * d + 1},SSC-MCU-196,controller,800`, `U${2 * d + 2},SDR-256-8,memory,800`);
  }
  let via = 1;
  for (let index = 0; index < count; index++) {
    const className = pick(CLASSES);
    const layer = pick(LAYERS);
    const device = Math.floor(index / 400);
    const driver = `U${2 * device + 1}.${(index % 400) + 1}`;
    const receiver = `U${2 * device + 2}.${(index % 400) + 1}`;
    const net = `${className.replace(/[^A-Za-z]/g, "").toUpperCase()}_${String(index).padStart(5, "0")}`;
    const width = (l: string) => widths[className]?.[l] ?? "0.150";
    // Short lines are clean without a resistor; a few long ones are drawn that ring.
    const long = random() < 0.06;
    const length = long ? 60 + 90 * random() : 6 + 16 * random();
    if (random() < 0.01) {
      sections.push(`${net},${driver},via${via++},L1 Top,${width("L1 Top")},${(length / 3).toFixed(3)}`);
      sections.push(
        `${net},via${via++},${receiver},L6 Bottom,${width("L6 Bottom")},${(length / 2).toFixed(3)}`,
      );
    } else if (layer === "L1 Top") {
      sections.push(`${net},${driver},${receiver},L1 Top,${width("L1 Top")},${length.toFixed(3)}`);
    } else {
      const a = via++;
      const b = via++;
      sections.push(`${net},${driver},via${a},L1 Top,${width("L1 Top")},1.500`);
      sections.push(`${net},via${a},via${b},${layer},${width(layer)},${length.toFixed(3)}`);
      sections.push(`${net},via${b},${receiver},L1 Top,${width("L1 Top")},1.200`);
    }
  }
  return {
    sectionList: `${sections.join("\n")}\n`,
    partsList: `${parts.join("\n")}\n`,
    neighbourList: "net,neighbour,layer,gap_mm,parallel_mm\n",
  };
}
