import type { Truss } from '../../domain/truss.ts';
import type { Vec3 } from '../../domain/vector.ts';
import { largest } from '../engine/vectors.ts';
import type { Restraint } from '../types.ts';

/** Movements below this share of the largest are rounding. */
export const NOTHING = 1e-9;

export interface ReducedModes {
  readonly modes: Float64Array[];
  /** pivots[i] moves by 1 in modes[i] and not at all, in that direction, in the others. */
  readonly pivots: Restraint[];
}

/**
 * Reduced row echelon form over nodes: each mode gets a pivot node and direction of its own, the largest movement left, and is taken
 * out of the others there. The modes come out in few nodes each where the mechanisms are local. `moves` has three components a node.
 */
export function reduceModes(
  truss: Truss,
  moves: readonly Float64Array[],
  only: readonly number[] | null = null,
): ReducedModes {
  const nodes = (only ?? truss.nodes.map((_, i) => i)).filter((i) => truss.nodes[i].carriedBy === null);
  const modes = moves.map((move) => move.slice());
  const size = modes.map(largest);
  const pivotOf: (Restraint | null)[] = modes.map(() => null);
  for (let step = 0; step < modes.length; step++) {
    let best = NOTHING;
    let column = -1;
    let node = -1;
    modes.forEach((mode, c) => {
      if (pivotOf[c] !== null || size[c] === 0) return;
      for (const i of nodes) {
        // A hair's preference for the first, so that equal movements are taken in the order of the nodes.
        const amount = Math.sqrt(mode[3 * i] ** 2 + mode[3 * i + 1] ** 2 + mode[3 * i + 2] ** 2) / size[c];
        if (amount > best * (1 + 1e-9)) {
          best = amount;
          column = c;
          node = i;
        }
      }
    });
    if (column < 0) break;
    const mode = modes[column];
    const direction = tidyDirection([mode[3 * node], mode[3 * node + 1], mode[3 * node + 2]]);
    const along = (m: Float64Array) =>
      direction[0] * m[3 * node] + direction[1] * m[3 * node + 1] + direction[2] * m[3 * node + 2];
    const factor = 1 / along(mode);
    for (let i = 0; i < mode.length; i++) mode[i] = mode[i] * factor;
    modes.forEach((other, c) => {
      if (c === column) return;
      const k = along(other);
      if (k === 0) return;
      for (let i = 0; i < other.length; i++) other[i] = other[i] - k * mode[i];
    });
    pivotOf[column] = { node, direction };
  }
  const kept = modes.map((_, c) => c).filter((c) => pivotOf[c] !== null);
  return { modes: kept.map((c) => modes[c]!), pivots: kept.map((c) => pivotOf[c]!) };
}

/** At length 1, exactly along an axis where it is so but for rounding, its largest component positive. */
export function tidyDirection(vector: Vec3): Vec3 {
  const length = Math.hypot(...vector);
  let parts = vector.map((v) => (Math.abs(v) < 1e-7 * length ? 0 : v / length));
  const again = Math.hypot(...parts);
  const lead = parts.reduce((most, v) => (Math.abs(v) > Math.abs(most) + 1e-9 ? v : most), 0);
  parts = parts.map((v) => v / (lead < 0 ? -again : again) + 0);
  return parts as unknown as Vec3;
}
