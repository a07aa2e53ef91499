import fc from "fast-check";
import { describe, expect, it } from "vitest";
import {
  cascade,
  chainFromScattering,
  deEmbed,
  portEntry,
  portFigures,
  scatteringFromChain,
  scatteringFromImmittance,
  scatteringFromTransfer,
  transferFromScattering,
  type PortData,
} from "@/lib/si/ports";

const twoPort = (values: number[], references = [50, 50]): PortData => ({
  ports: 2,
  frequencies: Float64Array.of(1e9),
  references: Float64Array.from(references),
  values: Float64Array.from(values),
});
const part = fc.double({ min: -0.6, max: 0.6, noNaN: true });
const passing = fc.double({ min: 0.1, max: 0.7, noNaN: true });
const anyTwoPort = fc
  .tuple(part, part, passing, part, passing, part, part, part)
  .map(([a, b, c, d, e, f, g, h]) => twoPort([a, b, c, d, e, f, g, h]));
const near = (a: PortData, b: PortData, digits = 9) =>
  a.values.forEach((value, i) => expect(value).toBeCloseTo(b.values[i]!, digits));

describe("chain and transfer matrices", () => {
  it("of a series resistor are known: A = D = 1, B = R, C = 0", () => {
    // S11 = R/(R + 2·50), S21 = 100/(R + 100); R = 25 Ω
    const chain = chainFromScattering(twoPort([0.2, 0, 0.8, 0, 0.8, 0, 0.2, 0]));
    [1, 0, 25, 0, 0, 0, 1, 0].forEach((value, i) => expect(chain.values[i]).toBeCloseTo(value, 12));
  });

  it("come back as the same scattering parameters, to 1e-9, for other references too", () => {
    fc.assert(
      fc.property(anyTwoPort, (data) => {
        near(scatteringFromChain(chainFromScattering(data), 50, 50), data);
        near(scatteringFromTransfer(transferFromScattering(data), data.frequencies, data.references), data);
        const other = scatteringFromChain(chainFromScattering(data), 30, 75);
        near(scatteringFromChain(chainFromScattering(other), 50, 50), data);
      }),
    );
  });

  it("of parts in a row are products; taking the outer ones off leaves the middle, to 1e-7", () => {
    fc.assert(
      fc.property(anyTwoPort, anyTwoPort, anyTwoPort, (a, b, c) => {
        const [left, middle, right] = [a, b, c].map(chainFromScattering);
        const whole = cascade(cascade(left!, middle!), right!);
        near(scatteringFromChain(deEmbed(left!, whole, right!), 50, 50), b, 7);
      }),
    );
  });

  it("refuse what lets nothing pass, and parts at other frequencies", () => {
    expect(() => chainFromScattering(twoPort([1, 0, 0, 0, 0, 0, 1, 0]))).toThrow("Nothing passes");
    const a = chainFromScattering(twoPort([0, 0, 1, 0, 1, 0, 0, 0]));
    expect(() => cascade(a, { ...a, frequencies: Float64Array.of(2e9) })).toThrow("different frequencies");
  });
});

describe("figures", () => {
  it("gain is the largest singular value; a rotation of a passive diagonal keeps it", () => {
    expect(portFigures(twoPort([0.3, 0, 0, 0, 0, 0, 0, -0.9])).gain).toBeCloseTo(0.9, 9);
    expect(portFigures(twoPort([0, 0, 1.2, 0, 0.5, 0, 0, 0])).gain).toBeCloseTo(1.2, 9);
    expect(portFigures(twoPort([0.6, 0, 0.8, 0, 0.8, 0, -0.6, 0])).gain).toBeCloseTo(1, 9);
  });

  it("the difference of S12 and S21 is the non-reciprocity", () => {
    const { nonReciprocity, nonReciprocityAt } = portFigures(twoPort([0, 0, 0.5, 0.1, 0.2, 0.5, 0, 0]));
    expect(nonReciprocity).toBeCloseTo(0.5, 12);
    expect(nonReciprocityAt).toBe(1e9);
  });
});

it("Z and Y of an L-pad give the same scattering parameters, to 1e-12", () => {
  // Z = [[30 + 20, 20], [20, 20]] Ω, Y its inverse; references 50 and 75 Ω
  const z = scatteringFromImmittance("Z", twoPort([50, 0, 20, 0, 20, 0, 20, 0], [50, 75]));
  const det = 50 * 20 - 400;
  const y = scatteringFromImmittance(
    "Y",
    twoPort(
      [20, 0, -20, 0, -20, 0, 50, 0].map((v) => v / det),
      [50, 75],
    ),
  );
  near(z, y, 12);
  const { re } = portEntry(z, 0, 0);
  // input resistance 30 + 20 ∥ 75 against 50 Ω
  const input = 30 + (20 * 75) / 95;
  expect(re[0]).toBeCloseTo((input - 50) / (input + 50), 12);
});
