import type { StepFile } from '../../step/step-file.ts';

const FIXED_TYPES = [
  'IFCBEAM',
  'IFCCOLUMN',
  'IFCMEMBER',
  'IFCBEAMSTANDARDCASE',
  'IFCCOLUMNSTANDARDCASE',
  'IFCMEMBERSTANDARDCASE',
  'IFCPLATE',
  'IFCPLATESTANDARDCASE',
  'IFCPILE',
  'IFCRAILING',
  'IFCBUILDINGELEMENTPROXY',
  'IFCBUILDINGELEMENTPART',
  'IFCELEMENTASSEMBLY',
  'IFCDISCRETEACCESSORY',
  'IFCMECHANICALFASTENER',
  'IFCSTRUCTURALCURVEMEMBER',
  'IFCSTRUCTURALCURVEMEMBERVARYING',
  'IFCSTRUCTURALSURFACEMEMBER',
  'IFCSTRUCTURALPOINTCONNECTION',
  'IFCSTRUCTURALPOINTACTION',
  'IFCSTRUCTURALCURVEACTION',
  'IFCSTRUCTURALLINEARACTION',
  'IFCSTRUCTURALLINEARACTIONVARYING',
] as const;

/**
 * The instances of the wanted elements by GlobalId: several where a GlobalId stands twice in the file. Looks among the
 * types that a truss is read from, findings speak of, or `classes` names.
 */
export function findElements(
  file: StepFile,
  wanted: ReadonlySet<string>,
  classes: Iterable<string>,
): Map<string, number[]> {
  const found = new Map<string, number[]>();
  const types = new Set<string>(FIXED_TYPES);
  for (const name of classes) types.add(name.toUpperCase());
  for (const type of types) {
    for (const id of file.idsOf(type)) {
      const globalId = file.args(id)[0];
      if (typeof globalId !== 'string' || !wanted.has(globalId)) continue;
      const ids = found.get(globalId);
      if (ids === undefined) found.set(globalId, [id]);
      else ids.push(id);
    }
  }
  return found;
}
