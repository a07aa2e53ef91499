import { describe, expect, it } from "vitest";
import { classLayer } from "@/lib/schemas/net-class";

describe("a class's line on a layer", () => {
  it("is at most 20 mm wide, and says so", () => {
    const of = (value: string, unit: string) =>
      classLayer.safeParse({
        layerLineageId: "0190a000-0000-7000-8000-000000000001",
        width: { value, unit },
        gap: null,
      });
    expect(of("20", "mm").success).toBe(true);
    expect(of("5", "m").error?.issues[0]?.message).toBe(
      "5 m is above 20 mm, the largest value allowed here.",
    );
  });
});
