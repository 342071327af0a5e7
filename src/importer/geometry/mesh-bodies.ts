import { add, cross, dot, norm, ORIGIN, scale, subtract, unit, type Vec3 } from '../../domain/vector.ts';
import { type Face, type Mesh, withFaces } from './mesh.ts';

/** The separate bodies in a mesh. A shell that lies within another (the bore of a tube, a cavity) belongs to it. */
export function separateBodies(mesh: Mesh): Mesh[] {
  const bodies = connectedFaces(mesh).map((faces) => withFaces(mesh, faces));
  if (bodies.length === 1) return bodies;
  const bySize = bodies
    .map((body) => ({ body, size: skinArea(body), middle: middleOf(body) }))
    .sort((a, b) => b.size - a.size);
  const outermost: { body: Mesh; faces: Face[] }[] = [];
  for (const { body, middle } of bySize) {
    const around = outermost.find((outer) => isInside(outer.body, middle));
    if (around === undefined) outermost.push({ body, faces: [...body.faces] });
    else around.faces.push(...body.faces);
  }
  return outermost.map(({ faces }) => withFaces(mesh, faces));
}

/** Faces that hang together by corners. */
function connectedFaces(mesh: Mesh): Face[][] {
  const leader = Int32Array.from({ length: mesh.points.length }, (_, i) => i);
  const find = (i: number): number => {
    let at = i;
    while (leader[at] !== at) {
      leader[at] = leader[leader[at]!]!;
      at = leader[at]!;
    }
    return at;
  };
  for (const face of mesh.faces) {
    const first = find(face.rings[0]![0]!);
    for (const ring of face.rings) for (const corner of ring) leader[find(corner)] = first;
  }
  const groups = new Map<number, Face[]>();
  for (const face of mesh.faces) {
    const root = find(face.rings[0]![0]!);
    const group = groups.get(root);
    if (group === undefined) groups.set(root, [face]);
    else group.push(face);
  }
  return [...groups.values()];
}

const skinArea = (mesh: Mesh): number => mesh.faces.reduce((sum, face) => sum + norm(face.area), 0);

export function cornersOf(mesh: Mesh): Vec3[] {
  const corners = new Set(mesh.faces.flatMap((face) => face.rings.flat()));
  return [...corners].map((corner) => mesh.points[corner]!);
}

function middleOf(mesh: Mesh): Vec3 {
  const corners = cornersOf(mesh);
  return scale(
    corners.reduce((sum, corner) => add(sum, corner), ORIGIN),
    1 / Math.max(1, corners.length),
  );
}

/** Any direction that no builder uses, so that a ray along it meets neither edges nor corners. */
const RAY = unit([0.28631, 0.55129, 0.78373]) as Vec3;
const RAY_X = unit(cross(RAY, [0, 0, 1])) as Vec3;
const RAY_Y = cross(RAY, RAY_X);

/** A ray from a point within leaves through the skin an odd number of times. */
function isInside(mesh: Mesh, p: Vec3): boolean {
  let inside = false;
  for (const { rings, area } of mesh.faces) {
    const steepness = dot(area, RAY);
    if (steepness === 0) continue;
    const onFace = mesh.points[rings[0]![0]!]!;
    if (dot(subtract(onFace, p), area) / steepness < 0) continue;
    let isWithin = false;
    for (const ring of rings) if (crossesOddly(ring, mesh.points, p)) isWithin = !isWithin;
    if (isWithin) inside = !inside;
  }
  return inside;
}

function crossesOddly(ring: readonly number[], points: readonly Vec3[], p: Vec3): boolean {
  let odd = false;
  for (let i = 0; i < ring.length; i++) {
    const a = subtract(points[ring[i]!]!, p);
    const b = subtract(points[ring[(i + 1) % ring.length]!]!, p);
    const [ay, by] = [dot(a, RAY_Y), dot(b, RAY_Y)];
    if (ay > 0 === by > 0) continue;
    const ax = dot(a, RAY_X);
    if (ax + (ay / (ay - by)) * (dot(b, RAY_X) - ax) > 0) odd = !odd;
  }
  return odd;
}
