import type { SectionShape } from '../../domain/member.ts';
import { AMERICAN } from './american-grades.ts';
import { ASIAN } from './asian-grades.ts';
import { COLD_FORMING, EUROPEAN, FORMER } from './european-grades.ts';
import type { Grade } from './grade.ts';

const HOLLOW: ReadonlySet<SectionShape> = new Set<SectionShape>(['CHS', 'RHS']);

/**
 * The steel grade that `name` contains, whatever stands around it ("STEEL/S235JR", "S 355 J2+N", "A992 Gr.50"); null where
 * there is none. Hollow sections have product standards of their own.
 */
export function gradeIn(name: string, shape: SectionShape | null = null): Grade | null {
  return (
    europeanGrade(name, shape) ?? americanGrade(name, shape) ?? ASIAN.find((it) => it.pattern.test(name))?.grade ?? null
  );
}

function europeanGrade(name: string, shape: SectionShape | null): Grade | null {
  const isHollow = shape !== null && HOLLOW.has(shape);
  const match = /(?<![A-Za-z0-9])S\s?(\d{3})(?!\d)\s*([A-Za-z0-9+]*)/i.exec(name);
  const number = match === null ? FORMER.find(([pattern]) => pattern.test(name))?.[1] : `S${match[1]}`;
  if (number === undefined) return null;
  const suffix = (match?.[2] ?? '').toUpperCase().replace(/\+.*$/, '');
  const cold = /^(MC|NC)/.exec(suffix)?.[1];
  if (cold !== undefined && COLD_FORMING[number]?.[cold] !== undefined) return COLD_FORMING[number][cold];
  const table = EUROPEAN[number];
  if (table === undefined) return null;
  const delivery = cold ?? deliveryOf(suffix);
  const ending = isHollow && !delivery.endsWith('H') ? `${delivery}H` : delivery;
  return table[ending] ?? table[delivery] ?? table[''] ?? null;
}

/** 'NH' of 'NLH', 'M' of 'ML', '' of 'J2' and 'J0+N', 'H' of 'J2H', 'Q' of 'QL1', 'GD' of 'GD+Z275'. */
function deliveryOf(letters: string): string {
  if (letters.startsWith('GD')) return 'GD';
  const isHollow = /H$/.test(letters);
  const treatment = /^([NMQ])/.exec(letters)?.[1] ?? (/W/.test(letters) ? 'W' : '');
  return `${treatment === 'W' && isHollow ? '' : treatment}${isHollow ? 'H' : ''}`;
}

function americanGrade(name: string, shape: SectionShape | null): Grade | null {
  const listed = AMERICAN.find(({ pattern }) => pattern.test(name));
  if (listed === undefined) return null;
  return shape === 'RHS' ? (listed.shaped ?? listed.grade) : listed.grade;
}

/** 345 MPa of "Metal - Steel - 345 MPa", Pa; null where the name states no strength. */
export function statedYield(name: string): number | null {
  const match = /(?<!\d)(\d{3})\s?(?:MPa|N\/mm2|N\/mm²)/i.exec(name);
  return match === null ? null : Number(match[1]) * 1e6;
}
