import type { Vec3 } from './vector.ts';

/** Says in the building's own words where a point (world metres) lies: "C/4, +6.20"; null where the model has no words. */
export type PlaceNamer = (at: Vec3) => string | null;
