import type { Truss } from '../../domain/truss.ts';
import type { BarStretch } from '../types.ts';

/**
 * Free stretch of bars by warmth: expansion x change x length. A bar that is only partly theirs (a splice) is warmed over its whole length.
 * @param change K
 */
export function stretchByWarmth(truss: Truss, members: readonly number[], change: number): BarStretch[] {
  return barsOf(truss, members).map((bar) => {
    const { expansion, length } = truss.bars[bar];
    return { bar, by: expansion * change * length };
  });
}

/** Each member is made `by` m too long; its bars share it by their lengths. */
export function stretchByMisfit(truss: Truss, members: readonly number[], by: number): BarStretch[] {
  return members.flatMap((member) => {
    const bars = barsOf(truss, [member]);
    const whole = bars.reduce((sum, bar) => sum + truss.bars[bar].length, 0);
    return bars.map((bar) => ({ bar, by: (by * truss.bars[bar].length) / whole }));
  });
}

function barsOf(truss: Truss, members: readonly number[]): number[] {
  const chosen = new Set(members);
  return truss.bars.flatMap((bar, b) => (bar.members.some((member) => chosen.has(member)) ? [b] : []));
}
