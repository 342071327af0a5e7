import { GRAVITY } from '../../domain/constants.ts';
import type { Truss } from '../../domain/truss.ts';
import { scale, type Vec3 } from '../../domain/vector.ts';
import type { NodeForces } from './node-forces.ts';

/**
 * Weight of the bars between their nodes, half to each end, and of overhangs cut off at a node, times `factor`. Bars without a
 * section weigh nothing.
 */
export function addSelfWeight(forces: NodeForces, truss: Truss, factor: number): void {
  addWeight(forces, truss, [0, 0, -factor]);
}

/** As self weight, pulled along a vector of any length and direction: (0, 0, -1) is self weight. */
export function addWeight(forces: NodeForces, truss: Truss, factors: Vec3): void {
  for (const bar of truss.bars) forces.addToEnds(bar, scale(factors, bar.massPerLength * bar.length * GRAVITY));
  truss.nodes.forEach(({ overhangMass }, node) => {
    if (overhangMass !== 0) forces.add(node, scale(factors, overhangMass * GRAVITY));
  });
}

/** kg that self weight acts on. */
export function weighedMass(truss: Truss): number {
  const bars = truss.bars.reduce((sum, bar) => sum + bar.massPerLength * bar.length, 0);
  return truss.nodes.reduce((sum, { overhangMass }) => sum + overhangMass, bars);
}
