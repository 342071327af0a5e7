import { z } from 'zod';
import { findingSchema, repliesSchema, stabilitySchema } from './result/judgement.ts';
import {
  barSchema,
  eccentricitySchema,
  familySchema,
  joiningSchema,
  memberSchema,
  nodeSchema,
  supportSchema,
} from './result/model.ts';
import {
  bearingSchema,
  bucklingSchema,
  caseSchema,
  checkSchema,
  combinationSchema,
  combiningSchema,
  holdSchema,
  idleSchema,
  jointSchema,
} from './result/solution.ts';
import { extreme, text, textOrNull, vector } from './result/values.ts';

/** The result of a run (CONTRACT "The result"): this schema is the one source of its types and of its JSON Schema. */

export const resultSchema = z.strictObject({
  format: z.literal('pinwright-result'),
  version: z.literal(1),
  generator: z.strictObject({ name: text, version: text }),
  caution: text,
  units: z.strictObject({ length: z.literal('m'), force: z.literal('N'), stress: z.literal('Pa') }),
  model: z.strictObject({
    file: text,
    sha256: text.describe("of the model's bytes without our own block"),
    schema: text,
    lengthUnit: text,
    source: z.enum(['physical', 'analysis']),
    project: z.strictObject({ globalId: text, name: textOrNull }).optional().describe('the IfcProject'),
    written: text.optional().describe("the time stamp in the model's header, as it stands there"),
  }),
  grid: z
    .array(z.strictObject({ tag: text, from: vector, to: vector }))
    .optional()
    .describe("the straight axes of the building's grid, m, world axes"),
  members: z.array(memberSchema),
  nodes: z.array(nodeSchema),
  bars: z.array(barSchema),
  families: z.array(familySchema).optional(),
  findings: z.array(findingSchema),
  replies: repliesSchema.optional().describe('what a returned BCF file said'),
  stability: stabilitySchema,
  cases: z.array(caseSchema),
  asked: z
    .array(
      z.strictObject({
        case: text,
        line: z.number().int().describe('of the brief'),
        what: text,
        asked: vector.nullable().describe('N, from areas, lengths and masses alone'),
        applied: vector.describe('N, the sum at the nodes'),
      }),
    )
    .optional()
    .describe('each load of the brief: what it asks for and what was applied'),
  imperfections: text.optional().describe('what was loaded for imperfections, by what rule'),
  combinations: z.array(combinationSchema),
  analysis: z.enum(['first-order', 'second-order']).optional(),
  buckling: bucklingSchema.optional(),
  oneWay: z
    .strictObject({ tensionOnly: z.array(text), compressionOnly: z.array(text) })
    .optional()
    .describe(
      'bars that only pull, and that only push: forces of cases do not add up, every combination is solved for itself',
    ),
  combining: combiningSchema.optional(),
  envelope: z.array(z.strictObject({ bar: text, tension: extreme, compression: extreme })),
  checks: z.array(checkSchema),
  supports: z
    .array(supportSchema)
    .optional()
    .describe('by node, in the order of nodes; what only holds keep is under `holds`'),
  idle: idleSchema.optional(),
  holds: z.array(holdSchema).optional(),
  joining: joiningSchema.optional(),
  eccentricities: z.array(eccentricitySchema).optional(),
  bending: z
    .array(z.strictObject({ bar: text, node: text, moment: z.number().describe('Nm'), from: text }))
    .optional()
    .describe('greatest moment that the nodes a bar carries cause in it; not checked'),
  bearings: z.array(bearingSchema).optional().describe('what each support has to bear at most'),
  joints: z.array(jointSchema).optional().describe('what the connection of each joint is designed for'),
});

export type Result = z.infer<typeof resultSchema>;

export type ResultMember = Result['members'][number];

export type ResultBar = Result['bars'][number];

export type ResultFinding = Result['findings'][number];
