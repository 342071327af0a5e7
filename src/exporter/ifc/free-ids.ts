import { ModelError } from '../../domain/errors.ts';
import type { StepFile } from '../../step/step-file.ts';
import type { Taken } from './taken.ts';

/** Many readers keep instance numbers in 32 bits with a sign. */
const HIGHEST_ID = 2 ** 31 - 1;

/**
 * The first of `amount` numbers in a row that nothing has or refers to: above the highest, or in a gap where that would
 * go too far.
 */
export function firstFreeId(
  file: Pick<StepFile, 'ids'>,
  { highestId, dangling }: Pick<Taken, 'highestId' | 'dangling'>,
  amount: number,
): number {
  if (highestId + amount <= HIGHEST_ID) return highestId + 1;
  const ids = Float64Array.from([...file.ids(), ...dangling()]).sort();
  let free = 1;
  for (const id of ids) {
    if (id - free >= amount) return free;
    free = Math.max(free, id + 1);
  }
  if (free + amount - 1 <= HIGHEST_ID) return free;
  throw new ModelError('The model has no room for new instances: its instance numbers leave no gap below 2^31.');
}
