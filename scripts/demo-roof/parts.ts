import { along, anyNormal, between, cross, dot, subtract, unit, type Vec3 } from '../../src/domain/vector.ts';
import type { WorkPoint } from './hall.ts';
import type { Grade, SectionName } from './sections.ts';

/** What the hall is built of, and how each kind is written. */
export const KINDS = {
  'top chord': { ifc: 'IfcMember', predefined: 'CHORD', grade: 'S355', drawsAxis: true },
  'bottom chord': { ifc: 'IfcMember', predefined: 'CHORD', grade: 'S355', drawsAxis: true },
  diagonal: { ifc: 'IfcMember', predefined: 'STRUT', grade: 'S355', drawsAxis: false },
  post: { ifc: 'IfcMember', predefined: 'POST', grade: 'S235', drawsAxis: false },
  purlin: { ifc: 'IfcMember', predefined: 'PURLIN', grade: 'S235', drawsAxis: false },
  'eaves strut': { ifc: 'IfcBeam', predefined: 'BEAM', grade: 'S235', drawsAxis: true },
  tie: { ifc: 'IfcMember', predefined: 'STRUT', grade: 'S235', drawsAxis: false },
  column: { ifc: 'IfcColumn', predefined: 'COLUMN', grade: 'S355', drawsAxis: true },
  'gable post': { ifc: 'IfcColumn', predefined: 'COLUMN', grade: 'S235', drawsAxis: true },
  'roof brace': { ifc: 'IfcMember', predefined: 'BRACE', grade: 'S355', drawsAxis: false },
  'wall brace': { ifc: 'IfcMember', predefined: 'BRACE', grade: 'S355', drawsAxis: false },
  'gable brace': { ifc: 'IfcMember', predefined: 'BRACE', grade: 'S235', drawsAxis: false },
  'chord brace': { ifc: 'IfcMember', predefined: 'BRACE', grade: 'S355', drawsAxis: false },
  'cross brace': { ifc: 'IfcMember', predefined: 'BRACE', grade: 'S355', drawsAxis: false },
  'canopy frame': { ifc: 'IfcMember', predefined: 'MEMBER', grade: 'S235', drawsAxis: false },
} as const satisfies Record<string, { ifc: string; predefined: string; grade: Grade; drawsAxis: boolean }>;

export type Kind = keyof typeof KINDS;

/** One steel member as drawn, and the work points (in order) that it is meant to pass through. */
export interface Part {
  /** Says where it sits; no two parts share one. */
  readonly name: string;
  /** The fabricator's piece mark; like pieces share one. */
  readonly mark: string;
  readonly kind: Kind;
  readonly section: SectionName;
  readonly truss: number | null;
  readonly axis: readonly [Vec3, Vec3];
  /** Unit direction of the section's z axis. */
  readonly zAxis: Vec3;
  readonly through: readonly WorkPoint[];
}

export interface GussetPlate {
  readonly name: string;
  readonly truss: number;
  /** Middle of the plate. */
  readonly at: Vec3;
  /** Direction of its length; the plate stands in its truss's plane. */
  readonly direction: Vec3;
  readonly length: number;
  readonly height: number;
}

export interface HallModel {
  readonly title: string;
  readonly parts: readonly Part[];
  readonly plates: readonly GussetPlate[];
  /** Tops of the footings. */
  readonly footings: readonly WorkPoint[];
}

export const directionOf = (from: Vec3, to: Vec3): Vec3 => unit(subtract(to, from)) as Vec3;

/**
 * How far short of the work point a detailer stops a member so that it clears the one it meets:
 * `half` is that one's half extent, `gap` is left between the two along the member, mm.
 */
export function setback(member: Vec3, met: Vec3, half: number, gap: number): number {
  const cosine = dot(member, met);
  return half / Math.sqrt(1 - cosine * cosine) + gap;
}

/** A member between two work points, cut back at both ends (negative: run past them). */
export function span(
  label: Pick<Part, 'name' | 'mark' | 'kind' | 'section'> & { readonly truss?: number; readonly zAxis?: Vec3 },
  from: WorkPoint,
  to: WorkPoint,
  cut: readonly [number, number],
  between: readonly WorkPoint[] = [],
): Part {
  const direction = directionOf(from.at, to.at);
  return {
    truss: null,
    zAxis: anyNormal(direction),
    ...label,
    axis: [along(from.at, direction, cut[0]), along(to.at, direction, -cut[1])],
    through: [from, ...between, to],
  };
}

/** The normal of the vertical plane through `direction` turned upward: a section's z axis that stands upright on it. */
export function uprightOn(direction: Vec3): Vec3 {
  return cross(direction, anyNormal(direction));
}

export const middle = (a: Vec3, b: Vec3): Vec3 => between(a, b, 0.5);
