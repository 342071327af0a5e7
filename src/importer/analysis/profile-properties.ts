import type { Section } from '../../domain/member.ts';
import type { StepFile } from '../../step/step-file.ts';
import { asRef, asRefs, asString, StepTyped, type StepValue } from '../../step/values.ts';
import type { Reading } from '../reading.ts';
import { sectionOfNumbers } from '../sections/stated-sections.ts';
import type { UnitKind } from '../unit-kinds.ts';

/** What IfcRelAssociatesProfileProperties (IFC2X3) gives a member: numbers, and how the profile is turned. */
export interface ProfileAssociation {
  readonly properties: number;
  /** IfcPlaneAngleMeasure or a reference to an IfcDirection; null where it is left out. */
  readonly orientation: StepValue;
}

/** By member. */
export function profileAssociations(file: StepFile): Map<number, ProfileAssociation> {
  const found = new Map<number, ProfileAssociation>();
  for (const id of file.idsOf('IFCRELASSOCIATESPROFILEPROPERTIES')) {
    const args = file.args(id);
    const properties = asRef(args[5]);
    if (properties === null) continue;
    for (const member of asRefs(args[4])) found.set(member, { properties, orientation: args[7] ?? null });
  }
  return found;
}

/** The profile that the properties are of; null where they stand alone. */
export const profileOf = (reading: Reading, properties: number): number | null => asRef(reading.args(properties)[1]);

/** A section of bare numbers (IfcGeneralProfileProperties and its subtypes of IFC2X3); null where there is no area. */
export function sectionOfProperties(reading: Reading, properties: number): Section | null {
  const args = reading.args(properties);
  const number = (i: number, kind: UnitKind): number => reading.quantity(args[i], kind) ?? 0;
  const thickness = number(5, 'length');
  return sectionOfNumbers(asString(args[0]) ?? 'Unnamed profile', {
    ...(thickness > 0 ? { thickness } : {}),
    area: number(6, 'area'),
    torsion: number(7, 'secondMoment'),
    inertiaYZ: number(8, 'secondMoment'),
    inertiaY: number(9, 'secondMoment'),
    inertiaZ: number(10, 'secondMoment'),
    warping: number(11, 'warpingConstant'),
  });
}

/** The turn of the profile about the member's axis, radians; null where the orientation is a direction or left out. */
export const turnOf = (reading: Reading, orientation: StepValue): number | null =>
  typeof orientation === 'number' || orientation instanceof StepTyped ? reading.angle(orientation) : null;
