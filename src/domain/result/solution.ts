import { z } from 'zod';
import { displacementPerNode, extreme, forcePerBar, nodeForces, text, textOrNull, vector } from './values.ts';

/** What was solved: cases, combinations, and what follows from them for bars, joints and supports. */

const criticalFactor = z
  .number()
  .nullable()
  .optional()
  .describe(
    'times the load at which the truss as a whole buckles, from first-order forces; null: it does not; absent: not judged',
  );

const slack = z.array(text).optional().describe('bars of `oneWay` that carry nothing');

const unstable = z
  .strictObject({ bars: z.array(text) })
  .optional()
  .describe('the balance is carried but not stable: bars that give way, none where it is only indifferent');

export const caseSchema = z.strictObject({
  name: text,
  nature: z.enum(['permanent', 'imposed', 'snow', 'wind', 'thermal', 'accidental']),
  refused: text.optional(),
  loads: nodeForces,
  stretch: z
    .array(z.strictObject({ bar: text, by: z.number().describe('m longer than without force') }))
    .optional()
    .describe('of temperature and misfit'),
  settlements: z
    .array(z.strictObject({ node: text, movement: vector.describe('m') }))
    .optional()
    .describe('how far supports move their nodes, along directions they hold'),
  loadSum: vector,
  axialForce: forcePerBar,
  displacement: displacementPerNode,
  reactions: nodeForces,
  residual: z.number().nullable().describe('largest out-of-balance joint force over the largest force'),
  criticalFactor,
  slack,
  unstable,
});

export const combinationSchema = z.strictObject({
  name: text,
  limit: z.enum(['strength', 'equilibrium', 'accidental', 'characteristic', 'frequent', 'quasi-permanent']),
  factors: z.record(text, z.number()),
  refused: text.optional(),
  axialForce: forcePerBar,
  displacement: displacementPerNode,
  reactions: nodeForces,
  criticalFactor,
  slack,
  unstable,
});

/** How the combinations came about where a code made them; `combinations` lists those of them that govern something. */
export const combiningSchema = z.strictObject({
  rule: text.describe('edition and method'),
  generated: z.number().int().describe('combinations the code asks for, repeats left out'),
  between: z.number().int().describe('left out before solving: they lie between two others and can never govern'),
  solved: z.record(text, z.number().int()).describe('how many were solved, by limit'),
  notGoverning: z
    .array(z.strictObject({ name: text, limit: text, factors: z.record(text, z.number()) }))
    .describe('solved, and neither a bar, nor a support, nor a movement is greatest in them'),
  notes: z.array(text),
});

export const bucklingSchema = z
  .strictObject({
    from: text.describe('the combination or case that is nearest to buckling the truss as a whole'),
    modes: z.array(
      z.strictObject({
        factor: z.number(),
        nodes: z.array(text),
        movement: z.array(vector).describe('one for each of nodes, the largest component 1'),
      }),
    ),
  })
  .describe('lowest modes first');

export const checkSchema = z.strictObject({
  bar: text,
  member: text,
  utilisation: z.number().nullable(),
  withheld: text.optional(),
  rule: text,
  clause: text,
  from: text,
  demand: z.number(),
  resistance: z.number(),
  slenderness: z.number(),
  axis: text,
  bucklingLength: z.number(),
  heldAt: z.array(text),
  curve: text,
  class: z.number().int(),
  assumptions: z.array(text),
});

const idleBar = z.strictObject({
  bar: text,
  rule: z
    .enum(['alone', 'two', 'three', 'out-of-line', 'out-of-plane', 'slack', 'whole'])
    .describe(
      'what shows it: alone at an unloaded joint; one of two bars not in line, or of three not in one plane, there; all else at the joint in one line, ' +
        'or in one plane, that it stands out of; it only pulls or pushes and would have to do the other; the balance of the whole',
    ),
  node: textOrNull.describe('the joint that shows it'),
});

export const idleSchema = z
  .strictObject({
    everywhere: z.array(idleBar).describe('in every case, and in every combination where forces do not add up'),
    cases: z.array(z.strictObject({ case: text, bars: z.array(idleBar) })),
  })
  .describe('bars that carry nothing, in the order in which a person would find them');

const governingReaction = z
  .strictObject({
    force: z.number().describe('N, not negative'),
    from: text,
    reaction: vector.describe('N, the whole reaction that acts together with it'),
  })
  .nullable();

export const bearingSchema = z.strictObject({
  node: text,
  down: governingReaction,
  uplift: governingReaction,
  horizontal: governingReaction,
});

export const jointSchema = z.strictObject({
  node: text,
  bars: z.array(text),
  states: z.array(
    z.strictObject({
      from: text,
      governs: z.array(text).describe('bars whose greatest tension or compression this is'),
      forces: z.array(z.number().nullable()).describe('N, tension positive, one per bar of the joint'),
      reaction: vector.nullable().describe('N, global axes; null where nothing supports the joint'),
      loads: vector.nullable().describe('N, global axes; what closes the sum of the rest'),
    }),
  ),
});

export const holdSchema = z.strictObject({
  node: text,
  direction: vector,
  because: text,
  supported: z.boolean().describe('whether a support stands at the node too'),
  force: extreme.describe('N along the direction, the greatest by size'),
  compression: extreme.describe('N, greatest in a bar at the node'),
  usual: z.number().nullable().describe('N, 1/100 of that compression: EN 1993-1-1 5.3.3(4), from memory'),
});
