import type { Section } from '../domain/member.ts';
import { cross, distance, dot, hypot, norm, subtract, unit, type Vec3 } from '../domain/vector.ts';
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
  /** Points along a bent line, in the order of its ends; null where it is straight or its course is not known. */
  readonly bow: readonly Vec3[] | null;
  /** One of several straight runs of a line with bends. */
  readonly isRun: boolean;
  readonly isTapered: boolean;
  /** Of a mesh: part of the cuts through it that agree, 0..1; null for all else. */
  readonly confidence: number | null;
  /** Of a mesh: an end is no single face across the axis, so that its place is that of the farthest corner. */
  readonly hasRaggedEnd: boolean;
  /** Of a mesh too short to show its own axis: how far it leaves its section carried along the one taken, metres. */
  readonly strays: number | null;
  /** Of a drawn line: the centroid line of the one body that runs along it. */
  readonly centroidEnds: readonly [Vec3, Vec3] | null;
  /** Whether the drawn line lies clearly elsewhere than the centroid line. */
  readonly isBeside: boolean;
}

/** Shorter than this is no member: the order of what rounded coordinates leave. */
export const SHORTEST = 1e-3;

/** Farther from the origin than this no building stands, in any national grid: metres. */
const FARTHEST = 1e8;

export const isSound = (p: Vec3): boolean => isNear(p[0]) && isNear(p[1]) && isNear(p[2]);

/** False of what is no number, too. */
export const isNear = (coordinate: number): boolean => Math.abs(coordinate) <= FARTHEST;

/** Ends are told apart to a tenth of a millimetre. */
const ROUNDED = 1e4;

export const rounded = (coordinate: number): number => Math.round(coordinate * ROUNDED);

/** The end with the lower rounded x, then y, then z first, so that the drawing direction does not matter. */
export function inOrder(a: Vec3, b: Vec3): readonly [Vec3, Vec3] {
  return compareRounded(a, b) <= 0 ? [a, b] : [b, a];
}

export function compareRounded(a: Vec3, b: Vec3): number {
  return rounded(a[0]) - rounded(b[0]) || rounded(a[1]) - rounded(b[1]) || rounded(a[2]) - rounded(b[2]);
}

/** The centroid line of a body, with the section that its profile shows across it. */
export function axisOfBody(book: SectionBook, body: BodyAxis, profiles: readonly number[]): MemberAxis {
  const ends = inOrder(body.start, body.end);
  const { section, noSection, zAxis } = sectionAcross(book, body, directionOf(ends), profiles);
  return {
    axisFrom: body.from,
    ends,
    zAxis,
    section,
    noSection,
    isBent: !isStraight(body.rise, lengthOf(body)),
    bow: fromFirst(body.bow, ends),
    isRun: body.isRun,
    isTapered: body.endProfile !== null,
    confidence: body.measured?.confidence ?? null,
    hasRaggedEnd: body.measured !== null && body.measured.squareness === null,
    strays: body.measured?.strays ?? null,
    centroidEnds: null,
    isBeside: false,
  };
}

/** A bow's points in the order of the member's ends. */
function fromFirst(bow: readonly Vec3[] | null, [first]: readonly [Vec3, Vec3]): readonly Vec3[] | null {
  if (bow === null) return null;
  return distance(bow[0]!, first) <= distance(bow.at(-1)!, first) ? bow : [...bow].reverse();
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
  const beside = centroidBeside(bodies, line);
  const centroidEnds = beside !== null && isSame(beside, ends) ? ends : beside;
  // Drawn where the one body's centroid line is, as most axes are, the line and the body run alike.
  const isBody = centroidEnds === ends && bodies.length === 1;
  const body = isBody ? bodies[0]! : alongside(bodies, along);
  const seen = body === null ? null : sectionAcross(book, body, isBody ? along : directionOfBody(body), profiles);
  const isSeen = seen !== null && dot(seen.zAxis, along) ** 2 < 0.99;
  const zAxis = firstAcross(along, isSeen ? seen.zAxis : upOf(world, along));
  const { section, noSection } = seen ?? sectionOfProfiles(book, profiles, along, zAxis);
  return {
    axisFrom: 'axis',
    ends,
    zAxis,
    section,
    noSection,
    isBent: !isStraight(line.rise, distance(line.from, line.to)),
    bow: fromFirst(line.bow ?? null, ends),
    isRun: line.isRun ?? false,
    isTapered: body !== null && body.endProfile !== null,
    confidence: body?.measured?.confidence ?? null,
    hasRaggedEnd: false,
    strays: null,
    centroidEnds,
    isBeside: centroidEnds !== null && centroidEnds !== ends && isFarFrom(line, along, centroidEnds),
  };
}

