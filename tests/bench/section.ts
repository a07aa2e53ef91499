/** One group of figures of `npm run bench`. A new group is a file in sections/ and a line in bench.ts. */
export interface BenchSection {
  title: string;
  run: () => BenchFigure[];
}

export interface BenchFigure {
  what: string;
  /** with its unit in `unit` */
  value: number;
  unit: string;
  /** what engine.md asks for, in the same unit */
  goal?: number;
  note?: string;
}

/** Median time of one call [µs], after a warm-up. */
export function microseconds(work: () => void, budgetMs = 400): number {
  const warm = performance.now() + budgetMs / 4;
  while (performance.now() < warm) work();
  const times: number[] = [];
  const end = performance.now() + budgetMs;
  while (performance.now() < end || times.length < 5) {
    const start = performance.now();
    work();
    times.push(performance.now() - start);
  }
  times.sort((a, b) => a - b);
  return (times[times.length >> 1] ?? 0) * 1000;
}
