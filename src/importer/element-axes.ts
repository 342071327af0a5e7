import { distance, dot, subtract, unit } from '../domain/vector.ts';
import { FITTINGS } from './element-remarks.ts';
import { readAxisLines } from './geometry/axis-representation.ts';
import { readBody } from './geometry/body.ts';
import { type BodyAxis, distinctAxes, lengthOf } from './geometry/body-axis.ts';
import type { Chord } from './geometry/curve-piece.ts';
import type { Polygon } from './geometry/mesh.ts';
import { meshAxes } from './geometry/mesh-axis.ts';
import type { KnownSections } from './geometry/short-bar.ts';
import { axisOfBody, axisOfLine, type MemberAxis, SHORTEST } from './member-axis.ts';
import { NeedsParser, NotRead, noAxis } from './not-read.ts';
import type { ImportOptions } from './options.ts';
import type { Reading } from './reading.ts';
import type { Shape } from './representations.ts';
import { measuredInstead } from './sections/impossible-profile.ts';
import { MERE_NAMES } from './sections/profile.ts';
import type { SectionBook } from './sections/section-book.ts';
import type { Transform } from './transform.ts';

interface Sources {
  readonly reading: Reading;
  readonly sections: SectionBook;
  readonly options: ImportOptions;
}

/**
 * The lines that one element is read as: its drawn Axis or the centroid lines of its solids, whichever is asked for; of a
 * lattice drawn as one element its solids, whatever its Axis. `profiles` are those its material gives, `known` are the
 * sections that its names and fellows say, `parsedMesh` asks a parser for the body's mesh.
 * @throws NotRead where there is none.
 */
export function elementAxes(
  { reading, sections, options }: Sources,
  shape: Shape,
  world: Transform,
  profiles: readonly number[],
  known: KnownSections,
  parsedMesh: () => readonly Polygon[] | null,
): MemberAxis[] {
  const lines = linesOrRefusal(reading, shape.axis, world);
  const read = bodiesOrRefusal(reading, sections, shape.body, world, known);
  const bodies = isUnknown(reading, sections, read) ? meshed(read, parsedMesh(), world, known) : read;
  if (bodies !== read) noteUnread(reading, sections, read);
  const drawn = Array.isArray(lines) ? longOnes(lines) : [];
  const solids = Array.isArray(bodies) ? distinctAxes(bodies) : [];
  const members = solids.length === 0 ? [] : memberSolids(sections, solids, profiles);
  const isGiven = options.axes === 'given' && !isLattice(drawn, members);
  if (drawn.length > 0 && (isGiven || members.length === 0)) {
    return drawn.map((line) => axisOfLine(sections, line, solids, profiles, world));
  }
  if (members.length > 0) {
    if (members.length < solids.length) reading.note(FITTINGS);
    return members.map((solid) => axisOfBody(sections, solid, profiles));
  }
  if (bodies instanceof NotRead && shape.body.length > 0) throw bodies;
  if (lines instanceof NotRead) throw lines;
  throw noAxis('it has no shape');
}

const isLong = (line: Chord): boolean => !(distance(line.from, line.to) < SHORTEST);

const longOnes = (lines: Chord[]): Chord[] => (lines.every(isLong) ? lines : lines.filter(isLong));

function linesOrRefusal(reading: Reading, items: readonly number[], world: Transform): Chord[] | NotRead {
  try {
    return readAxisLines(reading, items, world);
  } catch (problem) {
    return refusalIn(problem);
  }
}

function bodiesOrRefusal(
  reading: Reading,
  sections: SectionBook,
  items: readonly number[],
  world: Transform,
  known: KnownSections,
): BodyAxis[] | NotRead {
  try {
    return readBody(reading, sections, items, world, known);
  } catch (problem) {
    return refusalIn(problem);
  }
}

function refusalIn(problem: unknown): NotRead {
  if (problem instanceof NotRead) return problem;
  throw problem;
}

/** Whether a body is of a kind that only a parser can tell of, or has a drawn profile that is not read. */
function isUnknown(reading: Reading, sections: SectionBook, read: readonly BodyAxis[] | NotRead): boolean {
  if (read instanceof NotRead) return read instanceof NeedsParser;
  for (const { profile } of read) if (profile !== null && isUnread(reading, sections, profile)) return true;
  return false;
}

const isUnread = (reading: Reading, sections: SectionBook, profile: number): boolean =>
  sections.refusalOf(profile) !== null && isDrawn(reading, profile);

/** Why the body was measured although profiles are drawn. */
function noteUnread(reading: Reading, sections: SectionBook, read: readonly BodyAxis[] | NotRead): void {
  if (read instanceof NotRead) return;
  for (const { profile } of read) {
    const refusal = profile === null || !isDrawn(reading, profile) ? null : sections.refusalOf(profile);
    if (refusal !== null) reading.note(measuredInstead(refusal));
  }
}

/** A profile that is a mere name has no shape to be meshed. */
const isDrawn = (reading: Reading, profile: number): boolean =>
  profile > 0 && reading.file.has(profile) && !MERE_NAMES.has(reading.file.typeOf(profile));

/** What the parser's mesh shows, where there is one and it shows something. */
function meshed(
  read: BodyAxis[] | NotRead,
  mesh: readonly Polygon[] | null,
  world: Transform,
  known: KnownSections,
): BodyAxis[] | NotRead {
  if (mesh === null) return read;
  const fitted = fittedOrRefusal(mesh, world, known);
  return fitted instanceof NotRead && !(read instanceof NotRead) ? read : fitted;
}

function fittedOrRefusal(mesh: readonly Polygon[], world: Transform, known: KnownSections): BodyAxis[] | NotRead {
  try {
    return meshAxes(mesh, world.z, known);
  } catch (problem) {
    return refusalIn(problem);
  }
}

/** Plates and cleats drawn with a member are both far shorter than it and stout; a lattice's web bars are slender. */
const FITTING_LENGTH = 1 / 4;
const FITTING_SLENDER = 6;

function memberSolids(
  sections: SectionBook,
  solids: readonly BodyAxis[],
  profiles: readonly number[],
): readonly BodyAxis[] {
  if (solids.length === 1) return solids;
  const longest = Math.max(...solids.map(lengthOf));
  return solids.filter((solid) => {
    if (!(lengthOf(solid) < longest * FITTING_LENGTH)) return true;
    const extent = extentOf(sections, solid, profiles);
    return extent !== null && lengthOf(solid) >= FITTING_SLENDER * extent;
  });
}

function extentOf(sections: SectionBook, solid: BodyAxis, profiles: readonly number[]): number | null {
  try {
    const { section } = axisOfBody(sections, solid, profiles);
    return section === null ? null : Math.max(section.depth, section.width);
  } catch (problem) {
    if (problem instanceof NotRead) return null;
    throw problem;
  }
}

/** A solid that runs this much across a drawn line (10 degrees) is none that the line stands for. */
const ALONGSIDE = Math.cos((10 * Math.PI) / 180);

/** One drawn line for several bars, some of them across it: the line of a joist as a whole, not of its bars. */
function isLattice(drawn: readonly Chord[], solids: readonly BodyAxis[]): boolean {
  const [line] = drawn;
  if (line === undefined || drawn.length > 1 || solids.length < 3) return false;
  const along = unit(subtract(line.to, line.from));
  const across = solids.filter((solid) => {
    const direction = unit(subtract(solid.end, solid.start));
    return along !== null && direction !== null && Math.abs(dot(along, direction)) < ALONGSIDE;
  });
  return across.length >= 2;
}
