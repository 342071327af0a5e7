import type { Cursor } from '../../step/cursor.ts';

/** Three numbers of a point or a direction, as `Reading.pointOf` and `directionOf` read them. */
export class Triple {
  readonly at = new Float64Array(3);
  /** One of those that are known by their address there. */
  is: 'origin' | 'up' | 'ahead' | 'another' = 'another';

  /** False where instance `id` holds anything else than three numbers. */
  read(cursor: Cursor, id: number, factor: number): boolean {
    const { at } = this;
    if (!cursor.triple(id, at)) return false;
    const x = at[0]! * factor;
    const y = at[1]! * factor;
    const z = at[2]! * factor;
    this.is = 'another';
    if (y === 0) {
      if (x === 0) this.is = z === 0 ? 'origin' : z === 1 ? 'up' : 'another';
      else if (x === 1 && z === 0) this.is = 'ahead';
    }
    // The known ones have no negative zeros.
    const isKnown = this.is !== 'another';
    at[0] = isKnown ? x + 0 : x;
    at[1] = isKnown ? y + 0 : y;
    at[2] = isKnown ? z + 0 : z;
    return true;
  }
}
