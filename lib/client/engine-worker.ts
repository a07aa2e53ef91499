import { type EngineJob, jobError, runJob } from "./engine-jobs";

/** Runs in a Web Worker: the server's engine, beside the page's own thread. */
addEventListener("message", ({ data }: MessageEvent<{ id: number; job: EngineJob }>) => {
  try {
    postMessage({ id: data.id, answer: runJob(data.job) });
  } catch (error) {
    postMessage({ id: data.id, error: jobError(error) });
  }
});
