/**
 * Arrays that are lent to one simulation and taken back when it ends, so that thousands of them in a row allocate little.
 * What is lent holds old numbers.
 */
class Workspace {
  private readonly free: Float64Array[] = [];
  private lent: Float64Array[] = [];

  take(length: number): Float64Array {
    let array = this.free.pop();
    if (!array || array.length < length)
      array = new Float64Array(Math.max(1024, 2 ** Math.ceil(Math.log2(length))) + 24);
    this.lent.push(array);
    return array;
  }

  /** Takes everything back. Nothing lent may be used after. */
  endAll(): void {
    for (const array of this.lent)
      if (array.length <= LARGEST_KEPT && this.free.length < MOST_KEPT) this.free.push(array);
    this.lent = [];
  }
}

const LARGEST_KEPT = 70_000;
const MOST_KEPT = 128;

export const workspace = new Workspace();
