import type { Truss, TrussBar } from '../../domain/truss.ts';
import { scale, type Vec3 } from '../../domain/vector.ts';
import type { NodeForces } from './node-forces.ts';

/**
 * A force per length on every bar of the members, half of each bar's share to each of its ends: what a simply supported
 * bar hands on. A bar that is only partly theirs (a splice) is loaded over its whole length, a pair's bar once.
 * @param force N/m, global axes
 * @param per `length`: metres along the bar; `plan`: metres of its projection on the ground
 * @returns the number of bars that are theirs, and m of them, along or in plan
 */
export function addLineLoad(
  forces: NodeForces,
  truss: Truss,
  members: readonly number[],
  force: Vec3,
  per: 'length' | 'plan',
): { readonly bars: number; readonly metres: number } {
  const chosen = new Set(members);
  const bars = truss.bars.filter((bar) => bar.members.some((member) => chosen.has(member)));
  const metresOf = (bar: TrussBar) => (per === 'length' ? bar.length : planLength(truss, bar));
  for (const bar of bars) forces.addToEnds(bar, scale(force, metresOf(bar)));
  return { bars: bars.length, metres: bars.reduce((sum, bar) => sum + metresOf(bar), 0) };
}

function planLength(truss: Truss, bar: TrussBar): number {
  const [a, b] = [truss.nodes[bar.from].at, truss.nodes[bar.to].at];
  return Math.hypot(b[0] - a[0], b[1] - a[1]);
}
