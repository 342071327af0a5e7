import { cross, dot, scale, UP, unit, type Vec3 } from '../domain/vector.ts';

/** A parallel projection: metres in the drawing plane, x to the right and y up, and how far away a point is. */
export interface Projection {
  readonly right: Vec3;
  readonly up: Vec3;
  /** From the eye into the drawing. */
  readonly direction: Vec3;
}

export type Flat = readonly [x: number, y: number];

/** Looking along `direction`, with the vertical upright; looking straight down, +y is up. */
export function lookingAlong(direction: Vec3): Projection {
  const into = unit(direction) ?? [0, 1, 0];
  const right = unit(cross(into, UP)) ?? [1, 0, 0];
  return { right, up: cross(right, into), direction: into };
}

export const PLAN: Projection = { right: [1, 0, 0], up: [0, 1, 0], direction: [0, 0, -1] };

/** From above and from the side where x and y are least: x runs to the right and back, y to the left and back. */
export const ISOMETRIC: Projection = lookingAlong(scale([1, 1, -1], 1 / Math.sqrt(3)));

export const flat = ({ right, up }: Projection, point: Vec3): Flat => [dot(point, right), dot(point, up)];

export const depth = ({ direction }: Projection, point: Vec3): number => dot(point, direction);
