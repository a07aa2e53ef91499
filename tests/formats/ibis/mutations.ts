import { existsSync, readdirSync, readFileSync } from "node:fs";
import { fileURLToPath } from "node:url";
import { expect } from "vitest";
import { ibisDriver } from "@/lib/formats/ibis/driver";
import { ibisLimits } from "@/lib/formats/ibis/limits";
import { ibisQuality } from "@/lib/formats/ibis/quality";
import { ibisReceiver } from "@/lib/formats/ibis/receiver";
import { readIbis } from "@/lib/formats/ibis/read";
import { DomainError } from "@/lib/si/errors";
import { validateNetwork } from "@/lib/si/network";
import { saltFile } from "./salt-buffer";

const folder = fileURLToPath(new URL("../../../../shared/reference/ibis", import.meta.url));
const LONGEST_SEED = 12_000;
/** Every how many cases a model is also judged and converted, which takes longer than reading it. */
const CONVERTED = 5;

/** Files to break: our own, and pieces of the public samples where those are present. */
function seeds(): string[] {
  const own = [saltFile(), saltFile({ waveforms: false })];
  if (!existsSync(folder)) return own;
  const samples = readdirSync(folder)
    .filter((file) => file.endsWith(".ibs"))
    .map((file) => readFileSync(`${folder}/${file}`, "utf8"))
    .flatMap((text) => {
      if (text.length < LONGEST_SEED) return [text];
      const head = text.slice(0, 2000);
      return [3, 5, 8].map(
        (n) => head + text.slice((text.length * n) / 11, (text.length * n) / 11 + LONGEST_SEED),
      );
    });
  return [...own, ...samples];
}

/** mulberry32: a seed gives the same run everywhere. */
function random(seed: number): () => number {
  let a = seed;
  return () => {
    a = (a + 0x6d2b79f5) | 0;
    let t = Math.imul(a ^ (a >>> 15), 1 | a);
    t = (t + Math.imul(t ^ (t >>> 7), 61 | t)) ^ t;
    return ((t ^ (t >>> 14)) >>> 0) / 4294967296;
  };
}

const INSERTS = [
  "[End]",
  "[Model] X\n",
  "[Submodel] X\n",
  "[Comment Char] #_char\n",
  "NA",
  "-",
  "1e308",
  "-1e308",
  "1e-308",
  "1e999",
  "0",
  "0/0",
  "K",
  "M",
  "[",
  "]",
  "[]",
  "|",
  "\n",
  "\r",
  "\t",
  "\u0000",
  "\uFEFF",
  "µ",
  "__proto__",
  "constructor",
  "R_fixture = 0\n",
  "R_fixture = 1e-300\n",
  "V_fixture = 1e300\n",
  "Model_type Series\n",
  "Model_type Output_ECL\n",
  "Model_type Open_drain\n",
  "[Voltage Range] 0 0 0\n",
  "[Voltage Range] -5 NA 1e9\n",
  "[External Model]\n",
  "[Rising Waveform]\n",
  "[Pullup]\n",
  "[Ramp]\n",
  "x".repeat(2000),
];

function mutate(text: string, next: () => number): string {
  const at = () => Math.floor(next() * text.length);
  const rounds = 1 + Math.floor(next() * 8);
  for (let n = 0; n < rounds; n++) {
    const from = at();
    const to = Math.min(text.length, from + Math.floor(next() ** 3 * 400));
    const kind = Math.floor(next() * 7);
    if (kind === 0) text = text.slice(0, from) + text.slice(to);
    else if (kind === 1)
      text = text.slice(0, from) + INSERTS[Math.floor(next() * INSERTS.length)] + text.slice(from);
    else if (kind === 2) text = text.slice(0, to) + text.slice(from);
    else if (kind === 3)
      text = text.slice(0, from) + String.fromCharCode(next() * 256) + text.slice(from + 1);
    else if (kind === 4) text = text.slice(0, from) + text.slice(from, to).toUpperCase() + text.slice(to);
    else if (kind === 5) text = text.replace(/\d/, String(Math.floor(next() * 10)));
    else {
      const other = at();
      text = text.slice(0, from) + text.slice(other, other + (to - from)) + text.slice(to);
    }
  }
  return text;
}

/** Reads `count` broken files; whatever is in them, there is an answer in sentences, soon. @returns the slowest [ms] */
export function readBroken(count: number, seed: number): number {
  const files = seeds();
  const next = random(seed);
  let slowest = 0;
  for (let n = 0; n < count; n++) {
    const text = mutate(files[n % files.length]!, next);
    const started = performance.now();
    try {
      judge(text, n % CONVERTED === 0);
    } catch (cause) {
      throw new Error(`Case ${n} of seed ${seed}: ${JSON.stringify(text.slice(0, 4000))}`, { cause });
    }
    slowest = Math.max(slowest, performance.now() - started);
  }
  return slowest;
}

function judge(text: string, isConverted: boolean): void {
  const { document, problems } = readIbis(text);
  if (!document) expect(problems).toHaveLength(1);
  expect(problems.every(({ line, reason }) => line >= 1 && reason.endsWith("."))).toBe(true);
  if (!document || !isConverted) return;
  expect(
    ibisQuality(document).every(({ line, reason }) => line >= 1 && !/NaN|Infinity|undefined/.test(reason)),
  ).toBe(true);
  for (const model of document.models) {
    ibisLimits(model);
    const request = { name: "D", node: "pad", edges: [{ at: 0, edge: "rise" as const }] };
    domainOnly(() => {
      const { driver, parts } = ibisDriver(model, "slow", request);
      validateNetwork({ rails: [], drivers: [driver], sections: [], parts, probes: [] });
    });
    domainOnly(() => {
      const { parts } = ibisReceiver(model, "fast", { name: "R", node: "pad" });
      validateNetwork({ rails: [], drivers: [], sections: [], parts, probes: [] });
    });
  }
}

function domainOnly(convert: () => void): void {
  try {
    convert();
  } catch (error) {
    if (!(error instanceof DomainError)) throw error; // a DomainError is an answer
  }
}
