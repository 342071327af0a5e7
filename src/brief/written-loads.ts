import { z } from 'zod';
import { positive, quantity, vector } from './written-quantities.ts';
import { members, nodes } from './written-selectors.ts';

/** The loads of a case as a brief writes them. */

const selfWeight = z.strictObject({
  selfWeight: z.union([z.number(), z.strictObject({ factor: z.number() })], {
    error: 'a factor, such as 1.0 or 1.1 with an allowance for connections, is due',
  }),
});

const corner = z.tuple([quantity('length'), quantity('length')]);
const polygon = z.array(corner).min(3);

/** Where on the selected nodes a surface load acts. */
const extent = {
  over: nodes,
  outline: polygon.optional().describe('[[x, y], ...] in plan: the load acts inside it only'),
  openings: z.array(polygon).optional().describe('polygons in plan without load'),
  edge: positive('length').optional().describe('roof beyond the outer nodes: its load goes to them'),
};

const edgeOrOutline = (load: { outline?: unknown; edge?: unknown }): boolean =>
  load.outline === undefined || load.edge === undefined;
const EDGE_OR_OUTLINE = { message: 'an outline says where the roof ends: leave "edge" out', path: ['edge'] };

const area = z
  .strictObject({
    area: quantity('forcePerArea'),
    acts: z.enum(['down', 'normal']).describe('down: positive is downward; normal: positive presses on the upper face'),
    per: z.enum(['slope', 'plan']),
    ...extent,
  })
  .refine((load) => load.acts !== 'normal' || load.per === 'slope', {
    message: 'a load normal to the surface acts per slope, not per plan',
    path: ['per'],
  })
  .refine(edgeOrOutline, EDGE_OR_OUTLINE);

const coefficient = z.number().refine((value) => value > 0 && value <= 2, 'this coefficient lies between 0 and 2');

const snow = z
  .strictObject({
    snow: positive('forcePerArea').describe(
      'on the ground, EN 1991-1-3 4.1; the roof gets it by its pitch, per plan area',
    ),
    arrangement: z
      .enum(['undrifted', 'half-left', 'half-right'])
      .optional()
      .describe('EN 1991-1-3 5.3.3: half of it on the slopes that face left (right)'),
    left: z
      .tuple([z.number(), z.number()])
      .refine(([x, y]) => Math.hypot(x, y) > 0, 'this direction has no length')
      .optional()
      .describe('[x, y]: the way in plan that counts as left; default -x, or -y where the slopes face that way'),
    exposure: coefficient.optional().describe('Ce, 5.2(7); 1.0'),
    thermal: coefficient.optional().describe('Ct, 5.2(8); 1.0'),
    guards: z.boolean().optional().describe('snow is kept from sliding: never less than 0.8, 5.3.2(2)'),
    ...extent,
  })
  .refine(edgeOrOutline, EDGE_OR_OUTLINE);

const wind = z.strictObject({
  wind: positive('forcePerArea').describe('velocity pressure'),
  zones: z.array(z.strictObject({ over: nodes, coefficient: z.number().describe('external; negative sucks') })).min(1),
  internal: z.number().optional().describe('internal coefficient, taken off the external ones; 0'),
});

const line = z.strictObject({
  line: vector('forcePerLength').describe('global axes'),
  on: members,
  per: z.enum(['length', 'plan']),
});

const point = z.strictObject({ point: vector('force').describe('global axes; in full at every node'), at: nodes });

const temperature = z.strictObject({
  temperature: quantity('temperature').describe('warmer is positive'),
  on: members,
});

const misfit = z.strictObject({
  misfit: quantity('length').describe('each of the members is made this much too long'),
  on: members,
});

export const load = z.union([selfWeight, area, snow, wind, line, point, temperature, misfit]);

export type WrittenLoad = z.output<typeof load>;
