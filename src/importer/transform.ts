import { along, cross, dot, hypot, ORIGIN, scale, UP, unit, unitOf, type Vec3 } from '../domain/vector.ts';

/** The map `origin + x px + y py + z pz`; x, y, z need be neither unit vectors nor at right angles. */
export interface Transform {
  readonly x: Vec3;
  readonly y: Vec3;
  readonly z: Vec3;
  readonly origin: Vec3;
}

export const AHEAD: Vec3 = [1, 0, 0];
const ASIDE: Vec3 = [0, 1, 0];

export const IDENTITY: Transform = { x: AHEAD, y: ASIDE, z: UP, origin: ORIGIN };

export function mapDirection(t: Transform, d: Vec3): Vec3 {
  return [
    t.x[0] * d[0] + t.y[0] * d[1] + t.z[0] * d[2],
    t.x[1] * d[0] + t.y[1] * d[1] + t.z[1] * d[2],
    t.x[2] * d[0] + t.y[2] * d[1] + t.z[2] * d[2],
  ];
}

export function mapPosition(t: Transform, p: Vec3): Vec3 {
  return [
    t.x[0] * p[0] + t.y[0] * p[1] + t.z[0] * p[2] + t.origin[0],
    t.x[1] * p[0] + t.y[1] * p[1] + t.z[1] * p[2] + t.origin[1],
    t.x[2] * p[0] + t.y[2] * p[1] + t.z[2] * p[2] + t.origin[2],
  ];
}

/** Where the map puts the point (x, y) of its plane z = 0. */
export function mapPlanePoint(t: Transform, x: number, y: number): Vec3 {
  return [
    t.x[0] * x + t.y[0] * y + t.origin[0],
    t.x[1] * x + t.y[1] * y + t.origin[1],
    t.x[2] * x + t.y[2] * y + t.origin[2],
  ];
}

/** `p` moved by what the map makes of the direction `d`. */
export function movedBy(p: Vec3, t: Transform, d: Vec3): Vec3 {
  return [
    p[0] + (t.x[0] * d[0] + t.y[0] * d[1] + t.z[0] * d[2]),
    p[1] + (t.x[1] * d[0] + t.y[1] * d[1] + t.z[1] * d[2]),
    p[2] + (t.x[2] * d[0] + t.y[2] * d[1] + t.z[2] * d[2]),
  ];
}

/** The map that does `inner` first and `outer` after it. */
export function compose(outer: Transform, inner: Transform): Transform {
  if (outer === IDENTITY) return inner;
  if (inner === IDENTITY) return outer;
  return {
    x: mapDirection(outer, inner.x),
    y: mapDirection(outer, inner.y),
    z: mapDirection(outer, inner.z),
    origin: mapPosition(outer, inner.origin),
  };
}

/** The map that undoes `t`; null where `t` flattens space. */
export function inverse(t: Transform): Transform | null {
  const [yz, zx, xy] = [cross(t.y, t.z), cross(t.z, t.x), cross(t.x, t.y)];
  const volume = dot(t.x, yz);
  if (!(Math.abs(volume) > 1e-30)) return null;
  const rows = [scale(yz, 1 / volume), scale(zx, 1 / volume), scale(xy, 1 / volume)] as const;
  const column = (i: 0 | 1 | 2): Vec3 => [rows[0][i], rows[1][i], rows[2][i]];
  const origin: Vec3 = [-dot(rows[0], t.origin), -dot(rows[1], t.origin), -dot(rows[2], t.origin)];
  return { x: column(0), y: column(1), z: column(2), origin };
}

/** The part of `d` at right angles to the unit vector `u`. */
export const across = (d: Vec3, u: Vec3): Vec3 => along(d, u, -dot(d, u));

/**
 * A right-handed frame with its z along `axis` and its x as near `reference` as may be (IfcBuildAxes, ISO 16739).
 * What is missing or without direction takes the standard's own default. The plainest frame of all, which most solids
 * have, is known by its address, so that nothing need be made of it.
 */
export function frame(origin: Vec3, axis: Vec3 | null, reference: Vec3 | null): Transform {
  const isUpright = axis === null || axis === UP;
  if (isUpright && origin === ORIGIN && (reference === null || reference === AHEAD)) return IDENTITY;
  const z = isUpright ? UP : (unit(axis) ?? UP);
  const x = firstAcross(z, reference);
  return { x, y: cross(z, x), z, origin };
}

/** A unit vector across `z`, as near `reference` as may be (IfcFirstProjAxis). */
export function firstAcross(z: Vec3, reference: Vec3 | null): Vec3 {
  return (
    (reference === null ? null : projectedAcross(z, reference)) ??
    projectedAcross(z, AHEAD) ??
    projectedAcross(z, ASIDE) ??
    scale(z, 0)
  );
}

/** `unit(across(unit(reference), z))`, component by component: it is asked for some ten times a member. */
function projectedAcross(z: Vec3, reference: Vec3): Vec3 | null {
  const length = hypot(reference[0], reference[1], reference[2]);
  if (!(length > 0 && length < Number.POSITIVE_INFINITY)) return null;
  const size = 1 / length;
  const x = reference[0] * size;
  const y = reference[1] * size;
  const w = reference[2] * size;
  const lean = -(x * z[0] + y * z[1] + w * z[2]);
  const px = x + lean * z[0];
  const py = y + lean * z[1];
  const pz = w + lean * z[2];
  return px * px + py * py + pz * pz > 1e-12 ? unitOf(px, py, pz) : null;
}
