import type { Vec3 } from '../domain/vector.ts';

/** A power of two. */
const KEPT = 64;

/**
 * Directions that come again, each kept once: the members of a roof look a few ways only, and a triple of its own for each
 * member takes as much memory as the rest of what is known of where it lies.
 */
export class SharedDirections {
  private readonly lately: Vec3[] = [];

  /** The same direction, to the last digit, that was met before, if it was met lately. */
  shared(direction: Vec3): Vec3 {
    return this.sharedOf(direction[0], direction[1], direction[2]);
  }

  sharedOf(x: number, y: number, z: number): Vec3 {
    const slot = Math.round((x + 3 * y + 9 * z) * 1e6) & (KEPT - 1);
    const known = this.lately[slot];
    if (known !== undefined && Object.is(known[0], x) && Object.is(known[1], y) && Object.is(known[2], z)) return known;
    const direction: Vec3 = [x, y, z];
    this.lately[slot] = direction;
    return direction;
  }
}
