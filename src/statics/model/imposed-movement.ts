import { Matrix, solve } from 'ml-matrix';
import type { Vec3 } from '../../domain/vector.ts';
import type { Settlement } from '../types.ts';
import { carryMovements, frameDirection, type Movement, STRIDE } from './movement.ts';

/** Movements of all nodes (three components each) when supports settle and nothing else moves. */
export function imposedMovement(movement: Movement, settlements: readonly Settlement[]): Float64Array {
  const { truss, carriedRestraints } = movement;
  const own = new Float64Array(3 * truss.nodes.length);
  const asked = new Map(settlements.map((one) => [one.node, one.movement]));
  for (const { node, movement: moved } of settlements)
    if (truss.nodes[node].carriedBy === null) own.set(moved, 3 * node);
  if (carriedRestraints.some(({ node }) => asked.has(node))) moveFollowers(movement, asked, own);
  return carryMovements(truss, movement.shares, own);
}

/** A support on a carried node moves the freedom that follows the others. */
function moveFollowers(movement: Movement, asked: ReadonlyMap<number, Vec3>, own: Float64Array): void {
  const { carriedRestraints: restraints, shares } = movement;
  const coupling = Matrix.zeros(restraints.length, restraints.length);
  const wanted = Matrix.zeros(restraints.length, 1);
  const columnOf = new Map(restraints.map(({ follower }, i) => [follower, i]));
  restraints.forEach(({ node, direction, terms }, row) => {
    for (const { unknown, factor } of terms) {
      const column = columnOf.get(unknown);
      if (column !== undefined) coupling.set(row, column, coupling.get(row, column) + factor);
    }
    let amount = 0;
    for (let axis = 0; axis < 3; axis++) {
      amount += direction[axis] * (asked.get(node)?.[axis] ?? 0);
      for (const [real, share] of shares[node]) amount -= direction[axis] * share * own[3 * real + axis];
    }
    wanted.set(row, 0, amount);
  });
  const amounts = solve(coupling, wanted).to1DArray();
  restraints.forEach(({ follower }, i) => {
    const node = Math.floor(follower / STRIDE);
    const direction = frameDirection(movement, node, follower - STRIDE * node);
    for (let axis = 0; axis < 3; axis++) own[3 * node + axis] = own[3 * node + axis] + amounts[i] * direction[axis];
  });
}
