import { along, dot, norm, scale, unit, type Vec3 } from '../domain/vector.ts';

/** A remainder below this share of a unit direction is rounding, or an angle no support is built to (0.006 degrees). */
const PARALLEL = 1e-4;

const AXES: readonly Vec3[] = [
  [1, 0, 0],
  [0, 1, 0],
  [0, 0, 1],
];

/** What is left of `direction` outside the span of the orthonormal `held`; null where nothing is. */
export function remainder(direction: Vec3, held: readonly Vec3[]): Vec3 | null {
  let rest = direction;
  // Twice, because one pass of Gram-Schmidt leaves rounding of the size of what it took away.
  for (let pass = 0; pass < 2; pass++) for (const axis of held) rest = along(rest, axis, -dot(rest, axis));
  return norm(rest) > PARALLEL ? rest : null;
}

/**
 * Orthonormal directions with the same span as `directions` (Gram-Schmidt), the global axes where they lie in the span, so
 * that the outcome does not depend on the order of the rules.
 */
export function orthonormalSpan(directions: readonly Vec3[]): Vec3[] {
  const span = orthonormalise(directions);
  const axes = AXES.filter((axis) => remainder(axis, span) === null);
  return orthonormalise([...axes, ...span]).slice(0, span.length);
}

function orthonormalise(directions: readonly Vec3[]): Vec3[] {
  const span: Vec3[] = [];
  for (const direction of directions) {
    const rest = remainder(direction, span);
    const next = rest === null ? null : unit(rest);
    if (next !== null && span.length < 3) span.push(next);
  }
  return span;
}

export interface Spring {
  readonly direction: Vec3;
  readonly stiffness: number;
}

/**
 * The springs that act beside rigid directions, one for each direction. A spring k along d at a node that cannot move along
 * the held directions does the work 1/2 k (d.u)^2 of a spring k |r|^2 along the remainder r of d; parallel springs add up.
 */
export function freeSprings(springs: readonly Spring[], held: readonly Vec3[]): Spring[] {
  const free: Spring[] = [];
  for (const { direction, stiffness } of springs) {
    const rest = remainder(direction, held);
    if (rest === null) continue;
    const size = norm(rest);
    const next = { direction: scale(rest, 1 / size), stiffness: stiffness * size ** 2 };
    const parallel = free.findIndex((other) => remainder(next.direction, [other.direction]) === null);
    if (parallel < 0) free.push(next);
    else free[parallel] = { ...free[parallel]!, stiffness: free[parallel]!.stiffness + next.stiffness };
  }
  return free;
}
