import { facetAt } from './along-axes.ts';
import { type Axis, liesSquare } from './axes.ts';
import { offCourse } from './bows.ts';
import type { JoinOptions } from './options.ts';
import { straightLines } from './straight-lines.ts';
import { isFreeEnd, stationOn, type Vertex, type VertexGraph } from './vertices.ts';

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
  const lines = straightLines(graph, axes);
  const frame: Frame = { graph, axes, lines, meetElsewhere: meetings(graph, lines) };
  const carriers = graph.vertices.map((_, index) => (options.chords === 'strict' ? null : carrierOf(index, frame)));
  for (const vertex of offCourse(graph, axes, carriers)) carriers[vertex] = null;
  breakCycles(graph, carriers);
  return carriers;
}

interface Frame {
  readonly graph: VertexGraph;
  readonly axes: readonly (Axis | null)[];
  /** For each member the vertices of its line. */
  readonly lines: readonly Line[];
  /** Whether two lines share a vertex other than the one given. */
  readonly meetElsewhere: (a: Line, b: Line, vertex: number) => boolean;
}

type Line = readonly number[];

/** A line spliced of many members runs the length of the roof: the vertices that two lines share are looked for once. */
function meetings({ vertices }: VertexGraph, lines: readonly Line[]): Frame['meetElsewhere'] {
  const known = new Map<Line, Map<Line, readonly number[]>>();
  return (a, b, vertex) => sharedBy(a, b).some((other) => other !== vertex);

  function sharedBy(a: Line, b: Line): readonly number[] {
    const [short, long] = a.length <= b.length ? [a, b] : [b, a];
    const ofLong = known.get(long) ?? new Map<Line, readonly number[]>();
    known.set(long, ofLong);
    const found = ofLong.get(short);
    if (found) return found;
    const shared = short.filter((one) => vertices[one].stations.some(({ member }) => lines[member] === long));
    ofLong.set(short, shared);
    return shared;
  }
}

function carrierOf(index: number, frame: Frame): number | null {
  const vertex = frame.graph.vertices[index];
  const through = vertex.stations.filter(({ role }) => role === 'through').map(({ member }) => member);
  if (through.length === 0) return null;
  if (through.some((member) => isTriangulated(member, index, frame))) return null;
  if (through.some((member) => isLastBeforeTail(member, index, frame))) return null;
  const supporting = through.filter((member) => !vertex.seated.has(member));
  if (supporting.length === 0) return null;
  const depth = (member: number) => frame.axes[member]?.depth ?? 0;
  return supporting.reduce((best, member) => (depth(member) > depth(best) ? member : best));
}

/**
 * Whether some member that frames in at the vertex closes a triangle on `runner`: its far end is tied, by a third
 * member, back to the runner elsewhere. A column that stands on the ground holds its vertex as well.
 */
function isTriangulated(runner: number, index: number, frame: Frame): boolean {
  const { graph, axes, lines, meetElsewhere } = frame;
  const { vertices, chains } = graph;
  const vertex = vertices[index];
  for (const { member } of vertex.stations) {
    if (member === runner || onlySits(member, runner, vertex, axes)) continue;
    for (const far of neighboursOn(chains[member], index).map((next) => beyondSplices(next, member, frame))) {
      if (isFoot(vertices[far], vertex, axes[member], stationOn(vertex, member))) return true;
      for (const { member: third } of vertices[far].stations) {
        if (lines[third] === lines[member] || lines[third] === lines[runner]) continue;
        if (meetElsewhere(lines[third], lines[runner], index)) return true;
      }
    }
  }
  return false;
}

/** Purlins lie square to what carries them; a web beside its post, as far from it as if it sat there, slants and triangulates. */
function onlySits(member: number, runner: number, vertex: Vertex, axes: readonly (Axis | null)[]): boolean {
  const [a, b] = [axes[member], axes[runner]];
  return vertex.seated.has(member) && (a === null || b === null || liesSquare(a, b));
}

/** The next vertex along a member's line at which something else is: a splice in a web leads on to its far end. */
function beyondSplices(next: number, member: number, { graph: { vertices, chains }, lines }: Frame): number {
  let [vertex, along] = [next, member];
  for (;;) {
    const { stations } = vertices[vertex];
    const other = stations.find((station) => station.member !== along);
    if (stations.length !== 2 || other === undefined || lines[other.member] !== lines[along]) return vertex;
    const beyond = neighboursOn(chains[other.member], vertex)[0];
    if (beyond === undefined || beyond === next) return vertex;
    [vertex, along] = [beyond, other.member];
  }
}

/**
 * Whether a member ends free just beyond the vertex: between a joint and the air nothing can be carried by the lever
 * rule. A foot on the ground is no such end.
 */
function isLastBeforeTail(runner: number, index: number, { graph: { vertices, chains }, axes }: Frame): boolean {
  const vertex = vertices[index];
  const frames = vertex.stations.some(({ member, role }) => role !== 'through' && !vertex.seated.has(member));
  if (!frames) return false;
  const chain = chains[runner];
  const at = chain.indexOf(index);
  const isTail = (end: number, isLast: boolean): boolean =>
    isLast && isFreeEnd(vertices[end]) && !isFoot(vertices[end], vertex, axes[runner], stationOn(vertex, runner));
  return isTail(chain[at - 1], at === 1) !== isTail(chain[at + 1], at === chain.length - 2);
}

function isFoot(far: Vertex, near: Vertex, axis: Axis | null, s: number): boolean {
  return axis !== null && isFreeEnd(far) && far.at[2] < near.at[2] && Math.abs(facetAt(axis, s).direction[2]) > STEEP;
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
