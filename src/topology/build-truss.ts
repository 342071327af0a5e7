import type { Member } from '../domain/member.ts';
import type { PlaceNamer } from '../domain/place.ts';
import type { Joining, Truss, TrussBar, TrussNode } from '../domain/truss.ts';
import { between, distance, dot, subtract, type Vec3 } from '../domain/vector.ts';
import type { Axis } from './axes.ts';
import { nameBars } from './bar-names.ts';
import { barProperties, membersOfPiece } from './bar-properties.ts';
import { strayOf } from './bows.ts';
import { faithOf } from './faith.ts';
import { endsOf, type PieceRun } from './pieces.ts';
import { isFreeEnd, type Vertex, type VertexGraph } from './vertices.ts';

/** Makes nodes and bars of the runs, ordered and named by geometry so that the file's order does not matter. */
export function buildTruss(
  graph: VertexGraph,
  runs: readonly PieceRun[],
  members: readonly Member[],
  axes: readonly (Axis | null)[],
  placeOf: PlaceNamer,
  joiningOf: (vertex: Vertex) => Joining,
): Truss {
  const carriedIn = new Map<number, number>();
  runs.forEach((run, index) => {
    for (const piece of run) for (const vertex of piece.carries) carriedIn.set(vertex, index);
  });
  const positions = new Map<number, Vec3>();
  const used = new Set(runs.flatMap((run) => [...endsOf(run), ...run.flatMap((piece) => piece.carries)]));
  const ordered = [...used].sort((p, q) => compareVertices(p, q));
  const nodeOfVertex = new Map(ordered.map((vertex, node) => [vertex, node]));
  const draft = runs.map((run, index) => ({ run, index, ends: orderedEnds(run) }));
  draft.sort((p, q) => p.ends[0] - q.ends[0] || p.ends[1] - q.ends[1] || compareRuns(p.run, q.run));
  const barOfRun = new Map(draft.map(({ index }, bar) => [index, bar]));
  const names = nameBars(
    draft.map(({ run }) => run),
    members,
    axes,
  );
  const bars = draft.map(({ run, ends }, bar) => makeBar(run, ends, names[bar]));
  const nodes = ordered.map((vertex) => makeNode(vertex));
  const faith = faithOf(axes, graph.chains, positionOf);
  return { nodes, bars, faith };

  /** A carried vertex lies exactly on the line of its bar, or the lever rule would not keep moments. */
  function positionOf(vertex: number): Vec3 {
    const known = positions.get(vertex);
    if (known) return known;
    const run = carriedIn.get(vertex);
    const at = run === undefined ? graph.vertices[vertex].at : pointOnRun(vertex, runs[run]).at;
    positions.set(vertex, at);
    return at;
  }

  function pointOnRun(vertex: number, run: PieceRun): { at: Vec3; t: number } {
    const [from, to] = endsOf(run).map((end) => positionOf(end));
    const line = subtract(to, from);
    const t = dot(subtract(graph.vertices[vertex].at, from), line) / dot(line, line);
    return { at: between(from, to, t), t };
  }

  function orderedEnds(run: PieceRun): [number, number] {
    const [a, b] = endsOf(run).map((vertex) => nodeOfVertex.get(vertex) as number);
    return a < b ? [a, b] : [b, a];
  }

  function makeBar(run: PieceRun, [from, to]: readonly [number, number], name: string): TrussBar {
    const own = [...new Set(run.flatMap((piece) => membersOfPiece(axes, piece.member)))];
    const length = distance(positionOf(ordered[from]), positionOf(ordered[to]));
    const strays = strayOf(run, axes, graph);
    const bow = strays === null ? {} : { strays };
    return { name, members: own, from, to, length, ...bow, ...barProperties(run, members, axes, graph) };
  }

  function makeNode(vertex: number): TrussNode {
    const at = positionOf(vertex);
    const run = carriedIn.get(vertex);
    const carriedBy = run === undefined ? null : { bar: barOfRun.get(run) as number, t: alongBar(vertex, run) };
    const joint = graph.vertices[vertex];
    const met = joint.stations.flatMap(({ member }) => membersOfPiece(axes, member)).sort((p, q) => p - q);
    const joining = isFreeEnd(joint) ? {} : { joining: joiningOf(joint) };
    return { at, members: met, carriedBy, overhangMass: 0, place: placeOf(at), ...joining };
  }

  function alongBar(vertex: number, run: number): number {
    const { t } = pointOnRun(vertex, runs[run]);
    const bar = bars[barOfRun.get(run) as number];
    return nodeOfVertex.get(endsOf(runs[run])[0]) === bar.from ? t : 1 - t;
  }

  function compareVertices(p: number, q: number): number {
    return comparePoints(positionOf(p), positionOf(q)) || (leastId(p) < leastId(q) ? -1 : 1);
  }

  function leastId(vertex: number): string {
    return graph.vertices[vertex].stations.map(({ member }) => members[member].globalId).sort()[0];
  }

  function compareRuns(p: PieceRun, q: PieceRun): number {
    return members[p[0].member].globalId < members[q[0].member].globalId ? -1 : 1;
  }
}

/** Order of points by coordinates rounded to 0.1 mm. */
function comparePoints(p: Vec3, q: Vec3): number {
  for (let k = 0; k < 3; k++) {
    const difference = Math.round(p[k] * 1e4) - Math.round(q[k] * 1e4);
    if (difference !== 0) return difference;
  }
  return 0;
}
