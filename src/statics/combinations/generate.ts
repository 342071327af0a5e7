import type { CodeRule, Limit } from '../../brief/code-rule.ts';
import { RequestError } from '../../domain/errors.ts';
import { type ActionCase, isVariable } from './action-case.ts';
import { draftAsce7 } from './asce7.ts';
import { draftEn1990 } from './en1990.ts';
import { CATEGORY_UNSTATED, type Site } from './en1990-factors.ts';
import { tidy, withoutInner, withoutRepeats } from './prune.ts';
import { countSelections } from './selections.ts';

/** A combination with its name, as an explicit list of the brief gives it. */
export interface NamedCombination {
  readonly name: string;
  readonly limit: Limit;
  readonly factors: Readonly<Record<string, number>>;
}

/** What a code makes of the cases. */
export interface Generated {
  readonly combinations: readonly NamedCombination[];
  /** Edition and method: "EN 1990:2002+A1, expression 6.10". */
  readonly rule: string;
  /** How many the code asks for, repeats left out. */
  readonly generated: number;
  /** How many of these lie between two others and can never govern: they are left out. */
  readonly between: number;
  /** What was taken because the brief does not say. */
  readonly notes: readonly string[];
}

export interface GenerateOptions {
  readonly site: Site;
  /** Whether forces of cases may be added up: not with bars that only pull or only push. */
  readonly superposable: boolean;
}

export const GENERATE_DEFAULTS: GenerateOptions = { site: { altitude: null, nordic: false }, superposable: true };

/** Selections of variable cases beyond which a code's list is of no use to anyone. */
const MOST_SELECTIONS = 20_000;
/** Combinations that are carried through solving and checks. */
const MOST_COMBINATIONS = 20_000;

/**
 * The combinations that a code asks for, named and counted by limit.
 * @throws RequestError where there are too many to be meant
 */
export function generateCombinations(
  cases: readonly ActionCase[],
  rule: CodeRule,
  options: Partial<GenerateOptions> = {},
): Generated {
  const { site, superposable } = { ...GENERATE_DEFAULTS, ...options };
  const selections = countSelections(cases.filter(isVariable));
  if (selections > MOST_SELECTIONS) throw tooMany(`${selections} ways in which the variable cases may act together`);
  const names = cases.map(({ name }) => name);
  const drafts = rule.code === 'EN1990:2002+A1' ? draftEn1990(cases, rule, site) : draftAsce7(cases, rule);
  const distinct = withoutRepeats(names, drafts.map(tidy)).filter(({ factors }) => Object.keys(factors).length > 0);
  const kept = superposable ? withoutInner(names, distinct) : distinct;
  if (kept.length > MOST_COMBINATIONS) throw tooMany(`${kept.length} combinations`);
  const counts = new Map<Limit, number>();
  return {
    combinations: kept.map(({ limit, what, factors }) => {
      const number = (counts.get(limit) ?? 0) + 1;
      counts.set(limit, number);
      return { name: `${limit} ${number} (${what})`, limit, factors };
    }),
    rule:
      rule.code === 'EN1990:2002+A1'
        ? `EN 1990:2002+A1, expression ${rule.expression}`
        : wordsOfAsce7(rule.code, rule.method),
    generated: distinct.length,
    between: distinct.length - kept.length,
    notes: notesOf(cases, rule, site),
  };
}

const wordsOfAsce7 = (code: string, method: string): string => `${code.replace('ASCE7', 'ASCE 7')}, ${method}`;

function tooMany(what: string): RequestError {
  return new RequestError(
    `combinations: these cases make ${what}: give cases that never act together one \`alternative:\` name, or list the combinations`,
  );
}

function notesOf(cases: readonly ActionCase[], rule: CodeRule, { altitude, nordic }: Site): string[] {
  const notes: string[] = [];
  const unstated = cases.filter((one) => one.nature === 'imposed' && one.category === undefined);
  const names = unstated.map(({ name }) => name).join(', ');
  if (rule.code === 'EN1990:2002+A1') {
    const hasSnow = cases.some(({ nature }) => nature === 'snow') && rule.psi.snow === undefined;
    if (hasSnow && altitude === null && !nordic)
      notes.push('no `site: {altitude: ...}` is given: psi of snow is that above 1000 m (0.7, 0.5, 0.2)');
    if (unstated.length > 0)
      notes.push(
        `no \`category:\` is given for ${names}: taken as ${CATEGORY_UNSTATED}, the greatest psi of Table A1.1`,
      );
    return notes;
  }
  notes.push('earthquake, rain, flood and fluids are not combined');
  if (unstated.length > 0)
    notes.push(`no \`category:\` is given for ${names}: taken as live load L (category H is roof live load)`);
  if (rule.method === 'ASD' && cases.some(({ nature }) => nature === 'accidental'))
    notes.push('accidental cases stand in strength design only (2.5) and are in no combination of ASD');
  return notes;
}
