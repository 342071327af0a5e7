import { z } from 'zod';
import { unit, type Vec3 } from '../domain/vector.ts';
import { members, nodes, text } from './written-selectors.ts';

/** One rule under `holds:`: what keeps nodes sideways and is not in the model. */
export const hold = z
  .strictObject({
    on: members.optional().describe('members of the trusses that are held; without it, all'),
    nodes: nodes.optional().describe('which of their nodes; without it, all'),
    across: z.literal(true, { error: 'true is due, or leave it out and give `along`' }).optional(),
    along: z
      .tuple([z.number(), z.number(), z.number()])
      .transform((written, context): Vec3 => {
        const direction = unit(written);
        if (direction !== null) return direction;
        context.addIssue({ code: 'custom', message: 'this direction has no length' });
        return z.NEVER;
      })
      .optional()
      .describe('world axes'),
    because: text.describe('what holds them, such as roof sheeting'),
  })
  .refine(
    (rule) => (rule.across === undefined) !== (rule.along === undefined),
    'a hold needs "across: true" (normal to the plane of its own truss) or "along: [x, y, z]", one of them',
  )
  .refine((rule) => rule.on !== undefined || rule.nodes !== undefined, 'a hold needs "on" or "nodes"');
