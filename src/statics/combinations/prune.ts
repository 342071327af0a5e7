import type { Draft } from './action-case.ts';

/** Decimals of a factor: a product of two factors of a code has no more. */
const DECIMALS = 6;

/** Cases of factor 0 left out, and rounding noise of products of factors (1.5 x 0.6). */
export function tidy<D extends Draft>(draft: D): D {
  const factors = Object.entries(draft.factors)
    .map(([name, factor]) => [name, Number(factor.toFixed(DECIMALS))] as const)
    .filter(([, factor]) => factor !== 0);
  return { ...draft, factors: Object.fromEntries(factors) };
}

/** Of combinations with the same limit and factors the first. */
export function withoutRepeats<D extends Draft>(names: readonly string[], drafts: readonly D[]): D[] {
  const seen = new Set<string>();
  return drafts.filter((draft) => {
    const key = `${draft.limit} ${vectorOf(names, draft).join(' ')}`;
    if (seen.has(key)) return false;
    seen.add(key);
    return true;
  });
}

/**
 * Leaves out combinations that differ from two others of their limit in the factor of one case only, and lie between them: every force
 * that is a sum of the cases' forces lies between theirs, so that they never govern. True only where forces may be superposed.
 */
export function withoutInner<D extends Draft>(names: readonly string[], drafts: readonly D[]): D[] {
  const vectors = drafts.map((draft) => vectorOf(names, draft));
  const inner = new Set<number>();
  for (const [k] of names.entries()) {
    const lines = new Map<string, number[]>();
    drafts.forEach((draft, i) => {
      const key = `${draft.limit} ${vectors[i].toSpliced(k, 1).join(' ')}`;
      lines.set(key, [...(lines.get(key) ?? []), i]);
    });
    for (const line of lines.values()) {
      const along = line.map((i) => vectors[i][k]);
      const [least, most] = [Math.min(...along), Math.max(...along)];
      line.forEach((i, at) => {
        if (along[at] > least && along[at] < most) inner.add(i);
      });
    }
  }
  return drafts.filter((_, i) => !inner.has(i));
}

const vectorOf = (names: readonly string[], { factors }: Draft): number[] => names.map((name) => factors[name] ?? 0);
