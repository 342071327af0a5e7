import { EigenvalueDecomposition, Matrix } from 'ml-matrix';
import { type Finding, finding } from '../domain/finding.ts';
import { pushTo } from '../domain/group.ts';
import type { Member } from '../domain/member.ts';
import type { Truss } from '../domain/truss.ts';
import { dot, meanOf, subtract, unit, type Vec3 } from '../domain/vector.ts';
import { findEmptyNodeSelectors } from './selector-empty.ts';
import { joinedNodes } from './selectors/member-nodes.ts';
import { selectMembers } from './selectors/select-members.ts';
import { selectNodes } from './selectors/select-nodes.ts';
import type { HoldRule } from './types.ts';

/** A node held along a unit direction by something that is not in the model; of the same shape as the solver's own. */
export interface ResolvedHold {
  readonly node: number;
  readonly direction: Vec3;
  readonly because: string;
}

/** A truss is flat where its nodes lie within this share of its size from their plane: eccentric joints and cambers do. */
const FLAT = 0.05;
/** Nodes within this share of the size from one line make no plane. */
const LINE = 0.02;
/** Components of a normal below this are the drawing's tolerance (0.6 degrees). */
const TIDY = 0.01;

/** The holds that the brief's rules put on the nodes of a truss; two of one direction on a node are one. */
export function resolveHolds(
  truss: Truss,
  members: readonly Member[],
  rules: readonly HoldRule[],
): { holds: ResolvedHold[]; findings: Finding[] } {
  const holds: ResolvedHold[] = [];
  const findings: Finding[] = [];
  const put = (hold: ResolvedHold) => {
    const again = holds.some((h) => h.node === hold.node && Math.abs(dot(h.direction, hold.direction)) > 1 - 1e-9);
    if (!again) holds.push(hold);
  };
  for (const rule of rules) {
    const wanted = rule.nodes === null ? null : new Set(selectNodes(truss, members, rule.nodes));
    const groups = trussesOf(truss, members, rule);
    let placed = 0;
    for (const { own, all, name } of groups) {
      const direction = rule.along ?? planeNormal(truss, [...joinedNodes(truss, members.length, all)]);
      if (direction === null) {
        findings.push(sayNotFlat(rule, name));
        placed++;
        continue;
      }
      for (const node of [...joinedNodes(truss, members.length, own)].sort((a, b) => a - b)) {
        if (wanted !== null && !wanted.has(node)) continue;
        put({ node, direction, because: rule.because });
        placed++;
      }
    }
    if (placed === 0) findings.push(sayEmpty(rule));
  }
  const selectors = rules.flatMap((rule) => rule.nodes ?? []);
  return {
    holds: holds.sort((a, b) => a.node - b.node),
    findings: [...findings, ...findEmptyNodeSelectors(truss, members, selectors)],
  };
}

interface TrussGroup {
  /** Members that the rule names. */
  readonly own: readonly number[];
  /** All members of that truss: they make its plane. */
  readonly all: readonly number[];
  readonly name: string;
}

/** The trusses that the named members belong to: those of one assembly that hang together, or the named members that do. */
function trussesOf(truss: Truss, members: readonly Member[], rule: HoldRule): TrussGroup[] {
  const named = rule.on === null ? members.map((_, i) => i) : selectMembers(members, rule.on);
  const isNamed = new Set(named);
  const byAssembly = new Map<string, number[]>();
  const alone: number[] = [];
  for (const member of named) {
    const { assembly } = members[member];
    if (assembly === null) alone.push(member);
    else pushTo(byAssembly, assembly, member);
  }
  const groups = [...byAssembly].flatMap(([name]) => {
    const all = members.flatMap(({ assembly }, i) => (assembly === name ? [i] : []));
    return connected(truss, members.length, all).map((own) => ({ name, all: own }));
  });
  for (const own of connected(truss, members.length, alone)) groups.push({ name: markOf(members[own[0]]), all: own });
  return groups
    .map(({ name, all }) => ({ name, all, own: all.filter((member) => isNamed.has(member)) }))
    .filter(({ own }) => own.length > 0);
}

/** Members that hang together through common nodes. */
function connected(truss: Truss, memberCount: number, members: readonly number[]): number[][] {
  const groupOf = new Map<number, number[]>();
  const atNode = new Map<number, number[]>();
  for (const member of members) {
    let group = [member];
    for (const node of joinedNodes(truss, memberCount, [member])) {
      const other = atNode.get(node);
      const there = other && groupOf.get(other[0]);
      if (there && there !== group) {
        const [large, small] = there.length >= group.length ? [there, group] : [group, there];
        large.push(...small);
        for (const m of large) groupOf.set(m, large);
        group = large;
      }
      pushTo(atNode, node, member);
    }
    for (const m of group) groupOf.set(m, group);
  }
  return [...new Set(groupOf.values())].map((group) => group.toSorted((a, b) => a - b));
}

/** Unit normal of the plane through the nodes by least squares; null where they lie on a line or not in a plane. */
export function planeNormal(truss: Truss, nodes: readonly number[]): Vec3 | null {
  if (nodes.length < 3) return null;
  const points = nodes.map((node) => truss.nodes[node].at);
  const middle = meanOf(points);
  const spread = Matrix.zeros(3, 3);
  for (const at of points) {
    const arm = subtract(at, middle);
    for (let i = 0; i < 3; i++) for (let j = 0; j < 3; j++) spread.set(i, j, spread.get(i, j) + arm[i] * arm[j]);
  }
  const { realEigenvalues, eigenvectorMatrix } = new EigenvalueDecomposition(spread, { assumeSymmetric: true });
  const order = [0, 1, 2].sort((a, b) => realEigenvalues[a] - realEigenvalues[b]);
  const size = Math.sqrt(Math.max(realEigenvalues[order[2]], 0));
  if (Math.sqrt(Math.max(realEigenvalues[order[1]], 0)) < LINE * size) return null;
  const normal = eigenvectorMatrix.getColumn(order[0]) as unknown as Vec3;
  const extent = Math.max(...points.map((at) => Math.hypot(...subtract(at, middle))));
  const off = Math.max(...points.map((at) => Math.abs(dot(normal, subtract(at, middle)))));
  return off > FLAT * extent ? null : tidy(normal);
}

function tidy(normal: Vec3): Vec3 {
  const kept = normal.map((v) => (Math.abs(v) < TIDY ? 0 : v)) as unknown as Vec3;
  const lead = kept.reduce((most, v) => (Math.abs(v) > Math.abs(most) + 1e-9 ? v : most), 0);
  const turned = kept.map((v) => (lead < 0 ? -v : v) + 0) as unknown as Vec3;
  return unit(turned) ?? normal;
}

const markOf = ({ tag, name, globalId }: Member): string => tag || name || globalId;

function sayNotFlat({ line }: HoldRule, name: string): Finding {
  return finding(
    'selector-empty',
    `The hold in line ${line} of the brief holds nothing of ${name}: its members do not lie in one plane, so that nothing is across it.`,
    'Name the members of one flat truss, or give the direction: `along: [0, 1, 0]` in place of `across: true`.',
  );
}

function sayEmpty({ line }: HoldRule): Finding {
  return finding(
    'selector-empty',
    `The hold in line ${line} of the brief holds no node.`,
    'Look whether `on:` and `nodes:` together catch what they should.',
  );
}
