/** Nodes that are one electrically (zero-length copper, 0 Ω links, large coupling capacitors) under one name. */
export class NodeMap {
  private readonly parent = new Map<string, string>();

  find(node: string): string {
    let top = node;
    for (let up = this.parent.get(top); up !== undefined; up = this.parent.get(top)) top = up;
    return top;
  }

  join(a: string, b: string): void {
    const from = this.find(a);
    const to = this.find(b);
    if (from !== to) this.parent.set(from, to);
  }
}
