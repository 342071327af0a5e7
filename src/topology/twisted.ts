import { dot, norm, subtract, unit, type Vec3 } from '../domain/vector.ts';
import { distanceToLine, pointAt } from './along-axes.ts';
import type { Axis } from './axes.ts';
import type { Contact } from './contacts.ts';
import { isFreeEnd, stationOn, type Vertex, type VertexGraph } from './vertices.ts';

/** Cosine of 20 degrees: an axis turned by more is not the member that was drawn. */
const LEAST_COSINE = Math.cos(Math.PI / 9);

/**
 * The contacts without those that would turn a member (a short one, mostly) far from its drawn axis: of its two joints
 * the one farther off the axis is given up. Null where no member is turned so far.
 */
export function withoutTwisting(
  contacts: readonly Contact[],
  axes: readonly (Axis | null)[],
  graph: VertexGraph,
): Contact[] | null {
  const dropped = new Set<number>();
  axes.forEach((axis, member) => {
    if (axis === null) return;
    const chain = graph.chains[member];
    const [first, last] = [chain[0], chain[chain.length - 1]];
    const line = subtract(graph.vertices[last].at, graph.vertices[first].at);
    if (
      dot(line, drawnDirection(axis, member, graph.vertices[first], graph.vertices[last])) >=
      LEAST_COSINE * norm(line)
    )
      return;
    const worse = offAxis(graph.vertices[first].at, axis) > offAxis(graph.vertices[last].at, axis) ? first : last;
    const given = isFreeEnd(graph.vertices[worse]) ? (worse === first ? last : first) : worse;
    const station = graph.vertices[given].stations.find((one) => one.member === member);
    for (const contact of station?.contacts ?? []) dropped.add(contact);
  });
  return dropped.size === 0 ? null : contacts.filter((_, index) => !dropped.has(index));
}

/** Of a bent member, between the places on its curve that its ends were cut or carried to. */
function drawnDirection(axis: Axis, member: number, first: Vertex, last: Vertex): Vec3 {
  if (axis.facets === null) return axis.direction;
  const [from, to] = [first, last].map((vertex) => pointAt(axis, stationOn(vertex, member)));
  return unit(subtract(to, from)) ?? axis.direction;
}

const offAxis = (point: Vec3, axis: Axis): number => distanceToLine(point, axis).distance;
