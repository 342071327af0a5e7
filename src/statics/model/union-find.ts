/** Disjoint sets with path halving; a set is known by its lowest element. */
export class UnionFind {
  private readonly parent: Int32Array;

  constructor(size: number) {
    this.parent = Int32Array.from({ length: size }, (_, i) => i);
  }

  find(i: number): number {
    const { parent } = this;
    let at = i;
    while (parent[at] !== at) {
      parent[at] = parent[parent[at]];
      at = parent[at];
    }
    return at;
  }

  join(a: number, b: number): void {
    const i = this.find(a);
    const j = this.find(b);
    this.parent[Math.max(i, j)] = Math.min(i, j);
  }
}
