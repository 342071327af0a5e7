/** St. Venant torsion constants (m4), dimensions in metres. */

/**
 * Rolled I, U, T and L shapes: rectangles plus the discs inscribed at their junctions, less the loss at free ends.
 * El Darwish & Johnston, Torsion of structural shapes, J. Struct. Div. ASCE 91 (1965); coefficients from memory.
 */
export function torsionOfI(depth: number, top: Flange, bottom: Flange, web: number, fillet: number): number {
  const clear = depth - top.thickness - bottom.thickness;
  return (clear * web ** 3) / 3 + flangeOnWeb(top, web, fillet) + flangeOnWeb(bottom, web, fillet);
}

export interface Flange {
  readonly width: number;
  readonly thickness: number;
}

function flangeOnWeb({ width: b, thickness: t }: Flange, web: number, fillet: number): number {
  return (b * t ** 3) / 3 + teeJunction(web, t, fillet) - 0.21 * t ** 4;
}

/** A web that meets the middle of a flange. */
function teeJunction(web: number, flange: number, r: number): number {
  const ratio = web / flange;
  const alpha =
    -0.042 + 0.2204 * ratio + (0.1355 * r) / flange - (0.0865 * r * web) / flange ** 2 - 0.0725 * ratio ** 2;
  const disc = ((flange + r) ** 2 + (r + 0.25 * web) * web) / (2 * r + flange);
  return Math.max(0, alpha) * disc ** 4;
}

/** A web that meets the edge of a flange. */
function cornerJunction(web: number, flange: number, r: number): number {
  const ratio = web / flange;
  const alpha =
    -0.0908 + 0.2621 * ratio + (0.1231 * r) / flange - (0.0752 * web * r) / flange ** 2 - 0.0945 * ratio ** 2;
  const disc = 2 * (3 * r + web + flange - Math.sqrt(2 * (2 * r + web) * (2 * r + flange)));
  return Math.max(0, alpha) * disc ** 4;
}

export function torsionOfU(depth: number, flange: Flange, web: number, fillet: number): number {
  const { width: b, thickness: t } = flange;
  const clear = depth - 2 * t;
  return (2 * b * t ** 3 + clear * web ** 3) / 3 + 2 * cornerJunction(web, t, fillet) - 0.42 * t ** 4;
}

export function torsionOfT(depth: number, flange: Flange, web: number, fillet: number): number {
  const clear = depth - flange.thickness;
  return (clear * web ** 3) / 3 - 0.105 * web ** 4 + flangeOnWeb(flange, web, fillet);
}

export function torsionOfL(depth: number, width: number, thickness: number, fillet: number): number {
  const t = thickness;
  return ((depth + width - t) * t ** 3) / 3 + cornerJunction(t, t, fillet) - 0.21 * t ** 4;
}

/** Hollow rectangles: EN 10210-2:2006 Annex A (A.3). */
export function torsionOfRhs(depth: number, width: number, t: number, outer: number, inner: number): number {
  const corner = ((outer + inner) / 2) * (4 - Math.PI);
  const middleLine = 2 * (depth - t + (width - t)) - 2 * corner;
  const enclosed = (depth - t) * (width - t) - ((outer + inner) / 2) * corner;
  return (t ** 3 * middleLine) / 3 + (4 * enclosed ** 2 * t) / middleLine;
}

/** Solid rectangle: Roark's formulas for stress and strain, table of torsion, to 4 % (from memory). */
export function torsionOfRectangle(a: number, b: number): number {
  const long = Math.max(a, b);
  const short = Math.min(a, b);
  return long * short ** 3 * (1 / 3 - 0.21 * (short / long) * (1 - short ** 4 / (12 * long ** 4)));
}

/** Solid ellipse with half axes a and b: exact (St. Venant). */
export function torsionOfEllipse(a: number, b: number): number {
  return (Math.PI * a ** 3 * b ** 3) / (a ** 2 + b ** 2);
}

/** Any solid outline: St. Venant's estimate A^4 / (40 Ip), good to some 10 % for compact shapes. */
export function torsionOfSolid(area: number, polarInertia: number): number {
  return area ** 4 / (40 * polarInertia);
}

/** Any tube with one void: Bredt's 4 Am^2 / (s / t), with the mean of both rings and the mean wall. */
export function torsionOfTube(outer: RingSize, inner: RingSize): number {
  const enclosed = (outer.area + inner.area) / 2;
  const middleLine = (outer.length + inner.length) / 2;
  return (4 * enclosed ** 2 * (outer.area - inner.area)) / middleLine ** 2;
}

interface RingSize {
  readonly area: number;
  readonly length: number;
}
