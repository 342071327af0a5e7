import { between } from '../../domain/vector.ts';
import { asEnum, asRef } from '../../step/values.ts';
import { type Remark, whose } from '../findings-log.ts';
import { NeedsParser, NotRead, noAxis } from '../not-read.ts';
import type { Reading } from '../reading.ts';
import type { SectionBook } from '../sections/section-book.ts';
import { compose, IDENTITY, type Transform } from '../transform.ts';
import { inWords } from '../words.ts';
import { type BodyAxis, joinedInLine } from './body-axis.ts';
import { cutEnds, type Span, spansWithin } from './cutters.ts';
import { extrusionAxis, readExtrusion } from './extrusion.ts';
import { blockFaces, readFaces } from './face-sets.ts';
import { mappedItems } from './mapped-item.ts';
import { meshAxes } from './mesh-axis.ts';
import { revolutionAxis } from './revolution.ts';
import type { KnownSections } from './short-bar.ts';
import { sectionedAxis, sweptAreaAxes } from './swept-area.ts';
import { cylinderAxis, sweptDiskAxes } from './swept-disk.ts';

const DEEPEST = 64;

/**
 * The axes of the solids in a body's items, world metres. Items that give none are passed over where another gives one,
 * with a note. `known` are sections that a short mesh may be of.
 * @throws NotRead (no-axis) where no item gives an axis, saying what the body is.
 */
export function readBody(
  reading: Reading,
  book: SectionBook,
  items: readonly number[],
  world: Transform,
  known?: KnownSections,
  depth = 0,
): BodyAxis[] {
  const [only] = items;
  const sole = only !== undefined && items.length === 1 ? readSolid(reading, book, only, world, known, depth) : [];
  if (sole.length > 0) return sole;
  return readSeveral(reading, book, items, world, known, depth);
}

function readSeveral(
  reading: Reading,
  book: SectionBook,
  items: readonly number[],
  world: Transform,
  known: KnownSections | undefined,
  depth: number,
): BodyAxis[] {
  const axes: BodyAxis[] = [];
  let refusal: NotRead | null = null;
  for (const item of items) {
    try {
      axes.push(...readSolid(reading, book, item, world, known, depth));
    } catch (problem) {
      if (!(problem instanceof NotRead)) throw problem;
      refusal ??= problem;
    }
  }
  if (axes.length === 0) throw refusal ?? noAxis('its shape is empty');
  if (refusal !== null) reading.note(passedOver(refusal));
  return axes;
}

const passedOver = ({ message }: NotRead): Remark => ({
  code: 'many-in-one',
  key: `passed ${message}`,
  severity: 'note',
  say: (count, first) =>
    `${whose(count, first, 'hold', 'holds')} several shapes, of which some give no line of force and are left out: ${message}.`,
  advice: 'Where one of them is a member, export it as an element of its own.',
});

function readSolid(
  reading: Reading,
  book: SectionBook,
  id: number,
  world: Transform,
  known: KnownSections | undefined,
  depth: number,
): BodyAxis[] {
  if (depth > DEEPEST) throw noAxis('its body refers to itself');
  const type = reading.typeOf(id);
  switch (type) {
    case 'IFCEXTRUDEDAREASOLID':
    case 'IFCEXTRUDEDAREASOLIDTAPERED':
      return [extrusionAxis(book, readExtrusion(reading, id, world))];
    case 'IFCSWEPTDISKSOLID':
    case 'IFCSWEPTDISKSOLIDPOLYGONAL':
      return sweptDiskAxes(reading, book, id, world);
    case 'IFCFIXEDREFERENCESWEPTAREASOLID':
    case 'IFCDIRECTRIXDERIVEDREFERENCESWEPTAREASOLID':
    case 'IFCSURFACECURVESWEPTAREASOLID':
      return sweptAreaAxes(reading, book, id, world);
    case 'IFCSECTIONEDSOLIDHORIZONTAL':
    case 'IFCSECTIONEDSPINE':
      return [sectionedAxis(reading, book, id, world)];
    case 'IFCRIGHTCIRCULARCYLINDER':
      return [cylinderAxis(reading, book, id, world)];
    case 'IFCBOUNDINGBOX':
      return boundingBoxAxis(reading, id, world);
    case 'IFCREVOLVEDAREASOLID':
    case 'IFCREVOLVEDAREASOLIDTAPERED':
      return [revolutionAxis(reading, book, id, world)];
    case 'IFCMAPPEDITEM': {
      const mapped = mappedItems(reading, id);
      return readBody(reading, book, mapped.items, compose(world, mapped.transform), known, depth + 1);
    }
    case 'IFCBOOLEANRESULT':
    case 'IFCBOOLEANCLIPPINGRESULT':
      return readBoolean(reading, book, id, world, known, depth);
    case 'IFCCSGSOLID': {
      const root = asRef(reading.args(id)[0]);
      if (root === null) throw noAxis('its body is empty');
      return readSolid(reading, book, root, world, known, depth + 1);
    }
    case '':
      throw noAxis('the body it refers to is missing');
    default: {
      const faces = readFaces(reading, id, world);
      if (faces === null) throw new NeedsParser(`its body is ${inWords(type)}`);
      return meshAxes(faces, world.z, known);
    }
  }
}

