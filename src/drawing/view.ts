import { dot, type Vec3 } from '../domain/vector.ts';
import { depth, type Flat, flat, ISOMETRIC, lookingAlong, PLAN, type Projection } from './projection.ts';
import type { Scene, SceneBar, SceneMark, SceneSupport } from './scene.ts';

/** A way of looking at the truss: in which direction, and at which part of it. */
export interface View {
  readonly title: string;
  readonly kind: 'plan' | 'elevation' | 'isometric';
  readonly projection: Projection;
  /** Only bars with both ends in it are drawn. */
  readonly holds: (point: Vec3) => boolean;
}

const everything = (): boolean => true;

export const WHOLE_PLAN: View = { title: 'Plan', kind: 'plan', projection: PLAN, holds: everything };

export const WHOLE_ISOMETRIC: View = {
  title: 'Isometric',
  kind: 'isometric',
  projection: ISOMETRIC,
  holds: everything,
};

/** The plan of what lies between two levels (m). */
export function planBetween(low: number, high: number): View {
  const title = `Plan from ${signedLevel(low)} to ${signedLevel(high)}`;
  return { ...WHOLE_PLAN, title, holds: (point) => point[2] >= low && point[2] <= high };
}

/** Everything as seen in a horizontal direction. */
export function elevationLooking(direction: Vec3): View {
  return {
    title: `Elevation looking along ${directionWords(direction)}`,
    kind: 'elevation',
    projection: lookingAlong(direction),
    holds: everything,
  };
}

/** What lies within `within` (m) of the vertical plane through `through`, seen square to it. */
export function elevationThrough(name: string, through: Vec3, direction: Vec3, within: number): View {
  const projection = lookingAlong(direction);
  const plane = depth(projection, through);
  return {
    title: `Elevation ${name}`,
    kind: 'elevation',
    projection,
    holds: (point) => Math.abs(depth(projection, point) - plane) <= within,
  };
}

/** `+y` where it is that, else its share of x and y. */
export function directionWords([x, y]: Vec3): string {
  if (Math.abs(x) > 0.999) return x > 0 ? '+x' : '\u2212x';
  if (Math.abs(y) > 0.999) return y > 0 ? '+y' : '\u2212y';
  return `(${x.toFixed(2)}, ${y.toFixed(2)})`;
}

export function signedLevel(z: number): string {
  const text = z.toFixed(2);
  return Number(text) === 0 ? '+0.00' : z > 0 ? `+${text}` : `\u2212${text.slice(1)}`;
}

export interface Box {
  readonly low: Flat;
  readonly high: Flat;
}

export interface FlatBar {
  readonly bar: SceneBar;
  readonly from: Flat;
  readonly to: Flat;
}

/** What a view holds, in metres of the drawing plane. */
export interface FlatView {
  readonly view: View;
  readonly bars: readonly FlatBar[];
  readonly supports: readonly (SceneSupport & { readonly spot: Flat })[];
  readonly marks: readonly (SceneMark & { readonly spot: Flat })[];
  /** Grid axes: whole lines in plan; in an elevation those seen end on, as upright lines. */
  readonly grid: readonly { readonly tag: string; readonly from: Flat; readonly to: Flat }[];
  readonly box: Box;
}

/** Marks stand a little off the bars they speak of. */
const MARK_REACH = 0.5;

/** Null where no bar is in the view. */
export function flatten(scene: Scene, view: View): FlatView | null {
  const { projection, holds } = view;
  const bars = scene.bars
    .filter(({ from, to }) => holds(from) && holds(to))
    .map((bar) => ({ bar, from: flat(projection, bar.from), to: flat(projection, bar.to) }));
  if (bars.length === 0) return null;
  const box = boxAround(bars.flatMap(({ from, to }) => [from, to]));
  return {
    view,
    bars,
    supports: scene.supports.filter(({ at }) => holds(at)).map((one) => ({ ...one, spot: flat(projection, one.at) })),
    marks: scene.marks
      .filter(({ at }) => holds(at) || nearly(at, holds, projection))
      .map((one) => ({ ...one, spot: flat(projection, one.at) }))
      .filter(({ spot }) => isInside(spot, box, MARK_REACH)),
    grid: gridOf(scene, view, box),
    box,
  };
}

function nearly(at: Vec3, holds: View['holds'], { direction }: Projection): boolean {
  const moved = (k: number): Vec3 => [at[0] + k * direction[0], at[1] + k * direction[1], at[2] + k * direction[2]];
  return holds(moved(MARK_REACH)) || holds(moved(-MARK_REACH));
}

export function boxAround(points: Iterable<Flat>): Box {
  const low: [number, number] = [Number.POSITIVE_INFINITY, Number.POSITIVE_INFINITY];
  const high: [number, number] = [Number.NEGATIVE_INFINITY, Number.NEGATIVE_INFINITY];
  for (const point of points) {
    for (const k of [0, 1] as const) {
      low[k] = Math.min(low[k], point[k]);
      high[k] = Math.max(high[k], point[k]);
    }
  }
  return { low, high };
}

export const widthOf = ({ low, high }: Box): number => high[0] - low[0];
export const heightOf = ({ low, high }: Box): number => high[1] - low[1];

function isInside([x, y]: Flat, { low, high }: Box, margin: number): boolean {
  return x >= low[0] - margin && x <= high[0] + margin && y >= low[1] - margin && y <= high[1] + margin;
}

/** Within this (m) of the bars a grid axis belongs to the drawing. */
const GRID_REACH = 1;

function gridOf({ grid }: Scene, { kind, projection }: View, box: Box): FlatView['grid'] {
  if (kind === 'isometric') return [];
  const lines = grid.map(({ tag, from, to }) => ({ tag, from: flat(projection, from), to: flat(projection, to) }));
  if (kind === 'plan') return lines.filter(({ from, to }) => crosses(from, to, box)).map((line) => within(line, box));
  return lines
    .filter((_, k) => {
      const { from, to } = grid[k]!;
      const along = dot([to[0] - from[0], to[1] - from[1], 0], projection.right);
      return Math.abs(along) < 1e-3 * Math.hypot(to[0] - from[0], to[1] - from[1]);
    })
    .filter(({ from }) => from[0] > box.low[0] - GRID_REACH && from[0] < box.high[0] + GRID_REACH)
    .map(({ tag, from }) => ({ tag, from: [from[0], box.low[1]], to: [from[0], box.high[1]] }));
}

function crosses(from: Flat, to: Flat, { low, high }: Box): boolean {
  return ([0, 1] as const).every(
    (k) => Math.max(from[k], to[k]) > low[k] - GRID_REACH && Math.min(from[k], to[k]) < high[k] + GRID_REACH,
  );
}

/** Grid axes run far beyond the roof in many models: cut to the box where they run along it. */
function within(
  line: { tag: string; from: Flat; to: Flat },
  { low, high }: Box,
): { tag: string; from: Flat; to: Flat } {
  const [dx, dy] = [line.to[0] - line.from[0], line.to[1] - line.from[1]];
  const k = Math.abs(dx) > Math.abs(dy) ? 0 : 1;
  const length = k === 0 ? dx : dy;
  if (length === 0) return line;
  const at = (value: number): Flat => {
    const t = (value - line.from[k]) / length;
    return [line.from[0] + t * dx, line.from[1] + t * dy];
  };
  return { tag: line.tag, from: at(low[k]), to: at(high[k]) };
}
