import { z } from 'zod';
import { FINDING_SEVERITY, type FindingCode } from './finding.ts';

/** The result of a run (CONTRACT "The result"): this schema is the one source of its types and of its JSON Schema. */

const vector = z.tuple([z.number(), z.number(), z.number()]);
const text = z.string();
const textOrNull = text.nullable();
const forcePerBar = z.array(z.number().nullable()).describe('N, tension positive, one per bar in the order of bars');
const displacementPerNode = z.array(vector.nullable()).describe('m, one per node in the order of nodes');
const nodeForces = z.array(z.strictObject({ node: text, force: vector.describe('N, global axes') }));

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

const memberSchema = z.strictObject({
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

const nodeSchema = z.strictObject({
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

const barSchema = z.strictObject({
  id: text,
  name: text,
  member: text.describe('GlobalId'),
  members: z.array(text).optional(),
  from: text,
  to: text,
  length: z.number(),
  axialStiffness: z.number().nullable().optional().describe('EA in N; null where a member has no section'),
});

const familySchema = z
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

const replySchema = z.strictObject({
  topic: text.describe('GUID of the returned topic'),
  by: z.enum(['guid', 'members', 'place']).describe('how the topic was found again'),
  status: text,
  closed: z.boolean().describe('closed there, though the finding stands'),
  assignedTo: textOrNull,
  comments: z.array(z.strictObject({ date: text, author: text, text })),
});

const repliesSchema = z.strictObject({
  file: text,
  topics: z.number().int(),
  unreadable: z.number().int(),
  matched: z.number().int(),
  others: z.number().int().describe('topics that no finding answers to and that are not known to be gone'),
  gone: z.array(z.strictObject({ topic: text, title: text, status: text, closed: z.boolean() })),
});

const findingSchema = z.strictObject({
  code: z.enum(Object.keys(FINDING_SEVERITY) as [FindingCode, ...FindingCode[]]),
  severity: z.enum(['error', 'warning', 'note']),
  message: text,
  members: z.array(text),
  nodes: z.array(text),
  at: vector.nullable(),
  place: textOrNull,
  gap: z.number().nullable().describe('m'),
  advice: text,
  reply: replySchema.optional().describe('what came back of its topic'),
});

const remedySchema = z.union([
  z.strictObject({ node: text, direction: vector }),
  z.strictObject({ bar: z.tuple([text, text]) }),
]);

const modeSchema = z.strictObject({
  kind: z.enum(['local', 'part', 'whole']),
  nodes: z.array(text),
  movement: z.array(vector),
  order: z.enum(['infinitesimal', 'finite', 'undecided']),
  words: text,
  remedy: z.array(remedySchema).describe('with the remedies of all modes in place nothing moves'),
  otherRemedy: z.array(remedySchema).optional().describe('bars that do the same in place of `remedy`'),
});

const stabilitySchema = z.strictObject({
  nodes: z.number().int(),
  bars: z.number().int(),
  restraints: z.number().int(),
  springs: z.number().int(),
  rank: z.number().int(),
  mechanisms: z.number().int(),
  selfStressStates: z.number().int(),
  freeBody: z.boolean(),
  gap: z.number().nullable().describe("ratio across the spectrum's gap, null where none is clear"),
  criticalBars: z
    .array(text)
    .optional()
    .describe('bars in no state of self-stress: without any one of them there is one mechanism more'),
  redundancy: z
    .array(
      z.strictObject({
        bars: z.number().int().describe('bars and springs'),
        mechanisms: z.number().int(),
        selfStressStates: z.number().int(),
      }),
    )
    .optional()
    .describe('by part that hangs together'),
  setAside: z.array(text).describe('bars'),
  modes: z.array(modeSchema),
  modesOmitted: z.number().int().optional(),
});

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

const caseSchema = z.strictObject({
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

const combinationSchema = z.strictObject({
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
const combiningSchema = z.strictObject({
  rule: text.describe('edition and method'),
  generated: z.number().int().describe('combinations the code asks for, repeats left out'),
  between: z.number().int().describe('left out before solving: they lie between two others and can never govern'),
  solved: z.record(text, z.number().int()).describe('how many were solved, by limit'),
  notGoverning: z
    .array(z.strictObject({ name: text, limit: text, factors: z.record(text, z.number()) }))
    .describe('solved, and neither a bar, nor a support, nor a movement is greatest in them'),
  notes: z.array(text),
});

const bucklingSchema = z
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

const extreme = z.strictObject({ force: z.number(), from: text }).nullable();

const checkSchema = z.strictObject({
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

const limitSchema = z.strictObject({
  set: z.array(z.strictObject({ value: z.number().describe('m'), members: z.number().int() })).describe('by the brief'),
  bySections: z
    .tuple([z.number(), z.number()])
    .nullable()
    .describe('m, least and greatest that the sections of members that met gave'),
});

const joiningSchema = z
  .strictObject({ reach: limitSchema, offset: limitSchema })
  .describe('how far axes were allowed to be carried; evidence widens it for the pair concerned');

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

const idleSchema = z
  .strictObject({
    everywhere: z.array(idleBar).describe('in every case, and in every combination where forces do not add up'),
    cases: z.array(z.strictObject({ case: text, bars: z.array(idleBar) })),
  })
  .describe('bars that carry nothing, in the order in which a person would find them');

const eccentricitySchema = z.strictObject({
  node: text,
  of: z.enum(['braces', 'seat']),
  member: text.describe('GlobalId of the one that is bent: the chord, or the member that sits'),
  e: z.number().describe("m, as drawn; of braces positive beyond the chord's axis"),
  moment: z.number().nullable().describe('Nm, greatest dN e; null without forces'),
  from: textOrNull,
});

const governingReaction = z
  .strictObject({
    force: z.number().describe('N, not negative'),
    from: text,
    reaction: vector.describe('N, the whole reaction that acts together with it'),
  })
  .nullable();

const bearingSchema = z.strictObject({
  node: text,
  down: governingReaction,
  uplift: governingReaction,
  horizontal: governingReaction,
});

const jointSchema = z.strictObject({
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

const supportSchema = z.strictObject({
  node: text,
  fixed: z.array(vector).describe('unit directions that are held rigidly'),
  springs: z.array(z.strictObject({ direction: vector, stiffness: z.number().describe('N/m') })),
});

const holdSchema = z.strictObject({
  node: text,
  direction: vector,
  because: text,
  supported: z.boolean().describe('whether a support stands at the node too'),
  force: extreme.describe('N along the direction, the greatest by size'),
  compression: extreme.describe('N, greatest in a bar at the node'),
  usual: z.number().nullable().describe('N, 1/100 of that compression: EN 1993-1-1 5.3.3(4), from memory'),
});

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
