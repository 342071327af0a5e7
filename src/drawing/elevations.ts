import { distance, dot, type Vec3 } from '../domain/vector.ts';
import { depth, lookingAlong, type Projection } from './projection.ts';
import type { Scene, SceneBar } from './scene.ts';
import { directionWords, elevationLooking, elevationThrough, signedLevel, type View } from './view.ts';

/** m; bars this near to one upright plane are drawn as one frame. */
const FRAME_DEPTH = 0.3;

/** m; a frame this near to a grid axis stands on it. */
const ON_AXIS = 0.5;

/** In a frame bars meet in threes, in so many nodes at least; an arch of a shell is none. */
const LEAST_MEETINGS = 2;

/** Of what all bars are worth: less is a corner of the roof and not a frame of it. */
const LEAST_SHARE = 0.01;

/**
 * The two elevations that tell most: for each horizontal direction of the building the frame that carries most, or where
 * there are no frames in it everything as seen from the side.
 */
export function tellingElevations(scene: Scene): View[] {
  return horizontalDirections(scene).map((right) => {
    const into: Vec3 = [-right[1], right[0], 0];
    const projection = lookingAlong(into);
    const frame = greatestFrame(scene, projection);
    if (frame === null) return elevationLooking(into);
    const axis = axisAt(scene, projection, frame.plane);
    const where = axis === null ? `at ${planeWords(into, frame.plane)}` : `on axis ${axis}`;
    const name = `${where}, looking along ${directionWords(into)}`;
    return elevationThrough(name, frame.through, into, FRAME_DEPTH / 2 + 1e-6);
  });
}

/** The directions that run to the right in the elevations: those of the grid, or x and y. */
function horizontalDirections({ grid }: Scene): Vec3[] {
  const lengths = new Map<string, { direction: Vec3; length: number }>();
  for (const { from, to } of grid) {
    const length = Math.hypot(to[0] - from[0], to[1] - from[1]);
    if (length === 0) continue;
    const direction = rightward([(to[0] - from[0]) / length, (to[1] - from[1]) / length, 0]);
    const key = direction.map((part) => part.toFixed(2)).join();
    const known = lengths.get(key);
    if (known === undefined) lengths.set(key, { direction, length });
    else known.length += length;
  }
  const [first] = [...lengths.values()].sort((a, b) => b.length - a.length);
  const u = first === undefined ? ([1, 0, 0] as Vec3) : first.direction;
  const v = rightward([-u[1], u[0], 0]);
  // The one nearer to +x stands under the plan.
  return Math.abs(u[0]) >= Math.abs(v[0]) ? [u, v] : [v, u];
}

/** Turned so that it points to +x, or to +y where it is square to x. */
function rightward(direction: Vec3): Vec3 {
  const isBackward = direction[0] < -1e-6 || (Math.abs(direction[0]) <= 1e-6 && direction[1] < 0);
  return isBackward ? [-direction[0], -direction[1], 0] : direction;
}

interface Frame {
  readonly through: Vec3;
  readonly plane: number;
}

/** The upright plane whose bars carry most force over their lengths (most length, before there are forces). */
function greatestFrame({ bars, isLoaded }: Scene, projection: Projection): Frame | null {
  const flatBars = bars
    .map((bar) => ({ bar, from: depth(projection, bar.from), to: depth(projection, bar.to) }))
    .filter(({ from, to }) => Math.abs(from - to) < FRAME_DEPTH / 2)
    .map(({ bar, from, to }) => ({ bar, plane: (from + to) / 2 }))
    .sort((a, b) => a.plane - b.plane);
  const worthOf = (some: readonly SceneBar[]) =>
    some.reduce((sum, bar) => sum + distance(bar.from, bar.to) * (isLoaded ? Math.abs(bar.force ?? 0) : 1), 0);
  const least = worthOf(bars) * LEAST_SHARE;
  let best: (Frame & { readonly worth: number }) | null = null;
  for (let first = 0; first < flatBars.length; ) {
    let after = first;
    while (after < flatBars.length && flatBars[after]!.plane - flatBars[first]!.plane < FRAME_DEPTH / 2) after++;
    const group = flatBars.slice(first, after);
    const worth = worthOf(group.map(({ bar }) => bar));
    const isFrame = worth > least && meetings(group.map(({ bar }) => bar)) >= LEAST_MEETINGS;
    if (isFrame && (best === null || worth > best.worth * 1.001)) {
      const middle = group[Math.floor(group.length / 2)]!;
      best = { through: middle.bar.from, plane: middle.plane, worth };
    }
    first = after;
  }
  return best;
}

/** How many nodes of an upright plane three bars and more of it meet in. */
function meetings(bars: readonly SceneBar[]): number {
  const counts = new Map<Vec3, number>();
  for (const { from, to } of bars) for (const end of [from, to]) counts.set(end, (counts.get(end) ?? 0) + 1);
  return [...counts.values()].filter((count) => count >= 3).length;
}

function axisAt({ grid }: Scene, projection: Projection, plane: number): string | null {
  const near = grid
    .filter(({ from, to }) => {
      const along = Math.abs(dot([to[0] - from[0], to[1] - from[1], 0], projection.direction));
      return along < 1e-3 * Math.hypot(to[0] - from[0], to[1] - from[1]);
    })
    .map(({ tag, from }) => ({ tag, away: Math.abs(depth(projection, from) - plane) }))
    .filter(({ away }) => away <= ON_AXIS)
    .sort((a, b) => a.away - b.away);
  return near[0]?.tag ?? null;
}

function planeWords(into: Vec3, plane: number): string {
  if (Math.abs(into[1]) > 0.999) return `y ${signedLevel(plane * into[1])}`;
  if (Math.abs(into[0]) > 0.999) return `x ${signedLevel(plane * into[0])}`;
  return `${plane.toFixed(2)} m`;
}
