import type { Result } from '../../domain/result.ts';
import { html, type Markup } from './html.ts';
import { kNs } from './numbers.ts';
import { numbers, table, words } from './table.ts';

const AXES = ['x', 'y', 'z'];
const alongAxes = (word: string) => AXES.map((axis) => `${word} ${axis}, kN`);

/** Each load beside what was asked for, each case's sum beside its reactions. */
export function loadsSection({ cases, asked = [], combinations, combining }: Result): Markup {
  if (cases.length === 0) return html`<p>There is no load case: the truss was judged and not loaded.</p>`;
  const sums = cases.map(({ name, nature, refused, loadSum, reactions, residual }) => {
    const reaction = [0, 1, 2].map((k) => reactions.reduce((sum, { force }) => sum + (force[k] ?? 0), 0));
    const balance = refused === undefined ? (residual?.toExponential(0) ?? '–') : 'refused';
    return [name, nature, ...kNs(loadSum), ...kNs(refused === undefined ? reaction : null), balance];
  });
  const refusals = cases.filter(({ refused }) => refused !== undefined);
  return html`${refusals.map(({ name, refused = '' }) => html`<p><b>${name} is refused:</b> ${refused}</p>\n`)}
${table('Load cases: the sum of the loads, and of the reactions, which balance it', [...words('case', 'nature'), ...numbers(...alongAxes('loads'), ...alongAxes('reactions'), 'imbalance')], sums)}
${table(
  'What the brief asks for, by areas, lengths and masses alone, and what the nodes got',
  [...numbers('line'), ...words('case', 'load'), ...numbers(...alongAxes('asked'), ...alongAxes('applied'))],
  asked.map(({ case: name, line, what, asked: wished, applied }) => [
    line,
    name,
    what,
    ...kNs(wished),
    ...kNs(applied),
  ]),
)}
${combining === undefined ? null : html`<p>Combinations by ${combining.rule}: ${combining.generated} asked for, ${combining.between} of them lie between two others and can never govern.${combining.notes.map((note) => ` ${note}`)}</p>`}
${table(
  combining === undefined ? 'Combinations' : 'Combinations that govern something',
  words('name', 'limit', 'factors'),
  combinations.map(({ name, limit, factors }) => [name, limit, factorWords(factors)]),
)}`;
}

const factorWords = (factors: Readonly<Record<string, number>>): string =>
  Object.entries(factors)
    .filter(([, factor]) => factor !== 0)
    .map(([name, factor]) => `${Number(factor.toPrecision(4))} ${name}`)
    .join(' + ')
    .replaceAll('+ -', '− ');
