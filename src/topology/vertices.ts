import type { Vec3 } from '../domain/vector.ts';
import type { Axis } from './axes.ts';
import type { Joint } from './joints.ts';
import type { Role, Station } from './stations.ts';
import { workPoint } from './work-points.ts';

/** A point the truss may have a node at: a joint's work point, or the free end of one member. */
export interface Vertex {
  readonly at: Vec3;
  readonly stations: readonly Station[];
  readonly seated: ReadonlySet<number>;
}

/** Vertices, and for each member the ones it passes, in order along it from start to finish. */
export interface VertexGraph {
  readonly vertices: readonly Vertex[];
  readonly chains: readonly (readonly number[])[];
}

/** A vertex a joint, and one for each end that no joint took. Members without a length have no chain. */
export function makeVertices(axes: readonly (Axis | null)[], joints: readonly Joint[]): VertexGraph {
  const vertices: Vertex[] = joints.map((joint) => ({
    at: workPoint(joint, axes),
    stations: joint.stations,
    seated: joint.seated,
  }));
  const stops: { vertex: number; s: number; role: Role }[][] = axes.map(() => []);
  vertices.forEach((vertex, index) => {
    for (const { member, s, role } of vertex.stations) stops[member].push({ vertex: index, s, role });
  });
  const chains = axes.map((axis, member) => {
    if (axis === null) return [];
    const own = stops[member].sort((p, q) => p.s - q.s);
    const chain = own.map((stop) => stop.vertex);
    if (!own.some(({ role }) => role === 'start')) chain.unshift(addFreeEnd(member, 0, axis.start, 'start'));
    if (!own.some(({ role }) => role === 'finish')) chain.push(addFreeEnd(member, axis.length, axis.finish, 'finish'));
    return chain;
  });
  return { vertices, chains };

  function addFreeEnd(member: number, s: number, at: Vec3, role: Role): number {
    const station: Station = { member, s, role, contacts: [] };
    return vertices.push({ at, stations: [station], seated: new Set() }) - 1;
  }
}

/** Where along a member that comes to it a vertex was found, m from the member's start. */
export function stationOn(vertex: Vertex, member: number): number {
  return vertex.stations.find((station) => station.member === member)?.s ?? 0;
}

export const isFreeEnd = (vertex: Vertex): boolean => vertex.stations.length === 1;
