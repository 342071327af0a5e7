import type { Truss } from '../../domain/truss.ts';
import { along, dot, subtract, unit, type Vec3 } from '../../domain/vector.ts';

/** Bars that do less than this share of the worst one's part are not named. */
const PART = 0.05;

/**
 * Bars whose compression drives a motion, the most driving first.
 * @param moves three components a node, those of carried nodes filled in
 */
export function pushingBars(truss: Truss, forces: readonly (number | null)[], moves: Float64Array): number[] {
  const at = (i: number): Vec3 => [moves[3 * i], moves[3 * i + 1], moves[3 * i + 2]];
  const works = truss.bars.flatMap(({ from, to, length }, bar) => {
    const force = forces[bar] ?? 0;
    if (force >= 0) return [];
    const direction = unit(subtract(truss.nodes[to].at, truss.nodes[from].at));
    if (direction === null) return [];
    const apart = subtract(at(to), at(from));
    const across = along(apart, direction, -dot(apart, direction));
    const work = (force / length) * dot(across, across);
    return work < 0 ? [{ bar, work }] : [];
  });
  const worst = Math.min(0, ...works.map(({ work }) => work));
  return works
    .filter(({ work }) => work < PART * worst)
    .sort((a, b) => a.work - b.work || a.bar - b.bar)
    .map(({ bar }) => bar);
}
