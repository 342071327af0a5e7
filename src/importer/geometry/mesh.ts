import { add, cross, norm, ORIGIN, scale, subtract, type Vec3 } from '../../domain/vector.ts';

/** A flat face: its rings of corners, the outer one first. */
export type Polygon = readonly (readonly Vec3[])[];

export interface Face {
  /** Corner indices of each ring, the outer one first. */
  readonly rings: readonly (readonly number[])[];
  /** Normal times area, m2; its sense follows the order of the outer ring. */
  readonly area: Vec3;
}

/** Flat faces over shared corners, metres, about a base near to them so that a model far from its origin loses no digits. */
export interface Mesh {
  readonly base: Vec3;
  readonly points: readonly Vec3[];
  readonly faces: readonly Face[];
}

/** Corners nearer to one another than this are one: what exporters round coordinates to, at the finest. */
const SAME_POINT = 1e-6;

/** Faces without area and corners that are no numbers are left out. */
export function meshOf(polygons: readonly Polygon[]): Mesh {
  const base = polygons[0]?.[0]?.[0] ?? ORIGIN;
  const points: Vec3[] = [];
  const known = new Map<string, number>();
  const indexOf = (p: Vec3): number => {
    const local = subtract(p, base);
    const key = local.map((c) => Math.round(c / SAME_POINT)).join(' ');
    let index = known.get(key);
    if (index === undefined) {
      index = points.length;
      known.set(key, index);
      points.push(local);
    }
    return index;
  };
  const faces: Face[] = [];
  for (const polygon of polygons) {
    if (!polygon.every((ring) => ring.every((p) => p.every(Number.isFinite)))) continue;
    const rings = polygon.map((ring) => withoutRepeats(ring.map(indexOf))).filter((ring) => ring.length >= 3);
    const [outer, ...holes] = rings;
    if (outer === undefined) continue;
    const whole = areaVector(outer.map((i) => points[i]!));
    const size = norm(whole);
    if (!(size > 0)) continue;
    const left = holes.reduce((rest, ring) => rest - norm(areaVector(ring.map((i) => points[i]!))), size);
    faces.push({ rings, area: scale(whole, Math.max(0, left) / size) });
  }
  return { base, points, faces };
}

/** Newell's method: half the sum of the cross products round the ring. */
export function areaVector(ring: readonly Vec3[]): Vec3 {
  const [first] = ring;
  if (first === undefined) return ORIGIN;
  let sum: Vec3 = ORIGIN;
  for (let i = 1; i + 1 < ring.length; i++) {
    sum = add(sum, cross(subtract(ring[i]!, first), subtract(ring[i + 1]!, first)));
  }
  return scale(sum, 0.5);
}

function withoutRepeats(ring: readonly number[]): number[] {
  return ring.filter((index, i) => index !== ring[(i + 1) % ring.length]);
}

/** The faces of one body among those of a mesh. */
export const withFaces = (mesh: Mesh, faces: readonly Face[]): Mesh => ({ ...mesh, faces });
