import type { Vec3 } from '../../domain/vector.ts';
import type { ExtremeForce, NodalForce } from '../../statics/types.ts';

export const memberId = (index: number): string => `m${index + 1}`;

export const nodeId = (index: number): string => `n${index + 1}`;

export const barId = (index: number): string => `b${index + 1}`;

export const point = (at: Vec3): [number, number, number] => [at[0], at[1], at[2]];

export const extreme = (force: ExtremeForce | null) => force && { ...force };

export const nodalForces = (forces: readonly NodalForce[]) =>
  forces.map(({ node, force }) => ({ node: nodeId(node), force: point(force) }));
