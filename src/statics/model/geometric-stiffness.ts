import { Matrix } from 'ml-matrix';
import type { Truss } from '../../domain/truss.ts';
import { anyNormal, cross, type Vec3 } from '../../domain/vector.ts';
import { buildRows, type SparseRows } from '../engine/system.ts';
import type { Elongations } from './elongation.ts';
import { type Movement, spread } from './movement.ts';

/**
 * The geometric stiffness K_G of bars under axial force N: N / L on the relative movement of a bar's ends square to it (from the second variation of
 * the bar's length; Pellegrino & Calladine 1986 call its forces product forces). Tension stiffens, compression softens; springs to the ground have none.
 *
 * As rows over the unknowns, two a bar (row 2r and 2r + 1 for bar row r of `elongations`), so that K_G is
 * `sum over rows of weight * row * row^T` like K itself:
 *
 * - `applyStiffness(transverse, densities, q)` is K_G q;
 * - `joinRows(rows, transverse)` with the stiffnesses and the densities one after the other assembles K + K_G.
 *
 * The pattern of a `System` has room for both, that of K's rows alone may not (a bar along x that a node held along x cannot feel).
 */
export function mapTransverse(truss: Truss, movement: Movement, { bars, directions }: Elongations): SparseRows {
  return buildRows(2 * bars.length, (row, put) => {
    const bar = truss.bars[bars[row >> 1]];
    const first = anyNormal(directions[row >> 1]);
    const across = row % 2 === 0 ? first : cross(directions[row >> 1], first);
    spread(movement, bar.from, across, -1, put);
    spread(movement, bar.to, across, 1, put);
  });
}

/** N / L, one weight for each row of `mapTransverse`. `axial` has the force of every bar row first (N, tension positive); what follows is not read. */
export function forceDensities({ bars, lengths }: Elongations, axial: ArrayLike<number>): Float64Array {
  const out = new Float64Array(2 * bars.length);
  for (let row = 0; row < bars.length; row++) {
    const density = lengths[row] > 0 ? axial[row] / lengths[row] : 0;
    out[2 * row] = density;
    out[2 * row + 1] = density;
  }
  return out;
}

/**
 * K_G on given movements: entry (i, j) is m_i^T K_G m_j in N m. Movements have three components a node, carried nodes included, as modes and
 * `nodeMovements` give them; `axial` as for `forceDensities`. On a mode space: the balance is stable where the matrix is positive definite.
 */
export function projectGeometric(
  truss: Truss,
  { bars, directions, lengths }: Elongations,
  axial: ArrayLike<number>,
  movements: readonly Float64Array[],
): Matrix {
  const out = Matrix.zeros(movements.length, movements.length);
  bars.forEach((b, row) => {
    const density = lengths[row] > 0 ? axial[row] / lengths[row] : 0;
    if (density === 0) return;
    const { from, to } = truss.bars[b];
    const turned = movements.flatMap((moves, i) => {
      const across = acrossPart(moves, from, to, directions[row]);
      return across === null ? [] : [{ i, across }];
    });
    for (const a of turned)
      for (const { i, across } of turned) {
        const work = a.across[0] * across[0] + a.across[1] * across[1] + a.across[2] * across[2];
        out.set(a.i, i, out.get(a.i, i) + density * work);
      }
  });
  return out;
}

/** How the ends of a bar move against each other square to it; null where they do not. */
function acrossPart(moves: Float64Array, from: number, to: number, direction: Vec3): Vec3 | null {
  const x = moves[3 * to] - moves[3 * from];
  const y = moves[3 * to + 1] - moves[3 * from + 1];
  const z = moves[3 * to + 2] - moves[3 * from + 2];
  if (x === 0 && y === 0 && z === 0) return null;
  const along = x * direction[0] + y * direction[1] + z * direction[2];
  return [x - along * direction[0], y - along * direction[1], z - along * direction[2]];
}
