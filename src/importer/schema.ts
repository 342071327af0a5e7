import { ModelError } from '../domain/errors.ts';

/** The three schemas whose attribute positions are known here. */
export type SchemaFamily = 'IFC2X3' | 'IFC4' | 'IFC4X3';

export interface KnownSchema {
  readonly family: SchemaFamily;
  /** The file's own schema is read as the nearest one, since it was never made a standard. */
  readonly guessed: boolean;
}

/**
 * The family that the schema named in FILE_SCHEMA (upper-case) is read as.
 * @throws ModelError where the schema is older than IFC2X3, later than IFC4X3 or none of IFC.
 */
export function knownSchema(name: string): KnownSchema {
  const match = /^(IFC2X3|IFC4X[123]|IFC4)(?:$|[_ ]+(.*)$|((?:RC|FINAL|TC|ADD).*)$)/.exec(name.trim());
  if (match === null) throw new ModelError(refusal(name));
  const base = match[1]!;
  const suffix = match[2] ?? match[3] ?? '';
  const isCandidate = /^(RC|ALPHA|BETA|DEV)/.test(suffix);
  if (base === 'IFC4X1') return { family: 'IFC4', guessed: true };
  if (base === 'IFC4X2') return { family: 'IFC4X3', guessed: true };
  return { family: base as SchemaFamily, guessed: isCandidate };
}

function refusal(name: string): string {
  if (name === '')
    return 'The file names no schema in its header, so its contents cannot be told. Export it again as IFC4.';
  const printable = name.replace(/[^\x20-\x7e]/g, '?').slice(0, 40);
  return `The file's schema ${printable} is not one of IFC2X3, IFC4 and IFC4X3. Export the model again as one of these.`;
}
