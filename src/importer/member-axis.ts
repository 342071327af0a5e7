import type { Section } from '../domain/member.ts';
import { cross, distance, dot, norm, subtract, unit, type Vec3 } from '../domain/vector.ts';
import { type BodyAxis, lengthOf } from './geometry/body-axis.ts';
import { type Chord, isStraight } from './geometry/curve-piece.ts';
import { NotRead, noSection } from './not-read.ts';
import type { SectionBook } from './sections/section-book.ts';
import { across, firstAcross, type Transform } from './transform.ts';

/** A member's line with its section, before anything is said of the element it comes from. */
export interface MemberAxis {
  readonly axisFrom: 'axis' | 'extrusion' | 'swept' | 'mesh';
  readonly ends: readonly [Vec3, Vec3];
  readonly zAxis: Vec3;
  readonly section: Section | null;
  /** Why there is no section. */
  readonly noSection: NotRead | null;
  readonly isBent: boolean;
  /** One of several straight runs of a line with bends. */
  readonly isRun: boolean;
  readonly isTapered: boolean;
  /** Of a mesh: part of the cuts through it that agree, 0..1; null for all else. */
  readonly confidence: number | null;
  /** Of a mesh: an end is no single face across the axis, so that its place is that of the farthest corner. */
  readonly hasRaggedEnd: boolean;
  /** Of a drawn line: the centroid line of the one body that runs along it. */
  readonly centroidEnds: readonly [Vec3, Vec3] | null;
  /** Whether the drawn line lies clearly elsewhere than the centroid line. */
  readonly isBeside: boolean;
}

/** Shorter than this is no member: the order of what rounded coordinates leave. */
export const SHORTEST = 1e-3;

/** Farther from the origin than this no building stands, in any national grid: metres. */
const FARTHEST = 1e8;

export const isSound = (p: Vec3): boolean => p.every((c) => Number.isFinite(c) && Math.abs(c) <= FARTHEST);

/** Ends are told apart to a tenth of a millimetre. */
const ROUNDED = 1e4;

/** The end with the lower rounded x, then y, then z first, so that the drawing direction does not matter. */
export function inOrder(a: Vec3, b: Vec3): readonly [Vec3, Vec3] {
  return compareRounded(a, b) <= 0 ? [a, b] : [b, a];
}

export function compareRounded(a: Vec3, b: Vec3): number {
  for (const i of [0, 1, 2] as const) {
    const difference = Math.round(a[i] * ROUNDED) - Math.round(b[i] * ROUNDED);
    if (difference !== 0) return difference;
  }
  return 0;
}

/** The centroid line of a body, with the section that its profile shows across it. */
export function axisOfBody(book: SectionBook, body: BodyAxis, profiles: readonly number[]): MemberAxis {
  const ends = inOrder(body.start, body.end);
  const along = directionOf(ends);
  const common = {
    axisFrom: body.from,
    ends,
    isBent: !isStraight({ from: body.start, to: body.end, rise: body.rise }, lengthOf(body)),
    isRun: body.isRun,
    isTapered: body.endProfile !== null,
    centroidEnds: null,
    isBeside: false,
    confidence: body.measured?.confidence ?? null,
    hasRaggedEnd: body.measured !== null && body.measured.squareness === null,
  } as const;
  return { ...common, ...sectionAcross(book, body, along, profiles) };
}

/** A drawn axis, with the section of the body that runs along it, else of the material's profile. */
export function axisOfLine(
  book: SectionBook,
  line: Chord,
  bodies: readonly BodyAxis[],
  profiles: readonly number[],
  world: Transform,
): MemberAxis {
  const ends = inOrder(line.from, line.to);
  const along = directionOf(ends);
  const isBent = !isStraight(line, distance(line.from, line.to));
  const isRun = line.isRun ?? false;
  const beside = againstCentroid(bodies, line, along);
  const common = { axisFrom: 'axis', ends, isBent, isRun, hasRaggedEnd: false, ...beside } as const;
  const body = alongside(bodies, along);
  if (body !== null) {
    const seen = axisOfBody(book, body, profiles);
    const zAxis = firstAcross(along, dot(seen.zAxis, along) ** 2 < 0.99 ? seen.zAxis : upOf(world, along));
    return { ...seen, ...common, zAxis };
  }
  const zAxis = firstAcross(along, upOf(world, along));
  return { ...common, zAxis, isTapered: false, confidence: null, ...sectionOfProfiles(book, profiles, along, zAxis) };
}

