import type { En1990Rule, Limit, Psi } from '../../brief/code-rule.ts';
import { type ActionCase, type Draft, isPermanent, isVariable } from './action-case.ts';
import {
  CATEGORY_UNSTATED,
  equilibriumGammas,
  psiOf,
  type SetGammas,
  type Site,
  strengthGammas,
} from './en1990-factors.ts';
import { selectionsOf } from './selections.ts';

/** Factors of one combination before psi: what every kind of action is multiplied by. */
interface Terms {
  readonly limit: Limit;
  readonly expression: string;
  readonly permanent: number;
  readonly settlement: number;
  /** Of the leading variable action; null where none leads. */
  readonly leading: number | null;
  /** Of the others, before their psi. */
  readonly others: number;
  /** Which psi the others have, and which the leading one; null: none, its characteristic value. */
  readonly psiOthers: 0 | 1 | 2;
  readonly psiLeading: 0 | 1 | 2 | null;
}

/**
 * Every combination of EN 1990:2002+A1, 6.4.3 and 6.5.3, that may govern: all permanent cases together unfavourable or favourable, any subset
 * of the variable ones (favourable ones are left out), each variable action leading in turn. All imposed loads are one action
 * (EN 1991-1-1 3.3.1(2)); category H never acts with snow or wind (EN 1991-1-1 3.3.2(1)).
 */
export function draftEn1990(cases: readonly ActionCase[], rule: En1990Rule, site: Site): Draft<Limit>[] {
  const accidents = cases.filter(({ nature }) => nature === 'accidental');
  const selections = selectionsOf(cases.filter(isVariable)).filter(mayActTogether);
  const settles = cases.some(({ isSettlement }) => isSettlement);
  const terms = rule.sets.flatMap((limit) => termsOf(limit, rule));
  const drafts: Draft<Limit>[] = [];
  for (const one of terms)
    for (const accident of one.limit === 'accidental' ? accidents : [null])
      for (const settlement of settles ? [one.settlement, 0] : [0])
        for (const chosen of selections)
          for (const lead of leadsOf(one, chosen))
            drafts.push({
              limit: one.limit,
              what: describe(one, chosen, lead, accident),
              factors: factorsOf(cases, { ...one, settlement }, chosen, lead, accident, (key) =>
                psiFor(key, rule, site),
              ),
            });
  return drafts;
}

const psiFor = (one: ActionCase, rule: En1990Rule, site: Site): Psi =>
  psiOf(
    one.nature === 'snow' || one.nature === 'wind' || one.nature === 'thermal'
      ? one.nature
      : (one.category ?? CATEGORY_UNSTATED),
    site,
    rule.psi,
  );

/** EN 1991-1-1 3.3.2(1). */
function mayActTogether(chosen: readonly ActionCase[]): boolean {
  const hasRoofLoad = chosen.some(({ category }) => category === 'H');
  return !(hasRoofLoad && chosen.some(({ nature }) => nature === 'snow' || nature === 'wind'));
}

/** The actions that can lead: natures, since all imposed loads are one. */
function leadsOf({ leading }: Terms, chosen: readonly ActionCase[]): (string | null)[] {
  if (leading === null || chosen.length === 0) return [null];
  return [...new Set(chosen.map(({ nature }) => nature))];
}

function termsOf(limit: Limit, rule: En1990Rule): Terms[] {
  switch (limit) {
    case 'strength':
      return strengthTerms(rule);
    case 'equilibrium':
      return unfavourableAndFavourable(limit, '6.10', equilibriumGammas(rule.gammas));
    case 'accidental': {
      const psiLeading = rule.besideAccident === 'psi1' ? 1 : 2;
      return [{ ...SERVICE, limit, expression: '6.11b', leading: 1, psiLeading, psiOthers: 2 }];
    }
    case 'characteristic':
      return [{ ...SERVICE, limit, expression: '6.14b', leading: 1, psiLeading: null, psiOthers: 0 }];
    case 'frequent':
      return [{ ...SERVICE, limit, expression: '6.15b', leading: 1, psiLeading: 1, psiOthers: 2 }];
    case 'quasi-permanent':
      return [{ ...SERVICE, limit, expression: '6.16b', leading: null, psiLeading: null, psiOthers: 2 }];
  }
}

/** Table A1.4 and A1.3: permanent and settlement by their characteristic values. */
const SERVICE = { permanent: 1, settlement: 1, others: 1 } as const;

function strengthTerms({ expression, gammas }: En1990Rule): Terms[] {
  const { xi, ...set } = strengthGammas(gammas);
  if (expression === '6.10') return unfavourableAndFavourable('strength', '6.10', set);
  const a = unfavourableAndFavourable('strength', '6.10a', set);
  return [
    ...a.map((one) => ({ ...one, leading: null, psiLeading: null })),
    ...unfavourableAndFavourable('strength', '6.10b', { ...set, permanent: xi * set.permanent }),
  ];
}

function unfavourableAndFavourable(limit: Limit, expression: string, set: SetGammas): Terms[] {
  return [set.permanent, set.favourable].map((permanent) => ({
    limit,
    expression,
    permanent,
    settlement: set.settlement,
    leading: set.variable,
    others: set.variable,
    psiOthers: 0,
    psiLeading: null,
  }));
}

function factorsOf(
  cases: readonly ActionCase[],
  terms: Terms,
  chosen: readonly ActionCase[],
  lead: string | null,
  accident: ActionCase | null,
  psi: (one: ActionCase) => Psi,
): Record<string, number> {
  const factorOf = (one: ActionCase): number => {
    if (one.isSettlement) return terms.settlement;
    if (isPermanent(one)) return terms.permanent;
    if (one === accident) return 1;
    if (!chosen.includes(one)) return 0;
    if (one.nature !== lead) return terms.others * psi(one)[terms.psiOthers];
    return terms.leading! * (terms.psiLeading === null ? 1 : psi(one)[terms.psiLeading]);
  };
  return Object.fromEntries(cases.map((one) => [one.name, factorOf(one)]));
}

function describe(
  { expression }: Terms,
  chosen: readonly ActionCase[],
  lead: string | null,
  accident: ActionCase | null,
): string {
  const leading = chosen.filter(({ nature }) => nature === lead);
  const what = leading.length === 1 ? leading[0].name : lead;
  return [expression, accident?.name, what === null ? null : `${what} leads`].filter(Boolean).join(', ');
}
