import type { Vec3 } from '../../domain/vector.ts';
import type { NodeForces } from './node-forces.ts';

/** The whole force on every one of the nodes. */
export function addPointLoad(forces: NodeForces, nodes: readonly number[], force: Vec3): void {
  for (const node of nodes) forces.add(node, force);
}
