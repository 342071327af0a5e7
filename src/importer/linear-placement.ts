import { add, along, cross, scale, unit, type Vec3 } from '../domain/vector.ts';
import { asNumber, asRef } from '../step/values.ts';
import { readCurve } from './geometry/curve.ts';
import { pointAlong } from './geometry/directrix.ts';
import { noAxis } from './not-read.ts';
import type { Reading } from './reading.ts';
import { across, type Transform } from './transform.ts';

/**
 * IfcAxis2PlacementLinear: x along the basis curve unless a direction is given, z upright, y to the left; the point is moved
 * by its offsets.
 * @throws NotRead where the basis curve is not read or the point is not given by a distance along it.
 */
export function readLinearAxes(reading: Reading, id: number): Transform {
  const [location, axis, reference] = reading.args(id);
  const point = asRef(location);
  if (point === null || reading.typeOf(point) !== 'IFCPOINTBYDISTANCEEXPRESSION') {
    throw noAxis('it is placed along a curve by something else than a distance');
  }
  const [distanceAlong, lateral, vertical, longitudinal, basis] = reading.args(point);
  const curve = asRef(basis);
  const start = curve === null ? null : pointAlong(readCurve(reading, curve), reading.length(distanceAlong));
  if (start === null || asNumber(distanceAlong) === null) throw noAxis('the curve it is placed along has no length');
  const own = uprightFrame(start.point, start.tangent, null);
  const ahead = along(own.origin, own.x, reading.lengthOrZero(longitudinal));
  const aside = along(ahead, own.y, reading.lengthOrZero(lateral));
  const at = along(aside, own.z, reading.lengthOrZero(vertical));
  const x = reading.direction(reference);
  const inWorld = x === null ? own.x : add(add(scale(own.x, x[0]), scale(own.y, x[1])), scale(own.z, x[2]));
  return uprightFrame(at, inWorld, reading.direction(axis));
}

/** x along `tangent` and z as near `up` as may be. */
function uprightFrame(origin: Vec3, tangent: Vec3, up: Vec3 | null): Transform {
  const x = unit(tangent) ?? ([1, 0, 0] as const);
  const z = unit(across(up ?? [0, 0, 1], x)) ?? unit(across([0, 1, 0], x)) ?? ([0, 0, 1] as const);
  return { x, y: cross(z, x), z, origin };
}
