import type { Vec3 } from './vector.ts';

/** A straight axis of the building's grid, in world metres at the level it is drawn on. */
export interface GridLine {
  readonly tag: string;
  readonly from: Vec3;
  readonly to: Vec3;
}
