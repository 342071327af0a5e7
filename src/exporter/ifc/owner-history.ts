import type { StepFile } from '../../step/step-file.ts';
import { asRef, type StepRef } from '../../step/values.ts';
import { enumeration, integer, ref } from '../../step/write.ts';
import type { Block } from './block.ts';

/**
 * The owner history that new instances carry. IFC2X3 requires one: the project's own, or one written into the block
 * where the model has none. Later schemas do without.
 */
export function ownerHistory(file: StepFile, project: number | null, version: string, block: Block): StepRef | null {
  if (!block.isIfc2x3) return null;
  const given = project === null ? null : asRef(file.args(project)[1]);
  if (given !== null && file.typeOf(given) === 'IFCOWNERHISTORY') return ref(given);
  const [any] = file.idsOf('IFCOWNERHISTORY');
  return any === undefined ? writeOwnerHistory(file, version, block) : ref(any);
}

function writeOwnerHistory(file: StepFile, version: string, block: Block): StepRef {
  const name = 'Pinwright';
  const person = block.add('IFCPERSON', null, name, null, null, null, null, null, null);
  const organization = block.add('IFCORGANIZATION', null, name, null, null, null);
  const user = block.add('IFCPERSONANDORGANIZATION', person, organization, null);
  const program = block.add('IFCAPPLICATION', organization, version, name, name);
  const created = integer(secondsOf(file.timeStamp));
  const unchanged = enumeration('NOCHANGE');
  return block.add('IFCOWNERHISTORY', user, program, null, unchanged, null, null, null, created);
}

/** Seconds since 1970 of the model's own time stamp, read as UTC: the same model gives the same block at any hour. */
export function secondsOf(timeStamp: string | null): number {
  const stamp = /^\d{4}-\d\d-\d\dT\d\d:\d\d(:\d\d)?/.exec(timeStamp ?? '')?.[0];
  const milliseconds = stamp === undefined ? Number.NaN : Date.parse(`${stamp}Z`);
  return Number.isFinite(milliseconds) ? Math.max(0, Math.floor(milliseconds / 1000)) : 0;
}
