import { type Finding, finding } from '../../domain/finding.ts';
import type { Truss } from '../../domain/truss.ts';
import type { Vec3 } from '../../domain/vector.ts';
import { inner, largest } from '../engine/vectors.ts';
import { realStiffness } from '../model/elastic.ts';
import { gatherForces, nodeMovements } from '../model/movement.ts';
import { findParts } from '../model/parts.ts';
import { buildSystem, type System } from '../model/system.ts';
import { balanceJoints } from '../solution/balance.ts';
import { lacksSection } from '../solution/sections.ts';
import { directionInWords, movementDirection, nodeInWords, sizeAt } from '../stability/words.ts';
import type { NodalForce, Stability, Supports } from '../types.ts';
import type { Deformed } from './deformed.ts';
import { type Followed, followLoad } from './follow-load.ts';

/** What first and second order have in common: a case or a combination, solved. */
export interface SolvedForces {
  readonly name: string;
  readonly refused: string | null;
  readonly axialForce: readonly (number | null)[];
  readonly displacement: readonly (Vec3 | null)[];
  readonly reactions: readonly NodalForce[];
}

/** Something solved by first-order theory, with its loads, to be solved again. */
export interface Again<T extends SolvedForces> {
  readonly firstOrder: T;
  readonly loads: readonly NodalForce[];
}

/**
 * Balance at the moved nodes (geometric stiffness iterated to balance), each case or combination for itself, since they no longer add up. What is refused
 * by first-order theory stays refused; what loses its balance on the way to its load is refused with `unstable-balance`. Imperfections are not
 * put in: they come as loads.
 */
export function solveSecondOrder<T extends SolvedForces>(
  truss: Truss,
  supports: Supports,
  stability: Pick<Stability, 'mechanisms'>,
  asked: readonly Again<T>[],
): { readonly solved: T[]; readonly findings: readonly Finding[] } {
  const findings: Finding[] = [];
  if (asked.every(({ firstOrder }) => firstOrder.refused !== null)) {
    return { solved: asked.map(({ firstOrder }) => firstOrder), findings };
  }
  const parts = findParts(truss, supports);
  const lacking = lacksSection(truss, parts);
  const system = buildSystem({ truss, supports, parts }, [], realStiffness(truss));
  const solved = asked.map(({ firstOrder, loads }): T => {
    if (firstOrder.refused !== null) return firstOrder;
    if (lacking !== null)
      return refuse(firstOrder, `second order needs a section for every bar, and ${lacking} has none`);
    const forces = new Float64Array(3 * truss.nodes.length);
    for (const { node, force } of loads)
      if (parts.liveNode[node]) for (let axis = 0; axis < 3; axis++) forces[3 * node + axis] += force[axis];
    const load = gatherForces(system.movement, forces);
    const moved = unknownsOf(system, firstOrder.displacement);
    const followed = followLoad(system, load, moved, stability.mechanisms > 0);
    if (followed.goes === null) return { ...firstOrder, ...answerOf(system, followed.state, forces) };
    const lost = lostBalance(system, followed, followed.goes, load, firstOrder.name);
    findings.push(lost.finding);
    return refuse(firstOrder, lost.sentence);
  });
  return { solved, findings };
}

function refuse<T extends SolvedForces>(one: T, refused: string): T {
  return {
    ...one,
    refused,
    axialForce: one.axialForce.map(() => null),
    displacement: one.displacement.map(() => null),
    reactions: [],
    ...('residual' in one ? { residual: null } : {}),
  };
}

/** First-order movements as unknowns: the part of each node's movement along its free directions. */
function unknownsOf({ movement }: System, displacement: readonly (Vec3 | null)[]): Float64Array {
  const q = new Float64Array(movement.freedoms.active.length);
  displacement.forEach((moves, node) => {
    if (moves === null) return;
    for (let c = 0; c < movement.freeCount[node]; c++) {
      const unknown = movement.freedoms.stride * node + c;
      if (!movement.freedoms.active[unknown]) continue;
      for (let axis = 0; axis < 3; axis++) q[unknown] += movement.frame[9 * node + 3 * c + axis] * moves[axis];
    }
  });
  return q;
}

function answerOf(system: System, state: Deformed, forces: Float64Array) {
  const { truss, parts } = system.problem;
  const balance = balanceJoints({ ...system, elongations: state.elongations }, system, [], state.axial, forces);
  const moves = nodeMovements(system.movement, state.q);
  const axialForce = new Array<number | null>(truss.bars.length).fill(null);
  system.elongations.bars.forEach((b, row) => {
    axialForce[b] = state.axial[row] + 0;
  });
  return {
    axialForce,
    displacement: truss.nodes.map((_, i): Vec3 | null =>
      parts.liveNode[i] ? [moves[3 * i] + 0, moves[3 * i + 1] + 0, moves[3 * i + 2] + 0] : null,
    ),
    reactions: balance.reactions,
    residual: balance.largestForce > 0 ? balance.outOfBalance / balance.largestForce : 0,
  };
}

/** A load that works on the way the truss goes snaps it through; one that does not lets it buckle to a side. */
const WORKS = 1e-4;

function lostBalance(system: System, { reached }: Followed, goes: Float64Array, load: Float64Array, name: string) {
  const { truss } = system.problem;
  const work = Math.abs(inner(goes, load)) / Math.sqrt(inner(goes, goes) * inner(load, load));
  const moves = nodeMovements(system.movement, goes);
  let node = 0;
  truss.nodes.forEach((_, i) => {
    if (sizeAt(moves, i) > sizeAt(moves, node) * (1 + 1e-6)) node = i;
  });
  const where = `the node at ${nodeInWords(truss, node)} most, ${directionInWords(movementDirection(moves, node))}`;
  const how = work > WORKS ? 'snaps through' : 'buckles';
  const share = reached > 0 ? `at ${reached.toPrecision(4)} of its load` : 'under the smallest load';
  const sentence = `by second order the truss ${how} ${share}: ${where}`;
  const most = largest(moves);
  return {
    sentence,
    finding: finding(
      'unstable-balance',
      `Under ${name}, ${sentence}.`,
      'Give the truss more depth or stiffness there, or hold the nodes that move. There are no forces for this load.',
      {
        nodes: truss.nodes.flatMap((_, i) => (sizeAt(moves, i) > 0.5 * most ? [i] : [])),
        at: truss.nodes[node].at,
        place: truss.nodes[node].place,
      },
    ),
  };
}
