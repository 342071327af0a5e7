import type { Graph } from './graph.ts';

/** Sides of a parted piece: the two halves and the separator between them. */
export const FIRST = 0;
export const SECOND = 1;
export const BETWEEN = 2;

/** Share of the piece by which the halves may differ in size. */
const UNEVEN = 0.3;
const MOST_PASSES = 6;

/**
 * Shortens a separator by moving its blocks into the halves one at a time, the most gainful first and a loss taken where a later gain may make
 * up for it (Fiduccia & Mattheyses 1982, for separators of vertices as Ashcraft & Liu 1998). What a block that moves would touch on the other side
 * becomes part of the separator.
 */
export class SeparatorRefinement {
  private readonly graph: Graph;
  /** Blocks of the separator, and each one's place among them. */
  private readonly list: Int32Array;
  private readonly place: Int32Array;
  private length = 0;
  /** pulled[2 i + s]: blocks that come into the separator when block i moves to side s. */
  private readonly pulled: Int32Array;
  private readonly moved: Int32Array;
  private passes = 0;
  /** Moves of the pass: the block, its side, then how many it pulled in and which. */
  private log: number[] = [];
  private readonly sizes = [0, 0];

  constructor(graph: Graph) {
    this.graph = graph;
    this.list = new Int32Array(graph.count);
    this.place = new Int32Array(graph.count);
    this.pulled = new Int32Array(2 * graph.count);
    this.moved = new Int32Array(graph.count);
  }

  /** `order[from..to)` is the piece, all of it of one `region`; `side` is changed in place. */
  shorten(order: Int32Array, from: number, to: number, region: Int32Array, side: Uint8Array): void {
    this.length = 0;
    this.sizes.fill(0);
    for (let k = from; k < to; k++) {
      const i = order[k];
      if (side[i] === BETWEEN) this.enter(i, region, side);
      else this.sizes[side[i]]++;
    }
    for (let pass = 0; pass < MOST_PASSES && this.pass(to - from, region, side); pass++);
  }

  /** One pass; whether it made the separator shorter or the halves more even. */
  private pass(total: number, region: Int32Array, side: Uint8Array): boolean {
    this.passes++;
    this.log = [];
    const began = this.worth();
    let best = began;
    let kept = 0;
    let idle = 0;
    const patience = 20 + (this.length >> 1);
    while (idle < patience) {
      const choice = this.choose(total);
      if (choice < 0) break;
      this.move(choice >> 1, choice & 1, region, side);
      idle++;
      const worth = this.worth();
      if (worth < best) {
        best = worth;
        kept = this.log.length;
        idle = 0;
      }
    }
    this.undo(kept, region, side);
    return best < began;
  }

  /** Length first, evenness after it. */
  private worth(): number {
    return this.length + Math.abs(this.sizes[0] - this.sizes[1]) / (4 * (this.sizes[0] + this.sizes[1] + 1));
  }

  /** The move that lengthens the separator least, as 2 block + side; -1 where none is left. */
  private choose(total: number): number {
    const { list, pulled, moved, sizes } = this;
    const most = ((1 + UNEVEN) / 2) * total;
    let best = -1;
    let least = Number.POSITIVE_INFINITY;
    for (let k = 0; k < this.length; k++) {
      const i = list[k];
      if (moved[i] === this.passes) continue;
      for (let s = 0; s < 2; s++) {
        if (sizes[s] + 1 > most) continue;
        const cost = pulled[2 * i + s] + (sizes[s] > sizes[1 - s] ? 0.5 : 0);
        if (cost < least) {
          least = cost;
          best = 2 * i + s;
        }
      }
    }
    return best;
  }

  private move(i: number, s: number, region: Int32Array, side: Uint8Array): void {
    const { graph, log } = this;
    this.leave(i, s, region, side);
    this.moved[i] = this.passes;
    log.push(i);
    let count = 0;
    for (let p = graph.start[i]; p < graph.start[i + 1]; p++) {
      const j = graph.neighbour[p];
      if (region[j] !== region[i] || side[j] !== 1 - s) continue;
      this.sizes[1 - s]--;
      side[j] = BETWEEN;
      this.tell(j, 1 - s, -1, region, side);
      this.enter(j, region, side);
      log.push(j);
      count++;
    }
    log.push(count, s);
  }

  /** Takes moves back until the log is `kept` long. */
  private undo(kept: number, region: Int32Array, side: Uint8Array): void {
    const { log } = this;
    while (log.length > kept) {
      const s = log.pop()!;
      const count = log.pop()!;
      for (let k = 0; k < count; k++) this.leave(log.pop()!, 1 - s, region, side);
      const i = log.pop()!;
      this.sizes[s]--;
      side[i] = BETWEEN;
      this.tell(i, s, -1, region, side);
      this.enter(i, region, side);
    }
  }

  /** Block i of side BETWEEN joins the list. */
  private enter(i: number, region: Int32Array, side: Uint8Array): void {
    const { graph, pulled } = this;
    this.place[i] = this.length;
    this.list[this.length++] = i;
    let toFirst = 0;
    let toSecond = 0;
    for (let p = graph.start[i]; p < graph.start[i + 1]; p++) {
      const j = graph.neighbour[p];
      if (region[j] !== region[i]) continue;
      if (side[j] === SECOND) toFirst++;
      else if (side[j] === FIRST) toSecond++;
    }
    pulled[2 * i] = toFirst;
    pulled[2 * i + 1] = toSecond;
  }

  /** Block i leaves the list for side s. */
  private leave(i: number, s: number, region: Int32Array, side: Uint8Array): void {
    const last = this.list[--this.length];
    this.list[this.place[i]] = last;
    this.place[last] = this.place[i];
    side[i] = s;
    this.sizes[s]++;
    this.tell(i, s, 1, region, side);
  }

  /** Blocks of the separator beside i hear that it came to side s (1) or left it (-1). */
  private tell(i: number, s: number, sign: number, region: Int32Array, side: Uint8Array): void {
    const { graph, pulled } = this;
    for (let p = graph.start[i]; p < graph.start[i + 1]; p++) {
      const j = graph.neighbour[p];
      if (region[j] === region[i] && side[j] === BETWEEN) pulled[2 * j + 1 - s] += sign;
    }
  }
}
