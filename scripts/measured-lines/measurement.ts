import { existsSync, readFileSync } from "node:fs";
import { fileURLToPath } from "node:url";
import { gunzipSync } from "node:zlib";
import { readTouchstone } from "../../lib/formats/touchstone/read";
import type { PortData } from "../../lib/si";

const folder = fileURLToPath(new URL("../../../shared/reference/touchstone/", import.meta.url));
const files = {
  short: "microstrip-through-100mm.s2p.gz",
  long: "microstrip-through-200mm.s2p.gz",
  open: "microstrip-open.s1p.gz",
  stepped: "microstrip-stepped-140mm.s2p.gz",
} as const;

export type Measurements = Record<keyof typeof files, PortData>;

/** The four measured microstrips; null where their folder is not beside this repository. */
export function measurements(): Measurements | null {
  if (!existsSync(`${folder}${files.short}`)) return null;
  const read = (name: string) => {
    const { document, problems } = readTouchstone(gunzipSync(readFileSync(folder + name)), name);
    if (!document) throw new Error(`${name}: ${problems[0]?.reason}`);
    return document.data;
  };
  return {
    short: read(files.short),
    long: read(files.long),
    open: read(files.open),
    stepped: read(files.stepped),
  };
}

/** Every `every`-th frequency up to `most` [Hz], from `least` on. */
export function thinned(data: PortData, every: number, least: number, most: number): PortData {
  const kept = [...data.frequencies.keys()].filter(
    (k) => k % every === 0 && data.frequencies[k]! >= least && data.frequencies[k]! <= most,
  );
  const size = data.ports * data.ports * 2;
  const values = new Float64Array(kept.length * size);
  kept.forEach((k, i) => values.set(data.values.subarray(k * size, (k + 1) * size), i * size));
  return { ...data, frequencies: Float64Array.from(kept, (k) => data.frequencies[k]!), values };
}
