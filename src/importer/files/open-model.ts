import type { Finding } from '../../domain/finding.ts';
import { openStep, type StepFile } from '../../step/step-file.ts';
import { contentKind } from './content-kind.ts';
import { OPEN_DEFAULTS, type OpenOptions } from './options.ts';

export interface OpenedModel {
  readonly file: StepFile;
  /** What the bytes were; a zip may hold either of the others. */
  readonly container: 'ifc' | 'ifczip' | 'ifcxml';
  /** The model's name in its zip, without folders; null where there is no zip. */
  readonly modelName: string | null;
  /** Whether `file` is not the user's own text but STEP text made of an ifcXML. */
  readonly isConverted: boolean;
  readonly findings: readonly Finding[];
}

/**
 * Opens a model as STEP text (ISO 10303-21), a zip with one model in it, or ifcXML in the dialects of IFC2X3 and of IFC4 and
 * later. The content decides which, never a name; nothing is written to the disk. The bytes must not change while the
 * file is in use.
 * @throws ModelError where they are none of these, damaged, or larger than the limits.
 */
export async function openModel(bytes: Uint8Array, chosen: Partial<OpenOptions> = {}): Promise<OpenedModel> {
  const options = { ...OPEN_DEFAULTS, ...chosen };
  if (contentKind(bytes) !== 'zip') return { ...(await openUnpacked(bytes, options)), modelName: null };
  // Loaded where it is needed: the parsers take longer to load than many a model to read.
  const { modelInZip } = await import('./zip.ts');
  const { name, content } = await modelInZip(bytes, options);
  return { ...(await openUnpacked(content, options)), container: 'ifczip', modelName: name };
}

async function openUnpacked(bytes: Uint8Array, options: OpenOptions): Promise<Omit<OpenedModel, 'modelName'>> {
  if (contentKind(bytes) !== 'xml') {
    return { file: openStep(bytes), container: 'ifc', isConverted: false, findings: [] };
  }
  const { stepOfIfcXml } = await import('./ifcxml/step-of-ifcxml.ts');
  const { step, findings } = stepOfIfcXml(bytes, options);
  return { file: openStep(step), container: 'ifcxml', isConverted: true, findings };
}
