/** How far axes may be carried to meet. Lengths in metres; METHODS "Topology" gives the trade reasons. */
export interface JoinOptions {
  /** How far an end may be carried along its own axis, m; null lets the two sections decide. */
  readonly reach: PerMember;
  /** Shortest distance between two axes that are still taken to meet, m; null lets the two sections decide. */
  readonly offset: PerMember;
  /** Axes that run through each other away from their ends (crossed bracing). */
  readonly crossings: 'apart' | 'joined';
  /** Members that sit on others (purlins on chords). */
  readonly seated: 'node' | 'apart';
  /** Members that run side by side, as back-to-back angles do. */
  readonly pairs: 'one' | 'apart';
  /** `strict` splits a through member at every joint; `pinned` only where something triangulates. */
  readonly chords: 'pinned' | 'strict';
}

/** One value for all members, or one each in their order. */
export type PerMember = number | null | readonly (number | null)[];

export const valueFor = (values: PerMember, member: number): number | null =>
  typeof values === 'number' || values === null ? values : (values[member] ?? null);

export const JOIN_DEFAULTS: JoinOptions = {
  reach: null,
  offset: null,
  crossings: 'apart',
  seated: 'node',
  pairs: 'one',
  chords: 'pinned',
};

/** Tolerances of joining, in metres or as plain ratios. Starting values of METHODS 2.2. */
export const TOLERANCE = {
  /** Detailing gap that a gusset bridges whatever the size of the member. */
  detailingGap: 0.15,
  /** Share of a member's own depth that a gusset, a neighbouring brace or a notch may keep it away beyond its corner. */
  ownDepthShare: 1.25,
  /** How far an end may run past the far side of what it meets before that is an overhang. */
  overrun: 0.06,
  leastSine: 0.3,
  /** Ends that face each other clear no long slanting side: they keep apart at most as if they met at 45 degrees. */
  facingSine: Math.SQRT1_2,
  leastOffset: 0.02,
  /** A sheet or a wall is as deep as a storey; axes do not meet across it. */
  mostOffset: 0.3,
  /** An end is not carried on by more than this share of its member: a cleat does not become a brace. */
  mostOfLength: 0.5,
  /** Packing, cleat thickness and camber under a seat. */
  seatPacking: 0.025,
  /** An upright purlin on a ridge rests with the middle of its flange on the apex and not with an edge: lower by this share. */
  flangeSeat: 0.85,
  /** Members of one assembly were drawn to belong together. */
  sameAssembly: 1.5,
  /** A plate both touch, or a relationship in the file, says that they are joined. */
  withEvidence: 2.5,
  leastJoint: 0.05,
  /** Below this sine two axes count as parallel: where their lines cross says nothing about where they meet. */
  parallelSine: 0.17,
  zeroLength: 0.001,
  /** Depth assumed for a member without a section. */
  unknownDepth: 0.05,
  /** A near miss goes on to this multiple of its own limit; beyond, the end is loose. */
  nearMiss: 3,
} as const;
