import { EigenvalueDecomposition, Matrix } from 'ml-matrix';
import { pushTo } from '../domain/group.ts';
import { along, cross, dot, meanOf, norm, subtract, unit, type Vec3 } from '../domain/vector.ts';
import { endsOf, type PieceRun } from './pieces.ts';
import type { VertexGraph } from './vertices.ts';

/**
 * m. A work point this near to the plane of all that meets there is drawn in it: coordinates come to the tenth of a millimetre or the millimetre, and
 * joining moves axes by more. Left so, a flat truss is a folded one, whose joints no load in its plane leaves in balance.
 */
const HAIR = 0.001;
/** m; what is as flat as this is left as it is. */
const EXACT = 1e-9;
/** While a patch grows its plane is not yet sure. */
const GROWING = 3;
/** Slope by which what is no part of a plane leaves it. */
const FOLD = 0.02;
/** Least points of a plane. */
const FEWEST = 4;

interface Plane {
  readonly normal: Vec3;
  /** n . x = offset. */
  readonly offset: number;
}

/** The graph with the vertices of what is flat but for a hair set on its plane: upright or along an axis where that is as near. */
export function flattened(graph: VertexGraph, runs: readonly PieceRun[]): VertexGraph {
  const planesAt = new Map<number, Plane[]>();
  for (const { plane, vertices } of flatPatches(graph, runs)) {
    const isExact = vertices.every((v) => Math.abs(off(plane, graph.vertices[v].at)) <= EXACT);
    if (!isExact) for (const v of vertices) pushTo(planesAt, v, plane);
  }
  if (planesAt.size === 0) return graph;
  const vertices = graph.vertices.map((vertex, v) => {
    const planes = planesAt.get(v);
    return planes === undefined ? vertex : { ...vertex, at: onto(planes, vertex.at) };
  });
  return { ...graph, vertices };
}

const off = ({ normal, offset }: Plane, at: Vec3): number => dot(normal, at) - offset;

/** The nearest point on all planes, or on the first alone where they meet too far off. */
function onto(planes: readonly Plane[], at: Vec3): Vec3 {
  let point = at;
  for (let sweep = 0; sweep < 60; sweep++)
    for (const plane of planes) point = along(point, plane.normal, -off(plane, point));
  const meets = planes.every((plane) => Math.abs(off(plane, point)) < EXACT) && norm(subtract(point, at)) < 2 * HAIR;
  return meets ? point : along(at, planes[0].normal, -off(planes[0], at));
}

interface Patch {
  readonly plane: Plane;
  readonly vertices: readonly number[];
}

/**
 * Patches grow from a vertex whose bars lie in one plane over those whose bars lie in it too; they end at vertices that something else meets as well,
 * which belong to them. No vertex lies farther than a hair from the plane of its patch.
 */
function flatPatches(graph: VertexGraph, runs: readonly PieceRun[]): Patch[] {
  const next = neighbours(runs);
  const at = (v: number): Vec3 => graph.vertices[v].at;
  const taken = new Set<number>();
  const patches: Patch[] = [];
  for (const seed of [...next.keys()].sort((a, b) => a - b)) {
    const around = next.get(seed)!;
    if (taken.has(seed)) continue;
    const first = planeAround(at(seed), around.map(at));
    if (first === null) continue;
    const { members, inside } = grow(seed, first, next, at, taken);
    for (const v of inside) taken.add(v);
    const plane = members.length < FEWEST ? null : bestPlane(members.map(at));
    if (plane === null) continue;
    const isCurved = members.some((v) => next.get(v)!.some((other) => leavesGently(plane, at(v), at(other))));
    if (!isCurved) patches.push({ plane, vertices: members });
  }
  return patches;
}

/** Whether a bar leaves the plane by more than a hair and less than a fold: the surface is a curved one. */
function leavesGently(plane: Plane, from: Vec3, to: Vec3): boolean {
  const rise = Math.abs(off(plane, to));
  return rise > HAIR && rise < FOLD * norm(subtract(to, from));
}

function grow(
  seed: number,
  first: Plane,
  next: ReadonlyMap<number, number[]>,
  at: (v: number) => Vec3,
  taken: ReadonlySet<number>,
) {
  const members = new Set([seed]);
  const moments = new Moments(at(seed));
  const inside = new Set<number>();
  let plane = first;
  let ring = [seed];
  while (ring.length > 0) {
    const found: number[] = [];
    for (const v of ring) {
      if (taken.has(v)) continue;
      const around = next.get(v)!;
      if (!around.every((other) => Math.abs(off(plane, at(other))) < GROWING * HAIR)) continue;
      inside.add(v);
      for (const other of around)
        if (!members.has(other)) {
          members.add(other);
          moments.add(at(other));
          found.push(other);
        }
    }
    if (members.size >= FEWEST && found.length > 0) plane = moments.plane() ?? plane;
    ring = found;
  }
  return { members: [...members].sort((a, b) => a - b), inside };
}

