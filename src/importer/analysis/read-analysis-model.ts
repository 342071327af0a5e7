import type { StepFile } from '../../step/step-file.ts';
import { inGeometricOrder } from '../geometric-order.ts';
import { IMPORT_DEFAULTS, type ImportOptions } from '../options.ts';
import { cornerOf } from '../places-in-scope.ts';
import { finish, prepare } from '../prepare.ts';
import type { Reading } from '../reading.ts';
import type { ImportedModel } from '../types.ts';
import { readActions, SURFACE } from './activities.ts';
import { readConnections } from './connections.ts';
import { curveMemberIds, readCurveMembers } from './curve-members.ts';
import { Frames } from './frames.ts';
import { readLoadGroups } from './load-groups.ts';
import { noteConnections } from './member-connections.ts';
import { SURFACE_REMARK } from './remarks.ts';

/**
 * The structural analysis view of a model: its curve members as members, its point connections, loads, cases and combinations
 * as `given`. Surfaces are passed over, stored results are not used. What cannot be read or taken is a finding.
 * @throws ModelError where the schema is not one that is read; RequestError where the default material is unknown.
 */
export function readAnalysisModel(file: StepFile, options: Partial<ImportOptions> = {}): ImportedModel {
  const prepared = prepare(file, { ...IMPORT_DEFAULTS, ...options });
  const { sources } = prepared;
  const frames = new Frames(sources);
  const ids = curveMemberIds(sources);
  const members = readCurveMembers(sources, frames);
  const { connections, supports } = readConnections(sources, frames);
  const actions = readActions(sources, frames, { connections, members });
  const { cases, combinations } = readLoadGroups(sources, frames, actions);
  noteConnections(sources.reading, members);
  noteSurfaces(sources.reading);
  const read = inGeometricOrder([...members.values()].map(({ member }) => member));
  const globalIds = ids.map((id) => file.stringAt(id, 0)?.trim() ?? '');
  return {
    ...finish(prepared, 'analysis', ids, globalIds, read, cornerOf(read)),
    given: { supports, cases, combinations },
    evidence: null,
  };
}

/** Whether the file has a structural analysis view with members. */
export const hasAnalysisView = (file: StepFile): boolean =>
  ['IFCSTRUCTURALCURVEMEMBER', 'IFCSTRUCTURALCURVEMEMBERVARYING'].some((type) => file.idsOf(type).length > 0);

const SKIPPED: readonly (readonly [one: string, many: string, types: readonly string[]])[] = [
  ['surface member', 'surface members', ['IFCSTRUCTURALSURFACEMEMBER', 'IFCSTRUCTURALSURFACEMEMBERVARYING']],
  ['line connection', 'line connections', ['IFCSTRUCTURALCURVECONNECTION']],
  ['surface connection', 'surface connections', ['IFCSTRUCTURALSURFACECONNECTION']],
  ['surface load', 'surface loads', SURFACE],
];

function noteSurfaces(reading: Reading): void {
  const counts = SKIPPED.flatMap(([one, many, types]) => {
    const count = types.reduce((sum, type) => sum + reading.file.idsOf(type).length, 0);
    return count === 0 ? [] : [`${count} ${count === 1 ? one : many}`];
  });
  const last = counts.pop();
  if (last === undefined) return;
  reading.note(SURFACE_REMARK(counts.length === 0 ? last : `${counts.join(', ')} and ${last}`));
}
