import type { Result } from '../../domain/result.ts';

/** One solved case or combination, as the schedules read it. */
export type SolvedRun = Result['cases'][number] | Result['combinations'][number];

const ULTIMATE: ReadonlySet<string> = new Set(['strength', 'equilibrium', 'accidental']);

/** What supports have to be designed for: the strength, equilibrium and accidental combinations; the cases where there are no combinations. */
export function ultimateRuns(result: Result): readonly SolvedRun[] {
  if (result.combinations.length === 0) return result.cases;
  return result.combinations.filter(({ limit }) => ULTIMATE.has(limit));
}

/** The same runs in words. */
export function ultimateTitle(result: Result): string {
  return result.combinations.length === 0 ? 'unfactored, case by case' : 'strength, equilibrium, accidental';
}
