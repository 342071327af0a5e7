import type { ResultMember } from '../domain/result.ts';
import { add, along, cross, distance, dot, scale, subtract, unit, type Vec3 } from '../domain/vector.ts';
import { type Camera, inFront, seen } from './camera.ts';
import { sectionOutline } from './section-outline.ts';

/** One visible side of a piece of a member, in the picture's own coordinates. */
export interface Face {
  readonly globalId: string;
  readonly corners: readonly (readonly [number, number])[];
  /** m from the eye to its middle, and how far that is in front of the eye. */
  readonly depth: number;
  readonly inFront: number;
  /** 0 dark to 1 bright. */
  readonly light: number;
}

/** m; what comes nearer than this to the eye is cut off. */
const NEAR = 0.05;

/**
 * The sides of a member that face the camera. It is cut in pieces of at most `piece` metres, so that sorting them by depth
 * puts what crosses in front of each other right.
 */
export function memberFaces(member: ResultMember, camera: Camera, piece: number): Face[] {
  const axis = inFront(camera, member.axis, NEAR);
  const direction = unit(subtract(member.axis[1], member.axis[0]));
  if (axis === null || direction === null) return [];
  const outline = sectionOutline(member);
  const z = unit(subtract(member.zAxis, scale(direction, dot(member.zAxis, direction)))) ?? [0, 0, 1];
  const y = cross(z, direction);
  const length = distance(...axis);
  const count = Math.max(1, Math.min(MOST_PIECES, Math.ceil(length / piece)));
  const faces: Face[] = [];
  for (let k = 0; k < count; k++) {
    const ends = [k, k + 1].map((step) => along(axis[0], direction, (step * length) / count)) as [Vec3, Vec3];
    const rings = ends.map((end) => outline.map(([u, v]) => add(end, add(scale(y, u), scale(z, v)))));
    faces.push(...sides(member.globalId, rings[0]!, rings[1]!, camera));
    if (k === 0) faces.push(...cap(member.globalId, rings[0]!, scale(direction, -1), camera));
    if (k === count - 1) faces.push(...cap(member.globalId, rings[1]!, direction, camera));
  }
  return faces;
}

const MOST_PIECES = 60;

function sides(globalId: string, from: readonly Vec3[], to: readonly Vec3[], camera: Camera): Face[] {
  return from.flatMap((a, k) => {
    const next = (k + 1) % from.length;
    const corners = [a, from[next]!, to[next]!, to[k]!];
    const normal = unit(cross(subtract(corners[1]!, a), subtract(to[k]!, a)));
    return normal === null ? [] : faceOf(globalId, corners, normal, camera);
  });
}

function cap(globalId: string, ring: readonly Vec3[], normal: Vec3, camera: Camera): Face[] {
  return faceOf(globalId, ring, normal, camera);
}

/** Up and to the left of the camera. */
const LIGHT: Vec3 = [-0.45, 0.65, -0.6];

function faceOf(globalId: string, corners: readonly Vec3[], normal: Vec3, camera: Camera): Face[] {
  const middle = scale(
    corners.reduce((sum, corner) => add(sum, corner), [0, 0, 0] as Vec3),
    1 / corners.length,
  );
  if (dot(normal, subtract(middle, camera.eye)) >= 0) return [];
  const points = corners.map((corner) => seen(camera, corner));
  if (points.some(({ depth }) => depth <= NEAR / 2)) return [];
  const right = cross(camera.direction, camera.up);
  const shine =
    LIGHT[0] * dot(normal, right) + LIGHT[1] * dot(normal, camera.up) + LIGHT[2] * dot(normal, camera.direction);
  return [
    {
      globalId,
      corners: points.map(({ x, y }) => [x, y] as const),
      depth: distance(middle, camera.eye),
      inFront: dot(subtract(middle, camera.eye), camera.direction),
      light: Math.min(1, Math.max(0, 0.62 + 0.38 * shine)),
    },
  ];
}
