import { didYouMean } from '../domain/nearest-word.ts';
import { quoted } from './one-line.ts';
import type { WrittenBrief } from './schema.ts';
import type { Path, Problem, WrittenSource } from './written-source.ts';

/** The case that supports which settle make. */
export const SETTLEMENT = 'settlement';

/** Names that stand twice among cases and combinations, and factors of cases that do not exist. */
export function findNameProblems(written: WrittenBrief, source: WrittenSource): Problem[] {
  const own = (written.cases ?? []).map((rule) => rule.name);
  const settles = (written.supports ?? []).some(({ settle }) => settle !== undefined);
  const cases = settles ? [...own, SETTLEMENT] : own;
  const combinations = Array.isArray(written.combinations) ? written.combinations : [];
  const places: { name: string; path: Path }[] = [
    ...own.map((name, i) => ({ name, path: ['cases', i, 'name'] })),
    ...combinations.map(({ name }, i) => ({ name, path: ['combinations', i, 'name'] })),
  ];
  const seen = new Set<string>(settles ? [SETTLEMENT] : []);
  const problems: Problem[] = [];
  for (const { name, path } of places) {
    if (seen.has(name)) {
      problems.push({
        ...source.place(path),
        message: `${source.excerpt(path)}this name is taken by another case or combination`,
      });
    }
    seen.add(name);
  }
  combinations.forEach(({ factors }, i) => {
    const path = ['combinations', i, 'factors'];
    for (const name of Object.keys(factors)) {
      if (cases.includes(name)) continue;
      problems.push({
        ...source.placeOfKey(path, name),
        message: `${quoted(name)}there is no such case${didYouMean(name, cases)}`,
      });
    }
  });
  return problems;
}
