import type { Asce7Rule, Limit } from '../../brief/code-rule.ts';
import type { ActionCase, Draft } from './action-case.ts';
import { type Load, rowsOf } from './asce7-factors.ts';
import { selectionsOf } from './selections.ts';

/**
 * Every basic combination of ASCE 7 with any of its loads not acting (2.3.1, 2.4.1), one of each alternative group at a time. Imposed loads of
 * category H are roof live load, others live load.
 */
export function draftAsce7(cases: readonly ActionCase[], rule: Asce7Rule): Draft<Limit>[] {
  const dead = cases.filter((one) => loadOf(one) === 'D');
  const selections = selectionsOf(cases.filter((one) => loadOf(one) !== 'D'));
  return rowsOf(rule).flatMap(({ clause, limit, factors }) =>
    selections
      .filter((chosen) => chosen.every((one) => (factors[loadOf(one)] ?? 0) > 0))
      .filter((chosen) => chosen.filter((one) => loadOf(one) === 'A').length === (factors.A === undefined ? 0 : 1))
      .map(
        (chosen): Draft<Limit> => ({
          limit,
          what: clause,
          factors: Object.fromEntries([...dead, ...chosen].map((one) => [one.name, factors[loadOf(one)] ?? 0])),
        }),
      ),
  );
}

export function loadOf({ nature, category, isSettlement }: ActionCase): Load {
  if (isSettlement) return 'T';
  switch (nature) {
    case 'permanent':
      return 'D';
    case 'imposed':
      return category === 'H' ? 'Lr' : 'L';
    case 'snow':
      return 'S';
    case 'wind':
      return 'W';
    case 'thermal':
      return 'T';
    case 'accidental':
      return 'A';
  }
}
