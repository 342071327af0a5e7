import { cross, dot, scale, unit, type Vec3 } from '../domain/vector.ts';
import { asNumber, asRef, type StepValue } from '../step/values.ts';
import type { Reading } from './reading.ts';
import type { PlaneMap, Point2 } from './sections/outline.ts';
import { across, firstAcross, frame, IDENTITY, type Transform } from './transform.ts';

/** IfcAxis2Placement3D, or its plane form lying in z = 0; the identity where it is left out. */
export function readAxes(reading: Reading, value: StepValue | undefined): Transform {
  return axesOf(reading, asRef(value));
}

/** The same of the placement `id`. */
export function axesOf(reading: Reading, id: number | null): Transform {
  if (id === null) return IDENTITY;
  const location = reading.refAt(id, 0);
  const first = reading.file.refAt(id, 1);
  const second = reading.file.refAt(id, 2);
  const origin = reading.pointOf(location);
  if (reading.file.typeOf(id) === 'IFCAXIS2PLACEMENT2D') return frame(origin, null, reading.directionOf(first));
  return frame(origin, reading.directionOf(first), reading.directionOf(second));
}

/** IfcAxis2Placement2D as a map of the plane. */
export function readPlaneAxes(reading: Reading, value: StepValue | undefined): PlaneMap {
  return planeOf(readAxes(reading, value));
}

/** IfcCartesianTransformationOperator2D and 3D, mirroring and non-uniform ones included (IfcBaseAxis, ISO 16739). */
export function readOperator(reading: Reading, value: StepValue | undefined): Transform {
  const id = asRef(value);
  if (id === null) return IDENTITY;
  const type = reading.typeOf(id);
  const args = reading.args(id);
  const [axis1, axis2] = [reading.direction(args[0]), reading.direction(args[1])];
  const origin = reading.point(args[2]);
  const size = asNumber(args[3]) ?? 1;
  if (type.startsWith('IFCCARTESIANTRANSFORMATIONOPERATOR2D')) {
    const { x, y } = planeBase(axis1, axis2);
    return { x: scale(x, size), y: scale(y, asNumber(args[4]) ?? size), z: [0, 0, 1], origin };
  }
  const z = unit(reading.direction(args[4]) ?? [0, 0, 1]) ?? ([0, 0, 1] as const);
  const x = firstAcross(z, axis1);
  const y = secondAcross(z, x, axis2);
  const isUneven = type.endsWith('NONUNIFORM');
  const sizeY = isUneven ? (asNumber(args[5]) ?? size) : size;
  const sizeZ = isUneven ? (asNumber(args[6]) ?? size) : size;
  return { x: scale(x, size), y: scale(y, sizeY), z: scale(z, sizeZ), origin };
}

/** The unit vector across z and x on the side of `reference`: a left-handed set is a mirror image. */
function secondAcross(z: Vec3, x: Vec3, reference: Vec3 | null): Vec3 {
  const right = cross(z, x);
  const projected = across(across(reference ?? [0, 1, 0], z), x);
  return dot(projected, right) < -1e-9 ? scale(right, -1) : right;
}

function planeBase(axis1: Vec3 | null, axis2: Vec3 | null): { x: Vec3; y: Vec3 } {
  const second = axis2 === null ? null : unit(axis2);
  const first = axis1 === null ? null : unit(axis1);
  if (first === null) {
    if (second === null) return { x: [1, 0, 0], y: [0, 1, 0] };
    return { x: [second[1], -second[0], 0], y: second };
  }
  const left: Vec3 = [-first[1], first[0], 0];
  return { x: first, y: second !== null && dot(second, left) < 0 ? scale(left, -1) : left };
}

/** What a spatial map that keeps z = 0 does in that plane. */
export function planeOf(t: Transform): PlaneMap {
  const flat = (v: Vec3): Point2 => [v[0], v[1]];
  return { x: flat(t.x), y: flat(t.y), origin: flat(t.origin) };
}
