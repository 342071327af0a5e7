import type { ActionCase } from './action-case.ts';

/** Wind directions, snow arrangements and the signs of temperature never act together, imposed loads may. */
const GROUPED_BY_NATURE: ReadonlySet<string> = new Set(['wind', 'snow', 'thermal']);

/** Cases of which at most one acts at a time, in the order of their first cases. */
export function alternativeGroups(cases: readonly ActionCase[]): ActionCase[][] {
  const groups = new Map<string, ActionCase[]>();
  cases.forEach((one, i) => {
    const named = one.alternative === 'none' ? undefined : (one.alternative ?? groupOfNature(one));
    const key = named === undefined ? `alone ${i}` : `group ${named}`;
    groups.set(key, [...(groups.get(key) ?? []), one]);
  });
  return [...groups.values()];
}

const groupOfNature = ({ nature, alternative }: ActionCase): string | undefined =>
  alternative === undefined && GROUPED_BY_NATURE.has(nature) ? nature : undefined;

/** How many selections there are, without making them. */
export function countSelections(cases: readonly ActionCase[]): number {
  return alternativeGroups(cases).reduce((product, group) => product * (group.length + 1), 1);
}

/** Every choice of cases that may act together, none of each group included: the empty one first. */
export function selectionsOf(cases: readonly ActionCase[]): ActionCase[][] {
  let selections: ActionCase[][] = [[]];
  for (const group of alternativeGroups(cases))
    selections = selections.flatMap((chosen) => [chosen, ...group.map((one) => [...chosen, one])]);
  return selections;
}
