import { EngineError } from "@/lib/si/errors";
import type { ResolvedPath } from "@/lib/si/path/types";
import { checkPath } from "@/lib/si/rules/check-path";
import { allCorners } from "@/lib/si/rules/corners";
import type { PathResult } from "@/lib/si/rules/types";
import { pathBounces, type PathBounces } from "@/lib/resolve/path-bounces";
import { pathWaveforms, type PathWaveforms, type WaveformRequest } from "@/lib/resolve/path-waveforms";
import { answerImpedance, type ImpedanceAnswers, type ImpedanceJob } from "./engine-impedance";

/** What the engine is asked in the browser; each a pure function of its input. */
export type EngineJob =
  | { kind: "picture"; path: ResolvedPath; request: WaveformRequest }
  | { kind: "check"; path: ResolvedPath }
  | ImpedanceJob;

export interface PathPicture {
  waveforms: PathWaveforms;
  bounces: PathBounces;
}

export interface EngineAnswers extends ImpedanceAnswers {
  picture: PathPicture;
  check: PathResult;
}

/** @throws EngineError with the sentence for the screen */
export function runJob<J extends EngineJob>(job: J): EngineAnswers[J["kind"]] {
  return answer(job) as EngineAnswers[J["kind"]];
}

function answer(job: EngineJob): EngineAnswers[EngineJob["kind"]] {
  if (job.kind === "check") return checkPath(job.path, { corners: [...allCorners] });
  if (job.kind !== "picture") return answerImpedance(job);
  const waveforms = pathWaveforms(job.path, { ...job.request, waves: true });
  return { waveforms, bounces: pathBounces(waveforms.network, waveforms.until) };
}

/** What to say of anything that was thrown by a job. */
export function jobError(error: unknown): string {
  if (error instanceof EngineError) return error.message;
  return `The engine stopped: ${error instanceof Error ? error.message : String(error)}. Reload the page; if it stops again, tell whoever runs this server.`;
}
