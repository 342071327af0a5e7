import type { Result } from '../../domain/result.ts';
import { scale } from '../../domain/vector.ts';
import type { Cell, Table } from '../table.ts';
import { type Joint, type JointBar, type JointState, joints } from './joints.ts';

const DEGREES = 180 / Math.PI;

/**
 * The joint schedule: for each joint and each combination that governs one of its bars a row for every bar, with all
 * forces acting together, one for the support and one for the loads; the forces of such a group add up to zero.
 */
export function jointsTable(result: Result): Table {
  function* rows(): Generator<readonly Cell[]> {
    for (const joint of joints(result)) {
      for (const state of joint.states) yield* rowsOf(joint, state);
    }
  }
  const heads = [
    'node',
    'place',
    'x (m)',
    'y (m)',
    'z (m)',
    'together in',
    'what',
    'mark',
    'section',
    'governs',
    'axial force (N)',
    'direction x',
    'direction y',
    'direction z',
    'above horizontal (deg)',
    'to first bar (deg)',
    'Fx on joint (N)',
    'Fy on joint (N)',
    'Fz on joint (N)',
  ];
  return { heads, rows: rows() };
}

function* rowsOf({ node, bars }: Joint, state: JointState): Generator<readonly Cell[]> {
  const { from, governs, forces, reaction, loads } = state;
  const where: readonly Cell[] = [node.id, node.place, ...node.at, from];
  for (const [k, { bar, member, direction, slope }] of bars.entries()) {
    const force = forces[k];
    yield [
      ...where,
      bar.name,
      member?.tag ?? member?.name ?? null,
      member?.section?.name ?? null,
      governs.includes(bar.id) ? 'yes' : null,
      force,
      ...direction,
      slope * DEGREES,
      k === 0 ? null : angleBetween(bars[0], bars[k]) * DEGREES,
      ...(force === null ? [null, null, null] : scale(direction, force)),
    ];
  }
  const blank = Array<null>(9).fill(null);
  if (reaction !== null) yield [...where, 'support', ...blank, ...reaction];
  if (loads !== null) yield [...where, 'loads', ...blank, ...loads];
}

function angleBetween({ direction: [ax, ay, az] }: JointBar, { direction: [bx, by, bz] }: JointBar): number {
  const cross = Math.hypot(ay * bz - az * by, az * bx - ax * bz, ax * by - ay * bx);
  return Math.atan2(cross, ax * bx + ay * by + az * bz);
}
