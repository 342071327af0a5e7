import type { Category } from '../brief/code-rule.ts';
import type { Limit, Nature } from '../brief/types.ts';
import type { Finding } from '../domain/finding.ts';
import type { Vec3 } from '../domain/vector.ts';

/** A node held rigidly along a unit direction. Several on one node have linearly independent directions. */
export interface Restraint {
  readonly node: number;
  readonly direction: Vec3;
}

/** A spring from a node to the ground along a unit direction, N/m. */
export interface GroundSpring {
  readonly node: number;
  readonly direction: Vec3;
  readonly stiffness: number;
}

export interface Supports {
  readonly restraints: readonly Restraint[];
  readonly springs: readonly GroundSpring[];
  /** What holds nodes and is no support: it keeps them like a restraint, and makes nothing stand that has no support. */
  readonly holds?: readonly Hold[];
}

export interface Hold extends Restraint {
  /** What holds it, in the words of the brief. */
  readonly because: string;
}

/** What a hold has to take. */
export interface HoldForce extends Hold {
  /** N along `direction`, the greatest by size; null where nothing was solved. */
  readonly force: ExtremeForce | null;
  /** N, the greatest compression in a bar at the node; null where there is none. */
  readonly compression: ExtremeForce | null;
  /** N, what a brace for that compression is usually made for; null where there is none. */
  readonly usual: number | null;
}

export interface NodalForce {
  readonly node: number;
  /** N, global axes. */
  readonly force: Vec3;
}

/** How far a support moves a node, m, global axes, along directions it holds. */
export interface Settlement {
  readonly node: number;
  readonly movement: Vec3;
}

export interface BarStretch {
  readonly bar: number;
  /** m. */
  readonly by: number;
}

/** One entry a loaded node; loads on carried nodes are listed at the carried node. */
export interface LoadCase {
  readonly name: string;
  readonly nature: Nature;
  /** What combining has to know of it besides its nature. */
  readonly category?: Category;
  readonly alternative?: string;
  readonly isSettlement?: boolean;
  readonly loads: readonly NodalForce[];
  /** m that bars would be longer without force: warmth, misfit. A bar may stand several times. */
  readonly freeStretch?: readonly BarStretch[];
  /** How far supports move their nodes. */
  readonly settlements?: readonly Settlement[];
  /** The case whose downward loads these are a share of, as sway: they act by its factor, either way, in strength combinations only. */
  readonly swayOf?: string;
  /** Of sway: 0 along the brief's direction, 1 at right angles to it. */
  readonly swayWay?: 0 | 1;
  /** What of the case could not be put on the truss: the case is refused, since without it its forces would be too small. */
  readonly incomplete?: string;
}

/** One independent way the truss can move without straining a bar. */
export interface Mode {
  readonly kind: 'local' | 'part' | 'whole';
  readonly nodes: readonly number[];
  /** One vector for each of `nodes`, largest component 1. */
  readonly movement: readonly Vec3[];
  readonly order: 'infinitesimal' | 'finite' | 'undecided';
  readonly words: string;
  /** What to hold: with the remedies of all modes nothing moves. */
  readonly remedy: readonly Remedy[];
  /** The bars that do the same in place of `remedy`, of sensible length between nodes that exist; empty where none were found. */
  readonly otherRemedy: readonly Remedy[];
}

export type Remedy = { readonly node: number; readonly direction: Vec3 } | { readonly bar: readonly [number, number] };

/** The judgement. Counts leave out carried nodes and what is set aside: m = 3 nodes - restraints - rank, s = bars + springs - rank. */
export interface Stability {
  readonly nodes: number;
  readonly bars: number;
  readonly restraints: number;
  readonly springs: number;
  readonly rank: number;
  readonly mechanisms: number;
  readonly selfStressStates: number;
  /** Judged without any support: six whole motions are expected and no fault. */
  readonly freeBody: boolean;
  /** Ratio across the spectrum's gap; null where none is clear. */
  readonly gap: number | null;
  /** Bars in no state of self-stress, by index: without any one of them one mechanism more. Null where the spectrum has no clear gap. */
  readonly criticalBars: readonly number[] | null;
  /** Bars of parts that nothing supports, by index. */
  readonly setAside: readonly number[];
  /** The whole motions first, then the others up to a few hundred: where there are more, fewer than `mechanisms`. */
  readonly modes: readonly Mode[];
  readonly findings: readonly Finding[];
}

/** Set where bar forces do not bring the mechanisms back: the bars that those move. Their forces cannot last. */
export interface Unstable {
  readonly bars: readonly number[];
  /** How it gives way, three components a node. */
  readonly moves: Float64Array;
}

/** Forces of one case. Entries are null where the case is refused or the bar or node is set aside. */
export interface SolvedCase {
  readonly name: string;
  readonly nature: Nature;
  /** Why the case could not be carried; null where it was. */
  readonly refused: string | null;
  readonly loads: readonly NodalForce[];
  readonly loadSum: Vec3;
  /** N, one per bar, tension positive. */
  readonly axialForce: readonly (number | null)[];
  /** m, one per node. */
  readonly displacement: readonly (Vec3 | null)[];
  /** Force of the support on the truss, one entry a supported node. */
  readonly reactions: readonly NodalForce[];
  /** Largest out-of-balance joint force over the largest force. */
  readonly residual: number | null;
  /** Bars that only pull or only push and are slack in this case. */
  readonly slack?: readonly number[];
  readonly unstable?: Unstable;
}

/** Bars whose force has one sign only, by index. */
export interface OneWay {
  readonly tensionOnly: readonly number[];
  readonly compressionOnly: readonly number[];
}

export interface SolvedCombination {
  readonly name: string;
  readonly limit: Limit;
  readonly factors: Readonly<Record<string, number>>;
  readonly refused: string | null;
  readonly axialForce: readonly (number | null)[];
  readonly displacement: readonly (Vec3 | null)[];
  readonly reactions: readonly NodalForce[];
  readonly slack?: readonly number[];
  readonly unstable?: Unstable;
}

export interface ExtremeForce {
  readonly force: number;
  /** Name of the combination or case it comes from. */
  readonly from: string;
}

/** Greatest tension and compression of one bar; null where it is never in tension, or never in compression. */
export interface BarEnvelope {
  readonly bar: number;
  readonly tension: ExtremeForce | null;
  readonly compression: ExtremeForce | null;
}
