import type { Finding } from '../../domain/finding.ts';
import type { Truss } from '../../domain/truss.ts';
import type { Vec3 } from '../../domain/vector.ts';
import { factorise } from '../engine/factor.ts';
import { gatherForces, nodeMovements } from '../model/movement.ts';
import { findParts } from '../model/parts.ts';
import { buildSystem, type Problem } from '../model/system.ts';
import type { Judgement } from '../stability/assess-stability.ts';
import type { LoadCase, NodalForce, SolvedCase, Supports } from '../types.ts';
import { balanceJoints } from './balance.ts';
import { cleanOfModes } from './clean-of-modes.ts';
import { loadMovesIt } from './load-moves-it.ts';
import { solveRefined } from './refine.ts';
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
  cases: readonly LoadCase[],
  options: Partial<SolveOptions> = {},
): Solution {
  const { workTolerance } = { ...SOLVE_DEFAULTS, ...options };
  const problem: Problem = { truss, supports, parts: findParts(truss, supports) };
  const { pivots } = stability;
  const stiffnessOf = realStiffness(truss);
  const base = buildSystem(problem, [], stiffnessOf);
  const held = pivots.length === 0 ? base : buildSystem(problem, pivots, stiffnessOf, base);
  const factor = factorise(held.matrix);
  const sections = judgeSections(problem, stability);
  const nodeLoads = cases.map((one) => liveLoads(problem, one.loads));
  const answers = solveRefined(
    held,
    factor,
    nodeLoads.map((loads) => gatherForces(held.movement, loads)),
  );
  const findings: Finding[] = [];
  const solved = cases.map((one, i): SolvedCase => {
    const loads = nodeLoads[i]!;
    const { q, axial } = answers[i]!;
    const unsectioned = sections.refuse(one);
    if (unsectioned !== null) return refusedCase(truss, one, unsectioned);
    const balance = balanceJoints(base, held, pivots, axial, loads);
    if (balance.pivotForces.some((force) => Math.abs(force) > workTolerance * balance.largestForce)) {
      const moved = loadMovesIt(truss, stability, one, loads, balance.pivotForces);
      findings.push(moved.finding);
      return refusedCase(truss, one, moved.sentence);
    }
    const moves = cleanOfModes(base, held, factor, pivots, nodeMovements(held.movement, q));
    const axialForce = new Array<number | null>(truss.bars.length).fill(null);
    base.elongations.bars.forEach((b, row) => {
      axialForce[b] = axial[row]! + 0;
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
  for (const { force } of loads) for (let axis = 0; axis < 3; axis++) sum[axis] = sum[axis]! + force[axis]!;
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

/** Loads on what is solved, three components a node; those on parts set aside go with them. */
function liveLoads({ truss, parts }: Problem, loads: readonly NodalForce[]): Float64Array {
  const out = new Float64Array(3 * truss.nodes.length);
  for (const { node, force } of loads)
    if (parts.liveNode[node])
      for (let axis = 0; axis < 3; axis++) out[3 * node + axis] = out[3 * node + axis]! + force[axis]!;
  return out;
}

const vectorAt = (moves: Float64Array, i: number): Vec3 => [
  moves[3 * i]! + 0,
  moves[3 * i + 1]! + 0,
  moves[3 * i + 2]! + 0,
];
