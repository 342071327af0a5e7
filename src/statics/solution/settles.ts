import { CholeskyDecomposition, Matrix } from 'ml-matrix';
import type { Truss } from '../../domain/truss.ts';
import { geometricOf } from './group-balance.ts';
import type { MotionGroup } from './mode-groups.ts';

/**
 * m. How far the truss moves along its modes until its bar forces carry what little of the load works on them: a truss drawn flat to a tenth
 * of a millimetre hangs straight after as much. Positive infinity where the forces drive it on instead of bringing it back, and have work to do.
 *
 * @param loads three components a node, those of carried nodes shared out to the real ones
 * @param nothing work (N) that counts as none
 */
export function settlesBy(
  truss: Truss,
  groups: readonly MotionGroup[],
  forces: readonly (number | null)[],
  loads: Float64Array,
  nothing: number,
): number {
  let most = 0;
  for (const group of groups) {
    const work = group.motions.map(({ nodes, moves }) =>
      nodes.reduce((sum, node, i) => {
        for (let axis = 0; axis < 3; axis++) sum += moves[3 * i + axis] * loads[3 * node + axis];
        return sum;
      }, 0),
    );
    if (work.every((w) => Math.abs(w) <= nothing)) continue;
    const q = geometricOf(truss, group, forces);
    const factor = new CholeskyDecomposition(q);
    if (!factor.isPositiveDefinite()) return Number.POSITIVE_INFINITY;
    const amounts = factor.solve(Matrix.columnVector(work)).to1DArray();
    most = Math.max(most, ...amounts.map(Math.abs));
  }
  return most;
}
