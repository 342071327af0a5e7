import type { Factor } from './factor.ts';
import { solveMany } from './solve.ts';
import type { Stiffness } from './spectrum.ts';
import { combineRows, multiplyRows } from './system.ts';
import { largest } from './vectors.ts';

const MOST_STEPS = 6;

export interface Refined {
  readonly q: Float64Array;
  /** One entry a row, stiffness times its value: bar forces, then spring forces. */
  readonly axial: Float64Array;
}

/**
 * Solves K q = f for all loads and refines until the joints balance. The bar forces are added up from the steps, not taken from the
 * final q: where displacements are large against elongations, q alone cannot hold them to more digits than the condition leaves.
 * @param freeStretch m, one entry a row: how much longer each would be without force (warmth, misfit, a settled end); null for none
 */
export function solveRefined(
  system: Stiffness,
  factor: Factor,
  loads: readonly Float64Array[],
  freeStretch: readonly (Float64Array | null)[] = [],
): Refined[] {
  const { rows, stiffness } = system;
  const { active } = system.matrix.symbolic.freedoms;
  const results = loads.map((_, i) => ({
    q: new Float64Array(active.length),
    axial: Float64Array.from(stiffness, (k, row) => -k * (freeStretch[i]?.[row] ?? 0)),
  }));
  const rest = loads.map((load, i) => {
    if (freeStretch[i] == null) return mask(load, active);
    const given = combineRows(rows, results[i].axial, active.length);
    return mask(
      load.map((f, u) => f - given[u]),
      active,
    );
  });
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
      for (let u = 0; u < q.length; u++) q[u] = q[u] + dq[u];
      multiplyRows(rows, dq).forEach((e, row) => {
        axial[row] = axial[row] + stiffness[row] * e;
      });
      const carried = combineRows(rows, axial, q.length);
      rest[i] = mask(
        carried.map((v, u) => loads[i][u] - v),
        active,
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
