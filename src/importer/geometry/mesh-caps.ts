import { add, dot, norm, ORIGIN, scale, subtract, unit, type Vec3 } from '../../domain/vector.ts';
import { areaVector, type Face, type Mesh } from './mesh.ts';

/** One flat piece of a mesh's skin, of however many faces. */
export interface FlatPatch {
  /** Metres, about the mesh's base. */
  readonly centroid: Vec3;
  /** Unit; of either sense. */
  readonly normal: Vec3;
  readonly area: number;
}

/** Faces whose normals differ by less than this (sine) are one plane where they share an edge. */
const SAME_PLANE = 1e-3;

/** The flat pieces that the skin consists of: neighbouring faces in one plane are one. */
export function flatPatches(mesh: Mesh): FlatPatch[] {
  const normals = mesh.faces.map(({ area }) => unit(area));
  const leader = mesh.faces.map((_, i) => i);
  const find = (i: number): number => {
    let at = i;
    while (leader[at] !== at) at = leader[at] = leader[leader[at]!]!;
    return at;
  };
  const owners = new Map<number, number>();
  mesh.faces.forEach(({ rings }, i) => {
    for (const edge of edgesOf(rings, mesh.points.length)) {
      const other = owners.get(edge);
      owners.set(edge, i);
      if (other !== undefined && isParallel(normals[other]!, normals[i]!)) leader[find(i)] = find(other);
    }
  });
  const groups = new Map<number, Face[]>();
  mesh.faces.forEach((face, i) => {
    const group = groups.get(find(i));
    if (group === undefined) groups.set(find(i), [face]);
    else group.push(face);
  });
  return [...groups.values()].flatMap((faces) => patchOf(mesh, faces) ?? []);
}

function* edgesOf(rings: Face['rings'], count: number): Generator<number> {
  for (const ring of rings) {
    for (let i = 0; i < ring.length; i++) {
      const [a, b] = [ring[i]!, ring[(i + 1) % ring.length]!];
      yield Math.min(a, b) * count + Math.max(a, b);
    }
  }
}

const isParallel = (a: Vec3 | null, b: Vec3 | null): boolean =>
  a !== null && b !== null && 1 - Math.abs(dot(a, b)) < SAME_PLANE ** 2 / 2;

function patchOf(mesh: Mesh, faces: readonly Face[]): FlatPatch | null {
  const normal = unit(faces[0]!.area);
  if (normal === null) return null;
  let area = 0;
  let moment: Vec3 = ORIGIN;
  for (const { rings } of faces) {
    rings.forEach((ring, i) => {
      const part = ringMoment(ring.map((corner) => mesh.points[corner]!));
      const sign = i === 0 ? 1 : -1;
      area += sign * part.area;
      moment = add(moment, scale(part.moment, sign));
    });
  }
  return area > 0 ? { centroid: scale(moment, 1 / area), normal, area } : null;
}

/** Area and area times centroid of a flat ring, whatever way round it runs. */
function ringMoment(ring: readonly Vec3[]): { area: number; moment: Vec3 } {
  const whole = areaVector(ring);
  const area = norm(whole);
  const normal = unit(whole);
  const [first] = ring;
  if (normal === null || first === undefined) return { area: 0, moment: ORIGIN };
  let moment = scale(first, area);
  for (let i = 1; i + 1 < ring.length; i++) {
    const [p, q] = [subtract(ring[i]!, first), subtract(ring[i + 1]!, first)];
    moment = add(moment, scale(add(p, q), dot(areaVector([ORIGIN, p, q]), normal) / 3));
  }
  return { area, moment };
}
