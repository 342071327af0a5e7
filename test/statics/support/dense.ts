import { Matrix, SingularValueDecomposition } from 'ml-matrix';
import type { Truss } from '../../../src/domain/truss.ts';
import type { Vec3 } from '../../../src/domain/vector.ts';
import type { Supports } from '../../../src/statics/types.ts';

/** Elongations of all bars and springs over the movements of all real nodes, then one row a restraint: written out in full, by another way than the engine's. */
export function denseRows({ nodes, bars }: Truss, supports: Supports): { strains: Matrix; conditions: Matrix } {
  const width = 3 * nodes.length;
  const movementRow = (node: number, direction: Vec3): number[] => {
    const carriage = nodes[node].carriedBy;
    const row = new Array<number>(width).fill(0);
    if (carriage === null) {
      direction.forEach((v, axis) => {
        row[3 * node + axis] = v;
      });
      return row;
    }
    const bar = bars[carriage.bar];
    const from = movementRow(bar.from, direction);
    const to = movementRow(bar.to, direction);
    return row.map((_, i) => (1 - carriage.t) * from[i] + carriage.t * to[i]);
  };
  const strains = bars.map((bar) => {
    const p = nodes[bar.from].at;
    const q = nodes[bar.to].at;
    const d: Vec3 = [(q[0] - p[0]) / bar.length, (q[1] - p[1]) / bar.length, (q[2] - p[2]) / bar.length];
    const from = movementRow(bar.from, d);
    return movementRow(bar.to, d).map((v, i) => v - from[i]);
  });
  for (const spring of supports.springs) strains.push(movementRow(spring.node, spring.direction));
  const conditions = supports.restraints.map(({ node, direction }) => movementRow(node, direction));
  // What is carried has no movement of its own, what nothing touches is left out.
  const touched = new Set([...bars.flatMap((b) => [b.from, b.to]), ...supports.restraints.map((r) => r.node)]);
  nodes.forEach((node, i) => {
    if (node.carriedBy === null && touched.has(i)) return;
    for (let axis = 0; axis < 3; axis++) {
      const row = new Array<number>(width).fill(0);
      row[3 * i + axis] = 1;
      conditions.push(row);
    }
  });
  return {
    strains: new Matrix(strains),
    conditions: new Matrix(conditions.length > 0 ? conditions : [new Array(width).fill(0)]),
  };
}

/**
 * Mechanisms by the singular values of all rows together; rows are scaled alike. `gap` is the widest ratio between neighbours at or below a thousandth of
 * the highest, with what lies below rounding taken for rounding.
 */
export function denseMechanisms(truss: Truss, supports: Supports): { mechanisms: number; gap: number } {
  const { strains, conditions } = denseRows(truss, supports);
  const width = strains.columns;
  // Rows of zeros make it no wider than high.
  const padding = Array.from({ length: width }, () => new Array<number>(width).fill(0));
  const all = new Matrix([...strains.to2DArray(), ...conditions.to2DArray(), ...padding]);
  const values = [...new SingularValueDecomposition(all).diagonal].sort((a, b) => a - b);
  const rounding = 1e-15 * values[width - 1];
  const below = [rounding, ...values.map((v) => Math.max(v, rounding))];
  let mechanisms = 0;
  for (let m = 0; m < width && below[m] <= 1e-3 * values[width - 1]; m++)
    if (below[m + 1] / below[m] > below[mechanisms + 1] / below[mechanisms]) mechanisms = m;
  return { mechanisms, gap: below[mechanisms + 1] / below[mechanisms] };
}
