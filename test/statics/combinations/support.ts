import type { ActionCase } from '../../../src/statics/combinations/action-case.ts';

/** `cases('G permanent', 'S snow', 'Q imposed C', 'W1 wind west')`: name, nature, then a category or an alternative group. */
export function cases(...written: string[]): ActionCase[] {
  return written.map((text) => {
    const [name, nature, more] = text.split(' ') as [string, ActionCase['nature'], string | undefined];
    if (name === 'settlement') return { name, nature, isSettlement: true };
    const isCategory = more !== undefined && /^[A-H]$/u.test(more);
    return {
      name,
      nature,
      ...(isCategory ? { category: more as NonNullable<ActionCase['category']> } : {}),
      ...(more !== undefined && !isCategory ? { alternative: more } : {}),
    };
  });
}

/** Factors in the order of names, as one text; factors of 0 and repeats count once. */
export function asSet(names: readonly string[], all: readonly Readonly<Record<string, number>>[]): string[] {
  const texts = all.map((factors) => names.map((name) => Number((factors[name] ?? 0).toFixed(6))).join(' '));
  return [...new Set(texts)].filter((text) => /[1-9]/u.test(text)).sort();
}
