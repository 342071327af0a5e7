import type { CombinationRule } from '../../brief/types.ts';
import type { Vec3 } from '../../domain/vector.ts';
import type { NodalForce, SolvedCase, SolvedCombination } from '../types.ts';

/** Sums of solved cases times their factors. A combination with a refused or unknown case in it is refused, naming it. */
export function combine(
  cases: readonly SolvedCase[],
  rules: readonly Omit<CombinationRule, 'line'>[],
): SolvedCombination[] {
  const byName = new Map(cases.map((one) => [one.name, one]));
  return rules.map(({ name, limit, factors }): SolvedCombination => {
    const terms = Object.entries(factors).map(([caseName, factor]) => ({
      caseName,
      factor,
      one: byName.get(caseName),
    }));
    const bars = cases[0]?.axialForce.length ?? 0;
    const nodes = cases[0]?.displacement.length ?? 0;
    const missing = terms.find((term) => term.one === undefined);
    const bad = terms.find((term) => term.one !== undefined && term.one.refused !== null);
    if (missing || bad)
      return {
        name,
        limit,
        factors,
        refused: missing ? `there is no load case ${missing.caseName}` : `load case ${bad!.caseName} is refused`,
        axialForce: new Array<null>(bars).fill(null),
        displacement: new Array<null>(nodes).fill(null),
        reactions: [],
      };
    const parts = terms.map(({ factor, one }) => ({ factor, one: one! }));
    return {
      name,
      limit,
      factors,
      refused: null,
      axialForce: Array.from({ length: bars }, (_, b) => sum(parts, ({ one }) => one.axialForce[b])),
      displacement: Array.from({ length: nodes }, (_, n) => sumVectors(parts, ({ one }) => one.displacement[n])),
      reactions: sumReactions(parts),
    };
  });
}

interface Part {
  readonly factor: number;
  readonly one: SolvedCase;
}

function sum(parts: readonly Part[], pick: (part: Part) => number | null): number | null {
  let total = 0;
  for (const part of parts) {
    const value = pick(part);
    if (value === null) return null;
    total += part.factor * value;
  }
  return total;
}

function sumVectors(parts: readonly Part[], pick: (part: Part) => Vec3 | null): Vec3 | null {
  const components = [0, 1, 2].map((axis) => sum(parts, (part) => pick(part)?.[axis] ?? null));
  return components.includes(null) ? null : (components as unknown as Vec3);
}

function sumReactions(parts: readonly Part[]): NodalForce[] {
  const total = new Map<number, Vec3>();
  for (const { factor, one } of parts)
    for (const { node, force } of one.reactions) {
      const before = total.get(node) ?? [0, 0, 0];
      total.set(node, [before[0] + factor * force[0], before[1] + factor * force[1], before[2] + factor * force[2]]);
    }
  return [...total].sort((a, b) => a[0] - b[0]).map(([node, force]) => ({ node, force }));
}
