import { EigenvalueDecomposition, Matrix } from 'ml-matrix';
import { cross, dot, norm, scale, subtract, unit, type Vec3 } from '../../domain/vector.ts';
import { across, firstAcross } from '../transform.ts';
import type { Face, Mesh } from './mesh.ts';

/** Faces that lean less than this to the axis are sides; each pass is stricter, so that cut ends and holes drop out. */
const SIDE_LEANS = [Number.POSITIVE_INFINITY, 0.2, 0.02, 0.002];

/** A pass that would leave less of the skin than this has lost the sides themselves: the body tapers or is bent. */
const SIDES_AT_LEAST = 0.4;

/** What faces a second way makes at least this part of the sides, even the edges of a thin strip. */
const FACING_ONE_WAY = 1e-3;

/** Flatter than 15 degrees to the member a face is a taper or a notch along it, not its end (common practice in detailing). */
const FLATTEST_END = Math.sin((15 * Math.PI) / 180);

/**
 * The direction that a prism's sides run in: the one that the normals of its sides, weighted by area, are squarest to
 * (least eigenvector of the sum of A n n^T). Null where the faces show none.
 */
export function prismDirection(mesh: Mesh): Vec3 | null {
  const faces = mesh.faces.map(({ area }) => ({ size: norm(area), normal: unit(area) }));
  const skin = faces.reduce((sum, face) => sum + face.size, 0);
  let direction: Vec3 | null = null;
  for (const lean of SIDE_LEANS) {
    const scatter = new Matrix(3, 3);
    let sides = 0;
    for (const { size, normal } of faces) {
      if (normal === null || (direction !== null && Math.abs(dot(normal, direction)) > lean)) continue;
      sides += size;
      for (let i = 0; i < 3; i++) {
        for (let j = 0; j < 3; j++) scatter.set(i, j, scatter.get(i, j) + size * normal[i]! * normal[j]!);
      }
    }
    if (!(sides > SIDES_AT_LEAST * skin)) break;
    const { realEigenvalues, eigenvectorMatrix } = new EigenvalueDecomposition(scatter, { assumeSymmetric: true });
    const [first, second] = [...realEigenvalues].sort((a, b) => a - b) as [number, number];
    // Sides that all face one way leave their own direction open.
    if (second < FACING_ONE_WAY * sides) break;
    const least = realEigenvalues.indexOf(first);
    direction = unit(eigenvectorMatrix.getColumn(least) as unknown as Vec3) ?? direction;
  }
  return direction;
}

/** Sides that face two ways square to one another make up at least this part of a shape with flanges, legs or walls. */
const SQUARE_SIDES = 0.6;

/**
 * Two unit vectors across `along`, the second as near `upright` (a unit vector across `along`) as the sides allow: square
 * to the sides of a shape with flanges, legs or walls, else upright.
 */
export function sectionFrame(mesh: Mesh, along: Vec3, upright: Vec3): { x: Vec3; y: Vec3 } {
  const steps = 180;
  const facing = new Map<number, { size: number; normal: Vec3; most: number }>();
  let sides = 0;
  for (const { area } of mesh.faces) {
    const sideways = across(area, along);
    const size = norm(sideways);
    if (size < 0.98 * norm(area)) continue;
    sides += size;
    // Opposite sides and quarter turns face alike.
    const turn = Math.atan2(dot(cross(upright, sideways), along), dot(upright, sideways)) / (Math.PI / 2);
    const key = Math.round((turn - Math.floor(turn)) * steps) % steps;
    const known = facing.get(key) ?? { size: 0, normal: sideways, most: 0 };
    const isLarger = size > known.most;
    facing.set(key, {
      size: known.size + size,
      normal: isLarger ? sideways : known.normal,
      most: Math.max(size, known.most),
    });
  }
  const best = [...facing.values()].reduce((a, b) => (b.size > a.size * (1 + 1e-9) ? b : a), NOWHERE);
  const first = best.size < SQUARE_SIDES * sides ? upright : (unit(best.normal) ?? upright);
  const second = cross(along, first);
  const candidates = [first, scale(first, -1), second, scale(second, -1)];
  const y = candidates.reduce((a, b) => (dot(b, upright) > dot(a, upright) + 1e-6 ? b : a));
  return { x: cross(y, along), y };
}

