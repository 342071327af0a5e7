import { z } from 'zod';
import { text, textOrNull, vector } from './values.ts';

/** What was read and joined: members, nodes, bars, and how. */

const sectionSchema = z.strictObject({
  name: text,
  shape: text,
  area: z.number().describe('m2'),
  inertiaY: z.number().describe('m4, about the horizontal centroidal axis: integral of z^2'),
  inertiaZ: z.number().describe('m4, about the vertical centroidal axis: integral of y^2'),
  inertiaYZ: z.number(),
  inertiaMajor: z.number(),
  inertiaMinor: z.number(),
  torsion: z.number().describe('m4, St. Venant'),
  warping: z.number().describe('m6'),
  from: z.enum(['profile', 'name', 'properties', 'brief', 'mesh']),
});

const materialSchema = z.strictObject({
  name: text,
  elasticModulus: z.number().describe('Pa'),
  density: z.number().describe('kg/m3'),
  expansion: z.number().describe('1/K'),
  yieldStrength: z.number().nullable().describe('Pa'),
  ultimateStrength: z.number().nullable().describe('Pa'),
  from: text,
});

export const memberSchema = z.strictObject({
  id: text,
  globalId: text,
  part: z.number().int(),
  name: textOrNull,
  tag: textOrNull,
  class: text,
  predefinedType: textOrNull,
  type: textOrNull,
  assembly: textOrNull,
  storey: textOrNull,
  place: textOrNull,
  axisFrom: z.enum(['axis', 'extrusion', 'swept', 'mesh', 'analysis-view']),
  axis: z.tuple([vector, vector]).describe('m, world axes'),
  zAxis: vector,
  shift: z.number().describe('m, greatest sideways distance of its nodes from its axis as drawn'),
  turn: z.number().describe('rad, how far the axis was turned by joining'),
  section: sectionSchema.nullable(),
  material: materialSchema.nullable(),
});

export const nodeSchema = z.strictObject({
  id: text,
  at: vector.describe('m, world axes'),
  members: z.array(text).describe('GlobalIds'),
  fixed: text.describe('letters of the rigidly held directions; "" for a free node'),
  place: textOrNull,
  carriedBy: z.strictObject({ bar: text, t: z.number() }).nullable(),
  joinedBy: z
    .array(text)
    .optional()
    .describe(
      'why its members are one joint: nearness where all would be joined by it alone, seat, and evidence such as "plate GP-12"',
    ),
});

export const barSchema = z.strictObject({
  id: text,
  name: text,
  member: text.describe('GlobalId'),
  members: z.array(text).optional(),
  from: text,
  to: text,
  length: z.number(),
  axialStiffness: z.number().nullable().optional().describe('EA in N; null where a member has no section'),
});

export const familySchema = z
  .strictObject({
    role: z.enum(['column', 'chord', 'purlin', 'post', 'diagonal', 'bracing', 'beam']).describe('told by geometry'),
    section: textOrNull,
    length: z.number().describe('m, as drawn'),
    members: z.array(text).describe('GlobalIds'),
    oddBeside: z
      .strictObject({ length: z.number().describe('m'), count: z.number().int() })
      .nullable()
      .describe('the far larger family of nearly this length beside which these few look like a slip'),
  })
  .describe('members alike in role, section and length, the odd ones first');

const limitSchema = z.strictObject({
  set: z.array(z.strictObject({ value: z.number().describe('m'), members: z.number().int() })).describe('by the brief'),
  bySections: z
    .tuple([z.number(), z.number()])
    .nullable()
    .describe('m, least and greatest that the sections of members that met gave'),
});

export const joiningSchema = z
  .strictObject({ reach: limitSchema, offset: limitSchema })
  .describe('how far axes were allowed to be carried; evidence widens it for the pair concerned');

export const eccentricitySchema = z.strictObject({
  node: text,
  of: z.enum(['braces', 'seat']),
  member: text.describe('GlobalId of the one that is bent: the chord, or the member that sits'),
  e: z.number().describe("m, as drawn; of braces positive beyond the chord's axis"),
  moment: z.number().nullable().describe('Nm, greatest dN e; null without forces'),
  from: textOrNull,
});

export const supportSchema = z.strictObject({
  node: text,
  fixed: z.array(vector).describe('unit directions that are held rigidly'),
  springs: z.array(z.strictObject({ direction: vector, stiffness: z.number().describe('N/m') })),
});
