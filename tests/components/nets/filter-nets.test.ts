import { describe, expect, it } from "vitest";
import { countScopes, filterNets, layerNames, type NetFilter } from "@/components/nets/filter-nets";
import { lengthParts, scopeWords } from "@/components/nets/net-words";
import type { NetRow } from "@/lib/client/nets";

const net = (name: string, over: Partial<NetRow> = {}): NetRow => ({
  id: name,
  lineageId: name,
  name,
  classLineageId: null,
  className: null,
  scope: "in",
  scopeKind: "signal",
  pinCount: 2,
  sectionCount: 1,
  viaCount: 0,
  length_m: 0.0254,
  layers: "L1 Top",
  gaps: 0,
  pairPartner: null,
  bus: null,
  matchGroup: null,
  version: 0,
  ...over,
});
const NETS = [
  net("SD_DQ0", { bus: "SD_DQ", layers: "L1 Top · L3 Inner", classLineageId: "c1" }),
  net("SD_CLK", { pairPartner: "SD_CLK_N" }),
  net("+3V3", { scope: "out", scopeKind: "power" }),
  net("VALVE", { scope: "incomplete", gaps: 1, layers: "" }),
];
const all: NetFilter = { q: "", class: "", scope: "", kind: "", layer: "", member: "" };
const names = (filter: Partial<NetFilter>) => filterNets(NETS, { ...all, ...filter }).map(({ name }) => name);

describe("filterNets", () => {
  it("keeps all without a filter, and what fits every part of one", () => {
    expect(names({})).toHaveLength(4);
    expect(names({ q: "sd dq" })).toEqual(["SD_DQ0"]);
    expect(names({ scope: "out" })).toEqual(["+3V3"]);
    expect(names({ kind: "power" })).toEqual(["+3V3"]);
    expect(names({ layer: "L3 Inner" })).toEqual(["SD_DQ0"]);
    expect(names({ class: "none", scope: "in" })).toEqual(["SD_CLK"]);
    expect(names({ class: "c1" })).toEqual(["SD_DQ0"]);
    expect(names({ member: "bus" })).toEqual(["SD_DQ0"]);
    expect(names({ member: "pair", q: "clk" })).toEqual(["SD_CLK"]);
  });

  it("names layers by use and counts scopes", () => {
    expect(layerNames(NETS)).toEqual(["L1 Top", "L3 Inner"]);
    expect(countScopes(NETS)).toEqual({ in: 2, out: 1, incomplete: 1 });
  });
});

it("words scope with its kind, and lengths in either unit", () => {
  expect(NETS.map(scopeWords)).toEqual(["In scope", "In scope", "Out of scope, power", "Incomplete route"]);
  expect(lengthParts(0.0254, "mm")).toEqual({ text: "25.400", unit: "mm" });
  expect(lengthParts(0.0254, "mil")).toEqual({ text: "1000.0", unit: "mil" });
});
