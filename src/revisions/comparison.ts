import { z } from 'zod';
import { resultSchema } from '../domain/result.ts';

/** What changed between two revisions (CONTRACT "The result"): this schema is the one source of its types and of its JSON Schema. */

const text = z.string();
const vector = z.tuple([z.number(), z.number(), z.number()]);
const finding = resultSchema.shape.findings.element;

const revision = z.strictObject({
  file: text,
  sha256: text.describe("of the model's bytes without our own block"),
  members: z.number().int(),
  bars: z.number().int(),
  mechanisms: z.number().int(),
});

const pair = { old: text.describe('GlobalId'), new: text.describe('GlobalId') };

const fromTo = z.tuple([text.nullable(), text.nullable()]).nullable().describe('from, to; null where it is as it was');

const forces = z.strictObject({
  tension: z.number().nullable().describe('N, greatest in its bars; null where it is never in tension'),
  compression: z.number().nullable().describe('N, negative'),
});

export const comparisonSchema = z.strictObject({
  format: z.literal('pinwright-comparison'),
  version: z.literal(1),
  generator: z.strictObject({ name: text, version: text }),
  caution: text,
  old: revision,
  new: revision,
  matched: z.array(z.strictObject({ ...pair, by: z.enum(['globalId', 'geometry']) })),
  added: z.array(text).describe('GlobalIds in the new model'),
  removed: z.array(text).describe('GlobalIds in the old model'),
  changed: z
    .array(
      z.strictObject({
        ...pair,
        moved: z.number().describe('m, greatest shift of an end, between the work points that the ends are joined to'),
        aside: z.number().describe('m, greatest shift of a drawn end sideways from the old axis'),
        section: fromTo,
        material: fromTo,
        rejoined: z.boolean().describe('it meets other members than it did, and no change of theirs explains it'),
      }),
    )
    .describe('the farthest moved first'),
  supports: z
    .array(
      z.strictObject({
        at: vector.describe('m, where it stands or stood'),
        place: text.nullable(),
        old: text.nullable().describe('letters of the directions that were held; null where there was no support'),
        new: text.nullable(),
      }),
    )
    .describe('supports that are new, gone, or hold otherwise'),
  loads: z
    .array(
      z.strictObject({
        case: text,
        old: vector.nullable().describe('N, sum of the loads; null where there was no such case'),
        new: vector.nullable(),
        elsewhere: z.number().describe('N, sum of the loads that are at places where there was none before'),
      }),
    )
    .describe('cases whose loads fall elsewhere or have another sum'),
  forces: z
    .array(
      z.strictObject({
        ...pair,
        from: forces,
        to: forces,
        change: z.number().describe('N, the greater change of the two'),
        utilisation: z.tuple([z.number().nullable(), z.number().nullable()]).nullable(),
      }),
    )
    .describe('one for each member found again, of its worst bars; the greatest change first'),
  findings: z.strictObject({ new: z.array(finding), gone: z.array(finding), standing: z.array(finding) }),
});

export type Comparison = z.infer<typeof comparisonSchema>;

/** The JSON Schema (draft 2020-12) of a comparison. */
export function comparisonJsonSchema(): Record<string, unknown> {
  return { title: 'Pinwright comparison', ...z.toJSONSchema(comparisonSchema) };
}
