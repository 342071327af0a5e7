import { z } from 'zod';
import { briefInputSchema } from './schema.ts';

/** The JSON Schema (2020-12) of a brief as a user writes it. */
export function briefJsonSchema(): object {
  return z.toJSONSchema(briefInputSchema, { io: 'input' });
}
