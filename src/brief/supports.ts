import { type Finding, finding } from '../domain/finding.ts';
import type { Member } from '../domain/member.ts';
import type { Truss } from '../domain/truss.ts';
import type { Vec3 } from '../domain/vector.ts';
import type { GivenSupport } from '../importer/given.ts';
import { freeSprings, orthonormalSpan, type Spring } from './held-directions.ts';
import { nodeFinder } from './point-finder.ts';
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
  const placed = brief.supports.flatMap(({ at, fix, springs }) =>
    selectNodes(truss, members, at).map((node) => ({ node, fix, springs })),
  );
  return {
    supports: combineSupports(placed),
    findings: findEmptyNodeSelectors(
      truss,
      members,
      brief.supports.flatMap((rule) => rule.at),
    ),
  };
}

/** The supports that the model itself gives, at the nodes nearest to its points; one that meets no node is a finding. */
export function resolveGivenSupports(
  truss: Truss,
  given: readonly GivenSupport[],
): { supports: ResolvedSupports; findings: Finding[] } {
  const nodeAt = nodeFinder(truss);
  const placed: PlacedSupport[] = [];
  const findings: Finding[] = [];
  for (const { globalId, name, at, fix, springs } of given) {
    const node = nodeAt(at);
    if (node === null) findings.push(sayMeetsNoNode(globalId, name, at));
    else placed.push({ node, fix, springs });
  }
  return { supports: combineSupports(placed), findings };
}

interface PlacedSupport {
  readonly node: number;
  readonly fix: readonly Vec3[];
  readonly springs: readonly Spring[];
}

function combineSupports(placed: readonly PlacedSupport[]): ResolvedSupports {
  const byNode = new Map<number, { fix: Vec3[]; springs: Spring[] }>();
  for (const { node, fix, springs } of placed) {
    const support = byNode.get(node) ?? { fix: [], springs: [] };
    byNode.set(node, support);
    support.fix.push(...fix);
    support.springs.push(...springs);
  }
  const nodes = [...byNode]
    .toSorted(([a], [b]) => a - b)
    .map(([node, { fix, springs }]) => {
      const held = orthonormalSpan(fix);
      return { node, held, springs: freeSprings(springs, held) };
    });
  return {
    restraints: nodes.flatMap(({ node, held }) => held.map((direction) => ({ node, direction }))),
    springs: nodes.flatMap(({ node, springs }) => springs.map((spring) => ({ node, ...spring }))),
  };
}

function sayMeetsNoNode(globalId: string, name: string, at: Vec3): Finding {
  return finding(
    'selector-empty',
    `The model's support ${name} meets no node of the truss within 1 mm and holds nothing.`,
    'Look whether a member ends there, or give the supports in the brief.',
    { members: [globalId], at },
  );
}
