import type { StepFile } from '../../step/step-file.ts';
import { asString } from '../../step/values.ts';

/** As members have it: the instance's number stands for a GlobalId that is left out. */
export function globalIdOf(file: StepFile, id: number): string {
  const stated = asString(file.args(id)[0])?.trim() ?? '';
  return stated === '' ? `#${id}` : stated;
}
