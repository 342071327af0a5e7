// The end of the build: makes the command executable, and writes the JSON Schemas that ship with the package from the
// schemas that the program itself reads by.
import { chmodSync, mkdirSync, writeFileSync } from 'node:fs';
import { briefJsonSchema } from '../dist/brief/json-schema.js';
import { resultJsonSchema } from '../dist/exporter/json.js';
import { comparisonJsonSchema } from '../dist/revisions/comparison.js';

chmodSync(new URL('../dist/cli/main.js', import.meta.url), 0o755);

const folder = new URL('../dist/schemas/', import.meta.url);
mkdirSync(folder, { recursive: true });
const schemas = { brief: briefJsonSchema(), result: resultJsonSchema(), comparison: comparisonJsonSchema() };
for (const [name, schema] of Object.entries(schemas)) {
  writeFileSync(new URL(`${name}.schema.json`, folder), `${JSON.stringify(schema, null, 2)}\n`);
}
