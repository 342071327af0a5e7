import type { Member } from '../domain/member.ts';
import { between, distance } from '../domain/vector.ts';
import { asRef, asString } from '../step/values.ts';
import { writtenClass } from './class-names.ts';
import { contextOf, layerOf } from './context.ts';
import { type Remark, whose } from './findings-log.ts';
import { readAxisLines } from './geometry/axis-representation.ts';
import { readBody } from './geometry/body.ts';
import { type BodyAxis, distinctAxes, lengthOf } from './geometry/body-axis.ts';
import type { Chord } from './geometry/curve-piece.ts';
import type { MaterialBook } from './materials/material-book.ts';
import { axisOfBody, axisOfLine, compareRounded, isSound, type MemberAxis, SHORTEST } from './member-axis.ts';
import { NotRead, noAxis } from './not-read.ts';
import type { ImportOptions } from './options.ts';
import type { Placements } from './placements.ts';
import type { Reading } from './reading.ts';
import type { Relations } from './relations.ts';
import { readShape } from './representations.ts';
import type { SectionBook } from './sections/section-book.ts';
import type { Transform } from './transform.ts';

/** What elements are read with. */
export interface Sources {
  readonly reading: Reading;
  readonly relations: Relations;
  readonly placements: Placements;
  readonly sections: SectionBook;
  readonly materials: MaterialBook;
  readonly options: ImportOptions;
}

/** A member whose place is still to be named, since that takes the whole model. */
export interface PlacelessMember extends Member {
  place: string | null;
}

/** The members that one element holds; none, with a finding, where it cannot be read. */
export function readElement(sources: Sources, id: number): PlacelessMember[] {
  const { reading, placements } = sources;
  const args = reading.file.args(id);
  const stated = asString(args[0])?.trim() ?? '';
  const globalId = stated === '' ? `#${id}` : stated;
  reading.about(globalId);
  if (stated === '') reading.note(NO_GLOBAL_ID);
  try {
    const placement = asRef(args[5]);
    const world = placements.worldOf(placement);
    reading.about(globalId, isSound(world.origin) ? world.origin : null);
    return membersOf(sources, id, globalId, world);
  } catch (problem) {
    if (!(problem instanceof NotRead)) throw problem;
    reading.note(refusal(problem));
    return [];
  } finally {
    reading.about(null);
  }
}

function membersOf(sources: Sources, id: number, globalId: string, world: Transform): PlacelessMember[] {
  const { reading, relations, materials } = sources;
  const args = reading.file.args(id);
  const shape = asRef(args[6]);
  const made = materials.madeOf(materialId(relations, id));
  const axes = memberAxes(sources, shape, world, made.profiles);
  axes.sort((a, b) => compareRounded(a.ends[0], b.ends[0]) || compareRounded(a.ends[1], b.ends[1]));

  const context = contextOf(reading, relations, id);
  const layer = layerOf(reading, relations, shape);
  return axes.map((axis, part) => {
    reading.about(globalId, between(...axis.ends, 0.5));
    if (axis.noSection !== null) reading.note(refusal(axis.noSection));
    if (axis.isBent) reading.note(BENT);
    if (axis.isTapered && axis.section !== null) reading.note(TAPERED);
    if (made.remark !== null) reading.note(made.remark);
    return {
      globalId,
      part,
      name: asString(args[2]),
      tag: asString(args[7]),
      class: writtenClass(reading.file.typeOf(id)),
      predefinedType: context.predefinedType,
      type: context.type,
      assembly: context.assembly,
      partOf: context.partOf,
      storey: context.storey,
      layer,
      place: null,
      axisFrom: axis.axisFrom,
      axis: axis.ends,
      zAxis: axis.zAxis,
      section: axis.section,
      material: made.material,
    };
  });
}

function materialId(relations: Relations, id: number): number | null {
  const type = relations.typeOf.get(id);
  return relations.materialOf.get(id) ?? (type === undefined ? null : (relations.materialOf.get(type) ?? null));
}

