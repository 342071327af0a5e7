import { z } from 'zod';
import {
  parseQuantity,
  QuantityError,
  type QuantityKind,
  splitQuantity,
  UNIT_NAMES,
  wordsFor,
} from '../domain/units.ts';
import { unit, type Vec3 } from '../domain/vector.ts';
import { gradeIn } from '../importer/materials/grades.ts';
import { knownDesignations } from '../importer/sections/designations/known-designations.ts';
import { sectionFromDesignation } from '../importer/sections/designations/section-from-designation.ts';
import { didYouMean } from './nearest-word.ts';
import type { Range } from './types.ts';

/**
 * The brief as it is written (CONTRACT "The brief"). This schema is the one source of the brief's validation and of its JSON
 * Schema (`z.toJSONSchema(briefInputSchema, { io: 'input' })`). Quantities come out in SI. Keys that are planned and cannot be
 * honoured yet are not here: they stand in not-yet.ts and are refused by name.
 */

type Problems = { addIssue(issue: { code: 'custom'; message: string; path?: (string | number)[] }): void };

function inSi(value: number | string, kind: QuantityKind, problems: Problems): number {
  if (typeof value === 'number') return value;
  try {
    return parseQuantity(value, kind);
  } catch (error) {
    if (!(error instanceof QuantityError)) throw error;
    const hint = error.unknownUnit === null ? '' : didYouMean(error.unknownUnit, UNIT_NAMES);
    problems.addIssue({ code: 'custom', message: error.message + hint });
    return 0;
  }
}

/** A bare number in SI, or a text with its unit. */
const quantity = (kind: QuantityKind) =>
  z
    .union([z.number(), z.string()], { error: `${wordsFor(kind)} is due` })
    .transform((value, context) => inSi(value, kind, context))
    .describe(`${wordsFor(kind)}; a bare number is SI`);

/** As `quantity`, but never below zero. */
const positive = (kind: QuantityKind) => quantity(kind).refine((value) => value > 0, 'this must be greater than zero');

const vector = (kind: QuantityKind) => z.tuple([quantity(kind), quantity(kind), quantity(kind)]);

const end = z.union([z.number(), z.string(), z.null()], { error: 'a quantity, or null for an open end, is due' });

/** `[from, to]` or "from..to"; an end that is null or left out is open. */
const range = (kind: QuantityKind) =>
  z
    .union([z.tuple([end, end]), z.string()], {
      error: `a range, [from, to] or "from..to", of ${wordsFor(kind)} is due`,
    })
    .transform((written, context) => readRange(written, kind, context))
    .describe(`[from, to] or "from..to", either end open: ${wordsFor(kind)}; bare numbers are SI`);

function readRange(
  written: readonly (number | string | null)[] | string,
  kind: QuantityKind,
  problems: Problems,
): Range {
  const ends = typeof written === 'string' ? splitRange(written, kind, problems) : written;
  const [from, to] = ends.map((value) => (value === null ? null : inSi(value, kind, problems))) as [
    number | null,
    number | null,
  ];
  const say = (message: string) => problems.addIssue({ code: 'custom', message });
  const bare = ends.filter((value) => typeof value === 'number' && value !== 0).length;
  const named = ends.filter((value) => typeof value === 'string').length;
  if (bare > 0 && named > 0) say('one end has a unit and the other has none: give both their unit');
  else if (from === null && to === null) say('both ends are open: leave the key out');
  else if (from !== null && to !== null && from > to) say('the range runs backwards: the lower end comes first');
  return [from, to];
}

function splitRange(written: string, kind: QuantityKind, problems: Problems): (number | string | null)[] {
  const parts = written.split('..').map((part) => part.trim());
  if (parts.length !== 2) {
    problems.addIssue({ code: 'custom', message: `a range is written [from, to] or "from..to", of ${wordsFor(kind)}` });
    return [0, 0];
  }
  return parts.map((part) => {
    if (part === '') return null;
    try {
      const { value, unit: name } = splitQuantity(part, kind);
      return name === '' ? value : part;
    } catch {
      return part;
    }
  });
}

/** Slopes lie between 0 and 90 degrees, so a number beyond is one of degrees without its unit. */
const slopeRange = range('angle').refine(
  (ends) => ends.every((value) => value === null || (value >= 0 && value <= Math.PI / 2 + 1e-9)),
  'a slope lies between 0 and 90 deg, and a bare number is in radians: write "20 deg..40 deg"',
);

const toList = <T>(value: T | T[]): T[] => (Array.isArray(value) ? value : [value]);

/** One, or a list of which any may hold. */
const oneOrMore = <I, O extends object>(item: z.ZodType<O, I>) =>
  z.union([item, z.array(item).min(1)]).transform((value) => toList<O>(value));

