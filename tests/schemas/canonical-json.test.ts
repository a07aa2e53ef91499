import fc from "fast-check";
import { describe, expect, it } from "vitest";
import { canonicalJson, CanonicalJsonError } from "@/lib/schemas/canonical-json";

describe("canonical JSON", () => {
  it("gives equal bytes whatever the order in which keys were set", () => {
    expect(canonicalJson({ b: 1, a: { d: [1, 2], c: null } })).toBe('{"a":{"c":null,"d":[1,2]},"b":1}');
    expect(canonicalJson({ a: { c: null, d: [1, 2] }, b: 1 })).toBe(
      canonicalJson({ b: 1, a: { d: [1, 2], c: null } }),
    );
  });

  it("writes numbers to 12 significant digits, whole safe integers, minus zero as zero", () => {
    expect(canonicalJson([0.1 + 0.2, -0, 1e-12 / 3, 1e21, 1764576000123])).toBe(
      "[0.3,0,3.33333333333e-13,1e+21,1764576000123]",
    );
  });

  it("leaves out keys that hold undefined and writes typed arrays as lists", () => {
    expect(canonicalJson({ a: undefined, b: Float64Array.of(1, 2.5) })).toBe('{"b":[1,2.5]}');
  });

  it("refuses what JSON would turn into null or drop, naming the place", () => {
    expect(() => canonicalJson({ nets: [{ length: NaN }] })).toThrow("$.nets[0].length is not a number");
    expect(() => canonicalJson([Infinity])).toThrow(CanonicalJsonError);
    expect(() => canonicalJson([undefined])).toThrow(CanonicalJsonError);
    expect(() => canonicalJson({ at: new Date(0) })).toThrow(CanonicalJsonError);
    expect(() => canonicalJson({ n: 1n })).toThrow(CanonicalJsonError);
  });

  it("is a fixed point: reading it back and writing it again changes nothing", () => {
    fc.assert(
      fc.property(fc.jsonValue(), (value) => {
        const once = canonicalJson(value);
        expect(canonicalJson(JSON.parse(once))).toBe(once);
      }),
      { numRuns: 300, seed: 2 },
    );
  });
});
