import type { Category } from '../../brief/code-rule.ts';
import type { Nature } from '../../brief/types.ts';

/** A load case as far as combining is concerned. */
export interface ActionCase {
  readonly name: string;
  readonly nature: Nature;
  /** Of imposed loads. */
  readonly category?: Category;
  /** Cases of one group never act together; `none` stands outside its nature's group. */
  readonly alternative?: string;
  /** The supports' own settlement: a permanent action with a factor of its own, or absent. */
  readonly isSettlement?: boolean;
}

/** A combination before it has a name. Cases of factor 0 are left out. */
export interface Draft<L extends string = string> {
  readonly limit: L;
  /** What tells it from others, in words: "6.10, snow leads". */
  readonly what: string;
  readonly factors: Readonly<Record<string, number>>;
}

export const isPermanent = (one: ActionCase): boolean => one.nature === 'permanent' && one.isSettlement !== true;
export const isVariable = ({ nature }: ActionCase): boolean => nature !== 'permanent' && nature !== 'accidental';
