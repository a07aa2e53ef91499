import type { Engine } from "./engine";
import type { EngineAnswers, EngineJob } from "./engine-jobs";

type Answer = EngineAnswers[EngineJob["kind"]];
export type Answered = { answer: Answer } | { error: string };

export interface Keyed {
  /** says everything that the answer depends on */
  key: string;
  job: EngineJob;
  /** Jobs that share solutions go to one engine, which keeps them. */
  share?: string;
}

/** So long answers are gathered before the page is told of them [ms]: a table is not drawn anew for each of its rows. */
const GATHERED = 150;
const KEPT = 2_000;

/**
 * Many jobs, one at a time for each engine, in the order in which they are wanted. What is no longer wanted is not
 * begun; what was answered once is kept by its key.
 */
export class EngineQueue {
  private wanted: readonly Keyed[] = [];
  private readonly answers = new Map<string, Answered>();
  private snapshot: ReadonlyMap<string, Answered> = new Map();
  private readonly listeners = new Set<() => void>();
  private readonly running = new Set<number>();
  private readonly begun = new Set<string>();
  private hands = 1;
  private told: ReturnType<typeof setTimeout> | null = null;

  constructor(private readonly engines: readonly Engine[]) {}

  /** @param hands  how many of the engines may work at it; the others are left to whoever needs them at once */
  want(jobs: readonly Keyed[], hands = this.engines.length): void {
    this.wanted = jobs;
    this.hands = hands;
    this.engines.slice(0, hands).forEach((engine, at) => {
      if (!this.running.has(at)) void this.run(engine, at);
    });
  }

  readonly subscribe = (listener: () => void): (() => void) => {
    this.listeners.add(listener);
    return () => this.listeners.delete(listener);
  };

  /** What is answered by now; the same object until more is. */
  readonly known = (): ReadonlyMap<string, Answered> => this.snapshot;

  private async run(engine: Engine, at: number): Promise<void> {
    this.running.add(at);
    for (;;) {
      const next = at < this.hands ? this.next(at) : null;
      if (!next) break;
      this.begun.add(next.key);
      try {
        this.keep(next.key, { answer: await engine.run(next.job) });
      } catch (error) {
        this.keep(next.key, { error: error instanceof Error ? error.message : String(error) });
      }
      this.begun.delete(next.key);
      this.told ??= setTimeout(this.tell, GATHERED);
    }
    this.running.delete(at);
    if (this.running.size === 0) this.tell();
  }

  /** The first that is wanted of this engine's own, else of any that nobody has begun. */
  private next(at: number): Keyed | null {
    const open = this.wanted.filter(({ key }) => !this.answers.has(key) && !this.begun.has(key));
    const shares = [...new Set(this.wanted.map(({ share }) => share))];
    return open.find(({ share }) => shares.indexOf(share) % this.hands === at) ?? open[0] ?? null;
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
