import type { StepFile } from '../step/step-file.ts';
import { IMPORT_DEFAULTS, type ImportOptions } from './options.ts';
import { readPhysicalModel } from './read-physical-model.ts';
import type { ImportedModel } from './types.ts';

/**
 * Reads the members of a model. Asynchronous, because a body that only a mesh can tell of needs a parser that takes a
 * moment to load.
 * @throws ModelError where the schema is not one that is read; RequestError where the default material is unknown.
 */
export async function importModel(file: StepFile, options: Partial<ImportOptions> = {}): Promise<ImportedModel> {
  return readPhysicalModel(file, { ...IMPORT_DEFAULTS, ...options });
}
