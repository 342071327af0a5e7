import { type Finding, finding } from '../../domain/finding.ts';
import type { Truss } from '../../domain/truss.ts';
import type { Vec3 } from '../../domain/vector.ts';
import { factorise } from '../engine/factor.ts';
import { solveRefined } from '../engine/refine.ts';
import { gatherForces, nodeMovements } from '../model/movement.ts';
import { findParts } from '../model/parts.ts';
import { buildSystem, type Problem } from '../model/system.ts';
import type { Judgement } from '../stability/assess-stability.ts';
import type { LoadCase, NodalForce, SolvedCase, Supports } from '../types.ts';
import { balanceJoints } from './balance.ts';
import { cleanOfModes } from './clean-of-modes.ts';
import { loadMovesIt } from './load-moves-it.ts';
import { judgeSections, realStiffness } from './sections.ts';

export interface SolveOptions {
  /** Largest force a mode's pivot may have to give, as a share of the case's largest force, for the load to count as doing no work on it. */
  readonly workTolerance: number;
}

export const SOLVE_DEFAULTS: SolveOptions = { workTolerance: 1e-8 };

export interface Solution {
  readonly cases: readonly SolvedCase[];
  readonly findings: readonly Finding[];
}

/**
 * Bar forces, displacements and reactions of every case, from one factorisation. Where the truss has mechanisms, their pivots are held:
 * a case that leaves the pivots without force does no work on any mode and is carried; another is refused, with `load-moves-it`.
 * @param stability the judgement of this truss on these supports
 */
export function solveCases(
  truss: Truss,
  supports: Supports,
  stability: Judgement,
  asked: readonly LoadCase[],
  options: Partial<SolveOptions> = {},
): Solution {
  const { workTolerance } = { ...SOLVE_DEFAULTS, ...options };
  const problem: Problem = { truss, supports, parts: findParts(truss, supports) };
  const { cases, findings } = leaveOutSetAside(problem, asked);
  const { pivots } = stability;
  const stiffnessOf = realStiffness(truss);
  const base = buildSystem(problem, [], stiffnessOf);
  const held = pivots.length === 0 ? base : buildSystem(problem, pivots, stiffnessOf, base);
  const factor = factorise(held.matrix);
  const sections = judgeSections(problem, stability);
  const nodeLoads = cases.map((one) => componentsOf(problem, one.loads));
  const answers = solveRefined(
    held,
    factor,
    nodeLoads.map((loads) => gatherForces(held.movement, loads)),
  );
  const solved = cases.map((one, i): SolvedCase => {
    const loads = nodeLoads[i];
    const { q, axial } = answers[i];
    const reason = one.incomplete ? `a load could not be put on the truss (${one.incomplete})` : sections.refuse(one);
    if (reason !== null) return refusedCase(truss, one, reason);
    const balance = balanceJoints(base, held, pivots, axial, loads);
    if (balance.pivotForces.some((force) => Math.abs(force) > workTolerance * balance.largestForce)) {
      const moved = loadMovesIt(truss, stability, one, loads, balance.pivotForces);
      findings.push(moved.finding);
      return refusedCase(truss, one, moved.sentence);
    }
    const moves = cleanOfModes(base, held, factor, pivots, nodeMovements(held.movement, q));
    const axialForce = new Array<number | null>(truss.bars.length).fill(null);
    base.elongations.bars.forEach((b, row) => {
      axialForce[b] = axial[row] + 0;
    });
    return {
      ...headOf(one),
      refused: null,
      axialForce,
      displacement: truss.nodes.map((_, node) =>
        problem.parts.liveNode[node] && !sections.withoutDisplacement(node) ? vectorAt(moves, node) : null,
      ),
      reactions: balance.reactions,
      residual: balance.largestForce > 0 ? balance.outOfBalance / balance.largestForce : 0,
    };
  });
  return { cases: solved, findings };
}

function headOf({ name, nature, loads }: LoadCase) {
  const sum: [number, number, number] = [0, 0, 0];
  for (const { force } of loads) for (let axis = 0; axis < 3; axis++) sum[axis] = sum[axis] + force[axis];
  return { name, nature, loads, loadSum: sum as Vec3 };
}

function refusedCase(truss: Truss, one: LoadCase, refused: string): SolvedCase {
  return {
    ...headOf(one),
    refused,
    axialForce: truss.bars.map(() => null),
    displacement: truss.nodes.map(() => null),
    reactions: [],
    residual: null,
  };
}

/** Loads on parts that nothing supports go with them, and how much that is is said. */
function leaveOutSetAside({ truss, parts }: Problem, asked: readonly LoadCase[]) {
  const findings: Finding[] = [];
  const cases = asked.map((one): LoadCase => {
    const loads = one.loads.filter(({ node }) => parts.liveNode[node]);
    const lost = one.loads.filter(({ node }) => !parts.liveNode[node]);
    if (lost.length > 0) {
      const size = lost.reduce((sum, { force }) => sum + Math.hypot(...force), 0);
      findings.push(
        finding(
          'no-load',
          `Of load case ${one.name}, ${(size / 1000).toPrecision(3)} kN lie on parts that nothing supports and are not carried.`,
          'Join the parts to the rest or support them, or leave them out of the scope.',
          {
            nodes: lost.map(({ node }) => node),
            at: truss.nodes[lost[0].node].at,
            place: truss.nodes[lost[0].node].place,
          },
        ),
      );
    }
    return { ...one, loads };
  });
  return { cases, findings };
}

/** Three components a node. */
function componentsOf({ truss }: Problem, loads: readonly NodalForce[]): Float64Array {
  const out = new Float64Array(3 * truss.nodes.length);
  for (const { node, force } of loads)
    for (let axis = 0; axis < 3; axis++) out[3 * node + axis] = out[3 * node + axis] + force[axis];
  return out;
}

const vectorAt = (moves: Float64Array, i: number): Vec3 => [
  moves[3 * i] + 0,
  moves[3 * i + 1] + 0,
  moves[3 * i + 2] + 0,
];
