import type { Vec3 } from '../../domain/vector.ts';

/** What the pipeline knows besides the result and the reader wants to see. */
export interface SummaryExtras {
  /** Elements of the classes asked for, whether or not they could be read. */
  readonly elementCount?: number;
  /** kg, of the bars between their nodes. */
  readonly mass?: number;
  /** N, by the name of the case: what the brief's rules add up to before they are shared out to nodes. */
  readonly loadAsked?: Readonly<Record<string, Vec3>>;
}

export interface SummaryOptions {
  readonly extras: SummaryExtras;
  readonly width: number;
  readonly findingsOfACode: number;
  readonly bars: number;
  readonly reactions: number;
  readonly modes: number;
}

export const SUMMARY_DEFAULTS: SummaryOptions = {
  extras: {},
  width: 80,
  findingsOfACode: 3,
  bars: 10,
  reactions: 10,
  modes: 5,
};
