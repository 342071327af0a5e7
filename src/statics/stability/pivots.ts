import type { Vec3 } from '../../domain/vector.ts';
import { factorise } from '../engine/factor.ts';
import type { HeldPivot } from '../engine/pivot-blocks.ts';
import { lowestEigenpairs } from '../engine/spectrum.ts';
import { type Movement, nodeMovements } from '../model/movement.ts';
import { buildSystem, type System } from '../model/system.ts';
import type { Restraint } from '../types.ts';
import { reduceModes } from './reduce.ts';
import type { Spectrum } from './slicing.ts';

/** Eigenvectors looked at together where the factorisation alone did not name enough pivots. */
const TOGETHER = 24;
/** Rough vectors do: they only have to show where what is slack moves. */
const STEPS = 3;

/**
 * One direction to hold for each of `wanted` mechanisms, so that nothing moves freely with all of them held. The factorisation names
 * them: a pivot that is nothing belongs to a node that nothing before it holds.
 */
export function findPivots(base: System, held: readonly Restraint[], wanted: number, spectrum: Spectrum): Restraint[] {
  if (wanted === 0) return [];
  const system = held.length === 0 ? base : buildSystem(base.problem, held, undefined, base);
  const pivots: Restraint[] = [];
  for (let level = spectrum.cut; level > 1e-18; level /= 30) {
    const found = factorise(system.matrix, { holdBelow: level * spectrum.highest }).held;
    if (found.length > wanted) continue;
    for (const pivot of found) pivots.push(asRestraint(system.movement, pivot));
    break;
  }
  while (pivots.length < wanted) {
    const more = slackDirections(base, [...held, ...pivots], wanted - pivots.length, spectrum);
    if (more.length === 0) break;
    pivots.push(...more);
  }
  return pivots;
}

function asRestraint(movement: Movement, { block, direction }: HeldPivot): Restraint {
  const world = [0, 0, 0];
  direction.forEach((part, c) => {
    for (let axis = 0; axis < 3; axis++) world[axis] = world[axis] + part * movement.frame[9 * block + 3 * c + axis];
  });
  return { node: block, direction: world as unknown as Vec3 };
}

/** Where what is still the least stiff moves most. */
function slackDirections(base: System, held: readonly Restraint[], most: number, spectrum: Spectrum): Restraint[] {
  const system = buildSystem(base.problem, held, undefined, base);
  const little = spectrum.cut * spectrum.highest;
  // Shifted down a little, so that it can be factored however singular it is.
  const factor = factorise(system.matrix, { shift: -little / 10 });
  const pairs = lowestEigenpairs(system, factor, Math.min(most, TOGETHER), STEPS);
  const slack = pairs.filter((pair, i) => i === 0 || pair.value < little);
  const moves = slack.map((pair) => nodeMovements(system.movement, pair.vector));
  return reduceModes(base.problem.truss, moves).pivots;
}
