/** Most cells that one thing is entered into; larger things are looked at from everywhere. */
const MAX_CELLS = 4_096;

/** Things by where they lie: a hash of square cells. */
export class PlaceGrid<T> {
  private readonly cells = new Map<string, T[]>();
  private readonly wide: T[] = [];

  /** @param size edge of a cell [m], > 0 */
  constructor(private readonly size: number) {}

  /** Enters a thing that lies within a box [m]. */
  add(x0: number, y0: number, x1: number, y1: number, thing: T): void {
    const [i0, i1] = this.range(x0, x1);
    const [j0, j1] = this.range(y0, y1);
    if ((i1 - i0 + 1) * (j1 - j0 + 1) > MAX_CELLS) {
      this.wide.push(thing);
      return;
    }
    for (let i = i0; i <= i1; i++)
      for (let j = j0; j <= j1; j++) {
        const key = `${i},${j}`;
        const cell = this.cells.get(key);
        if (cell) cell.push(thing);
        else this.cells.set(key, [thing]);
      }
  }

  /** Things whose box may hold this point. */
  *at(x: number, y: number): Generator<T> {
    yield* this.cells.get(`${Math.floor(x / this.size)},${Math.floor(y / this.size)}`) ?? [];
    yield* this.wide;
  }

  /** Things whose box may meet this one, each once. */
  *within(x0: number, y0: number, x1: number, y1: number): Generator<T> {
    const seen = new Set<T>();
    const [i0, i1] = this.range(x0, x1);
    const [j0, j1] = this.range(y0, y1);
    for (let i = i0; i <= i1; i++)
      for (let j = j0; j <= j1; j++)
        for (const thing of this.cells.get(`${i},${j}`) ?? [])
          if (!seen.has(thing)) {
            seen.add(thing);
            yield thing;
          }
    yield* this.wide;
  }

  private range(from: number, to: number): [number, number] {
    return [Math.floor(Math.min(from, to) / this.size), Math.floor(Math.max(from, to) / this.size)];
  }
}
