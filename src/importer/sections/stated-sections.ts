import type { Section } from '../../domain/member.ts';
import { asRef, asRefs, asString } from '../../step/values.ts';
import type { Remark } from '../findings-log.ts';
import { whose } from '../findings-log.ts';
import { propertyNumber } from '../property-number.ts';
import type { Reading } from '../reading.ts';
import type { UnitKind } from '../unit-kinds.ts';

/** Numbers that the file states of a profile, SI. */
export interface StatedSection {
  area?: number;
  inertiaY?: number;
  inertiaZ?: number;
  inertiaYZ?: number;
  torsion?: number;
  warping?: number;
  thickness?: number;
}

type Key = keyof StatedSection;

/** Names of Pset_ProfileMechanical, which are those of the attributes of IFC2X3; there by their positions. */
const NAMED: Readonly<Record<string, readonly [key: Key, kind: UnitKind, at2x3: number]>> = {
  MAXIMUMPLATETHICKNESS: ['thickness', 'length', 5],
  CROSSSECTIONAREA: ['area', 'area', 6],
  TORSIONALCONSTANTX: ['torsion', 'secondMoment', 7],
  MOMENTOFINERTIAYZ: ['inertiaYZ', 'secondMoment', 8],
  MOMENTOFINERTIAY: ['inertiaY', 'secondMoment', 9],
  MOMENTOFINERTIAZ: ['inertiaZ', 'secondMoment', 10],
  WARPINGCONSTANT: ['warping', 'warpingConstant', 11],
};

const TYPES_2X3 = [
  'IFCGENERALPROFILEPROPERTIES',
  'IFCSTRUCTURALPROFILEPROPERTIES',
  'IFCSTRUCTURALSTEELPROFILEPROPERTIES',
] as const;

/** By profile: what its property instances state. Of doubled numbers the first counts; zeros say nothing. */
export function readStatedSections(reading: Reading): ReadonlyMap<number, StatedSection> {
  const found = new Map<number, StatedSection>();
  const put = (profile: number | null, key: Key, number: number | null) => {
    if (profile === null || number === null || number === 0) return;
    const stated = found.get(profile) ?? {};
    stated[key] ??= number;
    found.set(profile, stated);
  };
  const { file } = reading;
  for (const id of TYPES_2X3.flatMap((type) => [...file.idsOf(type)])) {
    const args = file.args(id);
    for (const [key, kind, at] of Object.values(NAMED)) {
      put(asRef(args[1]), key, propertyNumber(reading, args[at], null, kind));
    }
  }
  for (const id of file.idsOf('IFCPROFILEPROPERTIES')) {
    const args = file.args(id);
    for (const property of asRefs(args[2])) {
      if (file.typeOf(property) !== 'IFCPROPERTYSINGLEVALUE') continue;
      const [name, , value, unit] = file.args(property);
      const known = NAMED[(asString(name) ?? '').trim().toUpperCase()];
      if (known !== undefined) put(asRef(args[3]), known[0], propertyNumber(reading, value, asRef(unit), known[1]));
    }
  }
  return found;
}

/** A section of numbers alone; null where no area is among them. */
export function sectionOfNumbers(name: string, stated: StatedSection): Section | null {
  const { area, inertiaY = 0, inertiaZ = 0, inertiaYZ = 0, torsion = 0, warping = 0 } = stated;
  if (area === undefined || !(area > 0)) return null;
  const mean = (inertiaY + inertiaZ) / 2;
  const radius = Math.hypot((inertiaY - inertiaZ) / 2, inertiaYZ);
  // No outline is known: the sides of the rectangle with the same radii of gyration.
  const [depth, width] = [Math.sqrt((12 * inertiaY) / area), Math.sqrt((12 * inertiaZ) / area)];
  return {
    name,
    shape: 'other',
    area,
    inertiaY,
    inertiaZ,
    inertiaYZ,
    inertiaMajor: mean + radius,
    inertiaMinor: Math.max(0, mean - radius),
    torsion,
    warping,
    from: 'properties',
    depth,
    width,
    thickness: stated.thickness ?? Math.min(depth, width),
  };
}

/** A contradiction of more than this is said. */
const FARTHEST_APART = 0.05;

const COMPARED = [
  ['area', 'area'],
  ['inertiaY', 'second moment about y'],
  ['inertiaZ', 'second moment about z'],
] as const;

/** Where the numbers stated of a profile and its outline contradict each other; null where they do not. */
export function disagreement(section: Section, stated: StatedSection): Remark | null {
  // Some exporters change y and z about; that is no other section.
  const swapped: StatedSection = { ...stated };
  delete swapped.inertiaY;
  delete swapped.inertiaZ;
  if (stated.inertiaZ !== undefined) swapped.inertiaY = stated.inertiaZ;
  if (stated.inertiaY !== undefined) swapped.inertiaZ = stated.inertiaY;
  const worst = worstOf(section, stated);
  if (worst === null || worstOf(section, swapped) === null) return null;
  const [what, ratio] = worst;
  const percent = ratio < 10 ? `${Math.round(ratio * 100)} %` : `${Number(ratio.toPrecision(2))} times`;
  return {
    code: 'section-disagrees',
    key: section.name,
    say: (count, first) =>
      `${whose(count, first, 'have', 'has')} the profile '${section.name}', whose stated ${what} is ${percent} of its outline's; the outline is taken.`,
    advice: 'Correct the profile or its properties in the model, or name the section in the brief.',
  };
}

function worstOf(section: Section, stated: StatedSection): readonly [what: string, ratio: number] | null {
  let worst: readonly [string, number] | null = null;
  let apart = Math.log1p(FARTHEST_APART);
  for (const [key, what] of COMPARED) {
    const ratio = stated[key] === undefined ? 1 : stated[key] / section[key];
    const distance = ratio > 0 ? Math.abs(Math.log(ratio)) : Number.POSITIVE_INFINITY;
    if (distance > apart) [worst, apart] = [[what, ratio], distance];
  }
  return worst;
}
