import type { Truss } from '../../domain/truss.ts';
import { topNodes } from './top-nodes.ts';

/** How many nodes `top: true` catches at one level. */
export interface TopLevel {
  /** World z, m, to the centimetre. */
  readonly level: number;
  readonly count: number;
}

/** The nodes that `top: true` catches, by level from below. */
export function topLevels(truss: Truss): TopLevel[] {
  const isTop = topNodes(truss);
  const counts = new Map<number, number>();
  truss.nodes.forEach(({ at }, node) => {
    if (isTop[node] === 0) return;
    const level = Math.round(at[2] * 100) / 100;
    counts.set(level, (counts.get(level) ?? 0) + 1);
  });
  return [...counts].map(([level, count]) => ({ level, count })).sort((a, b) => a.level - b.level);
}
