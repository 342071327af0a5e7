import type { Vec3 } from '../domain/vector.ts';
import type { MemberSelector, NodeSelector } from './selector.ts';

/** Corners in plan, m. */
export type PlanPolygon = readonly (readonly [x: number, y: number])[];

/** How the load of a surface goes by its pitch, EN 1991-1-3 5.3. */
export interface SnowShape {
  readonly arrangement: 'undrifted' | 'half-left' | 'half-right';
  /** Which way in plan is left; null: by the slopes. */
  readonly left: readonly [x: number, y: number] | null;
  readonly guards: boolean;
}

export interface AreaRule {
  readonly kind: 'area';
  readonly line: number;
  /** N/m2; of snow that on the ground times exposure and thermal coefficients. */
  readonly pressure: number;
  readonly over: readonly NodeSelector[];
  readonly acts: 'down' | 'normal';
  readonly per: 'slope' | 'plan';
  readonly outline?: PlanPolygon;
  readonly openings?: readonly PlanPolygon[];
  /** m of roof beyond the outer nodes. */
  readonly edge?: number;
  readonly snow?: SnowShape;
  /** What it is called where that is not "area load". */
  readonly called?: string;
}

export type LoadRule =
  | { readonly kind: 'selfWeight'; readonly line: number; readonly factor: number }
  | AreaRule
  | {
      readonly kind: 'line';
      readonly line: number;
      /** N/m, global axes. */
      readonly force: Vec3;
      readonly on: readonly MemberSelector[];
      readonly per: 'length' | 'plan';
    }
  | { readonly kind: 'point'; readonly line: number; readonly force: Vec3; readonly at: readonly NodeSelector[] }
  | {
      readonly kind: 'temperature';
      readonly line: number /** K */;
      readonly change: number;
      readonly on: readonly MemberSelector[];
    }
  | {
      readonly kind: 'misfit';
      readonly line: number /** m */;
      readonly by: number;
      readonly on: readonly MemberSelector[];
    };
