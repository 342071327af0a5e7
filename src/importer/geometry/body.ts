import { between } from '../../domain/vector.ts';
import { asEnum, asRef } from '../../step/values.ts';
import { NotRead, noAxis } from '../not-read.ts';
import type { Reading } from '../reading.ts';
import type { SectionBook } from '../sections/section-book.ts';
import { compose, type Transform } from '../transform.ts';
import { inWords } from '../words.ts';
import { type BodyAxis, joinedInLine } from './body-axis.ts';
import { cutEnds, type Span, spansWithin } from './cutters.ts';
import { extrusionAxis, readExtrusion } from './extrusion.ts';
import { mappedItems } from './mapped-item.ts';
import { revolutionAxis } from './revolution.ts';
import { sweptDiskAxis } from './swept-disk.ts';

const DEEPEST = 64;

/**
 * The axes of the solids in a body's items, world metres. Items that give none are passed over where another gives one.
 * @throws NotRead (no-axis) where no item gives an axis, saying what the body is.
 */
export function readBody(
  reading: Reading,
  book: SectionBook,
  items: readonly number[],
  world: Transform,
  depth = 0,
): BodyAxis[] {
  const axes: BodyAxis[] = [];
  let refusal: NotRead | null = null;
  for (const item of items) {
    try {
      axes.push(...readSolid(reading, book, item, world, depth));
    } catch (problem) {
      if (!(problem instanceof NotRead)) throw problem;
      refusal ??= problem;
    }
  }
  if (axes.length === 0) throw refusal ?? noAxis('its shape is empty');
  return axes;
}

function readSolid(reading: Reading, book: SectionBook, id: number, world: Transform, depth: number): BodyAxis[] {
  if (depth > DEEPEST) throw noAxis('its body refers to itself');
  const type = reading.typeOf(id);
  switch (type) {
    case 'IFCEXTRUDEDAREASOLID':
    case 'IFCEXTRUDEDAREASOLIDTAPERED':
      return [extrusionAxis(book, readExtrusion(reading, id, world))];
    case 'IFCSWEPTDISKSOLID':
    case 'IFCSWEPTDISKSOLIDPOLYGONAL':
      return [sweptDiskAxis(reading, book, id, world)];
    case 'IFCREVOLVEDAREASOLID':
      return [revolutionAxis(reading, book, id, world)];
    case 'IFCMAPPEDITEM': {
      const mapped = mappedItems(reading, id);
      return readBody(reading, book, mapped.items, compose(world, mapped.transform), depth + 1);
    }
    case 'IFCBOOLEANRESULT':
    case 'IFCBOOLEANCLIPPINGRESULT':
      return readBoolean(reading, book, id, world, depth);
    case 'IFCCSGSOLID': {
      const root = asRef(reading.args(id)[0]);
      if (root === null) throw noAxis('its body is empty');
      return readSolid(reading, book, root, world, depth + 1);
    }
    case '':
      throw noAxis('the body it refers to is missing');
    default:
      throw noAxis(`its body is ${inWords(type)}`);
  }
}

/** The first operand is the member; the second cuts its ends or lengthens it, and never makes a member of its own. */
function readBoolean(reading: Reading, book: SectionBook, id: number, world: Transform, depth: number): BodyAxis[] {
  const args = reading.args(id);
  const first = asRef(args[1]);
  const second = asRef(args[2]);
  if (first === null) throw noAxis('its body is empty');
  const axes = readSolid(reading, book, first, world, depth + 1);
  if (second === null) return axes;
  const operator = asEnum(args[0]);
  if (operator === 'UNION') return lengthened(axes, operandAxes(reading, book, second, world, depth));
  return axes.map((axis) => {
    if (axis.rise > 0) return axis;
    const spans = spansWithin(reading, book, second, world, axis);
    if (spans === null) return axis;
    return trimmed(axis, operator === 'INTERSECTION' ? keptWithin(spans) : cutEnds(spans));
  });
}

function operandAxes(reading: Reading, book: SectionBook, id: number, world: Transform, depth: number): BodyAxis[] {
  try {
    return readSolid(reading, book, id, world, depth + 1);
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
