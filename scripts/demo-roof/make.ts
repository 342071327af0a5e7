import { mkdirSync, writeFileSync } from 'node:fs';
import { fileURLToPath } from 'node:url';
import { faultyModel } from './faults.ts';
import { hallFile } from './ifc-file.ts';
import { hallModel, REVISION_A, REVISION_B } from './revisions.ts';

/** Every model of the demo, by file name. */
export function demoFiles(): Readonly<Record<string, string>> {
  const models = {
    'boat-hall-a.ifc': hallModel(REVISION_A),
    'boat-hall-b.ifc': hallModel(REVISION_B),
    'boat-hall-faults.ifc': faultyModel(),
  };
  return Object.fromEntries(Object.entries(models).map(([name, model]) => [name, hallFile(model, name)]));
}

if (process.argv[1] === fileURLToPath(import.meta.url)) {
  const folder = new URL('../../fixtures/', import.meta.url);
  mkdirSync(folder, { recursive: true });
  for (const [name, text] of Object.entries(demoFiles())) writeFileSync(new URL(name, folder), text);
}
