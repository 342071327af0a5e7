import type { Finding } from '../domain/finding.ts';
import type { Member } from '../domain/member.ts';
import type { Truss } from '../domain/truss.ts';
import type { Vec3 } from '../domain/vector.ts';
import { freeSprings, orthonormalSpan, type Spring } from './held-directions.ts';
import { findEmptyNodeSelectors } from './selector-empty.ts';
import { selectNodes } from './selectors/select-nodes.ts';
import type { Brief } from './types.ts';

/** Rigid directions and springs by node, of the same shape as the solver's own supports. */
export interface ResolvedSupports {
  /** Orthonormal directions on each node, nodes ascending. */
  readonly restraints: readonly { readonly node: number; readonly direction: Vec3 }[];
  /** N/m; at right angles to the rigid directions of their node. */
  readonly springs: readonly { readonly node: number; readonly direction: Vec3; readonly stiffness: number }[];
}

/** The supports that the brief's rules put on the nodes of a truss. Rules on one node add up; fixed beats spring. */
export function resolveSupports(
  truss: Truss,
  members: readonly Member[],
  brief: Pick<Brief, 'supports'>,
): { supports: ResolvedSupports; findings: Finding[] } {
  const byNode = new Map<number, { fix: Vec3[]; springs: Spring[] }>();
  for (const rule of brief.supports) {
    for (const node of selectNodes(truss, members, rule.at)) {
      const support = byNode.get(node) ?? { fix: [], springs: [] };
      byNode.set(node, support);
      support.fix.push(...rule.fix);
      support.springs.push(...rule.springs);
    }
  }
  const nodes = [...byNode]
    .toSorted(([a], [b]) => a - b)
    .map(([node, { fix, springs }]) => {
      const held = orthonormalSpan(fix);
      return { node, held, springs: freeSprings(springs, held) };
    });
  return {
    supports: {
      restraints: nodes.flatMap(({ node, held }) => held.map((direction) => ({ node, direction }))),
      springs: nodes.flatMap(({ node, springs }) => springs.map((spring) => ({ node, ...spring }))),
    },
    findings: findEmptyNodeSelectors(
      truss,
      members,
      brief.supports.flatMap((rule) => rule.at),
    ),
  };
}
