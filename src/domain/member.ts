import { distance, type Vec3 } from './vector.ts';

export type SectionShape = 'I' | 'U' | 'L' | 'T' | 'C' | 'Z' | 'RHS' | 'CHS' | 'rectangle' | 'circle' | 'other';

/** How a hollow section was made, which decides its corners and its buckling curve. */
export interface Making {
  readonly finish: 'hot' | 'cold';
  /** Nothing says so; cold formed is the safe side. */
  readonly isAssumed: boolean;
}

/** A cross section, SI (m2, m4, m6). y is the profile's horizontal and z its vertical centroidal axis. */
export interface Section {
  readonly name: string;
  readonly shape: SectionShape;
  readonly area: number;
  /** Integral of z^2: about the horizontal centroidal axis. */
  readonly inertiaY: number;
  /** Integral of y^2: about the vertical centroidal axis. */
  readonly inertiaZ: number;
  readonly inertiaYZ: number;
  readonly inertiaMajor: number;
  readonly inertiaMinor: number;
  /** St. Venant torsion constant. */
  readonly torsion: number;
  /** Warping constant; 0 for closed and solid shapes. */
  readonly warping: number;
  readonly from: 'profile' | 'name' | 'properties' | 'brief' | 'mesh';
  /** Extent of the outline along z, m. */
  readonly depth: number;
  /** Extent of the outline along y, m. */
  readonly width: number;
  /** Of the thickest part, m: strengths fall with it. */
  readonly thickness: number;
  /** Of hollow sections known by their designation; left out where it is not known or not a question. */
  readonly making?: Making;
}

/** SI: Pa, kg/m3, 1/K. Yield and ultimate strength are null where the grade is not known. */
export interface Material {
  readonly name: string;
  readonly elasticModulus: number;
  readonly density: number;
  readonly expansion: number;
  readonly yieldStrength: number | null;
  readonly ultimateStrength: number | null;
  readonly from: 'properties' | 'name' | 'brief' | 'default';
}

/** What else the model says of an element; read from the file when it is asked for, since most is never wanted. */
export interface ElementFacts {
  /** Names of the groups, systems and zones it is assigned to. */
  readonly groups: readonly string[];
  /**
   * The values of "Pset_MemberCommon.Reference" or "Qto_BeamBaseQuantities.Length" ("*.Reference": of any set), the
   * element's own before its type's; numbers in SI; empty where there is none.
   */
  property(name: string): readonly (string | number | boolean)[];
}

/** m, along the bow of a bent member. */
export function developedLength({ axis, bow }: Pick<Member, 'axis' | 'bow'>): number {
  const points = bow ?? axis;
  return points.slice(1).reduce((sum, point, i) => sum + distance(points[i], point), 0);
}

/**
 * An element of the model read as a line of force. All lengths in metres, in the model's own world axes. Members of a file
 * look most of this up when asked: `{ ...recordOf(member) }` copies one, `{ ...member }` does not.
 */
export interface Member {
  readonly globalId: string;
  /** 0, or the order among several members read from one element. */
  readonly part: number;
  readonly name: string | null;
  readonly tag: string | null;
  readonly class: string;
  readonly predefinedType: string | null;
  readonly type: string | null;
  /** Name of the assembly the element is part of. */
  readonly assembly: string | null;
  /** Class of the element it is part of, e.g. IfcElementAssembly, IfcStair. */
  readonly partOf: string | null;
  readonly storey: string | null;
  readonly layer: string | null;
  readonly axisFrom: 'axis' | 'extrusion' | 'swept' | 'mesh' | 'analysis-view';
  readonly axis: readonly [Vec3, Vec3];
  /** Of a bent member: points along its line from one end of `axis` to the other, near enough that straight pieces stand for it. */
  readonly bow?: readonly Vec3[] | null;
  /** The centroid line of the body, where `axis` is drawn apart from the body and a body shows it. */
  readonly centroidAxis?: readonly [Vec3, Vec3] | null;
  /** Unit direction of the section's z axis; at right angles to the member's axis. */
  readonly zAxis: Vec3;
  readonly section: Section | null;
  readonly material: Material;
  readonly facts?: ElementFacts;
}

/** A member as a plain record, with all that a member of a file looks up when asked. */
export function recordOf(member: Member): Member {
  return {
    globalId: member.globalId,
    part: member.part,
    name: member.name,
    tag: member.tag,
    class: member.class,
    predefinedType: member.predefinedType,
    type: member.type,
    assembly: member.assembly,
    partOf: member.partOf,
    storey: member.storey,
    layer: member.layer,
    axisFrom: member.axisFrom,
    axis: member.axis,
    ...(member.bow ? { bow: member.bow } : {}),
    centroidAxis: member.centroidAxis ?? null,
    zAxis: member.zAxis,
    section: member.section,
    material: member.material,
    ...(member.facts === undefined ? {} : { facts: member.facts }),
  };
}
