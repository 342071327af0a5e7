import type { Brief } from '../../brief/types.ts';
import type { LoadCase } from '../types.ts';
import { type Generated, generateCombinations, type NamedCombination } from './generate.ts';

/** The combinations of a run; `generated` says how a code made them, null where they were listed. */
export interface Combining {
  readonly combinations: readonly NamedCombination[];
  readonly generated: Generated | null;
}

/**
 * Those that the brief's code makes of the cases, those the brief lists, or the model's own.
 * @param given the model's own, where its cases are used
 * @throws RequestError where a code makes too many
 */
export function combinationsFor(
  cases: readonly LoadCase[],
  brief: Pick<Brief, 'combinations' | 'codeRule' | 'site'>,
  given: readonly NamedCombination[] | null,
  superposable: boolean,
): Combining {
  if (cases.length === 0) return { combinations: [], generated: null };
  if (brief.codeRule !== null) {
    const generated = generateCombinations(cases, brief.codeRule, { site: brief.site, superposable });
    return { combinations: generated.combinations, generated };
  }
  return { combinations: given ?? brief.combinations, generated: null };
}
