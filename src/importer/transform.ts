import { along, cross, dot, ORIGIN, scale, unit, type Vec3 } from '../domain/vector.ts';

/** The map `origin + x px + y py + z pz`; x, y, z need be neither unit vectors nor at right angles. */
export interface Transform {
  readonly x: Vec3;
  readonly y: Vec3;
  readonly z: Vec3;
  readonly origin: Vec3;
}

export const IDENTITY: Transform = { x: [1, 0, 0], y: [0, 1, 0], z: [0, 0, 1], origin: ORIGIN };

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
 * What is missing or without direction takes the standard's own default.
 */
export function frame(origin: Vec3, axis: Vec3 | null, reference: Vec3 | null): Transform {
  const z = (axis === null ? null : unit(axis)) ?? ([0, 0, 1] as const);
  const x = firstAcross(z, reference);
  return { x, y: cross(z, x), z, origin };
}

/** A unit vector across `z`, as near `reference` as may be (IfcFirstProjAxis). */
export function firstAcross(z: Vec3, reference: Vec3 | null): Vec3 {
  return (
    (reference === null ? null : projectedAcross(z, reference)) ??
    projectedAcross(z, X) ??
    projectedAcross(z, Y) ??
    scale(z, 0)
  );
}

const X: Vec3 = [1, 0, 0];
const Y: Vec3 = [0, 1, 0];

function projectedAcross(z: Vec3, reference: Vec3): Vec3 | null {
  const direction = unit(reference);
  if (direction === null) return null;
  const projected = across(direction, z);
  return dot(projected, projected) > 1e-12 ? unit(projected) : null;
}
