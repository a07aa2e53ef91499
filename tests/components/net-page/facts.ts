import type { NetFacts } from "@/components/net-page/facts";
import { jobError, runJob, type EngineAnswers, type EngineJob } from "@/lib/client/engine-jobs";
import type { Engine } from "@/lib/client/engine";
import type { ResolvedPath } from "@/lib/si/path/types";
import { ruleCatalogue } from "@/lib/si/rules/catalogue";
import { checkPath } from "@/lib/si/rules/check-path";
import { allCorners } from "@/lib/si/rules/corners";
import { driverModel, pointToPoint, section } from "../../support/resolved-path";

const ns = 1e-9;

/** A strong driver on an open 50 Ω line: it rings. */
export const ringing: ResolvedPath = pointToPoint(
  driverModel(20, 1 * ns, {
    resistance: { slow: 30, typical: 20, fast: 14 },
    riseTime: { slow: 1.2 * ns, typical: 0.8 * ns, fast: 0.5 * ns },
  }),
  50,
  1.3 * ns,
  { sections: [section("U1.1", "U2.1", 50, 1.3 * ns, { impedance: { low: 45, nominal: 50, high: 55 } })] },
);

export function factsOf(path: ResolvedPath, over: Partial<NetFacts> = {}): NetFacts {
  return {
    projectId: "01a231dc-3b35-7000-8000-0080a55d99be",
    revision: { letter: "B", state: "draft" },
    path,
    result: checkPath(path, { corners: [...allCorners] }),
    rules: ruleCatalogue.map(({ id, title, measures, direction }) => ({ id, title, measures, direction })),
    run: { id: "01a231dc-6c04-7000-8000-004efa3e4635", number: 2, outdated: false, otherEngine: null },
    widths: [],
    problems: [],
    pathFlags: [],
    people: [{ userId: "u-1", name: "Idris Vane" }],
    may: { flag: true, comment: true, waive: true },
    around: null,
    ...over,
  };
}

/** The same engine, in the test's own thread. */
export const directEngine: Engine = {
  run: async <J extends EngineJob>(job: J): Promise<EngineAnswers[J["kind"]]> => {
    try {
      return runJob(job);
    } catch (error) {
      throw new Error(jobError(error));
    }
  },
};
