import type { Named } from './names.ts';

export interface StabilityOptions {
  /** The members that the truss was made of, for their marks; with none, nodes are known by their places. */
  readonly members: readonly Named[];
  /** Ratio between neighbouring eigenvalues from which a gap is clear. */
  readonly clearGap: number;
  /**
   * Without a clear gap, eigenvalues below this share of the highest count as mechanisms. An eigenvalue's share goes with the square of the
   * slope by which bars leave the direction that is free: 1e-10 is a slope of 1e-5, 0.03 mm on a bar of 3 m, less than any model's
   * coordinates or any workshop can tell from nothing.
   */
  readonly threshold: number;
  /** Eigenvalues below this share that are not counted as mechanisms are mentioned: a slope of 3e-5, 0.1 mm on 3 m. */
  readonly nearly: number;
  /** Most modes that are worked out. */
  readonly mostModes: number;
  /** Largest stretch of a bar, as a share of the movement, that a listed mode may have. */
  readonly mostStretch: number;
}

export const STABILITY_DEFAULTS: StabilityOptions = {
  members: [],
  clearGap: 1e3,
  threshold: 1e-10,
  nearly: 1e-9,
  mostModes: 200,
  mostStretch: 3e-7,
};
