import type { Member } from '../../domain/member.ts';
import { distance } from '../../domain/vector.ts';
import type { MemberSelector } from '../types.ts';
import { exactTest, textTest } from './pattern.ts';
import { valueTest } from './value-test.ts';
import { ANGLE_PRECISION, isWithin, LENGTH_PRECISION } from './within-range.ts';

type MemberTest = (member: Member) => boolean;

/**
 * Indices, ascending, of the members that any of the selectors catches. All keys of one selector must hold.
 * Texts are compared whole, without regard to case, and take `*`; GlobalIds keep their case. A class takes its
 * StandardCase form with it. Ranges include their ends to within 0.1 mm.
 */
export function selectMembers(members: readonly Member[], selectors: readonly MemberSelector[]): number[] {
  const tests = selectors.map(memberTest);
  return members.flatMap((member, i) => (tests.some((test) => test(member)) ? [i] : []));
}

const TEXTS = {
  predefinedType: (member) => member.predefinedType,
  tag: (member) => member.tag,
  name: (member) => member.name,
  type: (member) => member.type,
  assembly: (member) => member.assembly,
  storey: (member) => member.storey,
  layer: (member) => member.layer,
  section: (member) => member.section?.name ?? null,
  material: (member) => member.material.name,
} as const satisfies Record<string, (member: Member) => string | null>;

const length = ({ axis }: Member): number => distance(axis[0], axis[1]);

const RANGES = {
  level: { of: ({ axis }: Member) => (axis[0][2] + axis[1][2]) / 2, precision: LENGTH_PRECISION },
  length: { of: length, precision: LENGTH_PRECISION },
  slope: { of: slope, precision: ANGLE_PRECISION },
} as const;

function slope({ axis: [start, end] }: Member): number {
  return Math.atan2(Math.abs(end[2] - start[2]), Math.hypot(end[0] - start[0], end[1] - start[1]));
}

/** Makes the test of one selector, its patterns prepared once. */
export function memberTest(selector: MemberSelector): MemberTest {
  const tests: MemberTest[] = [];
  for (const [key, textOf] of Object.entries(TEXTS)) {
    const pattern = selector[key as keyof typeof TEXTS];
    if (pattern === undefined) continue;
    const fits = textTest(pattern);
    tests.push((member) => fits(textOf(member)));
  }
  for (const [key, { of, precision }] of Object.entries(RANGES)) {
    const range = selector[key as keyof typeof RANGES];
    if (range !== undefined) tests.push((member) => isWithin(of(member), range, precision));
  }
  if (selector.globalId !== undefined) {
    const fits = exactTest(selector.globalId);
    tests.push((member) => fits(member.globalId));
  }
  if (selector.class !== undefined) {
    const fits = textTest(selector.class);
    tests.push((member) => fits(member.class) || fits(withoutStandardCase(member.class)));
  }
  if (selector.group !== undefined) {
    const fits = textTest(selector.group);
    tests.push((member) => member.facts?.groups.some(fits) ?? false);
  }
  for (const [name, wanted] of Object.entries(selector.property ?? {})) {
    const fits = valueTest(wanted);
    tests.push((member) => member.facts?.property(name).some(fits) ?? false);
  }
  if (selector.not !== undefined) {
    const holds = memberTest(selector.not);
    tests.push((member) => !holds(member));
  }
  return (member) => tests.every((test) => test(member));
}

/** IfcBeamStandardCase is a subtype of IfcBeam, and so for columns and members (ISO 16739-1:2018). */
export const withoutStandardCase = (ifcClass: string): string => ifcClass.replace(/StandardCase$/iu, '');