/** A drawn axis this far beside the centroid line, in metres, makes moments that a modeller should know of. */
export const FARTHEST_BESIDE = 0.02;

/** The centroid line of the body that a drawn line stands for; null where the two cannot be held against each other. */
function centroidBeside(bodies: readonly BodyAxis[], line: Chord): readonly [Vec3, Vec3] | null {
  if (line.isRun === true || line.rise > FARTHEST_BESIDE) return null;
  const body = longestByFar(bodies);
  if (body === null || body.rise > FARTHEST_BESIDE || !isSound(body.start) || !isSound(body.end)) return null;
  return inOrder(body.start, body.end);
}

/** To the last digit: most axes are drawn where the centroid is, and one line is then kept for both. */
const isSame = ([a, b]: readonly [Vec3, Vec3], [c, d]: readonly [Vec3, Vec3]): boolean =>
  isSamePoint(a, c) && isSamePoint(b, d);

const isSamePoint = (a: Vec3, b: Vec3): boolean =>
  Object.is(a[0], b[0]) && Object.is(a[1], b[1]) && Object.is(a[2], b[2]);

/** The only body that is nearly as long as the longest. */
function longestByFar(bodies: readonly BodyAxis[]): BodyAxis | null {
  const [only] = bodies;
  if (only !== undefined && bodies.length === 1) return lengthOf(only) > 0 ? only : null;
  let longest = 0;
  for (const body of bodies) longest = Math.max(longest, lengthOf(body));
  let found: BodyAxis | null = null;
  for (const body of bodies) {
    if (!(lengthOf(body) > 0.8 * longest)) continue;
    if (found !== null) return null;
    found = body;
  }
  return found;
}

function isFarFrom(line: Chord, along: Vec3, ends: readonly [Vec3, Vec3]): boolean {
  return ends.some((end) => norm(across(subtract(end, line.from), along)) > FARTHEST_BESIDE);
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
  const dx = to[0] - from[0];
  const dy = to[1] - from[1];
  const dz = to[2] - from[2];
  const length = hypot(dx, dy, dz);
  if (!(length >= SHORTEST)) {
    throw new NotRead(
      'zero-length',
      'its ends coincide to a millimetre',
      'Delete the element, or draw it at its true length.',
    );
  }
  const size = 1 / length;
  return [dx * size, dy * size, dz * size];
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

const directionOfBody = (body: BodyAxis): Vec3 => directionOf(inOrder(body.start, body.end));

function sectionAcross(book: SectionBook, body: BodyAxis, along: Vec3, profiles: readonly number[]): SectionFound {
  const { measured, profile } = body;
  if (measured !== null) {
    return { section: measured.section, zAxis: firstAcross(along, measured.zAxis), noSection: null };
  }
  try {
    if (profile === null) throw noSection('only its bounding box is drawn');
    const seen = book.seenAlong(profile, along, body.x, body.y);
    const far = body.endProfile === null ? seen : book.seenAlong(body.endProfile, along, body.x, body.y);
    // The lesser end of a tapered member is the safe one.
    const { section, zAxis } = far.section.area < seen.section.area ? far : seen;
    return { section, zAxis, noSection: null };
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
