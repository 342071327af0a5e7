import { z } from 'zod';

/** What the schemas of the result share. */

export const vector = z.tuple([z.number(), z.number(), z.number()]);

export const text = z.string();

export const textOrNull = text.nullable();

export const forcePerBar = z
  .array(z.number().nullable())
  .describe('N, tension positive, one per bar in the order of bars');

export const displacementPerNode = z.array(vector.nullable()).describe('m, one per node in the order of nodes');

export const nodeForces = z.array(z.strictObject({ node: text, force: vector.describe('N, global axes') }));

export const extreme = z.strictObject({ force: z.number(), from: text }).nullable();
