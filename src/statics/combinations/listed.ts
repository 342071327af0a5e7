import { type BucklingJudgement, NOT_JUDGED } from '../buckling/judge-buckling.ts';
import type { BarEnvelope, SolvedCombination } from '../types.ts';
import type { Generated } from './generate.ts';
import { governing } from './governing.ts';

/** How the combinations of a result came about; the same shape as there. */
export interface CombiningRecord {
  rule: string;
  generated: number;
  between: number;
  solved: Record<string, number>;
  notGoverning: { name: string; limit: string; factors: Record<string, number> }[];
  notes: string[];
}

/**
 * Combinations that a result lists in full. A code makes hundreds, most of which govern nothing: of those only name and factors are kept. What the
 * brief lists itself is listed whole.
 */
export function listed(
  combinations: readonly SolvedCombination[],
  envelope: readonly BarEnvelope[],
  generated: Generated | null,
  buckling: BucklingJudgement = NOT_JUDGED,
): { combinations: readonly SolvedCombination[]; combining?: CombiningRecord } {
  if (generated === null) return { combinations };
  const chosen = new Set(governing(combinations, envelope));
  for (const one of combinations)
    if (one.name === buckling.governing?.from || one.unstable !== undefined) chosen.add(one);
  const solved: Record<string, number> = {};
  for (const { limit } of combinations) solved[limit] = (solved[limit] ?? 0) + 1;
  const { rule, between, notes } = generated;
  return {
    combinations: combinations.filter((one) => chosen.has(one)),
    combining: {
      rule,
      generated: generated.generated,
      between,
      solved,
      notGoverning: combinations
        .filter((one) => !chosen.has(one))
        .map(({ name, limit, factors }) => ({ name, limit, factors: { ...factors } })),
      notes: [...notes],
    },
  };
}
