import type { Factor } from '../engine/factor.ts';
import { solveMany } from '../engine/solve.ts';
import { combineRows, multiplyRows } from '../engine/system.ts';
import { largest } from '../engine/vectors.ts';
import type { System } from '../model/system.ts';

const MOST_STEPS = 6;

export interface Refined {
  readonly q: Float64Array;
  /** One entry a row: bar forces, then spring forces. */
  readonly axial: Float64Array;
}

/**
 * Solves K q = f for all loads and refines until the joints balance. The bar forces are added up from the steps, not taken from the
 * final q: where displacements are large against elongations, q alone cannot hold them to more digits than the condition leaves.
 */
export function solveRefined(system: System, factor: Factor, loads: readonly Float64Array[]): Refined[] {
  const { rows, stiffness } = system;
  const unknowns = system.movement.freedoms.active.length;
  const results = loads.map(() => ({ q: new Float64Array(unknowns), axial: new Float64Array(rows.count) }));
  let rest = loads.map((load) => mask(load, system.movement.freedoms.active));
  const worst = rest.map(() => Number.POSITIVE_INFINITY);
  let open = loads.map((_, i) => i);
  for (let step = 0; step < MOST_STEPS && open.length > 0; step++) {
    const steps = solveMany(
      factor,
      open.map((i) => rest[i]),
    );
    open.forEach((i, k) => {
      const { q, axial } = results[i];
      const dq = steps[k];
      for (let u = 0; u < unknowns; u++) q[u] = q[u] + dq[u];
      multiplyRows(rows, dq).forEach((e, row) => {
        axial[row] = axial[row] + stiffness[row] * e;
      });
    });
    rest = rest.map((r, i) => {
      if (!open.includes(i)) return r;
      const carried = combineRows(rows, results[i].axial, unknowns);
      return mask(
        carried.map((v, u) => loads[i][u] - v),
        system.movement.freedoms.active,
      );
    });
    open = open.filter((i) => {
      const size = largest(rest[i]);
      const scale = Math.max(largest(loads[i]), largest(results[i].axial));
      const better = size < worst[i] / 2;
      worst[i] = size;
      return better && size > 1e-15 * scale;
    });
  }
  return results;
}

function mask(vector: Float64Array, active: Uint8Array): Float64Array {
  return vector.map((v, i) => (active[i] ? v : 0));
}
