import { type Finding, finding } from '../domain/finding.ts';
import type { Member } from '../domain/member.ts';
import type { Eccentricity, Truss } from '../domain/truss.ts';
import { along, cross, dot, norm, scale, subtract, unit, type Vec3 } from '../domain/vector.ts';
import { millimetres } from '../domain/words.ts';
import { facetAt } from './along-axes.ts';
import { type Axis, approach, sineBetween } from './axes.ts';
import { labelOf } from './labels.ts';
import { TOLERANCE } from './options.ts';
import type { Vertex } from './vertices.ts';

/**
 * Shares of the chord's depth within which the moment of the eccentricity may be left out for the chord: EN 1993-1-8
 * 5.1.5(5), from memory. Negative on the side of the braces.
 */
const INNER = -0.55;
const OUTER = 0.25;

/** The eccentricities of a joint as drawn: of braces that meet off the only chord's axis, and of members that sit. */
export function eccentricitiesOf(vertex: Vertex, axes: readonly (Axis | null)[]): Eccentricity[] {
  const seats = vertex.stations.flatMap(({ member, s }): Eccentricity[] => {
    const axis = lineOf(axes[member], s);
    if (axis === null || !vertex.seated.has(member)) return [];
    return [{ of: 'seat', member, others: [], e: distanceToLine(vertex.at, axis), share: null }];
  });
  const chord = onlyChord(vertex, axes);
  const braces = chord === null ? null : greatestEccentricity(vertex, chord, bracesOn(vertex, chord, axes));
  return braces === null ? seats : [braces, ...seats];
}

/** Joints whose braces, as drawn, meet farther from the chord's axis than the standard lets pass. */
export function offsetJointFindings(truss: Truss, members: readonly Member[]): Finding[] {
  return truss.nodes.flatMap(({ joining, at, place }, node) =>
    (joining?.eccentricities ?? []).flatMap(({ share, e, member: chord, others }) => {
      if (share === null || (share >= INNER && share <= OUTER)) return [];
      // In an order of their own, so that the file's order does not show.
      const braces = others.map((brace) => members[brace]).sort((p, q) => (p.globalId < q.globalId ? -1 : 1));
      const side = share > 0 ? 'beyond' : 'before';
      return finding(
        'offset-joint',
        `${braces.map(labelOf).join(' and ')} meet ${millimetres(Math.abs(e))} ${side} the axis of ${labelOf(members[chord])}, ${Math.abs(share).toFixed(2)} of its depth: the moment of their forces on it bends the chord and is not checked.`,
        `Move the braces so that they meet within ${Math.abs(INNER)} of the depth before and ${OUTER} beyond the chord's axis (EN 1993-1-8 5.1.5), or check the chord for the moment.`,
        {
          members: [members[chord], ...braces].map(({ globalId }) => globalId),
          nodes: [node],
          at,
          place,
          gap: Math.abs(e),
        },
      );
    }),
  );
}

function bracesOn(vertex: Vertex, chord: Axis, axes: readonly (Axis | null)[]): Axis[] {
  return vertex.stations.flatMap(({ member, role, s }) => {
    const axis = lineOf(axes[member], s);
    const frames = role !== 'through' && !vertex.seated.has(member) && axis !== null;
    return frames && sineBetween(axis, chord) > TOLERANCE.leastSine ? [axis] : [];
  });
}

function onlyChord(vertex: Vertex, axes: readonly (Axis | null)[]): Axis | null {
  const through = vertex.stations.filter(({ member, role }) => role === 'through' && !vertex.seated.has(member));
  return through.length === 1 ? lineOf(axes[through[0].member], through[0].s) : null;
}

/** The line that a member follows at the joint. */
const lineOf = (axis: Axis | null, s: number): Axis | null => (axis === null ? null : facetAt(axis, s));

type OfBraces = Eccentricity & { readonly share: number };

function greatestEccentricity(vertex: Vertex, chord: Axis, braces: readonly Axis[]): OfBraces | null {
  let worst: OfBraces | null = null;
  const excess = (found: OfBraces | null) =>
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
function eccentricityOf(vertex: Vertex, chord: Axis, first: Axis, second: Axis): OfBraces | null {
  const [a, b] = [leaving(first, vertex.at), leaving(second, vertex.at)];
  const [normalA, normalB] = [squareTo(chord, a), squareTo(chord, b)];
  if (normalA === null || normalB === null || dot(normalA, normalB) < 0.98) return null;
  const [stationA, stationB] = [approach(chord, first).s, approach(chord, second).s];
  const slope = (d: Vec3) => dot(d, chord.direction) / dot(d, normalA);
  const difference = slope(a) - slope(b);
  if (Math.abs(difference) < TOLERANCE.leastSine) return null;
  const height = (stationB - stationA) / difference;
  return {
    of: 'braces',
    member: chord.member,
    others: [first.member, second.member],
    e: -height,
    share: -height / (2 * chord.halfExtent(normalA)),
  };
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

const distanceToLine = (point: Vec3, axis: Axis): number => norm(cross(subtract(point, axis.start), axis.direction));
