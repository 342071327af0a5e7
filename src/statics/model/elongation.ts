import type { Truss } from '../../domain/truss.ts';
import { subtract, unit, type Vec3 } from '../../domain/vector.ts';
import { buildRows, type SparseRows } from '../engine/system.ts';
import type { GroundSpring, Supports } from '../types.ts';
import { type Movement, spread } from './movement.ts';
import type { Parts } from './parts.ts';

/** The bars and springs that are judged, as rows over the unknowns: first the bars, then the springs. */
export interface Elongations {
  readonly rows: SparseRows;
  /** Bar of each bar row. */
  readonly bars: readonly number[];
  readonly springs: readonly GroundSpring[];
  /** Unit vector of each bar row from `from` to `to`. */
  readonly directions: readonly Vec3[];
  /** m, between the nodes of each bar row. */
  readonly lengths: Float64Array;
}

export function mapElongations(truss: Truss, parts: Parts, supports: Supports, movement: Movement): Elongations {
  const bars = truss.bars.map((_, b) => b).filter((b) => parts.liveBar[b]);
  const springs = supports.springs.filter((spring) => parts.liveNode[spring.node]);
  const lengths = new Float64Array(bars.length);
  const directions = bars.map((b, row): Vec3 => {
    const bar = truss.bars[b];
    const between = subtract(truss.nodes[bar.to].at, truss.nodes[bar.from].at);
    lengths[row] = Math.hypot(...between);
    return unit(between) ?? [0, 0, 0];
  });
  const rows = mapRows(truss, movement, { bars, springs, directions });
  return { rows, bars, springs, directions, lengths };
}

/** Rows of bars that lie along `directions`, then those of the springs. */
export function mapRows(
  truss: Truss,
  movement: Movement,
  { bars, springs, directions }: Pick<Elongations, 'bars' | 'springs' | 'directions'>,
): SparseRows {
  return buildRows(bars.length + springs.length, (row, put) => {
    if (row < bars.length) {
      const bar = truss.bars[bars[row]];
      spread(movement, bar.from, directions[row], -1, put);
      spread(movement, bar.to, directions[row], 1, put);
    } else {
      const spring = springs[row - bars.length];
      spread(movement, spring.node, spring.direction, 1, put);
    }
  });
}

/** Elongation of every row under given movements of all nodes. */
export function elongationsOf(truss: Truss, elongations: Elongations, moves: Float64Array): Float64Array {
  const { bars, springs, directions } = elongations;
  const out = new Float64Array(bars.length + springs.length);
  bars.forEach((b, row) => {
    const { from, to } = truss.bars[b];
    const d = directions[row];
    let sum = 0;
    for (let axis = 0; axis < 3; axis++) sum += d[axis] * (moves[3 * to + axis] - moves[3 * from + axis]);
    out[row] = sum;
  });
  springs.forEach((spring, s) => {
    let sum = 0;
    for (let axis = 0; axis < 3; axis++) sum += spring.direction[axis] * moves[3 * spring.node + axis];
    out[bars.length + s] = sum;
  });
  return out;
}

/** With EA = 1 everywhere; a spring counts as a bar of the mean length, so that no support's own size decides what moves. */
export function unitStiffness(elongations: Elongations): Float64Array {
  const { bars, springs, lengths } = elongations;
  const mean = lengths.reduce((sum, length) => sum + length, 0) / Math.max(bars.length, 1);
  const stiffness = new Float64Array(bars.length + springs.length).fill(mean > 0 ? 1 / mean : 1);
  lengths.forEach((length, row) => {
    stiffness[row] = length > 0 ? 1 / length : 0;
  });
  return stiffness;
}