/** The plane of a vertex and its neighbours where they lie in one; null where they do not, or in a line. */
function planeAround(centre: Vec3, around: readonly Vec3[]): Plane | null {
  const arms = around.map((p) => subtract(p, centre));
  let normal: Vec3 | null = null;
  let best = 0;
  for (const [i, a] of arms.entries())
    for (const b of arms.slice(i + 1)) {
      const area = cross(a, b);
      if (norm(area) > best) {
        best = norm(area);
        normal = area;
      }
    }
  const longest = Math.max(...arms.map(norm));
  const direction = normal === null || best < 0.05 * longest ** 2 ? null : unit(normal);
  if (direction === null || arms.some((arm) => Math.abs(dot(direction, arm)) > GROWING * HAIR)) return null;
  return { normal: direction, offset: dot(direction, centre) };
}

/** Along an axis, upright, or as it comes: the first plane that no point lies farther from than a hair. */
function bestPlane(points: readonly Vec3[]): Plane | null {
  const middle = meanOf(points);
  const moments = new Moments(middle);
  for (const point of points) moments.add(point);
  const through = (normal: Vec3): Plane => ({ normal, offset: dot(normal, middle) });
  const planes = [through([1, 0, 0]), through([0, 1, 0]), through([0, 0, 1]), moments.plane(true), moments.plane()];
  const fits = (plane: Plane | null) => plane !== null && points.every((point) => Math.abs(off(plane, point)) <= HAIR);
  return planes.find(fits) ?? null;
}

/** Sums over points, from which their plane comes by least squares. */
class Moments {
  private readonly origin: Vec3;
  private count = 1;
  private readonly first = [0, 0, 0];
  private readonly second = [0, 0, 0, 0, 0, 0, 0, 0, 0];

  /** @param origin a point among them or their middle: sums are taken from there */
  constructor(origin: Vec3) {
    this.origin = origin;
  }

  add(point: Vec3): void {
    const arm = subtract(point, this.origin);
    this.count++;
    for (let i = 0; i < 3; i++) {
      this.first[i] += arm[i];
      for (let j = 0; j < 3; j++) this.second[3 * i + j] += arm[i] * arm[j];
    }
  }

  /** The nearest plane of all, or the nearest upright one; null where there is none. */
  plane(isUpright = false): Plane | null {
    const mean = this.first.map((v) => v / this.count);
    const spread = this.second.map((v, k) => v - this.count * mean[Math.floor(k / 3)] * mean[k % 3]);
    // What is rounding beside the rest may be so small that the eigenproblem loses its footing.
    const nothing = 1e-24 * (spread[0] + spread[4] + spread[8]);
    const matrix = new Matrix([0, 3, 6].map((k) => spread.slice(k, k + 3).map((v) => (Math.abs(v) < nothing ? 0 : v))));
    if (isUpright) {
      for (const k of [0, 1]) {
        matrix.set(k, 2, 0);
        matrix.set(2, k, 0);
      }
      matrix.set(2, 2, 1 + matrix.get(0, 0) + matrix.get(1, 1));
    }
    const { realEigenvalues, eigenvectorMatrix } = new EigenvalueDecomposition(matrix, { assumeSymmetric: true });
    const [x, y, z] = eigenvectorMatrix.getColumn(realEigenvalues.indexOf(Math.min(...realEigenvalues)));
    const normal = unit([x, y, isUpright ? 0 : z]);
    return normal === null
      ? null
      : { normal, offset: dot(normal, this.origin) + dot(normal, [mean[0], mean[1], mean[2]]) };
  }
}

/** For each vertex that moves by itself the others that its bars tie it to; what a bar carries stands for the bar's ends. */
function neighbours(runs: readonly PieceRun[]): Map<number, number[]> {
  const carrierOf = new Map<number, PieceRun>();
  for (const run of runs) for (const piece of run) for (const vertex of piece.carries) carrierOf.set(vertex, run);
  const real = (vertex: number, depth = 0): number[] => {
    const run = carrierOf.get(vertex);
    return run === undefined || depth > 8 ? [vertex] : endsOf(run).flatMap((end) => real(end, depth + 1));
  };
  const next = new Map<number, number[]>();
  const tie = (a: number, b: number) => {
    const others = next.get(a);
    if (others === undefined) next.set(a, [b]);
    else if (!others.includes(b)) others.push(b);
  };
  for (const run of runs) {
    const [from, to] = endsOf(run);
    const isPlain = !carrierOf.has(from) && !carrierOf.has(to);
    const tied = isPlain ? [from, to] : [...new Set([...real(from), ...real(to)])];
    for (const a of tied) for (const b of tied) if (a !== b) tie(a, b);
  }
  return next;
}
