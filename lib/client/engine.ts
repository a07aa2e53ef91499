import type { EngineAnswers, EngineJob } from "./engine-jobs";

/** Answers jobs; refuses with an Error whose message is fit for the screen. */
export interface Engine {
  run<J extends EngineJob>(job: J): Promise<EngineAnswers[J["kind"]]>;
}

interface Waiting {
  done: (answer: never) => void;
  failed: (error: Error) => void;
}

/** The engine in a Web Worker, started with the first job. */
export class WorkerEngine implements Engine {
  private worker: Worker | null = null;
  private readonly waiting = new Map<number, Waiting>();
  private next = 1;

  run<J extends EngineJob>(job: J): Promise<EngineAnswers[J["kind"]]> {
    const id = this.next++;
    return new Promise<EngineAnswers[J["kind"]]>((done, failed) => {
      this.waiting.set(id, { done, failed });
      this.start().postMessage({ id, job });
    });
  }

  private start(): Worker {
    if (this.worker) return this.worker;
    const worker = new Worker(new URL("./engine-worker.ts", import.meta.url), { type: "module" });
    worker.onmessage = ({ data }: MessageEvent<{ id: number; answer?: never; error?: string }>) => {
      const waiting = this.waiting.get(data.id);
      this.waiting.delete(data.id);
      if (data.error === undefined) waiting?.done(data.answer as never);
      else waiting?.failed(new Error(data.error));
    };
    worker.onerror = () => {
      this.worker = null;
      worker.terminate();
      for (const { failed } of this.waiting.values())
        failed(new Error("The engine could not be started in this browser. Reload the page to try again."));
      this.waiting.clear();
    };
    this.worker = worker;
    return worker;
  }
}

let shared: Engine | null = null;
let second: Engine | null = null;

/** One for the page. */
export function pageEngine(): Engine {
  shared ??= new WorkerEngine();
  return shared;
}

/** Another one, for long lists and curves: what is dragged by hand never waits behind them. */
export function backgroundEngine(): Engine {
  second ??= new WorkerEngine();
  return second;
}
