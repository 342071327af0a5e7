import type { Section } from '../domain/member.ts';
import type { Vec3 } from '../domain/vector.ts';
import type { Category, CodeRule, Limit } from './code-rule.ts';
import type { LoadRule } from './load-rule.ts';
import type { MemberSelector, NodeSelector } from './selector.ts';

export type { Limit } from './code-rule.ts';
export type { LoadRule } from './load-rule.ts';
export type { MemberSelector, NodeSelector, Range } from './selector.ts';

/** A validated brief: SI throughout, defaults filled in. Each rule keeps its line in the file, for findings. */
export interface Brief {
  readonly title: string | null;
  /** null: the analysis view where no physical element is in scope. */
  readonly source: 'physical' | 'analysis' | null;
  readonly axes: 'given' | 'centroid';
  readonly scope: { readonly include: readonly MemberSelector[]; readonly exclude: readonly MemberSelector[] };
  readonly joints: {
    /** m, for all members or by rules; null where the sections decide. */
    readonly reach: number | null | readonly LengthRule[];
    readonly offset: number | null | readonly LengthRule[];
    readonly crossings: 'apart' | 'joined';
    readonly seated: 'node' | 'apart';
    readonly pairs: 'one' | 'apart';
  };
  readonly chords: 'pinned' | 'strict';
  /** second-order: balance at the moved nodes. */
  readonly analysis: 'first-order' | 'second-order';
  readonly supports: readonly SupportRule[];
  readonly holds: readonly HoldRule[];
  readonly materials: { readonly default: string | null };
  readonly sections: readonly SectionRule[];
  /** Members that only pull, and that only push. */
  readonly tensionOnly: readonly MemberSelector[];
  readonly compressionOnly: readonly MemberSelector[];
  readonly cases: readonly CaseRule[];
  /** null: none is loaded. */
  readonly imperfections: Imperfections | null;
  /** Those listed one by one; none where a code makes them. */
  readonly combinations: readonly CombinationRule[];
  readonly codeRule: CodeRule | null;
  readonly site: {
    /** m above sea level. */
    readonly altitude: number | null;
    readonly nordic: boolean;
  };
}

/** Initial sway as horizontal forces that follow every downward load. */
export interface Imperfections {
  readonly rule: 'EN1993-1-1' | 'AISC360';
  /** Unit direction in plan; the other is at right angles to it. */
  readonly along: readonly [number, number];
}

/** A length, m, for the members it is given to; of several rules on one member the last counts. */
export interface LengthRule {
  readonly line: number;
  readonly on: readonly MemberSelector[];
  readonly use: number;
}

/** The section that members have, whatever the model says. */
export interface SectionRule {
  readonly line: number;
  readonly on: readonly MemberSelector[];
  readonly use: Section;
}

export interface SupportRule {
  readonly line: number;
  readonly at: readonly NodeSelector[];
  /** Unit directions rigidly held. */
  readonly fix: readonly Vec3[];
  /** Stiffness in N/m along a unit direction. */
  readonly springs: readonly { readonly direction: Vec3; readonly stiffness: number }[];
  /** m, how far the support itself moves, along what it fixes. */
  readonly settle?: Vec3;
}

/** Nodes held by something that is not in the model. */
export interface HoldRule {
  readonly line: number;
  /** Members whose nodes are meant; null: all. */
  readonly on: readonly MemberSelector[] | null;
  /** Which of their nodes; null: all. */
  readonly nodes: readonly NodeSelector[] | null;
  /** Unit direction; null: across the plane of each node's own truss. */
  readonly along: Vec3 | null;
  readonly because: string;
}

export type Nature = 'permanent' | 'imposed' | 'snow' | 'wind' | 'thermal' | 'accidental';

export interface CaseRule {
  readonly line: number;
  readonly name: string;
  readonly nature: Nature;
  /** Of an imposed load. */
  readonly category?: Category;
  /** Cases of one group never act together. */
  readonly alternative?: string;
  readonly loads: readonly LoadRule[];
}

export interface CombinationRule {
  readonly line: number;
  readonly name: string;
  readonly limit: Limit;
  readonly factors: Readonly<Record<string, number>>;
}
