import type { Truss } from '../../domain/truss.ts';
import { along, dot, norm, scale, subtract, unit, type Vec3 } from '../../domain/vector.ts';
import { leverShares } from '../model/carriage.ts';
import type { NodalForce, Supports } from '../types.ts';

/**
 * What shows at a joint that a bar carries nothing: it is alone there; it and one other are not in line; it and two others are not in one plane; all others
 * (and what the support gives, and the load) lie in one line, or in one plane, that it stands out of.
 */
export type JointRule = 'alone' | 'two' | 'three' | 'out-of-line' | 'out-of-plane';

export interface ShownIdle {
  readonly bar: number;
  /** The joint that shows it. */
  readonly node: number;
  readonly rule: JointRule;
}

/** Sine of the angle from which a bar stands out of the line or plane of the others: less is not seen. */
const STANDS_OUT = 1e-3;

/** Sine of the angle up to which others lie in one line or plane: drawn so, but for rounding. */
const IN_LINE = 1e-6;

/** Share of the largest load below which a load has no part across a line or plane. */
const NO_LOAD = 1e-9;

/** What acts on one joint. */
interface Joint {
  readonly bars: { readonly bar: number; readonly pull: Vec3 }[];
  /** Directions that supports, holds and springs may push in. */
  readonly held: Vec3[];
  readonly loads: Vec3[];
  /** Something bends there: its shear may go anywhere. */
  isClosed: boolean;
}

/**
 * The bars that the balance of single joints shows to carry nothing, in the order in which a person would find them: round by round, with the idle bars of
 * the rounds before taken away, the simplest joints first.
 * @param loads of one case, or of several: a bar found carries nothing under any of them
 * @param known bars that are known to carry nothing to begin with
 * @param bending bars that bend: joints where they end show nothing
 */
export function idleByJoints(
  truss: Truss,
  supports: Supports,
  loads: readonly (readonly NodalForce[])[],
  { known = [], bending = new Set() }: { known?: readonly number[]; bending?: ReadonlySet<number> } = {},
): ShownIdle[] {
  const joints = jointsOf(truss, supports, loads, bending);
  const least = NO_LOAD * Math.max(0, ...joints.flatMap((joint) => joint.loads.map(norm)));
  const idle = new Set(known);
  const found: ShownIdle[] = [];
  let open = joints.flatMap(({ isClosed }, node) => (isClosed ? [] : [node]));
  while (open.length > 0) {
    const round = new Map<number, ShownIdle>();
    const inOrder = open.toSorted((a, b) => liveBars(joints[a], idle) - liveBars(joints[b], idle) || a - b);
    for (const node of inOrder)
      for (const shown of shownAt(joints[node], node, idle, least))
        if (!round.has(shown.bar)) round.set(shown.bar, shown);
    for (const bar of round.keys()) idle.add(bar);
    found.push(...round.values());
    open = joints.flatMap(({ bars, isClosed }, node) =>
      !isClosed && bars.some(({ bar }) => round.has(bar)) ? [node] : [],
    );
  }
  return found;
}

const liveBars = ({ bars }: Joint, idle: ReadonlySet<number>): number =>
  bars.filter(({ bar }) => !idle.has(bar)).length;

function shownAt({ bars, held, loads }: Joint, node: number, idle: ReadonlySet<number>, least: number): ShownIdle[] {
  const live = bars.filter(({ bar }) => !idle.has(bar));
  return live.flatMap(({ bar, pull }): ShownIdle[] => {
    const others = live.flatMap((other) => (other.bar === bar ? [] : [other.pull]));
    const span = spanOf([...others, ...held]);
    const across = unit(rest(pull, span));
    if (across === null || norm(rest(pull, span)) < STANDS_OUT * norm(pull)) return [];
    if (loads.some((load) => Math.abs(dot(load, across)) > least)) return [];
    return [{ bar, node, rule: ruleOf(span.length, others.length, held.length, loads) }];
  });
}

function ruleOf(rank: number, others: number, held: number, loads: readonly Vec3[]): JointRule {
  if (rank === 0) return 'alone';
  const isBare = held === 0 && loads.length === 0;
  if (isBare && others === 1) return 'two';
  if (isBare && others === 2 && rank === 2) return 'three';
  return rank === 1 ? 'out-of-line' : 'out-of-plane';
}

/** Orthonormal directions of what the vectors span; what hardly leaves the span of those before it adds none. */
function spanOf(vectors: readonly Vec3[]): Vec3[] {
  const span: Vec3[] = [];
  for (const vector of vectors) {
    const own = rest(vector, span);
    const direction = unit(own);
    if (direction !== null && norm(own) > IN_LINE * norm(vector)) span.push(direction);
  }
  return span;
}

/** What is left of a vector at right angles to the span. */
const rest = (vector: Vec3, span: readonly Vec3[]): Vec3 =>
  span.reduce((left, direction) => along(left, direction, -dot(left, direction)), vector);

/** Carried nodes hand what they get to the joints at the ends of their bars. */
function jointsOf(
  truss: Truss,
  { restraints, springs, holds = [] }: Supports,
  cases: readonly (readonly NodalForce[])[],
  bending: ReadonlySet<number>,
): Joint[] {
  const joints = truss.nodes.map((): Joint => ({ bars: [], held: [], loads: [], isClosed: false }));
  const shares = leverShares(truss);
  truss.bars.forEach((bar, b) => {
    const direction = unit(subtract(truss.nodes[bar.to].at, truss.nodes[bar.from].at));
    if (direction === null) return;
    const pulls = new Map<number, Vec3>();
    for (const [end, sign] of [
      [bar.from, 1],
      [bar.to, -1],
    ] as const)
      for (const [real, share] of shares[end])
        pulls.set(real, along(pulls.get(real) ?? [0, 0, 0], direction, sign * share));
    for (const [real, pull] of pulls) {
      joints[real].bars.push({ bar: b, pull });
      if (bending.has(b)) joints[real].isClosed = true;
    }
  });
  for (const { node, direction } of [...restraints, ...holds, ...springs])
    for (const [real] of shares[node]) joints[real].held.push(direction);
  for (const loads of cases) {
    const sums = new Map<number, Vec3>();
    for (const { node, force } of loads)
      for (const [real, share] of shares[node]) sums.set(real, along(sums.get(real) ?? [0, 0, 0], force, share));
    for (const [real, force] of sums) if (norm(force) > 0) joints[real].loads.push(scale(force, 1));
  }
  return joints;
}
