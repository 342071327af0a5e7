import { EigenvalueDecomposition, Matrix } from 'ml-matrix';
import {
  add,
  along,
  anyNormal,
  cross,
  distance,
  dot,
  norm,
  scale,
  subtract,
  unit,
  type Vec3,
} from '../../domain/vector.ts';
import { type Outline, type Point2, startOf } from '../sections/outline.ts';
import { outlineProperties, ringSize } from '../sections/outline-properties.ts';
import { type Face, type Mesh, withFaces } from './mesh.ts';
import { MeshCutter } from './mesh-cut.ts';

/** One piece of material that a plane shows, metres, about the mesh's base. */
export interface Slice {
  readonly centroid: Vec3;
  /** Unit normal of the plane. */
  readonly normal: Vec3;
  readonly area: number;
  readonly outline: Outline;
  /** Length of its edges, outside and in. */
  readonly perimeter: number;
  /** The longer side of the box around it. */
  readonly size: number;
}

/** Cuts by parallel planes. */
export class Slicer {
  private readonly mesh: Mesh;
  private readonly normal: Vec3;
  private readonly x: Vec3;
  private readonly y: Vec3;
  private readonly cutter: MeshCutter;

  /** `normal` and `x` are unit vectors at right angles to one another. */
  constructor(mesh: Mesh, normal: Vec3, x: Vec3 = anyNormal(normal)) {
    this.mesh = mesh;
    this.normal = normal;
    this.x = x;
    this.y = cross(normal, x);
    this.cutter = new MeshCutter(mesh, normal, x, this.y);
  }

  /** All pieces in the plane through `point`. */
  at(point: Vec3): Slice[] {
    const { normal, x, y } = this;
    const height = dot(point, normal);
    return this.cutter.at(height).flatMap((outline) => {
      const plane = outlineProperties(outline);
      if (plane === null || !(plane.area > 0)) return [];
      const centroid = along(along(scale(normal, height), x, plane.centroid[0]), y, plane.centroid[1]);
      const perimeter = [outline.outer, ...outline.voids].reduce((sum, ring) => sum + ringSize(ring).length, 0);
      const [low, high] = boxOf(outline);
      const size = Math.max(high[0] - low[0], high[1] - low[1]);
      return [{ centroid, normal, area: plane.area, outline, perimeter, size }];
    });
  }

  /** The piece in the plane through `point` whose centroid is nearest to it. */
  nearest(point: Vec3): Slice | null {
    const slices = this.at(point);
    return slices.reduce<Slice | null>(
      (best, slice) =>
        best === null || distance(slice.centroid, point) < distance(best.centroid, point) ? slice : best,
      null,
    );
  }

  /** The faces that one of its slices runs over, with the length that it has on each. */
  facesOf(slice: Slice): { face: Face; length: number }[] {
    const [low, high] = boxOf(slice.outline);
    const slack = 1e-3 * slice.size;
    const isWithin = (p: Vec3): boolean => {
      const [u, v] = [dot(p, this.x), dot(p, this.y)];
      return u > low[0] - slack && u < high[0] + slack && v > low[1] - slack && v < high[1] + slack;
    };
    return this.mesh.faces.flatMap((face) => {
      const points = this.crossings(face, dot(slice.centroid, this.normal)).filter(isWithin);
      const length = points.length < 2 ? 0 : distance(points[0]!, points.at(-1)!);
      return length > 0 ? [{ face, length }] : [];
    });
  }

  private crossings({ rings }: Face, level: number): Vec3[] {
    const found: Vec3[] = [];
    const { points } = this.mesh;
    for (const ring of rings) {
      let p = points[ring.at(-1)!]!;
      let above = dot(p, this.normal) - level;
      for (const corner of ring) {
        const q = points[corner]!;
        const next = dot(q, this.normal) - level;
        if (above >= 0 !== next >= 0) found.push(along(p, subtract(q, p), above / (above - next)));
        [p, above] = [q, next];
      }
    }
    return found;
  }
}

/** Of an outline of straight edges. */
export function boxOf({ outer }: Outline): readonly [low: Point2, high: Point2] {
  const low: [number, number] = [Number.POSITIVE_INFINITY, Number.POSITIVE_INFINITY];
  const high: [number, number] = [Number.NEGATIVE_INFINITY, Number.NEGATIVE_INFINITY];
  for (const [x, y] of outer.map(startOf)) {
    [low[0], low[1]] = [Math.min(low[0], x), Math.min(low[1], y)];
    [high[0], high[1]] = [Math.max(high[0], x), Math.max(high[1], y)];
  }
  return [low, high];
}

const SQUARING_STEPS = 4;

/** Sides that all face one way, to this part of the edge of a slice, leave their own direction open. */
const FACING_ONE_WAY = 1e-3;

/**
 * The slice near `point` that is square to the sides it runs over (least eigenvector of the sum of l n n^T along its
 * edge), from a first guess of their direction, a unit vector.
 */
export function squareSlice(mesh: Mesh, point: Vec3, guess: Vec3): Slice | null {
  let slicer = new Slicer(mesh, guess);
  let slice = slicer.nearest(point);
  for (let i = 0; i < SQUARING_STEPS && slice !== null; i++) {
    const direction = directionOfSides(slicer.facesOf(slice), guess);
    if (direction === null || norm(subtract(direction, slice.normal)) < 1e-7) break;
    slicer = new Slicer(mesh, direction);
    slice = slicer.nearest(slice.centroid);
  }
  return slice;
}

/** The mesh of those faces only that a slice runs over. */
export const sidesAt = (mesh: Mesh, slice: Slice): Mesh =>
  withFaces(
    mesh,
    new Slicer(mesh, slice.normal).facesOf(slice).map(({ face }) => face),
  );

function directionOfSides(sides: readonly { face: Face; length: number }[], guess: Vec3): Vec3 | null {
  const scatter = new Matrix(3, 3);
  let whole = 0;
  for (const { face, length } of sides) {
    const normal = unit(face.area);
    if (normal === null) continue;
    whole += length;
    for (let i = 0; i < 3; i++) {
      for (let j = 0; j < 3; j++) scatter.set(i, j, scatter.get(i, j) + length * normal[i]! * normal[j]!);
    }
  }
  if (!(whole > 0)) return null;
  const { realEigenvalues, eigenvectorMatrix } = new EigenvalueDecomposition(scatter, { assumeSymmetric: true });
  const [first, second] = [...realEigenvalues].sort((a, b) => a - b) as [number, number];
  if (second < FACING_ONE_WAY * whole) return null;
  const direction = unit(eigenvectorMatrix.getColumn(realEigenvalues.indexOf(first)) as unknown as Vec3);
  return direction === null || dot(direction, guess) >= 0 ? direction : scale(direction, -1);
}

/** Where two lines pass nearest to one another; null where they run alongside. */
export function crossingOf(
  p: Vec3,
  d: Vec3,
  q: Vec3,
  e: Vec3,
): { onFirst: number; onSecond: number; gap: number; point: Vec3 } | null {
  const normal = cross(d, e);
  const square = dot(normal, normal);
  if (square < 1e-6) return null;
  const apart = subtract(q, p);
  const onFirst = dot(cross(apart, e), normal) / square;
  const onSecond = dot(cross(apart, d), normal) / square;
  const [a, b] = [along(p, d, onFirst), along(q, e, onSecond)];
  return { onFirst, onSecond, gap: distance(a, b), point: scale(add(a, b), 0.5) };
}
