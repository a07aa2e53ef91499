import { resolvePaths } from "@/lib/resolve/resolve-paths";
import { allCorners, checkPath } from "@/lib/si/rules";
import type { StoredNet } from "@/lib/schemas/net";
import type { RevisionInputs } from "@/lib/schemas/snapshot";
import {
  binding,
  inputModel,
  netClass,
  outputModel,
  part,
  q,
  revisionInputs,
  routed,
} from "../../support/revision-inputs";
import type { BenchSection } from "../section";

/** A board of `count` paths: a third bare, a third with a series resistor and vias, a third branched to two receivers. */
export function benchBoard(count: number): RevisionInputs {
  const nets: StoredNet[] = [];
  const parts = [];
  for (let i = 0; i < count; i++) {
    const mm = 20 + ((i * 37) % 600) / 10;
    const driver = `U1.A${i}`;
    if (i % 3 === 0) nets.push(routed(`N${i}`, [`${driver} U2.B${i} ${mm}`]));
    else if (i % 3 === 1) {
      parts.push(part(`R${i}`, "22R", "resistor"));
      nets.push(routed(`N${i}_S`, [`${driver} R${i}.1 2.4`]));
      nets.push(routed(`N${i}`, [`R${i}.2 v1 1.6`, `v1 v2 ${mm} Bottom`, `v2 U2.B${i} 1.5`]));
    } else nets.push(routed(`N${i}`, [`${driver} v1 ${mm}`, `v1 U2.B${i} 12`, `v1 U3.C${i} 17.3`]));
  }
  const driver = outputModel("OUT", "17 Ω", "0.8 ns");
  if (driver.driver) {
    driver.driver.resistance = { slow: q("26 Ω"), typical: q("18 Ω"), fast: q("13 Ω") };
    driver.driver.riseTime = { slow: q("1.2 ns"), typical: q("0.8 ns"), fast: q("0.5 ns") };
  }
  return revisionInputs(nets, {
    parts,
    models: [driver, inputModel("IN")],
    bindings: [binding("U1", "driver", "OUT"), binding("U*", "receiver", "IN")],
    classes: [
      netClass("Data", {
        layers: [
          { layerLineageId: "layer-Top", width: q("0.28 mm"), gap: null },
          { layerLineageId: "layer-Bottom", width: q("0.28 mm"), gap: null },
        ],
        rate: q("100 MHz"),
        flightTimeMax: q("900 ps"),
      }),
    ],
  });
}

/** Processor time, which other work on the machine does not add to. */
function cpuMilliseconds(): number {
  return process.cpuUsage().user / 1000;
}

/** A whole check on one core: resolving, then every rule at nine corners. */
export const check: BenchSection = {
  title: "Check of a board (processor time on one core)",
  run() {
    measure(60);
    const { nets, paths, simulations, resolve, judge } = measure(600);
    const perPath = judge / paths;
    return [
      { what: `resolve ${nets} nets into ${paths} paths`, value: resolve, unit: "ms" },
      {
        what: `a path, 9 corners, ${(simulations / paths).toFixed(0)} simulations`,
        value: perPath,
        unit: "ms",
      },
      { what: "5,000 paths on two cores, by that", value: (5000 * perPath) / 2000, unit: "s", goal: 20 },
    ];
  },
};

function measure(count: number) {
  const inputs = benchBoard(count);
  const started = cpuMilliseconds();
  const { paths } = resolvePaths(inputs);
  const resolved = cpuMilliseconds();
  let simulations = 0;
  for (const path of paths) simulations += checkPath(path, { corners: [...allCorners] }).simulations;
  return {
    nets: inputs.nets.length,
    paths: paths.length,
    simulations,
    resolve: resolved - started,
    judge: cpuMilliseconds() - resolved,
  };
}