const anyNumber = <I, O extends object>(item: z.ZodType<O, I>) =>
  z.union([item, z.array(item)]).transform((value) => toList<O>(value));

const text = z.string().min(1);
const pattern = text.describe('text; * stands for anything; upper and lower case are the same');

const plainEnd = z.union([z.number(), z.null()], { error: 'a number in SI, or null for an open end, is due' });

/** What the model's own properties are to be, by "Set.Property". */
const properties = z
  .record(
    z.string().regex(/^[^.]+\../u, 'write the set and the property, such as Pset_MemberCommon.LoadBearing'),
    z.union([z.boolean(), z.number(), text, z.tuple([plainEnd, plainEnd])], {
      error: 'true, false, a number in SI, a text, or a range [from, to] is due',
    }),
  )
  .refine((wanted) => Object.keys(wanted).length > 0, 'name a property: {Pset_MemberCommon.LoadBearing: true}')
  .describe('"Set.Property": true, false, a number or range [from, to] in SI, or a text with *; the set may be *');

const memberKeys = z.strictObject({
  class: pattern.optional().describe('IFC class; IfcBeam takes IfcBeamStandardCase too'),
  predefinedType: pattern.optional(),
  globalId: text.optional().describe('upper and lower case differ'),
  tag: pattern.optional(),
  name: pattern.optional(),
  type: pattern.optional(),
  assembly: pattern.optional(),
  storey: pattern.optional(),
  layer: pattern.optional(),
  group: pattern.optional().describe('name of a group, system or zone'),
  property: properties.optional(),
  section: pattern.optional(),
  material: pattern.optional(),
  level: range('length').optional().describe("world z of the member's middle"),
  slope: slopeRange.optional().describe('angle to the horizontal'),
  length: range('length').optional(),
});

export type WrittenMemberSelector = z.output<typeof memberKeys> & { not?: WrittenMemberSelector | undefined };
type MemberSelectorInput = z.input<typeof memberKeys> & { not?: MemberSelectorInput | undefined };

const SOME_KEY = 'an empty selector would catch everything: give it a key';

const memberSelector: z.ZodType<WrittenMemberSelector, MemberSelectorInput> = memberKeys
  .extend({ not: z.lazy(() => memberSelector).optional() })
  .refine((selector) => Object.keys(selector).length > 0, SOME_KEY)
  .meta({ id: 'memberSelector', description: 'selects members; all keys must hold' });

const nodeKeys = z.strictObject({
  near: vector('length').optional().describe('world coordinates'),
  within: positive('length').optional(),
  lowest: z.boolean().optional().describe('within 10 mm of the lowest node'),
  highest: z.boolean().optional().describe('within 10 mm of the highest node'),
  level: range('length').optional().describe('world z'),
  top: z.boolean().optional().describe('no bar, and no triangle or quadrilateral closed by bars, lies above the node'),
  endOf: oneOrMore(memberSelector).optional(),
  joins: oneOrMore(memberSelector).optional(),
});

export type WrittenNodeSelector = z.output<typeof nodeKeys> & { not?: WrittenNodeSelector | undefined };
type NodeSelectorInput = z.input<typeof nodeKeys> & { not?: NodeSelectorInput | undefined };

const nodeSelector: z.ZodType<WrittenNodeSelector, NodeSelectorInput> = nodeKeys
  .extend({ not: z.lazy(() => nodeSelector).optional() })
  .refine((selector) => Object.keys(selector).length > 0, SOME_KEY)
  .refine(
    (selector) => (selector.near === undefined) === (selector.within === undefined),
    '"near" and "within" go together',
  )
  .meta({ id: 'nodeSelector', description: 'selects nodes; all keys must hold' });

const members = oneOrMore(memberSelector);
const nodes = oneOrMore(nodeSelector);

const LETTERS = 'the letters x, y and z, each once at most, {along: [1, 1, 0]}, or a list of these, is due';
type Held = { held: readonly Vec3[] };
const AXES = { x: [1, 0, 0], y: [0, 1, 0], z: [0, 0, 1] } as const satisfies Record<string, Vec3>;

const letters = z
  .string()
  .regex(/^(?!.*(.).*\1)[xyz]{1,3}$/u, LETTERS)
  .transform((written): Held => ({ held: [...written].map((letter) => AXES[letter as keyof typeof AXES]) }));

const along = z
  .strictObject({ along: z.tuple([z.number(), z.number(), z.number()]) })
  .transform((written, context): Held => {
    const direction = unit(written.along);
    if (direction === null)
      context.addIssue({ code: 'custom', message: 'this direction has no length', path: ['along'] });
    return { held: direction === null ? [] : [direction] };
  });

