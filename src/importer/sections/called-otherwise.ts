import type { Section } from '../../domain/member.ts';
import { type Remark, whose } from '../findings-log.ts';
import { NotRead } from '../not-read.ts';
import { shapeFromDesignation } from './designations/shape-from-designation.ts';
import { type ProfileShape, sectionOf } from './profile-shape.ts';

/** A contradiction of more than this is said. */
const FARTHEST_APART = 0.05;

/** Dimensions this near are those of the section that is named; what is left are fillets and corners. */
const SAME_SIZE = 0.01;

/** Fillets that are left out make so much of a small section (HEA 100), corners drawn sharp of a small tube (SHS 60x60x5). */
const FILLETS = 0.1;
const CORNERS = 0.2;

/** 'T 100', 'U 200', 'I 300' may be the name of anything. */
const AMBIGUOUS = /^\s*[A-Z]\s?\d+\s*$/i;

const COMPARED = [
  ['area', 'area'],
  ['inertiaMajor', 'greater second moment'],
  ['inertiaMinor', 'lesser second moment'],
] as const;

/** Where a profile is called by a designation and its dimensions are those of another section; null where they are not. */
export function calledOtherwise(shape: ProfileShape, name: string): Remark | null {
  if (AMBIGUOUS.test(name)) return null;
  const called = shapeFromDesignation(name);
  if (called === null) return null;
  try {
    const [drawn, named] = [sectionOf(shape), sectionOf(called)];
    const worst = worstOf(drawn, named);
    return worst === null ? null : contradiction(name, ...worst);
  } catch (problem) {
    if (problem instanceof NotRead) return null;
    throw problem;
  }
}

function worstOf(drawn: Section, named: Section): readonly [what: string, ratio: number] | null {
  let worst: readonly [string, number] | null = null;
  const rounds = named.shape === 'RHS' ? CORNERS : FILLETS;
  let apart = Math.log1p(hasSameSizes(drawn, named) ? rounds : FARTHEST_APART);
  for (const [key, what] of COMPARED) {
    const distance = Math.abs(Math.log(drawn[key] / named[key]));
    if (distance > apart) [worst, apart] = [[what, drawn[key] / named[key]], distance];
  }
  return worst;
}

function hasSameSizes(a: Section, b: Section): boolean {
  const near = (p: number, q: number) => Math.abs(p / q - 1) < SAME_SIZE;
  const isTurned = near(a.depth, b.width) && near(a.width, b.depth);
  return ((near(a.depth, b.depth) && near(a.width, b.width)) || isTurned) && near(a.thickness, b.thickness);
}

function contradiction(name: string, what: string, ratio: number): Remark {
  const told = ratio < 10 ? `${Math.round(ratio * 100)} %` : `${Number(ratio.toPrecision(2))} times`;
  return {
    code: 'section-disagrees',
    key: `called ${name}`,
    say: (count, first) =>
      `${whose(count, first, 'have', 'has')} the profile '${name}', whose dimensions give ${told} of the ${what} of a section of that name; the dimensions are taken.`,
    advice: 'Correct the profile or its name in the model, or name the section in the brief.',
  };
}
