import type { SolvedCase, SolvedCombination } from '../types.ts';

/**
 * The answers that greatest values are sought among: the strength and accidental combinations, or the cases where there is no
 * combination. What is refused has no part in it.
 */
export function decisive(
  cases: readonly SolvedCase[],
  combinations: readonly SolvedCombination[],
): readonly (SolvedCase | SolvedCombination)[] {
  const asked =
    combinations.length > 0
      ? combinations.filter((one) => one.limit === 'strength' || one.limit === 'accidental')
      : cases;
  return asked.filter((one) => one.refused === null);
}
