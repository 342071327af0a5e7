import { z } from 'zod';
import { FINDING_SEVERITY, type FindingCode } from '../finding.ts';
import { text, textOrNull, vector } from './values.ts';

/** What was found: findings with what came back of them, and whether the truss stands. */

const replySchema = z.strictObject({
  topic: text.describe('GUID of the returned topic'),
  by: z.enum(['guid', 'members', 'place']).describe('how the topic was found again'),
  status: text,
  closed: z.boolean().describe('closed there, though the finding stands'),
  assignedTo: textOrNull,
  comments: z.array(z.strictObject({ date: text, author: text, text })),
});

export const repliesSchema = z.strictObject({
  file: text,
  topics: z.number().int(),
  unreadable: z.number().int(),
  matched: z.number().int(),
  others: z.number().int().describe('topics that no finding answers to and that are not known to be gone'),
  gone: z.array(z.strictObject({ topic: text, title: text, status: text, closed: z.boolean() })),
});

export const findingSchema = z.strictObject({
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

export const stabilitySchema = z.strictObject({
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
