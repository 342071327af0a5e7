import { z } from 'zod';
import { briefInputSchema } from './schema.ts';
import type { Path } from './written-source.ts';

type JsonSchema = z.core.JSONSchema.BaseSchema;

let generated: JsonSchema | null = null;

/** The keys that the mapping at `path` may have, of whatever kind it turns out to be. */
export function knownKeysAt(path: Path): string[] {
  // Made once and only where there is a mistake to explain: it takes longer than reading a brief.
  generated ??= z.toJSONSchema(briefInputSchema, { io: 'input' });
  let schemas = openUp([generated], generated);
  for (const step of path)
    schemas = openUp(
      schemas.flatMap((schema) => inside(schema, step)),
      generated,
    );
  return [...new Set(schemas.flatMap((schema) => Object.keys(schema.properties ?? {})))];
}

/** The alternatives of a schema, its references followed. */
function openUp(schemas: readonly JsonSchema[], root: JsonSchema): JsonSchema[] {
  return schemas.flatMap((schema) => {
    const referred =
      schema.$ref?.startsWith('#/$defs/') === true ? root.$defs?.[schema.$ref.slice('#/$defs/'.length)] : undefined;
    if (referred !== undefined) return openUp([referred], root);
    const branches = [...(schema.anyOf ?? []), ...(schema.allOf ?? [])] as JsonSchema[];
    return branches.length === 0 ? [schema] : openUp(branches, root);
  });
}

function inside(schema: JsonSchema, step: PropertyKey): JsonSchema[] {
  const child =
    typeof step === 'number' ? (schema.prefixItems?.[step] ?? schema.items) : schema.properties?.[String(step)];
  return typeof child === 'object' && !Array.isArray(child) ? [child as JsonSchema] : [];
}
