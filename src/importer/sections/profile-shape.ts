import type { Making, Section, SectionShape } from '../../domain/member.ts';
import { noSection } from '../not-read.ts';
import { type Outline, type Point2, piecesOf } from './outline.ts';
import { outlineProperties, type PlaneProperties, ringSize } from './outline-properties.ts';
import { torsionOfSolid, torsionOfTube } from './torsion.ts';

/** A cross section as drawn: its outline in its own plane (metres; x is the section's y, y is its z) and what is known of it. */
export interface ProfileShape {
  readonly name: string;
  readonly shape: SectionShape;
  readonly outline: Outline;
  /** St. Venant constant (m4) where a closed form is known; null where it is to be estimated from the outline. */
  readonly torsion: number | null;
  /** Warping constant (m6); 0 for closed, solid and unknown shapes, which is the safe side in torsional buckling. */
  readonly warping: number;
  /** Of the thickest part, m; left out where it is to be estimated from the outline. */
  readonly thickness?: number;
  /** Of hollow sections known by their designation. */
  readonly making?: Making;
  /** In the shape's own plane; left out where it is the centroid, as of closed and solid shapes, or unknown. */
  readonly shearCentre?: Point2;
}

/** @throws NotRead (no-section) where the outline encloses no area, or so much that its moments are no numbers. */
export function propertiesOf(shape: ProfileShape): PlaneProperties {
  const properties = outlineProperties(shape.outline);
  if (properties === null) throw noSection(`the outline of profile '${shape.name}' encloses no area`);
  if (!Number.isFinite(properties.secondX + properties.secondY + properties.productXY)) {
    throw noSection(`the profile '${shape.name}' is larger than anything that is built`);
  }
  return properties;
}

export function sectionOf(shape: ProfileShape): Section {
  const plane = propertiesOf(shape);
  const { area, secondX: inertiaY, secondY: inertiaZ, productXY: inertiaYZ } = plane;
  const mean = (inertiaY + inertiaZ) / 2;
  const radius = Math.hypot((inertiaY - inertiaZ) / 2, inertiaYZ);
  return {
    name: shape.name,
    shape: shape.shape,
    area,
    inertiaY,
    inertiaZ,
    inertiaYZ,
    inertiaMajor: mean + radius,
    inertiaMinor: Math.max(0, mean - radius),
    torsion: shape.torsion ?? estimatedTorsion(shape.outline, area, inertiaY + inertiaZ),
    warping: shape.warping,
    from: 'profile',
    depth: plane.max[1] - plane.min[1],
    width: plane.max[0] - plane.min[0],
    thickness: shape.thickness ?? meanThickness(shape.outline, area),
    ...(shape.making === undefined ? {} : { making: shape.making }),
  };
}

export const centroidOf = (shape: ProfileShape): Point2 => propertiesOf(shape).centroid;

function estimatedTorsion(outline: Outline, area: number, polar: number): number {
  const hole = outline.voids[0];
  if (outline.voids.length === 1 && hole !== undefined) return torsionOfTube(ringSize(outline.outer), ringSize(hole));
  return torsionOfSolid(area, polar);
}

/** That of a strip as long as half the outline's way round: exact for bent strips and for tubes. */
function meanThickness(outline: Outline, area: number): number {
  const rings = piecesOf(outline).flatMap(({ outer, voids }) => [outer, ...voids]);
  const around = rings.reduce((sum, ring) => sum + ringSize(ring).length, 0);
  return (2 * area) / around;
}

/** '200x100x6.3' of metres: as sections are called. */
export const inMillimetres = (...lengths: readonly number[]): string =>
  lengths.map((length) => String(Math.round(length * 1e5) / 100)).join('x');

/** @throws NotRead (no-section) naming the first of `lengths` (metres) that is no positive number. */
export function requirePositive(lengths: Readonly<Record<string, number>>): void {
  for (const [what, length] of Object.entries(lengths)) {
    if (!(length > 0 && Number.isFinite(length))) throw noSection(`its ${what} is ${formatted(length)}`);
  }
}

const formatted = (length: number): string =>
  Number.isFinite(length) ? `${inMillimetres(length)} mm` : 'missing or no number';

/** @throws NotRead (no-section) with `reason` and the `lengths` (metres) that it speaks of, where these cannot be those of such a shape. */
export function requireShape(holds: boolean, reason: string, lengths: Readonly<Record<string, number>> = {}): void {
  if (holds) return;
  const told = Object.entries(lengths).map(([what, length]) => `${what} ${formatted(length)}`);
  throw noSection(told.length === 0 ? reason : `${reason} (${told.join(', ')})`);
}
