import type { Section } from '../domain/member.ts';
import type { Vec3 } from '../domain/vector.ts';
import type { Category, CodeRule, Limit } from './code-rule.ts';

export type { Limit } from './code-rule.ts';

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
  /** Those listed one by one; none where a code makes them. */
  readonly combinations: readonly CombinationRule[];
  readonly codeRule: CodeRule | null;
  readonly site: {
    /** m above sea level. */
    readonly altitude: number | null;
    readonly nordic: boolean;
  };
}

/** An end left null is open. */
export type Range = readonly [from: number | null, to: number | null];

/** All keys given must hold. Texts take `*`. */
export interface MemberSelector {
  readonly line: number;
  readonly class?: string;
  readonly predefinedType?: string;
  readonly globalId?: string;
  readonly tag?: string;
  readonly name?: string;
  readonly type?: string;
  readonly assembly?: string;
  readonly storey?: string;
  readonly layer?: string;
  /** Name of a group it is assigned to. */
  readonly group?: string;
  /** By "Set.Property"; numbers in SI. */
  readonly property?: Readonly<Record<string, boolean | number | string | Range>>;
  readonly section?: string;
  readonly material?: string;
  /** World z of the member's middle, m. */
  readonly level?: Range;
  /** Angle to the horizontal, rad. */
  readonly slope?: Range;
  /** m. */
  readonly length?: Range;
  readonly not?: MemberSelector;
}

/** All keys given must hold. */
export interface NodeSelector {
  readonly line: number;
  readonly near?: Vec3;
  /** m; goes with `near`. */
  readonly within?: number;
  readonly lowest?: boolean;
  readonly highest?: boolean;
  /** World z, m. */
  readonly level?: Range;
  readonly top?: boolean;
  /** An end of such a member lies at the node. */
  readonly endOf?: readonly MemberSelector[];
  /** Such a member meets the node, wherever along it. */
  readonly joins?: readonly MemberSelector[];
  readonly not?: NodeSelector;
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

export type LoadRule =
  | { readonly kind: 'selfWeight'; readonly line: number; readonly factor: number }
  | {
      readonly kind: 'area';
      readonly line: number;
      /** N/m2. */
      readonly pressure: number;
      readonly over: readonly NodeSelector[];
      readonly acts: 'down' | 'normal';
      readonly per: 'slope' | 'plan';
    }
  | {
      readonly kind: 'line';
      readonly line: number;
      /** N/m, global axes. */
      readonly force: Vec3;
      readonly on: readonly MemberSelector[];
      readonly per: 'length' | 'plan';
    }
  | { readonly kind: 'point'; readonly line: number; readonly force: Vec3; readonly at: readonly NodeSelector[] };

export interface CombinationRule {
  readonly line: number;
  readonly name: string;
  readonly limit: Limit;
  readonly factors: Readonly<Record<string, number>>;
}
