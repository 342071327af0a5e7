import type { Vec3 } from '../../domain/vector.ts';
import { distanceToAxis } from '../along-axes.ts';
import type { Axis } from '../axes.ts';
import type { VertexGraph } from '../vertices.ts';
import type { MemberRole } from './roles.ts';

/** How ends of one kind are drawn where they are joined. */
export interface JoinedEnds {
  readonly count: number;
  /** m, the farthest that any of them stops from the axis it meets. */
  readonly farthest: number;
}

/**
 * What kind of detail an end is: section and role of its member, and the role of what it meets. Neither place nor
 * direction counts, so the same detail on the other slope or in the next frame is of the same kind.
 */
export const endKind = (axis: Axis, role: MemberRole | null, met: MemberRole | null): string =>
  `${axis.sectionName ?? ''} ${role ?? ''} to ${met ?? ''}`;

/** For each kind of end that `wanted` holds, how many ends of it are joined, and over what gap at most. */
export function joinedEnds(
  wanted: ReadonlySet<string>,
  axes: readonly (Axis | null)[],
  { vertices }: VertexGraph,
  roles: readonly (MemberRole | null)[],
): ReadonlyMap<string, JoinedEnds> {
  const found = new Map<string, JoinedEnds>();
  for (const { stations } of vertices) {
    for (const { member, role } of stations) {
      const axis = axes[member];
      if (axis === null || role === 'through') continue;
      const end = endOf(axis, role);
      const gaps = new Map<string, number>();
      for (const { member: other } of stations) {
        const met = axes[other];
        if (other === member || met === null) continue;
        const kind = endKind(axis, roles[member], roles[other]);
        if (!wanted.has(kind)) continue;
        const gap = distanceToAxis(end, met).distance;
        gaps.set(kind, Math.min(gap, gaps.get(kind) ?? gap));
      }
      for (const [kind, gap] of gaps) {
        const { count, farthest } = found.get(kind) ?? { count: 0, farthest: 0 };
        found.set(kind, { count: count + 1, farthest: Math.max(farthest, gap) });
      }
    }
  }
  return found;
}

const endOf = (axis: Axis, role: 'start' | 'finish'): Vec3 => (role === 'start' ? axis.start : axis.finish);
