import type { Engine } from "./engine";
import type { EngineAnswers, EngineJob } from "./engine-jobs";

type Answer = EngineAnswers[EngineJob["kind"]];
export type Answered = { answer: Answer } | { error: string };

export interface Keyed {
  /** says everything that the answer depends on */
  key: string;
  job: EngineJob;
}

/** So long answers are gathered before the page is told of them [ms]: a table is not drawn anew for each of its rows. */
const GATHERED = 60;
const KEPT = 2_000;

/**
 * Many jobs, one at a time, in the order in which they are wanted. What is no longer wanted is not begun; what was
 * answered once is kept by its key.
 */
export class EngineQueue {
  private wanted: readonly Keyed[] = [];
  private readonly answers = new Map<string, Answered>();
  private snapshot: ReadonlyMap<string, Answered> = new Map();
  private readonly listeners = new Set<() => void>();
  private running = false;
  private told: ReturnType<typeof setTimeout> | null = null;

  constructor(private readonly engine: Engine) {}

  want(jobs: readonly Keyed[]): void {
    this.wanted = jobs;
    if (!this.running) void this.run();
  }

  readonly subscribe = (listener: () => void): (() => void) => {
    this.listeners.add(listener);
    return () => this.listeners.delete(listener);
  };

  /** What is answered by now; the same object until more is. */
  readonly known = (): ReadonlyMap<string, Answered> => this.snapshot;

  private async run(): Promise<void> {
    this.running = true;
    for (;;) {
      const next = this.wanted.find(({ key }) => !this.answers.has(key));
      if (!next) break;
      try {
        this.keep(next.key, { answer: await this.engine.run(next.job) });
      } catch (error) {
        this.keep(next.key, { error: error instanceof Error ? error.message : String(error) });
      }
      this.told ??= setTimeout(this.tell, GATHERED);
    }
    this.running = false;
    this.tell();
  }

  private keep(key: string, answer: Answered): void {
    this.answers.set(key, answer);
    if (this.answers.size > KEPT) {
      const wanted = new Set(this.wanted.map((job) => job.key));
      for (const old of this.answers.keys()) if (!wanted.has(old)) this.answers.delete(old);
    }
  }

  private readonly tell = (): void => {
    if (this.told !== null) clearTimeout(this.told);
    this.told = null;
    this.snapshot = new Map(this.answers);
    for (const listener of this.listeners) listener();
  };
}
