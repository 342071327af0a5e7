import { scale, type Vec3 } from '../../../src/domain/vector.ts';
import type { Chance } from './chance.ts';
import type { Design, Part } from './design.ts';
import type { Run, TrussShape } from './truss-shapes.ts';

export const ACROSS: Vec3 = [0, 1, 0];
export const SPAN: Vec3 = [1, 0, 0];

/** Work points on the top chord between panel points where purlins sit: by the run they lie on. */
export type ExtraStops = ReadonlyMap<string, readonly { readonly name: string; readonly x: number }[]>;

export interface FramePlan {
  readonly index: number;
  readonly y: number;
  readonly shape: TrussShape;
  readonly design: Design;
  readonly extra: ExtraStops;
  readonly columns: boolean;
  readonly columnHeight: number;
  readonly gablePosts: readonly string[];
  /** Outside brackets on the columns, m long; 0 for none. */
  readonly stub: number;
  readonly detail: FrameDetail;
}

/** Choices that every frame of a roof shares. */
export interface FrameDetail {
  readonly ridge: 'mitred' | 'butted';
  /** How far the top chord runs past the eaves; beyond any gusset when it is a real overhang. */
  readonly overhang: number;
  readonly bottomOverhang: number;
  readonly spliceGap: number;
  /** Splices of each run as fractions of its length, or at the panel point nearest to them. */
  readonly splices: readonly { readonly run: string; readonly share: number; readonly atPanelPoint: boolean }[];
  readonly heel: 'both to the work point' | 'bevelled on the bottom chord';
  readonly columnGap: number;
}

export function frameDetail(chance: Chance, shape: TrussShape): FrameDetail {
  const chords = shape.runs.filter((run) => run.role !== 'web' && lengthOf(shape, run) > 9);
  return {
    ridge: chance.pick(['mitred', 'butted'] as const),
    overhang: chance.happens(0.2) ? chance.between(0.5, 1) : chance.between(0, 0.1),
    bottomOverhang: chance.between(0, 0.08),
    spliceGap: chance.pick([0, 0.002, 0.01]),
    splices: chords
      .filter(() => chance.happens(0.7))
      .map((run) => ({
        run: run.key,
        share: chance.between(0.3, 0.7),
        atPanelPoint: chance.happens(0.4),
      })),
    heel: chance.pick(['both to the work point', 'bevelled on the bottom chord'] as const),
    columnGap: chance.between(0.01, 0.025),
  };
}

const lengthOf = (shape: TrussShape, run: Run): number => {
  const [a, b] = [shape.nodes.get(run.nodes[0])!, shape.nodes.get(run.nodes.at(-1)!)!];
  return Math.hypot(b[0] - a[0], b[1] - a[1]);
};

export const nodeKey = (frame: number, node: string): string => `F${frame}/${node}`;

/** In the truss plane, square to a direction in it, pointing up. */
export function upright(direction: Vec3): Vec3 {
  const normal: Vec3 = [-direction[2], 0, direction[0]];
  return normal[2] < 0 || (normal[2] === 0 && normal[0] < 0) ? scale(normal, -1) : normal;
}

export const partFor = (design: Design, run: Run): Part => {
  if (run.role === 'top chord') return design.topChord;
  if (run.role === 'bottom chord') return design.bottomChord;
  return isPost(run) ? design.post : design.diagonal;
};
export const isPost = (run: Run): boolean => /^(post\d+|t(\d+)b\2)$/.test(run.key);

/** The section's z axis of a run: angles have their heel outside, at the top of a top chord. */
export function zAxisOf(run: Run, part: Part, direction: Vec3): Vec3 {
  if (part.turned) return ACROSS;
  const up = upright(direction);
  return run.role === 'top chord' && (part.profile.shape === 'L' || part.profile.shape === 'T') ? scale(up, -1) : up;
}
