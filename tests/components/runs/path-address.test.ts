import { describe, expect, it } from "vitest";
import { pathAddress } from "@/components/runs/path-address";

describe("the address of a path of a run", () => {
  it("opens the row of a controlled line on the impedance page", () => {
    expect(pathAddress("p", "r", "line class-1 layer-2")).toBe("/projects/p/impedance?cell=class-1.layer-2");
  });

  it("is the net page for any other path, in that run", () => {
    expect(pathAddress("p", "r", "net-1")).toBe("/projects/p/nets/net-1?run=r");
  });
});
