import { type Finding, finding } from '../domain/finding.ts';
import type { Member } from '../domain/member.ts';
import type { PlaceNamer } from '../domain/place.ts';
import { along, cross, dot, scale, subtract, unit, type Vec3 } from '../domain/vector.ts';
import { millimetres } from '../domain/words.ts';
import { type Axis, approach, sineBetween } from './axes.ts';
import { labelOf } from './labels.ts';
import { TOLERANCE } from './options.ts';
import type { Vertex, VertexGraph } from './vertices.ts';

/**
 * Shares of the chord's depth within which the moment of the eccentricity may be left out for the chord: EN 1993-1-8
 * 5.1.5(5), from memory. Negative on the side of the braces.
 */
const INNER = -0.55;
const OUTER = 0.25;

/** Joints whose braces, as drawn, meet farther from the chord's axis than the standard lets pass. */
export function offsetJointFindings(
  graph: VertexGraph,
  members: readonly Member[],
  axes: readonly (Axis | null)[],
  placeOf: PlaceNamer,
): Finding[] {
  return graph.vertices.flatMap((vertex) => {
    const chord = onlyChord(vertex, axes);
    if (chord === null) return [];
    const braces = vertex.stations.flatMap(({ member, role }) => {
      const axis = axes[member];
      const frames = role !== 'through' && !vertex.seated.has(member) && axis !== null;
      return frames && sineBetween(axis, chord) > TOLERANCE.leastSine ? [axis] : [];
    });
    const worst = greatestEccentricity(vertex, chord, braces);
    if (worst === null || (worst.share >= INNER && worst.share <= OUTER)) return [];
    const side = worst.share > 0 ? 'beyond' : 'before';
    const { braces: pair } = worst;
    return finding(
      'offset-joint',
      `${pair.map((axis) => labelOf(members[axis.member])).join(' and ')} meet ${millimetres(Math.abs(worst.e))} ${side} the axis of ${labelOf(members[chord.member])}, ${Math.abs(worst.share).toFixed(2)} of its depth: the moment of their forces on it bends the chord and is not seen.`,
      `Move the braces so that they meet within ${Math.abs(INNER)} of the depth before and ${OUTER} beyond the chord's axis (EN 1993-1-8 5.1.5), or check the chord for the moment.`,
      {
        members: [chord, ...pair].map((axis) => members[axis.member].globalId),
        at: vertex.at,
        place: placeOf(vertex.at),
        gap: Math.abs(worst.e),
      },
    );
  });
}

function onlyChord(vertex: Vertex, axes: readonly (Axis | null)[]): Axis | null {
  const through = vertex.stations.filter(({ member, role }) => role === 'through' && !vertex.seated.has(member));
  return through.length === 1 ? axes[through[0].member] : null;
}

interface Eccentricity {
  /** m from the chord's axis, positive away from the braces. */
  readonly e: number;
  /** Of the chord's depth in the plane of the braces. */
  readonly share: number;
  readonly braces: readonly [Axis, Axis];
}

function greatestEccentricity(vertex: Vertex, chord: Axis, braces: readonly Axis[]): Eccentricity | null {
  let worst: Eccentricity | null = null;
  const excess = (found: Eccentricity | null) =>
    found === null ? Number.NEGATIVE_INFINITY : Math.max(found.share / OUTER, found.share / INNER);
  braces.forEach((first, i) => {
    for (const second of braces.slice(i + 1)) {
      const found = eccentricityOf(vertex, chord, first, second);
      if (excess(found) > excess(worst)) worst = found;
    }
  });
  return worst;
}

/** Two braces on one side of the chord, in one plane with it; null for any others. */
function eccentricityOf(vertex: Vertex, chord: Axis, first: Axis, second: Axis): Eccentricity | null {
  const [a, b] = [leaving(first, vertex.at), leaving(second, vertex.at)];
  const [normalA, normalB] = [squareTo(chord, a), squareTo(chord, b)];
  if (normalA === null || normalB === null || dot(normalA, normalB) < 0.98) return null;
  const [stationA, stationB] = [approach(chord, first).s, approach(chord, second).s];
  const slope = (d: Vec3) => dot(d, chord.direction) / dot(d, normalA);
  const difference = slope(a) - slope(b);
  if (Math.abs(difference) < TOLERANCE.leastSine) return null;
  const height = (stationB - stationA) / difference;
  return { e: -height, share: -height / (2 * chord.halfExtent(normalA)), braces: [first, second] };
}

/** The direction in which a brace goes away from the joint. */
function leaving(brace: Axis, joint: Vec3): Vec3 {
  const middle = along(brace.start, brace.direction, brace.length / 2);
  return dot(subtract(middle, joint), brace.direction) > 0 ? brace.direction : scale(brace.direction, -1);
}

/** The part of a direction that is square to the chord. */
function squareTo(chord: Axis, direction: Vec3): Vec3 | null {
  return unit(cross(chord.direction, cross(direction, chord.direction)));
}
