import { GRAVITY } from '../../domain/constants.ts';
import type { Truss } from '../../domain/truss.ts';
import type { NodeForces } from './node-forces.ts';

/**
 * Weight of the bars between their nodes, half to each end, and of overhangs cut off at a node, times `factor`. Bars without a
 * section weigh nothing.
 */
export function addSelfWeight(forces: NodeForces, truss: Truss, factor: number): void {
  for (const bar of truss.bars) {
    forces.addToEnds(bar, [0, 0, -bar.massPerLength * bar.length * GRAVITY * factor]);
  }
  truss.nodes.forEach(({ overhangMass }, node) => {
    if (overhangMass !== 0) forces.add(node, [0, 0, -overhangMass * GRAVITY * factor]);
  });
}
