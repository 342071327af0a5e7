import { type Finding, finding } from '../../domain/finding.ts';
import type { Truss } from '../../domain/truss.ts';
import { between, norm } from '../../domain/vector.ts';
import type { LoadCase, SolvedCase } from '../types.ts';

/**
 * A bar force of more than this many times all loads together is no load path: a net that sags by a four-hundredth of its span
 * asks for fifty (H = W L / 8 f). What does is a mechanism but for a small dimension.
 */
const MOST_TIMES = 300;

/** Cases in which some bar would have to carry many times the sum of the loads, as one finding; none of strains alone. */
export function forcesBeyondReason(truss: Truss, cases: readonly LoadCase[], solved: readonly SolvedCase[]): Finding[] {
  const found = solved.flatMap((one, k) => {
    if (one.refused !== null || cases[k]?.freeStretch?.length || cases[k]?.settlements?.length) return [];
    const loads = one.loads.reduce((sum, { force }) => sum + norm(force), 0);
    let [bar, force] = [-1, 0];
    one.axialForce.forEach((axial, index) => {
      if (Math.abs(axial ?? 0) > Math.abs(force)) [bar, force] = [index, axial ?? 0];
    });
    return loads > 0 && Math.abs(force) > MOST_TIMES * loads
      ? [{ name: one.name, bar, force, times: Math.abs(force) / loads }]
      : [];
  });
  if (found.length === 0) return [];
  const worst = found.reduce((most, one) => (one.times > most.times ? one : most));
  const { name, from, to } = truss.bars[worst.bar];
  const often = found.length === 1 ? '' : `, and so do ${found.length - 1} more`;
  return [
    finding(
      'load-moves-it',
      `Load case ${worst.name} would put ${(worst.force / 1000).toPrecision(3)} kN into bar ${name}, ${worst.times.toPrecision(2)} times the sum of its loads${often}: the truss stands by a small dimension only and would move.`,
      'Trust no force of this result. Look about this bar for a member or a support that is missing, and for an end that was drawn a little off; the finding nearly-moves has the numbers.',
      { nodes: [from, to], at: between(truss.nodes[from].at, truss.nodes[to].at, 0.5), place: truss.nodes[from].place },
    ),
  ];
}
