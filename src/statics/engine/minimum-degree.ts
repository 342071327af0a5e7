import type { Graph } from './graph.ts';

/**
 * Minimum degree on the quotient graph with the approximate external degree of Amestoy, Davis & Duff (1996): eliminated
 * blocks become elements, an element met by the pivot is absorbed. Returns the blocks in the order of elimination.
 */
export function minimumDegree(graph: Graph): Int32Array {
  const n = graph.count;
  const variables: number[][] = [];
  const elements: number[][] = Array.from({ length: n }, () => []);
  const members: (number[] | null)[] = new Array<number[] | null>(n).fill(null);
  for (let i = 0; i < n; i++) variables.push(Array.from(graph.neighbour.subarray(graph.start[i], graph.start[i + 1])));
  const degree = Int32Array.from(variables, (list) => list.length);
  const eliminated = new Uint8Array(n);
  const buckets = new DegreeBuckets(degree);
  const mark = new Int32Array(n).fill(-1);
  const outside = new Int32Array(n);
  const outsideOf = new Int32Array(n).fill(-1);
  const order = new Int32Array(n);

  for (let step = 0; step < n; step++) {
    const pivot = buckets.takeLowest();
    order[step] = pivot;
    eliminated[pivot] = 1;
    const boundary: number[] = [];
    mark[pivot] = step;
    const gather = (list: readonly number[]) => {
      for (const i of list) {
        if (eliminated[i] || mark[i] === step) continue;
        mark[i] = step;
        boundary.push(i);
      }
    };
    gather(variables[pivot]);
    for (const e of elements[pivot]) {
      gather(members[e]!);
      members[e] = null;
    }
    members[pivot] = boundary;
    // outside[e]: members of e that the new element does not have.
    for (const i of boundary) {
      elements[i] = elements[i].filter((e) => members[e] !== null);
      for (const e of elements[i]) {
        if (outsideOf[e] !== step) {
          outsideOf[e] = step;
          members[e] = members[e]!.filter((j) => !eliminated[j]);
          outside[e] = members[e].length;
        }
        outside[e] = outside[e] - 1;
      }
    }
    for (const i of boundary) {
      // What the new element holds is reached through it.
      variables[i] = variables[i].filter((j) => !eliminated[j] && mark[j] !== step);
      const kept = elements[i].filter((e) => outside[e] > 0);
      let bound = variables[i].length + boundary.length - 1;
      for (const e of kept) bound += outside[e];
      kept.push(pivot);
      elements[i] = kept;
      buckets.move(i, Math.min(bound, n - step - 2));
    }
    variables[pivot] = [];
  }
  return order;
}

/** Doubly linked lists of the blocks of each degree. */
class DegreeBuckets {
  private readonly head: Int32Array;
  private readonly next: Int32Array;
  private readonly previous: Int32Array;
  private readonly degree: Int32Array;
  private lowest = 0;

  constructor(degree: Int32Array) {
    const n = degree.length;
    this.head = new Int32Array(n + 1).fill(-1);
    this.next = new Int32Array(n).fill(-1);
    this.previous = new Int32Array(n).fill(-1);
    this.degree = degree;
    for (let i = n - 1; i >= 0; i--) this.insert(i);
  }

  takeLowest(): number {
    while (this.head[this.lowest] === -1) this.lowest++;
    const i = this.head[this.lowest];
    this.remove(i);
    return i;
  }

  move(i: number, degree: number): void {
    this.remove(i);
    this.degree[i] = Math.max(degree, 0);
    this.insert(i);
  }

  private insert(i: number): void {
    const d = this.degree[i];
    const first = this.head[d];
    this.next[i] = first;
    this.previous[i] = -1;
    if (first !== -1) this.previous[first] = i;
    this.head[d] = i;
    if (d < this.lowest) this.lowest = d;
  }

  private remove(i: number): void {
    const before = this.previous[i];
    const after = this.next[i];
    if (before === -1) this.head[this.degree[i]] = after;
    else this.next[before] = after;
    if (after !== -1) this.previous[after] = before;
  }
}
