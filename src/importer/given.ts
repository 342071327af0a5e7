import type { Result } from '../domain/result.ts';
import type { Vec3 } from '../domain/vector.ts';

/**
 * What the model itself says of supports, loads and combinations, in SI and world axes. There are no nodes yet: everything
 * is said by points and members.
 */
export interface Given {
  readonly supports: readonly GivenSupport[];
  readonly cases: readonly GivenCase[];
  readonly combinations: readonly GivenCombination[];
}

export interface GivenSupport {
  readonly globalId: string;
  readonly name: string;
  readonly at: Vec3;
  /** Unit directions rigidly held. */
  readonly fix: readonly Vec3[];
  /** N/m along unit directions. */
  readonly springs: readonly { readonly direction: Vec3; readonly stiffness: number }[];
}

export interface GivenCase {
  readonly name: string;
  readonly nature: Result['cases'][number]['nature'];
  readonly loads: readonly GivenLoad[];
}

export type GivenLoad =
  | { readonly kind: 'point'; readonly at: Vec3 /** N */; readonly force: Vec3 }
  | {
      readonly kind: 'line';
      /** The member it acts on. */
      readonly globalId: string;
      readonly from: Vec3;
      readonly to: Vec3;
      /** N per metre of the line itself at either end, linear in between. */
      readonly forceFrom: Vec3;
      readonly forceTo: Vec3;
    }
  /** K, of a whole member. */
  | { readonly kind: 'temperature'; readonly globalId: string; readonly change: number }
  /** How far a support moves what stands on it, m. */
  | { readonly kind: 'settlement'; readonly at: Vec3; readonly movement: Vec3 }
  /** Weight of all bars times this vector: (0, 0, -1) is their own weight. */
  | { readonly kind: 'selfWeight'; readonly factors: Vec3 };

export interface GivenCombination {
  readonly name: string;
  readonly limit: Result['combinations'][number]['limit'];
  readonly factors: Readonly<Record<string, number>>;
}
