import type { StepFile } from '../step/step-file.ts';
import { type BodyMeshes, WantedMeshes } from './body-meshes.ts';
import { readEvidence } from './evidence/read-evidence.ts';
import { IMPORT_DEFAULTS, type ImportOptions } from './options.ts';
import { PlainElements } from './plain/plain-elements.ts';
import { finish, prepare } from './prepare.ts';
import { readElement, type Sources } from './read-element.ts';
import type { ImportedModel } from './types.ts';
import { noteUnknownClasses } from './unknown-classes.ts';

const MEMBER_CLASSES = ['IfcBeam', 'IfcColumn', 'IfcMember'].flatMap((name) => [name, `${name}StandardCase`]);

/**
 * The members of a physical model: elements of the member classes and of those in `options.classes`, each as a line of
 * force in world metres with section and material. What cannot be read is a finding, never silence.
 * Bodies that only a parser can mesh are asked of `meshes`. What `shortWay` reads makes no difference but in time.
 * @throws ModelError where the schema is not one that is read; RequestError where the default material is unknown.
 */
export function readPhysicalModel(
  file: StepFile,
  chosen: ImportOptions = IMPORT_DEFAULTS,
  meshes: BodyMeshes = new WantedMeshes(),
  shortWay: (sources: Sources) => Pick<PlainElements, 'read'> = (sources) => new PlainElements(sources),
): ImportedModel {
  const prepared = prepare(file, chosen);
  const elements = elementsOf(file, chosen.classes);
  const { sources } = prepared;
  const { members } = sources;
  const plain = shortWay(sources);
  const globalIds: string[] = [];
  members.reserve(elements.length);
  for (const id of elements) {
    const known = plain.read(id);
    const globalId = known ?? file.stringAt(id, 0)?.trim() ?? '';
    globalIds.push(globalId);
    if (known === null) readElement(sources, id, globalId, meshes);
  }
  noteUnknownClasses(sources.reading);
  return {
    ...finish(prepared, 'physical', elements, globalIds, members.members(), members.corner()),
    given: null,
    evidence: readEvidence(sources),
  };
}

function elementsOf(file: StepFile, extra: readonly string[]): number[] {
  const classes = new Set([...MEMBER_CLASSES, ...extra].map((name) => name.toUpperCase()));
  return [...classes].flatMap((name) => file.idsOf(name));
}
