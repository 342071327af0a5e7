import type { Vec3 } from '../../domain/vector.ts';
import { assemble } from '../engine/assemble.ts';
import { type Factor, factorise } from '../engine/factor.ts';
import { combineRows, joinNumbers, joinRows, type SparseRows } from '../engine/system.ts';
import { largest } from '../engine/vectors.ts';
import { type Elongations, mapRows } from '../model/elongation.ts';
import { forceDensities, mapTransverse } from '../model/geometric-stiffness.ts';
import { nodeMovements } from '../model/movement.ts';
import type { System } from '../model/system.ts';

/** A truss whose nodes have moved, however far: bars along their new lines, springs along their old ones. */
export interface Deformed {
  readonly q: Float64Array;
  /** Directions and lengths of the bars as they lie now. */
  readonly elongations: Elongations;
  /** N, of every row: bars, then springs. */
  readonly axial: Float64Array;
  /** Forces of bars and springs on the unknowns: in balance with the load. */
  readonly internal: Float64Array;
  /** What rounding leaves of the joint forces, N. */
  readonly rounding: number;
}

/** Exact for movements of any size; N = EA (l - L) / L. */
export function deform(system: System, q: Float64Array): Deformed {
  const { problem, movement, elongations, stiffness } = system;
  const { truss } = problem;
  const { bars, springs } = elongations;
  const moves = nodeMovements(movement, q);
  const lengths = new Float64Array(bars.length);
  const axial = new Float64Array(bars.length + springs.length);
  const directions = bars.map((b, row): Vec3 => {
    const { from, to } = truss.bars[b];
    const start = elongations.directions[row];
    const before = elongations.lengths[row];
    const now: [number, number, number] = [0, 0, 0];
    let twice = 0;
    for (let axis = 0; axis < 3; axis++) {
      const more = moves[3 * to + axis] - moves[3 * from + axis];
      now[axis] = before * start[axis] + more;
      twice += more * (2 * before * start[axis] + more);
    }
    const length = Math.hypot(...now);
    lengths[row] = length;
    // (l^2 - L^2) / (l + L): no digits lost where bars hardly stretch.
    axial[row] = stiffness[row] * (twice / (length + before));
    return length > 0 ? [now[0] / length, now[1] / length, now[2] / length] : start;
  });
  springs.forEach(({ node, direction }, s) => {
    let along = 0;
    for (let axis = 0; axis < 3; axis++) along += direction[axis] * moves[3 * node + axis];
    axial[bars.length + s] = stiffness[bars.length + s] * along;
  });
  const now: Elongations = {
    ...elongations,
    directions,
    lengths,
    rows: mapRows(truss, movement, { bars, springs, directions }),
  };
  return {
    q,
    elongations: now,
    axial,
    internal: combineRows(now.rows, axial, q.length),
    rounding: 2 ** -50 * (largest(axial) + largest(stiffness) * largest(moves)),
  };
}

/** Factor of K + K_G as the truss lies now. */
export function tangentOf({ problem, movement, stiffness, matrix }: System, { elongations, axial }: Deformed): Factor {
  const transverse: SparseRows = mapTransverse(problem.truss, movement, elongations);
  const weights = joinNumbers(stiffness, forceDensities(elongations, axial));
  return factorise(assemble(matrix.symbolic, joinRows(elongations.rows, transverse), weights));
}
