import type { Section } from '../../domain/member.ts';
import { along, cross, distance, dot, norm, subtract, unit, type Vec3 } from '../../domain/vector.ts';
import { across } from '../transform.ts';

/** What was measured on a mesh, beside its axis. */
export interface Measured {
  readonly section: Section;
  /** Unit direction of the section's z axis, across the member. */
  readonly zAxis: Vec3;
  /** Part of the cuts that show this same section, 0..1. */
  readonly confidence: number;
  /** The lesser of both ends' cosines between the axis and the end face's normal; null where an end has no one face. */
  readonly squareness: number | null;
  /** Of a body too short to show its own axis: how far it leaves its section carried along the one taken, metres. */
  readonly strays: number | null;
}

/** The centroid line of one solid, world metres. */
export interface BodyAxis {
  readonly from: 'extrusion' | 'swept' | 'mesh';
  readonly start: Vec3;
  readonly end: Vec3;
  /** What the swept plane's two axes have become in the world. */
  readonly x: Vec3;
  readonly y: Vec3;
  /** The profile, as the section book knows it; null for a mesh. */
  readonly profile: number | null;
  /** A second profile at the far end, where the solid tapers. */
  readonly endProfile: number | null;
  /** How far the true axis leaves the straight line, metres. */
  readonly rise: number;
  /** Points along the true axis from `start` to `end`; null where it is straight, or not known so well. */
  readonly bow: readonly Vec3[] | null;
  /** One of several straight runs of a body that bends between them. */
  readonly isRun: boolean;
  /** Of a mesh: what its cuts show. */
  readonly measured: Measured | null;
}

export const lengthOf = (axis: { start: Vec3; end: Vec3 }): number => distance(axis.start, axis.end);

/** Pieces this near to one line, end to end, are one length of steel. */
const SIDEWAYS = 5e-3;
const LENGTHWISE = 1e-3;
const TURN = 0.01;

/** The two as one axis where they lie in one line and touch or overlap; the longer gives the section. */
export function joinedInLine(a: BodyAxis, b: BodyAxis): BodyAxis | null {
  if (a.bow !== null || b.bow !== null) return isSameBow(a, b) ? a : null;
  const [long, short] = lengthOf(a) >= lengthOf(b) ? [a, b] : [b, a];
  const d = unit(subtract(long.end, long.start));
  const e = unit(subtract(short.end, short.start));
  if (d === null || e === null || norm(cross(d, e)) > TURN) return null;
  const positions = [short.start, short.end].map((p) => {
    const away = subtract(p, long.start);
    return { t: dot(away, d), sideways: norm(across(away, d)) };
  });
  if (positions.some((p) => p.sideways > SIDEWAYS)) return null;
  const low = Math.min(...positions.map((p) => p.t));
  const high = Math.max(...positions.map((p) => p.t));
  const length = lengthOf(long);
  if (low > length + LENGTHWISE || high < -LENGTHWISE) return null;
  return {
    ...long,
    start: low < 0 ? along(long.start, d, low) : long.start,
    end: high > length ? along(long.start, d, high) : long.end,
    rise: Math.max(long.rise, short.rise),
  };
}

/** Whether two bent axes are one drawn twice. */
function isSameBow(a: BodyAxis, b: BodyAxis): boolean {
  const sameWay = distance(a.start, b.start) < distance(a.start, b.end);
  const [start, end] = sameWay ? [b.start, b.end] : [b.end, b.start];
  const [middle, other] = [a, b].map(({ bow }) => bow?.[Math.floor(bow.length / 2)]);
  if (middle === undefined || other === undefined) return false;
  return [distance(a.start, start), distance(a.end, end), distance(middle, other)].every((d) => d < SIDEWAYS);
}

/** Each distinct axis once: repeated solids and pieces in line are one. */
export function distinctAxes(axes: readonly BodyAxis[]): readonly BodyAxis[] {
  if (axes.length === 1) return axes;
  const kept: BodyAxis[] = [];
  for (const axis of axes) {
    let current = axis;
    for (let i = 0; i < kept.length; i++) {
      const joined = joinedInLine(kept[i]!, current);
      if (joined === null) continue;
      kept.splice(i, 1);
      current = joined;
      // The longer piece may now reach one that was passed already.
      i = -1;
    }
    kept.push(current);
  }
  return kept;
}