/** All that is drawn is how large the member is: its line along the longest edge, and no section. */
function boundingBoxAxis(reading: Reading, id: number, world: Transform): BodyAxis[] {
  const args = reading.args(id);
  const corner = compose(world, { ...IDENTITY, origin: reading.point(args[0]) });
  const sizes = [1, 2, 3].map((i) => reading.length(args[i]));
  return meshAxes(blockFaces(corner, sizes), world.z).map((axis) => ({ ...axis, measured: null }));
}

/** The first operand is the member; the second cuts its ends or lengthens it, and never makes a member of its own. */
function readBoolean(
  reading: Reading,
  book: SectionBook,
  id: number,
  world: Transform,
  known: KnownSections | undefined,
  depth: number,
): BodyAxis[] {
  const args = reading.args(id);
  const first = asRef(args[1]);
  const second = asRef(args[2]);
  if (first === null) throw noAxis('its body is empty');
  const axes = readSolid(reading, book, first, world, known, depth + 1);
  if (second === null) return axes;
  const operator = asEnum(args[0]);
  if (operator === 'UNION') return lengthened(axes, operandAxes(reading, book, second, world, depth));
  return axes.map((axis) => {
    if (axis.rise > 0) return axis;
    const spans = spansWithin(reading, book, second, world, axis);
    if (spans === null) return axis;
    if (operator === 'DIFFERENCE' && !isHalfSpace(reading, second) && spans.some(coversAll)) {
      throw new NeedsParser('a boolean cut hollows it out along its whole length');
    }
    return trimmed(axis, operator === 'INTERSECTION' ? keptWithin(spans) : cutEnds(spans));
  });
}

/** A half-space that would take the whole member is one whose side is told wrongly. */
const isHalfSpace = (reading: Reading, id: number): boolean => reading.typeOf(id).endsWith('HALFSPACESOLID');

const coversAll = ([from, to]: Span): boolean => from <= 0 && to >= 1;

function operandAxes(reading: Reading, book: SectionBook, id: number, world: Transform, depth: number): BodyAxis[] {
  try {
    return readSolid(reading, book, id, world, undefined, depth + 1);
  } catch (problem) {
    if (problem instanceof NotRead) return [];
    throw problem;
  }
}

const lengthened = (axes: readonly BodyAxis[], added: readonly BodyAxis[]): BodyAxis[] =>
  axes.map((axis) => added.reduce((whole, piece) => joinedInLine(whole, piece) ?? whole, axis));

function keptWithin(spans: readonly Span[]): Span {
  const from = Math.max(0, Math.min(...spans.map((span) => span[0])));
  const to = Math.min(1, Math.max(...spans.map((span) => span[1])));
  return from < to ? [from, to] : [0, 1];
}

function trimmed(axis: BodyAxis, [from, to]: Span): BodyAxis {
  if (from === 0 && to === 1) return axis;
  return { ...axis, start: between(axis.start, axis.end, from), end: between(axis.start, axis.end, to) };
}
