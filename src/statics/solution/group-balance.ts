import { CholeskyDecomposition, EigenvalueDecomposition, Matrix } from 'ml-matrix';
import type { Truss } from '../../domain/truss.ts';
import type { ModeGroup } from './mode-groups.ts';

/** How the bar forces of one case act on the modes of one group. */
export interface GroupBalance {
  readonly kind: 'stable' | 'indifferent' | 'unstable';
  /** Shares of the group's modes in the motion that the forces resist least; empty where they hold all. */
  readonly motion: readonly number[];
  /** Bars whose compression drives that motion, the most driving first. */
  readonly pushing: readonly number[];
}

/** Eigenvalues below this share of what the forces do, taken without their signs, are nothing. */
const NOTHING = 1e-8;
/** Bars that do less than this share of the worst one's part are not named. */
const PART = 0.05;

/**
 * The geometric stiffness of the bar forces on the modes: Q_ij = sum over bars of N / L times the movements across the bar in modes i and j
 * (N/m), with the largest share that one bar has in its diagonal.
 */
export function geometricOf(
  truss: Truss,
  group: ModeGroup,
  forces: readonly (number | null)[],
): { readonly q: Matrix; readonly most: number } {
  const size = group.modes.length;
  const q = Matrix.zeros(size, size);
  let most = 0;
  for (const { bar, turns } of group.bars) {
    const density = (forces[bar] ?? 0) / truss.bars[bar].length;
    if (density === 0) continue;
    for (const a of turns)
      for (const b of turns) {
        if (b.mode > a.mode) continue;
        const work = density * (a.across[0] * b.across[0] + a.across[1] * b.across[1] + a.across[2] * b.across[2]);
        q.set(a.mode, b.mode, q.get(a.mode, b.mode) + work);
        if (a.mode === b.mode) most = Math.max(most, Math.abs(work));
        else q.set(b.mode, a.mode, q.get(b.mode, a.mode) + work);
      }
  }
  return { q, most };
}

/**
 * Bars do not stretch in a mode, so that to second order the geometric stiffness alone decides: with its smallest eigenvalue positive the
 * balance is stable (Pellegrino & Calladine 1986; Bazant & Cedolin, Stability of Structures, ch. 4, from memory).
 */
export function balanceOf(truss: Truss, group: ModeGroup, forces: readonly (number | null)[]): GroupBalance {
  const size = group.modes.length;
  const { q, most } = geometricOf(truss, group, forces);
  if (most === 0) return { kind: 'indifferent', motion: group.modes.map((_, i) => (i === 0 ? 1 : 0)), pushing: [] };
  const little = NOTHING * most;
  const lowered = Matrix.sub(q, Matrix.eye(size, size).mul(little));
  if (new CholeskyDecomposition(lowered).isPositiveDefinite()) return { kind: 'stable', motion: [], pushing: [] };
  const eigen = new EigenvalueDecomposition(q, { assumeSymmetric: true });
  const lowest = eigen.realEigenvalues.indexOf(Math.min(...eigen.realEigenvalues));
  const motion = eigen.eigenvectorMatrix.getColumn(lowest);
  const kind = eigen.realEigenvalues[lowest] < -little ? 'unstable' : 'indifferent';
  return { kind, motion, pushing: pushingBars(truss, group, forces, motion) };
}

function pushingBars(
  truss: Truss,
  group: ModeGroup,
  forces: readonly (number | null)[],
  motion: readonly number[],
): number[] {
  const works = group.bars.flatMap(({ bar, turns }) => {
    const force = forces[bar] ?? 0;
    if (force >= 0) return [];
    const across = [0, 1, 2].map((axis) => turns.reduce((sum, t) => sum + motion[t.mode] * t.across[axis], 0));
    const work = (force / truss.bars[bar].length) * (across[0] ** 2 + across[1] ** 2 + across[2] ** 2);
    return work < 0 ? [{ bar, work }] : [];
  });
  const worst = Math.min(0, ...works.map(({ work }) => work));
  return works
    .filter(({ work }) => work < PART * worst)
    .sort((a, b) => a.work - b.work || a.bar - b.bar)
    .map(({ bar }) => bar);
}
