import { add, between, scale, type Vec3 } from '../../domain/vector.ts';
import type { NodeForces } from './node-forces.ts';

/**
 * Puts a load per length, linear from `forces[0]` at distance `ends[0]` from the bar's start to `forces[1]` at `ends[1]`, on
 * the bar as far as it lies on it, and hands it to the bar's ends so that force and moment are kept.
 * @returns m of the load that lie on the bar
 */
export function shareLineLoad(
  sum: NodeForces,
  bar: { readonly from: number; readonly to: number; readonly length: number },
  ends: readonly [number, number],
  forces: readonly [Vec3, Vec3],
): number {
  const whole = ends[1] - ends[0];
  const from = Math.max(0, Math.min(...ends));
  const to = Math.min(bar.length, Math.max(...ends));
  const length = to - from;
  if (!(length > 0) || whole === 0) return 0;
  const at = (s: number): Vec3 => between(forces[0], forces[1], (s - ends[0]) / whole);
  const [first, last] = [at(from), at(to)];
  const force = scale(add(first, last), length / 2);
  // Integral of q(s) s ds over the bar: that of a trapezium about the bar's start.
  const moment = add(scale(force, from), scale(add(first, scale(last, 2)), length ** 2 / 6));
  const atEnd = scale(moment, 1 / bar.length);
  sum.add(bar.to, atEnd);
  sum.add(bar.from, add(force, scale(atEnd, -1)));
  return length;
}
