import type { StepFile } from '../step/step-file.ts';
import { WantedMeshes } from './body-meshes.ts';
import { IMPORT_DEFAULTS, type ImportOptions } from './options.ts';
import { parserMeshes } from './parser-meshes.ts';
import { readPhysicalModel } from './read-physical-model.ts';
import type { ImportedModel } from './types.ts';

/**
 * Reads the members of a model. Asynchronous, because a body that only a mesh can tell of needs a parser that takes a
 * moment to load.
 * @throws ModelError where the schema is not one that is read; RequestError where the default material is unknown.
 */
export async function importModel(file: StepFile, options: Partial<ImportOptions> = {}): Promise<ImportedModel> {
  const chosen = { ...IMPORT_DEFAULTS, ...options };
  const unmeshed = new WantedMeshes();
  const model = readPhysicalModel(file, chosen, unmeshed);
  if (unmeshed.wanted.size === 0) return model;
  return readPhysicalModel(file, chosen, await parserMeshes(file.bytes, unmeshed.wanted));
}
