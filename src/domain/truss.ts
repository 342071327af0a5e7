import type { Vec3 } from './vector.ts';

/** A node on a through member that is not split there: it lies at fraction `t` of the way along bar `bar`. */
export interface Carriage {
  readonly bar: number;
  readonly t: number;
}

/** Axes that miss their node as drawn: what they hand over there bends a member. */
export interface Eccentricity {
  /** `braces`: they meet off the chord's axis; `seat`: a member sits on another. */
  readonly of: 'braces' | 'seat';
  /** The member that is bent: the chord, or the one that sits. */
  readonly member: number;
  /** The braces, none for a seat. */
  readonly others: readonly number[];
  /** m; of braces positive beyond the chord's axis, negative where they meet before it. */
  readonly e: number;
  /** e as a share of the chord's depth in the plane of the braces; null for a seat. */
  readonly share: number | null;
}

/** How the members at a node came together. */
export interface Joining {
  /** "nearness" where the axes come near enough by themselves; "seat"; and the evidence for it: "plate GP-12", "assembly T1". */
  readonly by: readonly string[];
  readonly eccentricities: readonly Eccentricity[];
}

export interface TrussNode {
  readonly at: Vec3;
  /** Indices into the members the truss was made of. */
  readonly members: readonly number[];
  readonly carriedBy: Carriage | null;
  /** kg of overhangs that were cut off here: they carry no force but weigh. */
  readonly overhangMass: number;
  /** Absent where members were not joined here: at a free end, or where the truss was not made of members. */
  readonly joining?: Joining;
  readonly place: string | null;
}

export interface TrussBar {
  readonly name: string;
  /** Indices into the members; the first is the one the bar is named for. More than one for splices and pairs. */
  readonly members: readonly number[];
  /** Indices into `nodes`. */
  readonly from: number;
  readonly to: number;
  /** m, between the nodes. */
  readonly length: number;
  /** m, of bent members: how far they leave the straight line between the bar's ends, as drawn. */
  readonly strays?: number;
  /** EA in N, in series or added over the bar's members; null where a member has no section. */
  readonly stiffnessEA: number | null;
  /** kg per metre of bar; 0 where a member has no section. */
  readonly massPerLength: number;
  /** 1/K; the members' expansion, weighted by length. */
  readonly expansion: number;
}

/** How far joining moved a member off its axis as drawn: greatest sideways shift (m) and turn (rad). */
export interface Faith {
  readonly shift: number;
  readonly turn: number;
}

/** Nodes and bars, in the order of geometry. `faith` is one entry a member. */
export interface Truss {
  readonly nodes: readonly TrussNode[];
  readonly bars: readonly TrussBar[];
  readonly faith: readonly Faith[];
}
