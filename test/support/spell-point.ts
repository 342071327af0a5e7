import type { Vec3 } from '../../src/domain/vector.ts';

/** A point in words that two computations of it agree on: coordinates in metres, no minus before a zero. */
export function spellPoint(point: Vec3, decimals = 3): string {
  return point.map((x) => x.toFixed(decimals).replace(/^-(0\.0+)$/, '$1')).join(' ');
}
