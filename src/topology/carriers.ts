import type { Axis } from './axes.ts';
import type { JoinOptions } from './options.ts';
import { straightLines } from './straight-lines.ts';
import { isFreeEnd, type Vertex, type VertexGraph } from './vertices.ts';

/** Slope above which a member that frames in from below and ends free is a column standing on the ground: 60 degrees. */
const STEEP = Math.sin(Math.PI / 3);

/**
 * For each vertex the member that carries it, or null for a node of the truss in its own right. A through member is
 * split only where something that triangulates with it frames in; elsewhere (a purlin between panel points, a sag
 * rod) a hinge in it would be false, so it carries the vertex (METHODS 2.4).
 */
export function findCarriers(
  graph: VertexGraph,
  axes: readonly (Axis | null)[],
  options: JoinOptions,
): (number | null)[] {
  const frame: Frame = { graph, axes, lines: straightLines(graph, axes) };
  const carriers = graph.vertices.map((_, index) => (options.chords === 'strict' ? null : carrierOf(index, frame)));
  breakCycles(graph, carriers);
  return carriers;
}

interface Frame {
  readonly graph: VertexGraph;
  readonly axes: readonly (Axis | null)[];
  /** For each member the vertices of its line. */
  readonly lines: readonly (readonly number[])[];
}

function carrierOf(index: number, frame: Frame): number | null {
  const vertex = frame.graph.vertices[index];
  const through = vertex.stations.filter(({ role }) => role === 'through').map(({ member }) => member);
  if (through.length === 0) return null;
  if (through.some((member) => isTriangulated(member, index, frame))) return null;
  const supporting = through.filter((member) => !vertex.seated.has(member));
  if (supporting.length === 0) return null;
  const depth = (member: number) => frame.axes[member]?.depth ?? 0;
  return supporting.reduce((best, member) => (depth(member) > depth(best) ? member : best));
}

/**
 * Whether some member that frames in at the vertex closes a triangle on `runner`: its far end is tied, by a third
 * member, back to the runner elsewhere. A column that stands on the ground holds its vertex as well.
 */
function isTriangulated(runner: number, index: number, { graph, axes, lines }: Frame): boolean {
  const { vertices, chains } = graph;
  const vertex = vertices[index];
  const onRunner = new Set(lines[runner]);
  onRunner.delete(index);
  for (const { member } of vertex.stations) {
    if (member === runner || vertex.seated.has(member)) continue;
    for (const far of neighboursOn(chains[member], index)) {
      if (isFoot(vertices[far], vertex, axes[member])) return true;
      for (const { member: third } of vertices[far].stations) {
        if (third === member || lines[third] === lines[runner]) continue;
        if (lines[third].some((other) => onRunner.has(other))) return true;
      }
    }
  }
  return false;
}

function isFoot(far: Vertex, near: Vertex, axis: Axis | null): boolean {
  return axis !== null && isFreeEnd(far) && far.at[2] < near.at[2] && Math.abs(axis.direction[2]) > STEEP;
}

function neighboursOn(chain: readonly number[], vertex: number): number[] {
  const at = chain.indexOf(vertex);
  return [chain[at - 1], chain[at + 1]].filter((other) => other !== undefined);
}

/** Members that carry one another in a ring (each resting on the next) cannot all be carried: the ring is opened. */
function breakCycles(graph: VertexGraph, carriers: (number | null)[]): void {
  const state = new Uint8Array(carriers.length);
  const DONE = 2;
  const OPEN = 1;
  for (let root = 0; root < carriers.length; root++) visit(root);

  function visit(vertex: number): void {
    if (state[vertex] === DONE || carriers[vertex] === null) return;
    if (state[vertex] === OPEN) {
      carriers[vertex] = null;
      return;
    }
    state[vertex] = OPEN;
    for (const end of barEnds(vertex)) visit(end);
    state[vertex] = DONE;
  }

  function barEnds(vertex: number): number[] {
    const carrier = carriers[vertex];
    if (carrier === null) return [];
    const chain = graph.chains[carrier];
    const at = chain.indexOf(vertex);
    const splits = (other: number) => carriers[other] !== carrier;
    const before = chain.slice(0, at).findLast(splits);
    const after = chain.slice(at + 1).find(splits);
    return [before, after].filter((end) => end !== undefined);
  }
}