/** A drawn axis this far beside the centroid line, in metres, makes moments that a modeller should know of. */
export const FARTHEST_BESIDE = 0.02;

/** The line and the centroid line of the body it stands for: the only one that is nearly as long as the longest. */
function againstCentroid(
  bodies: readonly BodyAxis[],
  line: Chord,
  along: Vec3,
): Pick<MemberAxis, 'centroidEnds' | 'isBeside'> {
  const longest = Math.max(0, ...bodies.map(lengthOf));
  const [body, ...more] = bodies.filter((each) => lengthOf(each) > 0.8 * longest);
  const isComparable = body !== undefined && more.length === 0 && line.isRun !== true && !(line.rise > FARTHEST_BESIDE);
  if (!isComparable || body.rise > FARTHEST_BESIDE || !isSound(body.start) || !isSound(body.end)) {
    return { centroidEnds: null, isBeside: false };
  }
  const beside = Math.max(...[body.start, body.end].map((p) => norm(across(subtract(p, line.from), along))));
  return { centroidEnds: inOrder(body.start, body.end), isBeside: beside > FARTHEST_BESIDE };
}

/** @throws NotRead where the ends are no points of a building or no line lies between them. */
function directionOf([from, to]: readonly [Vec3, Vec3]): Vec3 {
  if (!isSound(from) || !isSound(to)) {
    throw new NotRead(
      'unreadable-element',
      `its coordinates are no numbers, or more than ${FARTHEST / 1000} km from the origin`,
      'Export the element again at its true place.',
    );
  }
  const direction = distance(from, to) < SHORTEST ? null : unit(subtract(to, from));
  if (direction === null) {
    throw new NotRead(
      'zero-length',
      'its ends coincide to a millimetre',
      'Delete the element, or draw it at its true length.',
    );
  }
  return direction;
}

/** The longest body that runs within some 25 degrees of the line. */
function alongside(bodies: readonly BodyAxis[], along: Vec3): BodyAxis | null {
  let best: BodyAxis | null = null;
  for (const body of bodies) {
    const direction = unit(subtract(body.end, body.start));
    if (direction === null || Math.abs(dot(direction, along)) < 0.9) continue;
    if (best === null || lengthOf(body) > lengthOf(best)) best = body;
  }
  return best;
}

/** Where no body shows it: a member drawn along its own z has y upright, as standard cases do; any other has z. */
function upOf(world: Transform, along: Vec3): Vec3 {
  const z = unit(world.z);
  return z !== null && Math.abs(dot(z, along)) > 0.99 ? world.y : world.z;
}

type SectionFound = Pick<MemberAxis, 'section' | 'noSection' | 'zAxis'>;

function sectionAcross(book: SectionBook, body: BodyAxis, along: Vec3, profiles: readonly number[]): SectionFound {
  const { measured, profile } = body;
  if (measured !== null) {
    return { section: measured.section, zAxis: firstAcross(along, measured.zAxis), noSection: null };
  }
  try {
    if (profile === null) throw noSection('only its bounding box is drawn');
    const seen = book.seenAlong(profile, along, body.x, body.y);
    if (body.endProfile === null) return { ...seen, noSection: null };
    const far = book.seenAlong(body.endProfile, along, body.x, body.y);
    // The lesser end of a tapered member is the safe one.
    return { ...(far.section.area < seen.section.area ? far : seen), noSection: null };
  } catch (problem) {
    if (!(problem instanceof NotRead)) throw problem;
    const upright = across(body.y, along);
    const zAxis = firstAcross(along, upright);
    const found = sectionOfProfiles(book, profiles, along, zAxis);
    return found.section === null ? { zAxis, section: null, noSection: problem } : { zAxis, ...found };
  }
}

/** By the material profile set: the first of its profiles that makes a section. */
function sectionOfProfiles(
  book: SectionBook,
  profiles: readonly number[],
  along: Vec3,
  zAxis: Vec3,
): Pick<MemberAxis, 'section' | 'noSection'> {
  let refusal: NotRead | null = null;
  for (const profile of profiles) {
    try {
      return { section: book.seenAlong(profile, along, cross(zAxis, along), zAxis).section, noSection: null };
    } catch (problem) {
      if (!(problem instanceof NotRead)) throw problem;
      refusal ??= problem;
    }
  }
  return { section: null, noSection: refusal ?? noSection('neither its body nor its material has a profile') };
}
