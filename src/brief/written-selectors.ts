import { z } from 'zod';
import { positive, range, slopeRange, vector } from './written-quantities.ts';

/** Selectors of members and nodes as a brief writes them. */

export const toList = <T>(value: T | T[]): T[] => (Array.isArray(value) ? value : [value]);

/** One, or a list of which any may hold. */
export const oneOrMore = <I, O extends object>(item: z.ZodType<O, I>) =>
  z.union([item, z.array(item).min(1)]).transform((value) => toList<O>(value));

export const anyNumber = <I, O extends object>(item: z.ZodType<O, I>) =>
  z.union([item, z.array(item)]).transform((value) => toList<O>(value));

export const text = z.string().min(1);
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

export const memberSelector: z.ZodType<WrittenMemberSelector, MemberSelectorInput> = memberKeys
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

export const nodeSelector: z.ZodType<WrittenNodeSelector, NodeSelectorInput> = nodeKeys
  .extend({ not: z.lazy(() => nodeSelector).optional() })
  .refine((selector) => Object.keys(selector).length > 0, SOME_KEY)
  .refine(
    (selector) => (selector.near === undefined) === (selector.within === undefined),
    '"near" and "within" go together',
  )
  .meta({ id: 'nodeSelector', description: 'selects nodes; all keys must hold' });

export const members = oneOrMore(memberSelector);
export const nodes = oneOrMore(nodeSelector);