const fix = z
  .union([letters, along, z.array(z.union([letters, along], { error: LETTERS })).min(1)], { error: LETTERS })
  .transform((written) => (Array.isArray(written) ? written.flatMap((entry) => entry.held) : written.held));

const stiffness = positive('forcePerLength').optional();

const support = z
  .strictObject({
    at: nodes,
    fix: fix.optional(),
    spring: z
      .strictObject({ x: stiffness, y: stiffness, z: stiffness })
      .transform((springs) =>
        (['x', 'y', 'z'] as const).flatMap((axis) => {
          const value = springs[axis];
          return value === undefined ? [] : [{ direction: AXES[axis] as Vec3, stiffness: value }];
        }),
      )
      .refine((springs) => springs.length > 0, 'a spring needs x, y or z')
      .optional(),
  })
  .refine((rule) => rule.fix !== undefined || rule.spring !== undefined, 'a support needs "fix" or "spring"');

const selfWeight = z.strictObject({
  selfWeight: z.union([z.number(), z.strictObject({ factor: z.number() })], { error: 'a factor, such as 1.0, is due' }),
});

const area = z
  .strictObject({
    area: quantity('forcePerArea'),
    over: nodes,
    acts: z.enum(['down', 'normal']).describe('down: positive is downward; normal: positive presses on the upper face'),
    per: z.enum(['slope', 'plan']),
  })
  .refine((load) => load.acts !== 'normal' || load.per === 'slope', {
    message: 'a load normal to the surface acts per slope, not per plan',
    path: ['per'],
  });

const line = z.strictObject({
  line: vector('forcePerLength').describe('global axes'),
  on: members,
  per: z.enum(['length', 'plan']),
});

const point = z.strictObject({ point: vector('force').describe('global axes; in full at every node'), at: nodes });

const loadCase = z.strictObject({
  name: text,
  nature: z.enum(['permanent', 'imposed', 'snow', 'wind', 'thermal', 'accidental']),
  loads: z.array(z.union([selfWeight, area, line, point])),
});

const combination = z.strictObject({
  name: text,
  limit: z.enum(['strength', 'equilibrium', 'accidental', 'characteristic', 'frequent', 'quasi-permanent']),
  factors: z.record(z.string(), z.number()).describe('factor of each case, by its name'),
});

const steelGrade = text
  .refine((name) => gradeIn(name) !== null, 'this is no steel grade that is known: name one like S355, S275J2H or A992')
  .describe('a steel grade, such as S355 or A992');

const sectionDesignation = text
  .transform((written, context) => {
    const section = sectionFromDesignation(written);
    if (section !== null) return section;
    const near = didYouMean(written, knownDesignations());
    context.addIssue({
      code: 'custom',
      message: `this section is not known${near === '' ? ', or its dimensions make none; write it like "HEA 200" or "CHS 88.9x4"' : near}`,
    });
    return z.NEVER;
  })
  .describe('a designation, such as "HEA 200", "CHS 88.9x4" or "W12X26"');

/** A list that may stand in a brief and may not catch anything in this version. */
const nothingYet = z
  .array(z.unknown())
  .refine((list) => list.length === 0, 'this is not available yet; an empty list may stand');

export const briefInputSchema = z.strictObject({
  pinwright: z.literal(1),
  title: z.string().optional(),
  source: z.enum(['physical', 'analysis']).optional(),
  axes: z.enum(['given', 'centroid']).optional(),
  scope: z
    .strictObject({
      include: anyNumber(memberSelector).optional(),
      exclude: anyNumber(memberSelector).optional(),
    })
    .optional(),
  joints: z
    .strictObject({
      reach: positive('length').optional(),
      offset: positive('length').optional(),
      crossings: z.enum(['apart', 'joined']).optional(),
      seated: z.enum(['node', 'apart']).optional(),
      pairs: z.enum(['one', 'apart']).optional(),
    })
    .optional(),
  chords: z.enum(['pinned', 'strict']).optional(),
  supports: z.array(support).optional(),
  materials: z.strictObject({ default: steelGrade.optional() }).optional(),
  sections: z
    .array(z.strictObject({ on: members, use: sectionDesignation }))
    .optional()
    .describe('sections that go before those of the model; of several rules on a member the last counts'),
  tensionOnly: nothingYet.optional(),
  compressionOnly: nothingYet.optional(),
  cases: z.array(loadCase).optional(),
  combinations: z
    .union([z.literal('none'), z.array(combination)], { error: 'none, or a list of combinations, is due' })
    .optional(),
  checks: z
    .union([z.literal('none'), z.strictObject({ rule: z.literal('none') })], { error: 'none is due' })
    .optional(),
});

/** A brief that fits the schema, in SI, before its defaults are filled in. */
export type WrittenBrief = z.output<typeof briefInputSchema>;
