import fc from "fast-check";
import { expect, it } from "vitest";
import { resolvePaths } from "@/lib/resolve/resolve-paths";
import { checkPath } from "@/lib/si/rules";
import { binding, part, revisionInputs, routed } from "../support/revision-inputs";

const pinName = fc.constantFrom(
  "U1.1",
  "U1.2",
  "U2.1",
  "U3.7",
  "J1.3",
  "R1.1",
  "R1.2",
  "R2.1",
  "R2.2",
  "C1.1",
  "C1.2",
  "L1.1",
  "L1.2",
);
const node = fc.oneof({ weight: 3, arbitrary: pinName }, fc.constantFrom("via1", "via2", "via3"));
const row = fc
  .tuple(
    node,
    node,
    fc.constantFrom("0", "1.5", "40"),
    fc.constantFrom("Top", "Bottom", "?"),
    fc.constantFrom("0.12", "0.28"),
  )
  .map((cells) => cells.join(" "));
const names = ["A", "B", "CLK", "GND", "+3V3", "VTT"];
const board = fc.record({
  nets: fc.array(fc.array(row, { minLength: 0, maxLength: 5 }), { minLength: 1, maxLength: names.length }),
  values: fc.array(fc.constantFrom("33R", "0R", "10k", "100n", "2p", "1u", "", "tbd"), {
    minLength: 4,
    maxLength: 4,
  }),
  listed: fc.boolean(),
  role: fc.constantFrom("driver" as const, "either" as const, "receiver" as const),
});

it("any board resolves and is judged: nothing throws, no number is broken, every signal net is in one path", () => {
  fc.assert(
    fc.property(board, ({ nets, values, listed, role }) => {
      const stored = nets.map((rows, i) => routed(names[i] ?? "X", rows));
      const kinds = ["resistor", "resistor", "capacitor", "inductor"] as const;
      const parts = listed
        ? ["R1", "R2", "C1", "L1"].map((reference, i) =>
            part(reference, values[i] ?? "", kinds[i] ?? "other"),
          )
        : [];
      const inputs = revisionInputs(stored, {
        parts,
        bindings: [binding("U1", role, "OUT"), binding("U*", "receiver", "IN")],
      });
      const { paths, outOfScope } = resolvePaths(inputs);
      const placed = [
        ...paths.flatMap((path) => path.nets.map((net) => net.name)),
        ...outOfScope.map((net) => net.name),
      ];
      expect(placed.sort()).toEqual(stored.map((net) => net.name).sort());
      for (const path of paths) {
        const result = checkPath(path, { corners: [{ driver: "fast", impedance: "high" }] });
        JSON.stringify([path, result], (_key, value: unknown) => {
          if (typeof value === "number") expect(Number.isFinite(value)).toBe(true);
          return value;
        });
        if (path.missing.length > 0) expect(result.verdict).not.toBe("pass");
        for (const finding of result.findings)
          expect(finding.cause ?? "").not.toMatch(/stopped|NaN|undefined/);
      }
    }),
    { numRuns: 300, seed: 17 },
  );
});
