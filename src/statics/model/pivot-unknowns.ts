import type { Restraint } from '../types.ts';
import { type Movement, STRIDE } from './movement.ts';

/** The unknowns that move a real node by 1 along a pivot's direction. */
export function pivotUnknowns(movement: Movement, { node, direction }: Restraint): [unknown: number, value: number][] {
  const out: [number, number][] = [];
  for (let c = 0; c < movement.freeCount[node]; c++) {
    const unknown = STRIDE * node + c;
    if (!movement.freedoms.active[unknown]) continue;
    const at = 9 * node + 3 * c;
    const along =
      direction[0] * movement.frame[at] + direction[1] * movement.frame[at + 1] + direction[2] * movement.frame[at + 2];
    if (along !== 0) out.push([unknown, along]);
  }
  return out;
}
