import type { Result } from '../../domain/result.ts';
import type { Vec3 } from '../../domain/vector.ts';
import { ultimateRuns } from './runs.ts';

/** The greatest of one kind, with the whole reaction that acts together with it. */
export interface GoverningReaction {
  /** N, not negative. */
  readonly force: number;
  /** Case or combination. */
  readonly from: string;
  /** N, global axes, on the truss. */
  readonly reaction: Vec3;
}

/** What a support has to bear: pressed down, lifted up, pushed sideways; null where it never is. */
export interface Bearing {
  readonly node: string;
  readonly down: GoverningReaction | null;
  readonly uplift: GoverningReaction | null;
  readonly horizontal: GoverningReaction | null;
}

export const BEARING_KINDS = ['down', 'uplift', 'horizontal'] as const;
export type BearingKind = (typeof BEARING_KINDS)[number];

/** A reaction acts on the truss: upward where the support is pressed down. */
const SIZE: Readonly<Record<BearingKind, (reaction: Vec3) => number>> = {
  down: (reaction) => reaction[2],
  uplift: (reaction) => -reaction[2],
  horizontal: (reaction) => Math.hypot(reaction[0], reaction[1]),
};

/** The greatest reactions of each support, in the order of nodes. Nodes that are only held are no bearings: they stand with the holds. */
export function bearings(result: Result): Bearing[] {
  const found = new Map<string, Record<BearingKind, GoverningReaction | null>>();
  const held = new Set((result.holds ?? []).filter(({ supported }) => !supported).map(({ node }) => node));
  for (const { name, reactions } of ultimateRuns(result)) {
    for (const { node, force: reaction } of reactions) {
      if (held.has(node)) continue;
      const bearing = found.get(node) ?? { down: null, uplift: null, horizontal: null };
      found.set(node, bearing);
      for (const kind of BEARING_KINDS) {
        const force = SIZE[kind](reaction);
        if (force > (bearing[kind]?.force ?? 0)) bearing[kind] = { force, from: name, reaction };
      }
    }
  }
  return result.nodes.flatMap(({ id }) => {
    const bearing = found.get(id);
    return bearing === undefined ? [] : [{ node: id, ...bearing }];
  });
}
