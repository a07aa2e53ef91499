import { describe, expect, it } from "vitest";
import { readLimit } from "@/components/rules/limit-text";

describe("a limit as typed", () => {
  it("is read in the rule's own unit, exactly", () => {
    expect(readLimit("300 mV", "V")).toBe("0.3");
    expect(readLimit("0,3", "V")).toBe("0.3");
    expect(readLimit("0.45 ns", "ps")).toBe("450");
    expect(readLimit("50 % of bit", "% of bit")).toBe("50");
    expect(readLimit("20%", "%")).toBe("20");
    expect(readLimit("−0.5", "1")).toBe("-0.5");
  });
  it("is none where nothing is typed", () => expect(readLimit("  ", "V")).toBeNull());
  it("is refused in a sentence where it is no number or of another kind", () => {
    expect(() => readLimit("much", "%")).toThrow("'much' is not a number");
    expect(() => readLimit("3 mm", "V")).toThrow();
  });
});
