import { describe, expect, it } from "vitest";
import { solveCrossSection } from "@/lib/si/field";
import exact from "../../reference/impedance/exact.json";
import fem from "../../reference/impedance/fem.json";
import { deviations } from "./deviations";
import { sectionOf, type ReferenceCase } from "./reference-sections";

const cases = [...fem.cases, ...exact.cases] as unknown as ReferenceCase[];
const solved = cases.flatMap((item) => {
  const section = sectionOf(item);
  return section ? [{ item, section }] : [];
});

describe.each([
  ["live", 5e-3],
  ["standard", 1e-3],
  ["reference", 1e-4],
] as const)("field solution, %s", (accuracy, limit) => {
  it.each(solved)(`$item.id ($item.structure): every stated value within ${limit}`, ({ item, section }) => {
    const line = solveCrossSection(section, { accuracy });
    for (const { quantity, value } of deviations(line, item)) {
      expect(Math.abs(value), quantity).toBeLessThanOrEqual(limit);
    }
  });
});
