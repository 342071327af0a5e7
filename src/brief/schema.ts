import { z } from 'zod';
import { didYouMean } from '../domain/nearest-word.ts';
import { wordsFor } from '../domain/units.ts';
import { unit, type Vec3 } from '../domain/vector.ts';
import { gradeIn } from '../importer/materials/grades.ts';
import { knownDesignations } from '../importer/sections/designations/known-designations.ts';
import { sectionFromDesignation } from '../importer/sections/designations/section-from-designation.ts';
import { orthonormalSpan, remainder } from './held-directions.ts';
import { category, combinations } from './written-combinations.ts';
import { hold } from './written-holds.ts';
import { load } from './written-loads.ts';
import { positive, quantity } from './written-quantities.ts';
import { anyNumber, memberSelector, members, nodes, text } from './written-selectors.ts';

/**
 * The brief as it is written (CONTRACT "The brief"). This schema is the one source of the brief's validation and of its JSON
 * Schema (`z.toJSONSchema(briefInputSchema, { io: 'input' })`). Quantities come out in SI. Keys that are planned and cannot be
 * honoured yet are not here: they stand in not-yet.ts and are refused by name.
 */

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

/** Along its own length, so that what is left of it is a share. */
const scaled = (settle: Vec3): Vec3 => unit(settle) ?? settle;

const stiffness = positive('forcePerLength').optional();
const moved = quantity('length').optional();

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
    settle: z
      .strictObject({ x: moved, y: moved, z: moved })
      .refine((settle) => Object.keys(settle).length > 0, 'a settlement needs x, y or z')
      .transform(({ x = 0, y = 0, z: down = 0 }): Vec3 => [x, y, down])
      .optional()
      .describe('how far the support moves; a case of its own named settlement'),
  })
  .refine((rule) => rule.fix !== undefined || rule.spring !== undefined, 'a support needs "fix" or "spring"')
  .refine(
    (rule) => rule.settle === undefined || remainder(scaled(rule.settle), orthonormalSpan(rule.fix ?? [])) === null,
    {
      message: 'a support settles only in a direction that its "fix" holds',
      path: ['settle'],
    },
  );

const loadCase = z
  .strictObject({
    name: text,
    nature: z.enum(['permanent', 'imposed', 'snow', 'wind', 'thermal', 'accidental']),
    category: category.optional(),
    alternative: text
      .optional()
      .describe(
        'cases of one name never act together; default: one group each of wind, snow and thermal; none: no group',
      ),
    loads: z.array(load),
  })
  .refine((rule) => rule.category === undefined || rule.nature === 'imposed', {
    message: 'only imposed loads have a category',
    path: ['category'],
  })
  .refine((rule) => rule.alternative === undefined || rule.nature !== 'permanent', {
    message: 'permanent cases always act together',
    path: ['alternative'],
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

/** One length for every member, or one each for those that selectors catch. */
const lengthByMember = z
  .union([positive('length'), z.array(z.strictObject({ on: members, use: positive('length') })).min(1)], {
    error: `${wordsFor('length')}, or a list of {on: ..., use: 200 mm}, is due`,
  })
  .describe('a length, or a list of {on, use}; of several rules on a member the last counts, of no rule the sections');
const imperfectionRule = z.enum(['EN1993-1-1', 'AISC360', 'none']);

const imperfections = z
  .union(
    [
      imperfectionRule,
      z.strictObject({
        rule: imperfectionRule,
        along: z
          .tuple([z.number(), z.number()])
          .refine(([x, y]) => Math.hypot(x, y) > 0, 'this direction has no length')
          .optional()
          .describe('[x, y] in plan: sway acts along it and at right angles to it; default [1, 0]'),
      }),
    ],
    { error: 'EN1993-1-1, AISC360 or none is due' },
  )
  .describe('initial sway as horizontal forces in strength combinations');

/** Only `none` can be honoured yet: check-rules.ts says so. */
const checkRule = z.enum(['none', 'EN1993-1-1', 'EN1993-1-1:2005', 'EN1993-1-1:2005+A1', 'AISC360', 'AISC360-22']);

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
      reach: lengthByMember.optional(),
      offset: lengthByMember.optional(),
      crossings: z.enum(['apart', 'joined']).optional(),
      seated: z.enum(['node', 'apart']).optional(),
      pairs: z.enum(['one', 'apart']).optional(),
    })
    .optional(),
  chords: z.enum(['pinned', 'strict']).optional(),
  analysis: z
    .enum(['first-order', 'second-order'])
    .optional()
    .describe(
      'second-order: combinations are balanced at the nodes as they have moved; without it a critical factor below 10 is said',
    ),
  supports: z.array(support).optional(),
  holds: z.array(hold).optional(),
  materials: z.strictObject({ default: steelGrade.optional() }).optional(),
  sections: z
    .array(z.strictObject({ on: members, use: sectionDesignation }))
    .optional()
    .describe('sections that go before those of the model; of several rules on a member the last counts'),
  tensionOnly: anyNumber(memberSelector).optional().describe('members that only pull: rods, flats, cables'),
  compressionOnly: anyNumber(memberSelector).optional().describe('members that only push'),
  cases: z.array(loadCase).optional(),
  imperfections: imperfections.optional(),
  site: z
    .strictObject({
      altitude: quantity('length').optional().describe('above sea level'),
      nordic: z.boolean().optional().describe('in Finland, Iceland, Norway or Sweden'),
    })
    .optional(),
  combinations: combinations.optional(),
  checks: z.union([checkRule, z.strictObject({ rule: checkRule })], { error: 'none is due' }).optional(),
});

/** A brief that fits the schema, in SI, before its defaults are filled in. */
export type WrittenBrief = z.output<typeof briefInputSchema>;