function memberAxes(
  { reading, sections, options }: Sources,
  shapeId: number | null,
  world: Transform,
  profiles: readonly number[],
): MemberAxis[] {
  const shape = readShape(reading, shapeId);
  const lines = orRefusal<Chord>(() => readAxisLines(reading, shape.axis, world));
  const bodies = orRefusal<BodyAxis>(() => readBody(reading, sections, shape.body, world));
  const drawn = Array.isArray(lines) ? lines.filter((line) => !(distance(line.from, line.to) < SHORTEST)) : [];
  const solids = Array.isArray(bodies) ? distinctAxes(bodies) : [];
  if (drawn.length > 0 && (options.axes === 'given' || solids.length === 0)) {
    return drawn.map((line) => axisOfLine(sections, line, solids, profiles, world));
  }
  if (solids.length > 0) {
    return slenderOnes(reading, solids).map((solid) => axisOfBody(sections, solid, profiles));
  }
  if (bodies instanceof NotRead && shape.body.length > 0) throw bodies;
  if (lines instanceof NotRead) throw lines;
  throw noAxis('it has no shape');
}

function orRefusal<T>(read: () => T[]): T[] | NotRead {
  try {
    return read();
  } catch (problem) {
    if (problem instanceof NotRead) return problem;
    throw problem;
  }
}

/** Of several solids those that are members: plates and cleats drawn with them are far shorter. */
function slenderOnes(reading: Reading, solids: readonly BodyAxis[]): readonly BodyAxis[] {
  const longest = Math.max(...solids.map(lengthOf));
  const members = solids.filter((solid) => !(lengthOf(solid) < longest / 4));
  if (members.length < solids.length) reading.note(FITTINGS);
  return members;
}

const REFUSED: Readonly<Record<string, readonly [have: string, has: string]>> = {
  'no-axis': ['have no line of force', 'has no line of force'],
  'no-section': ['have no section', 'has no section'],
  'zero-length': ['have no length', 'has no length'],
};

function refusal(problem: NotRead): Remark {
  const [have, has] = REFUSED[problem.code] ?? ['cannot be read', 'cannot be read'];
  const reason = problem.message;
  return {
    code: problem.code,
    key: reason,
    say: (count, first) => `${whose(count, first, have, has)}: ${count === 1 ? reason : plural(reason)}.`,
    advice: problem.advice,
  };
}

/** Reasons are told of one element. */
const plural = (reason: string): string => reason.replace(/^its /, 'their ').replace(/^it has /, 'they have ');

const NO_GLOBAL_ID: Remark = {
  code: 'unreadable-element',
  key: 'GlobalId',
  severity: 'warning',
  say: (count, first) => `${whose(count, first, 'have', 'has')} no GlobalId, so results cannot be written to it.`,
  advice: 'Export the model again from a program that gives every element a GlobalId.',
};

const BENT: Remark = {
  code: 'bent-axis',
  key: '',
  say: (count, first) =>
    `${whose(count, first, 'are', 'is')} bent; the straight line between the ends is taken, and bending by the bow is not seen.`,
  advice: 'Divide a bent member at its panel points, or judge its bow by hand.',
};

const TAPERED: Remark = {
  code: 'guessed-section',
  key: 'tapered',
  say: (count, first) =>
    `${whose(count, first, 'taper', 'tapers')}; the section of the lesser end is taken throughout.`,
  advice: 'Name the section in the brief where the lesser end is too safe.',
};

const FITTINGS: Remark = {
  code: 'many-in-one',
  key: 'fittings',
  severity: 'note',
  say: (count, first) =>
    `${whose(count, first, 'hold', 'holds')} several solids, some less than a quarter as long as the longest; these are taken as fittings and left out.`,
  advice: 'Where one of them is a member, export it as an element of its own.',
};
