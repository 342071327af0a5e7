import type { Vec3 } from '../../../src/domain/vector.ts';
import type { LoadCase, NodalForce, Supports } from '../../../src/statics/types.ts';
import { alsoFlat, fix, randomFrom, type Sketch } from '../support/trusses.ts';

export interface BracedFrame {
  readonly sketch: Sketch;
  readonly supports: Supports;
  /** Bars that only pull. */
  readonly rods: readonly number[];
  readonly cases: readonly LoadCase[];
}

/** A plane frame of one to four bays and storeys, crossed rods in at least one bay of each storey, pushed and loaded at random. */
export function bracedFrame(seed: number): BracedFrame {
  const random = randomFrom(seed);
  const [bays, storeys] = [1 + Math.floor(4 * random()), 1 + Math.floor(4 * random())];
  const width = 3 + 4 * random();
  const height = 2.5 + 2 * random();
  const node = (bay: number, storey: number) => storey * (bays + 1) + bay;
  const points: Vec3[] = [];
  for (let s = 0; s <= storeys; s++) for (let b = 0; b <= bays; b++) points.push([b * width, 0, s * height]);
  const bars: [number, number][] = [];
  const rods: number[] = [];
  for (let s = 0; s < storeys; s++) {
    for (let b = 0; b <= bays; b++) bars.push([node(b, s), node(b, s + 1)]);
    for (let b = 0; b < bays; b++) bars.push([node(b, s + 1), node(b + 1, s + 1)]);
    const sure = Math.floor(bays * random());
    for (let b = 0; b < bays; b++) {
      if (b !== sure && random() < 0.6) continue;
      rods.push(bars.length, bars.length + 1);
      bars.push([node(b, s), node(b + 1, s + 1)], [node(b + 1, s), node(b, s + 1)]);
    }
  }
  const feet = Object.fromEntries(Array.from({ length: bays + 1 }, (_, b) => [node(b, 0), 'xz']));
  const free = points.flatMap((_, i) => (i > bays ? [i] : []));
  const cases = ['a', 'b', 'c'].map((name): LoadCase => {
    const push = 2e4 * (random() - 0.5);
    const loads = free.map((at): NodalForce => ({ node: at, force: [push * random(), 0, -3e4 * (random() - 0.2)] }));
    return { name, nature: 'wind', loads };
  });
  const stiffness = bars.map((_, b) => (rods.includes(b) ? 2e7 : 3e8) * (0.5 + random()));
  return { sketch: { points, bars, stiffness }, supports: alsoFlat(fix(feet), points.length, 'y'), rods, cases };
}