const NOWHERE = { size: 0, normal: [0, 0, 0] as Vec3, most: 0 };

/** The unit vector across a member's direction that is nearest to `upright`; of one that runs along it, to the world's y. */
export const uprightAcross = (upright: Vec3, direction: Vec3): Vec3 =>
  firstAcross(direction, Math.abs(dot(upright, direction)) > 0.99 ? [0, 1, 0] : upright);

/** An end of a prism as found along its centroid line. */
export interface PrismEnd {
  /** Distance along the line from its point. */
  readonly at: number;
  /** 1 for an end cut square to the line; the cosine between the line and the end face's normal; null where no face is the end. */
  readonly squareness: number | null;
}

/** A coped beam's end has some half of its section left. */
const MOST_OF_AN_END = 0.45;

/**
 * Where the line through `point` along the unit vector `along` leaves the body: at the outermost face that covers
 * some half of the section, else at the body's farthest corner. `sectionArea` in m2.
 */
export function prismEnds(mesh: Mesh, point: Vec3, along: Vec3, sectionArea: number): readonly [PrismEnd, PrismEnd] {
  const [low, high] = rangeAlong(mesh, along).map((height) => height - dot(point, along)) as [number, number];
  const middle = (low + high) / 2;
  const planes = endPlanes(mesh, point, along);
  const ends = planes.filter((plane) => plane.size >= MOST_OF_AN_END * sectionArea);
  const outermost = (side: 1 | -1, corner: number): PrismEnd => {
    const own = ends.filter((plane) => side * (plane.at - middle) >= 0);
    return own.reduce<PrismEnd>(
      (far, plane) => (far.squareness === null || side * (plane.at - far.at) > 0 ? plane : far),
      {
        at: corner,
        squareness: null,
      },
    );
  };
  return [outermost(-1, low), outermost(1, high)];
}

interface EndPlane {
  /** Where the line meets it. */
  at: number;
  /** Area as seen along the line. */
  size: number;
  readonly squareness: number;
  readonly normal: Vec3;
}

function endPlanes(mesh: Mesh, point: Vec3, along: Vec3): EndPlane[] {
  const planes: EndPlane[] = [];
  for (const face of mesh.faces) {
    const normal = unit(face.area);
    if (normal === null) continue;
    const lean = dot(normal, along);
    if (Math.abs(lean) < FLATTEST_END) continue;
    const at = dot(subtract(cornerOf(mesh, face), point), normal) / lean;
    const size = Math.abs(dot(face.area, along));
    const same = planes.find((plane) => Math.abs(plane.at - at) < 1e-3 && norm(cross(plane.normal, normal)) < 1e-2);
    if (same === undefined) planes.push({ at, size, squareness: Math.abs(lean), normal });
    else same.size += size;
  }
  return planes;
}

const cornerOf = (mesh: Mesh, face: Face): Vec3 => mesh.points[face.rings[0]![0]!]!;

/** Between which heights along a unit vector the mesh lies, about its base. */
export function rangeAlong(mesh: Mesh, axis: Vec3): readonly [low: number, high: number] {
  let [low, high] = [Number.POSITIVE_INFINITY, Number.NEGATIVE_INFINITY];
  for (const { rings } of mesh.faces) {
    for (const ring of rings) {
      for (const corner of ring) {
        const height = dot(mesh.points[corner]!, axis);
        low = Math.min(low, height);
        high = Math.max(high, height);
      }
    }
  }
  return [low, high];
}
