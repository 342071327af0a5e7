import type { MemberKind } from '../../brief/member-kinds.ts';

/** What the pipeline knows besides the result and the reader wants to see. */
export interface SummaryExtras {
  /** Elements of the classes asked for, whether or not they could be read. */
  readonly elementCount?: number;
  /** Instances of earlier results taken out of a file that another program has rewritten. */
  readonly tracesRemoved?: number;
  /** kg, of the bars between their nodes. */
  readonly mass?: number;
  /** Members that were read, by what a scope would name. */
  readonly kinds?: readonly MemberKind[];
  /** Nodes that nothing lies above, by level (m). */
  readonly topLevels?: readonly { readonly level: number; readonly count: number }[];
  /** m2 that each area load of the brief covers, on the slope and in plan. */
  readonly coverage?: readonly { readonly case: string; readonly area: number; readonly planArea: number }[];
}

export interface SummaryOptions {
  readonly extras: SummaryExtras;
  readonly width: number;
  readonly findingsOfACode: number;
  readonly bars: number;
  readonly reactions: number;
  readonly modes: number;
  readonly kinds: number;
  readonly families: number;
}

export const SUMMARY_DEFAULTS: SummaryOptions = {
  extras: {},
  width: 80,
  findingsOfACode: 3,
  bars: 10,
  reactions: 10,
  modes: 5,
  kinds: 12,
  families: 5,
};
