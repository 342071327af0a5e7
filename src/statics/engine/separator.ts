import type { Graph } from './graph.ts';
import { BETWEEN, FIRST, SECOND, SeparatorRefinement } from './refine-separator.ts';

/** Landmarks whose distances serve as coordinates. */
const LANDMARKS = 4;

/** A cut where the difference of the distances to two landmarks passes a threshold; the blocks of one side that touch the other are the separator. */
interface Cut {
  readonly from: Int32Array;
  readonly less: Int32Array;
  readonly threshold: number;
  readonly shore: number;
  readonly length: number;
}

/**
 * Finds few blocks that part a piece of a graph into halves. Distances (in steps) from landmarks far from each other serve as coordinates:
 * where the difference of two of them passes its median the piece is cut, which on a grid gives straight cuts where the levels of a single
 * distance run askew. The shortest of these cuts is then shortened further by moving single blocks.
 */
export class Separator {
  private readonly graph: Graph;
  private readonly region: Int32Array;
  private readonly side: Uint8Array;
  private readonly distance: Int32Array[];
  private readonly queue: Int32Array;
  private readonly room: Int32Array;
  private readonly refinement: SeparatorRefinement;
  private regions = 0;

  constructor(graph: Graph) {
    this.graph = graph;
    this.region = new Int32Array(graph.count);
    this.side = new Uint8Array(graph.count);
    this.distance = Array.from({ length: LANDMARKS }, () => new Int32Array(graph.count));
    this.queue = new Int32Array(graph.count);
    this.room = new Int32Array(graph.count);
    this.refinement = new SeparatorRefinement(graph);
  }

  /**
   * Rearranges `order[from..to)` into pieces that do not touch each other, the separator after them. Returns the sizes of the pieces: two halves,
   * or as many as the piece hung together in; none where it cannot be parted.
   */
  part(order: Int32Array, from: number, to: number): number[] {
    const { region, distance } = this;
    const size = to - from;
    this.regions++;
    for (let k = from; k < to; k++) region[order[k]] = this.regions;
    const reached = this.measure(order[from], distance[0]);
    if (reached < size) return this.separate(order, from, to, reached);
    let landmark = this.queue[size - 1];
    for (let l = 0; l < LANDMARKS; l++) {
      this.measure(landmark, distance[l]);
      landmark = this.farthest(order, from, to, l + 1);
    }
    let best: Cut | null = null;
    for (let a = 0; a < LANDMARKS; a++)
      for (let b = a + 1; b < LANDMARKS; b++) {
        const cut = this.cut(order, from, to, distance[a], distance[b]);
        if (cut !== null && (best === null || cut.length < best.length)) best = cut;
      }
    if (best === null) return [];
    this.apply(order, from, to, best);
    this.refinement.shorten(order, from, to, region, this.side);
    return this.arrange(order, from, to);
  }

  /** Steps from `start` to every block of its region, left in `into`; returns how many were reached, in the order of `queue`. */
  private measure(start: number, into: Int32Array): number {
    const { region, queue } = this;
    const { start: first, neighbour } = this.graph;
    const here = region[start];
    // While it is measured, a block that is reached stands in the region's negative.
    queue[0] = start;
    into[start] = 0;
    region[start] = -here;
    let size = 1;
    for (let head = 0; head < size; head++) {
      const i = queue[head];
      const next = into[i] + 1;
      const end = first[i + 1];
      for (let p = first[i]; p < end; p++) {
        const j = neighbour[p];
        if (region[j] !== here) continue;
        region[j] = -here;
        into[j] = next;
        queue[size++] = j;
      }
    }
    for (let k = 0; k < size; k++) region[queue[k]] = here;
    return size;
  }

  /** The block farthest from the nearest of the first `count` landmarks. */
  private farthest(order: Int32Array, from: number, to: number, count: number): number {
    let best = order[from];
    let most = -1;
    for (let k = from; k < to; k++) {
      const i = order[k];
      let least = this.distance[0][i];
      for (let l = 1; l < count; l++) least = Math.min(least, this.distance[l][i]);
      if (least > most) {
        most = least;
        best = i;
      }
    }
    return best;
  }

  /** The cut at the median of the difference of two distances; null where all differ alike. Leaves the halves in `side`. */
  private cut(order: Int32Array, from: number, to: number, a: Int32Array, b: Int32Array): Cut | null {
    const { side, room } = this;
    const size = to - from;
    let low = Number.POSITIVE_INFINITY;
    let high = Number.NEGATIVE_INFINITY;
    for (let k = from; k < to; k++) {
      const value = a[order[k]] - b[order[k]];
      if (value < low) low = value;
      if (value > high) high = value;
    }
    const span = high - low + 1;
    if (span < 2 || span > size) return null;
    room.fill(0, 0, span);
    for (let k = from; k < to; k++) room[a[order[k]] - b[order[k]] - low]++;
    let level = 0;
    for (let sum = room[0]; 2 * sum < size; sum += room[level]) level++;
    const threshold = Math.min(level, span - 2) + low;
    for (let k = from; k < to; k++) side[order[k]] = a[order[k]] - b[order[k]] <= threshold ? FIRST : SECOND;
    let first = 0;
    let second = 0;
    for (let k = from; k < to; k++) {
      if (!this.isShore(order[k])) continue;
      if (side[order[k]] === FIRST) first++;
      else second++;
    }
    return {
      from: a,
      less: b,
      threshold,
      shore: first <= second ? FIRST : SECOND,
      length: Math.min(first, second),
    };
  }

  /** Puts a cut into `side`. */
  private apply(order: Int32Array, from: number, to: number, { from: a, less: b, threshold, shore }: Cut): void {
    const { side } = this;
    for (let k = from; k < to; k++) side[order[k]] = a[order[k]] - b[order[k]] <= threshold ? FIRST : SECOND;
    for (let k = from; k < to; k++) if (side[order[k]] === shore && this.isShore(order[k])) side[order[k]] = BETWEEN;
  }

  /** Whether a block touches the half it is not in. */
  private isShore(i: number): boolean {
    const { side, region } = this;
    const { start, neighbour } = this.graph;
    const other = 1 - side[i];
    const end = start[i + 1];
    for (let p = start[i]; p < end; p++) {
      const j = neighbour[p];
      if (side[j] === other && region[j] === region[i]) return true;
    }
    return false;
  }

  /** Pieces that do not hang together, the first of them still in `queue`. */
  private separate(order: Int32Array, from: number, to: number, reached: number): number[] {
    const { region, queue, room } = this;
    const here = region[order[from]];
    const sizes: number[] = [];
    let filled = 0;
    const take = (size: number) => {
      sizes.push(size);
      for (let k = 0; k < size; k++) {
        room[filled++] = queue[k];
        region[queue[k]] = 0;
      }
    };
    take(reached);
    for (let k = from; k < to; k++) if (region[order[k]] === here) take(this.measure(order[k], this.distance[0]));
    order.set(room.subarray(0, filled), from);
    return sizes;
  }

  private arrange(order: Int32Array, from: number, to: number): number[] {
    const { room, side } = this;
    const count = [0, 0, 0];
    for (let k = from; k < to; k++) count[side[order[k]]]++;
    const next = [0, count[FIRST], count[FIRST] + count[SECOND]];
    for (let k = from; k < to; k++) room[next[side[order[k]]]++] = order[k];
    order.set(room.subarray(0, to - from), from);
    return [count[FIRST], count[SECOND]];
  }
}
