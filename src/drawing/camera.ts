import { along, cross, dot, subtract, UP, unit, type Vec3 } from '../domain/vector.ts';

/** A perspective camera as building models' viewpoints describe it: metres, world axes, +Z up. */
export interface Camera {
  readonly eye: Vec3;
  /** Unit vectors. */
  readonly direction: Vec3;
  readonly up: Vec3;
  /** Degrees from the lower to the upper edge. */
  readonly fieldOfView: number;
  /** Width by height. */
  readonly aspect: number;
}

/** A point in the picture: x to the right and y down, both in heights of the picture from its middle. */
export interface Seen {
  readonly x: number;
  readonly y: number;
  /** m in front of the eye. */
  readonly depth: number;
}

/** A camera that looks along `direction` at `target` from `distance` metres. */
export function cameraAt(target: Vec3, direction: Vec3, distance: number, fieldOfView: number, aspect: number): Camera {
  const into = unit(direction) ?? [0, 1, 0];
  const right = unit(cross(into, UP)) ?? [1, 0, 0];
  return { eye: along(target, into, -distance), direction: into, up: cross(right, into), fieldOfView, aspect };
}

/** How the camera sees a point in front of it. */
export function seen(camera: Camera, point: Vec3): Seen {
  const from = subtract(point, camera.eye);
  const depth = dot(from, camera.direction);
  const right = cross(camera.direction, camera.up);
  const height = 2 * Math.tan((camera.fieldOfView * Math.PI) / 360) * depth;
  return { x: dot(from, right) / height, y: -dot(from, camera.up) / height, depth };
}

/** The part of a segment that lies beyond `near` metres in front of the eye; null where none does. */
export function inFront(camera: Camera, [a, b]: readonly [Vec3, Vec3], near: number): readonly [Vec3, Vec3] | null {
  const depthOf = (point: Vec3) => dot(subtract(point, camera.eye), camera.direction) - near;
  const [da, db] = [depthOf(a), depthOf(b)];
  if (da <= 0 && db <= 0) return null;
  if (da > 0 && db > 0) return [a, b];
  const cut = along(a, subtract(b, a), da / (da - db));
  return da > 0 ? [a, cut] : [cut, b];
}
