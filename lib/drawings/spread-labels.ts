/**
 * Moves labels along one axis until none overlaps its neighbour, each as little as possible
 * (least squares; the pool-adjacent-violators method).
 *
 * @param wanted  where each label would like its centre [px], in any order
 * @param size    room each label needs along the axis [px]; one number or one a label
 * @param low     lowest edge a label may reach [px]
 * @param high    highest edge [px]; when all labels together need more, they run on beyond it
 * @returns centres in the order given [px]
 */
export function spreadLabels(
  wanted: readonly number[],
  size: number | readonly number[],
  low: number,
  high: number,
): number[] {
  const room = (i: number): number => (typeof size === "number" ? size : (size[i] ?? 0));
  const order = wanted.map((_, i) => i).sort((a, b) => (wanted[a] ?? 0) - (wanted[b] ?? 0) || a - b);
  const total = order.reduce((sum, i) => sum + room(i), 0);
  const top = Math.max(high, low + total);

  // A block is a run of labels that touch; its start is the mean of where its members want it to be.
  interface Block {
    members: number[];
    wantedSum: number;
    length: number;
  }
  const start = (block: Block): number =>
    Math.min(Math.max(block.wantedSum / block.members.length, low), top - block.length);
  const blocks: Block[] = [];
  for (const i of order) {
    let block: Block = { members: [i], wantedSum: (wanted[i] ?? 0) - room(i) / 2, length: room(i) };
    for (
      let last = blocks.at(-1);
      last && start(last) + last.length > start(block) + 1e-9;
      last = blocks.at(-1)
    ) {
      blocks.pop();
      block = {
        members: [...last.members, ...block.members],
        wantedSum: last.wantedSum + block.wantedSum - block.members.length * last.length,
        length: last.length + block.length,
      };
    }
    blocks.push(block);
  }

  const centres = wanted.map(() => 0);
  for (const block of blocks) {
    let edge = start(block);
    for (const i of block.members) {
      centres[i] = edge + room(i) / 2;
      edge += room(i);
    }
  }
  return centres;
}
