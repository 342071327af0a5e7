import type { System } from '../model/system.ts';
import type { OneWay } from '../types.ts';
import type { OneWayRow } from './one-way-bars.ts';

/** The rows of the bars that pull only or push only; those set aside have none. */
export function oneWayRows({ elongations }: System, { tensionOnly, compressionOnly }: OneWay): OneWayRow[] {
  const signs = new Map<number, 1 | -1>([
    ...tensionOnly.map((bar) => [bar, 1] as const),
    ...compressionOnly.map((bar) => [bar, -1] as const),
  ]);
  return elongations.bars.flatMap((bar, row) => {
    const sign = signs.get(bar);
    return sign === undefined ? [] : [{ row, sign }];
  });
}
