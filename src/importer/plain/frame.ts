import { hypot } from '../../domain/vector.ts';
import { IDENTITY, type Transform } from '../transform.ts';
import type { Triple } from './triple.ts';

/**
 * The arithmetic of `transform.ts`, term by term and so to the last bit, on numbers that stand in arrays made once: what it
 * saves is some 4 kB of short-lived vectors a member, whose collection took as long as the reading itself.
 */

/** Where the three directions and the origin of a frame stand in its numbers. */
export const [X, Y, Z, ORIGIN] = [0, 3, 6, 9] as const;

const IDENTITY_NUMBERS = new Float64Array([1, 0, 0, 0, 1, 0, 0, 0, 1, 0, 0, 0]);

/** A Transform in one array. */
export class Frame {
  readonly at = new Float64Array(12);
  isIdentity = false;

  setTransform(transform: Transform): void {
    const { x, y, z, origin } = transform;
    [x, y, z, origin].forEach((vector, i) => {
      this.at.set(vector, 3 * i);
    });
    this.isIdentity = transform === IDENTITY;
  }

  setIdentity(): void {
    for (let k = 0; k < this.at.length; k++) this.at[k] = IDENTITY_NUMBERS[k]!;
    this.isIdentity = true;
  }

  /** As `frame`; null for what is left out. */
  setAxes(origin: Triple, axis: Triple | null, reference: Triple | null): void {
    const { at } = this;
    const isUpright = axis === null || axis.is === 'up';
    if (isUpright && origin.is === 'origin' && (reference === null || reference.is === 'ahead')) {
      this.setIdentity();
      return;
    }
    this.isIdentity = false;
    at[ORIGIN] = origin.at[0]!;
    at[ORIGIN + 1] = origin.at[1]!;
    at[ORIGIN + 2] = origin.at[2]!;
    if (isUpright || !unitInto(at, Z, axis.at[0]!, axis.at[1]!, axis.at[2]!)) {
      at[Z] = 0;
      at[Z + 1] = 0;
      at[Z + 2] = 1;
    }
    if (reference === null) firstAcrossInto(at, X, at, Z, 1, 0, 0);
    else firstAcrossInto(at, X, at, Z, reference.at[0]!, reference.at[1]!, reference.at[2]!);
    at[Y] = at[Z + 1]! * at[X + 2]! - at[Z + 2]! * at[X + 1]!;
    at[Y + 1] = at[Z + 2]! * at[X]! - at[Z]! * at[X + 2]!;
    at[Y + 2] = at[Z]! * at[X + 1]! - at[Z + 1]! * at[X]!;
  }

  /** As `compose`. */
  setComposed(outer: Frame, inner: Frame): void {
    const { at } = this;
    if (outer.isIdentity || inner.isIdentity) {
      const other = outer.isIdentity ? inner : outer;
      for (let k = 0; k < at.length; k++) at[k] = other.at[k]!;
      this.isIdentity = other.isIdentity;
      return;
    }
    this.isIdentity = false;
    const o = outer.at;
    const i = inner.at;
    for (let column = X; column <= Z; column += 3) {
      const a = i[column]!;
      const b = i[column + 1]!;
      const c = i[column + 2]!;
      at[column] = o[X]! * a + o[Y]! * b + o[Z]! * c;
      at[column + 1] = o[X + 1]! * a + o[Y + 1]! * b + o[Z + 1]! * c;
      at[column + 2] = o[X + 2]! * a + o[Y + 2]! * b + o[Z + 2]! * c;
    }
    positionInto(at, ORIGIN, outer, i[ORIGIN]!, i[ORIGIN + 1]!, i[ORIGIN + 2]!);
  }
}

/** As `mapPosition`. */
export function positionInto(into: Float64Array, to: number, { at }: Frame, x: number, y: number, z: number): void {
  into[to] = at[X]! * x + at[Y]! * y + at[Z]! * z + at[ORIGIN]!;
  into[to + 1] = at[X + 1]! * x + at[Y + 1]! * y + at[Z + 1]! * z + at[ORIGIN + 1]!;
  into[to + 2] = at[X + 2]! * x + at[Y + 2]! * y + at[Z + 2]! * z + at[ORIGIN + 2]!;
}

/** As `mapPlanePoint`. */
export function planePointInto(into: Float64Array, to: number, { at }: Frame, x: number, y: number): void {
  into[to] = at[X]! * x + at[Y]! * y + at[ORIGIN]!;
  into[to + 1] = at[X + 1]! * x + at[Y + 1]! * y + at[ORIGIN + 1]!;
  into[to + 2] = at[X + 2]! * x + at[Y + 2]! * y + at[ORIGIN + 2]!;
}

/** As `movedBy`, from the point that stands at `from` in `into`. */
export function movedInto(
  into: Float64Array,
  to: number,
  from: number,
  { at }: Frame,
  a: number,
  b: number,
  c: number,
): void {
  into[to] = into[from]! + (at[X]! * a + at[Y]! * b + at[Z]! * c);
  into[to + 1] = into[from + 1]! + (at[X + 1]! * a + at[Y + 1]! * b + at[Z + 1]! * c);
  into[to + 2] = into[from + 2]! + (at[X + 2]! * a + at[Y + 2]! * b + at[Z + 2]! * c);
}

/** As `unitOf`; false where (x, y, z) has no direction. */
export function unitInto(into: Float64Array, to: number, x: number, y: number, z: number): boolean {
  const length = hypot(x, y, z);
  if (!(length > 0 && length < Number.POSITIVE_INFINITY)) return false;
  const k = 1 / length;
  into[to] = x * k;
  into[to + 1] = y * k;
  into[to + 2] = z * k;
  return true;
}

/** As `firstAcross`, across the unit vector at `u` in `of`. */
export function firstAcrossInto(
  into: Float64Array,
  to: number,
  of: Float64Array,
  u: number,
  x: number,
  y: number,
  z: number,
): void {
  if (projectedInto(into, to, of, u, x, y, z)) return;
  if (projectedInto(into, to, of, u, 1, 0, 0) || projectedInto(into, to, of, u, 0, 1, 0)) return;
  for (let i = 0; i < 3; i++) into[to + i] = of[u + i]! * 0;
}

/** As `projectedAcross`. */
function projectedInto(
  into: Float64Array,
  to: number,
  of: Float64Array,
  u: number,
  rx: number,
  ry: number,
  rz: number,
): boolean {
  const length = hypot(rx, ry, rz);
  if (!(length > 0 && length < Number.POSITIVE_INFINITY)) return false;
  const size = 1 / length;
  const x = rx * size;
  const y = ry * size;
  const w = rz * size;
  const lean = -(x * of[u]! + y * of[u + 1]! + w * of[u + 2]!);
  const px = x + lean * of[u]!;
  const py = y + lean * of[u + 1]!;
  const pz = w + lean * of[u + 2]!;
  return px * px + py * py + pz * pz > 1e-12 && unitInto(into, to, px, py, pz);
}
