import type { Truss } from '../../domain/truss.ts';
import type { Vec3 } from '../../domain/vector.ts';
import { tidyDirection } from './reduce.ts';

/** A node in words: its place in the building, or its coordinates to the millimetre. */
export function nodeInWords(truss: Truss, node: number): string {
  const { at, place } = truss.nodes[node];
  return place ?? `(${at.map((v) => plain(v, 3)).join(', ')})`;
}

/** "up and down (along z)", "sideways (along y)", "along (0.60, 0.80, 0.00)". */
export function directionInWords(direction: Vec3): string {
  const axis = direction.findIndex((v) => Math.abs(v) > 1 - 1e-6);
  if (axis === 2) return 'up and down (along z)';
  if (axis >= 0) return `sideways (along ${'xy'[axis]})`;
  const vector = `along (${direction.map((v) => plain(v, 2)).join(', ')})`;
  return Math.abs(direction[2]) < 1e-6 ? `sideways (${vector})` : vector;
}

export function movementDirection(moves: Float64Array, node: number): Vec3 {
  return tidyDirection([moves[3 * node], moves[3 * node + 1], moves[3 * node + 2]]);
}

export function sizeAt(moves: Float64Array, node: number): number {
  return Math.hypot(moves[3 * node], moves[3 * node + 1], moves[3 * node + 2]);
}

export const count = (n: number, one: string, many = `${one}s`): string => `${n} ${n === 1 ? one : many}`;

export function plain(v: number, digits: number): string {
  const text = v.toFixed(digits);
  return Number(text) === 0 ? (0).toFixed(digits) : text;
}
