import type { Engine } from "@/lib/client/engine";
import { type EngineAnswers, type EngineJob, jobError, runJob } from "@/lib/client/engine-jobs";

/** The same engine, in the test's own thread. */
export const directEngine: Engine = {
  run: async <J extends EngineJob>(job: J): Promise<EngineAnswers[J["kind"]]> => {
    try {
      return runJob(job);
    } catch (error) {
      throw new Error(jobError(error), { cause: error });
    }
  },
};
