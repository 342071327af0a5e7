import type { PlaceNamer } from '../domain/place.ts';
import { dot, subtract, unit, type Vec3 } from '../domain/vector.ts';
import type { Grid } from './grids.ts';
import { NotRead } from './not-read.ts';
import type { Placements } from './placements.ts';
import { mapPosition } from './transform.ts';

/** Within this of a grid axis a point is on it for whoever looks for it on site. */
const ON_AXIS = 0.5;

/** A grid axis in plan: where it is and which way is to its left. */
interface Line {
  readonly tag: string;
  readonly at: Vec3;
  readonly left: Vec3;
}

export interface Storey {
  readonly name: string;
  /** World z of its floor, metres. */
  readonly level: number;
}

export interface Surroundings {
  readonly grids: readonly Grid[];
  readonly placements: Placements;
  readonly storeys: readonly Storey[];
}

export interface PlaceNamers {
  readonly placeOf: PlaceNamer;
  /** From any corner; null where a grid names places. */
  readonly placesFrom: ((corner: Vec3) => PlaceNamer) | null;
}

/**
 * "C/4, +6.20" by the grid; without one "Roof, x 12.3 m, y 4.5 m from the lowest, +6.20": from the lowest x and y of the
 * members, which is `corner`, null where there are none.
 */
export function placeNamers(around: Surroundings, corner: Vec3 | null): PlaceNamers {
  const grids = planGrids(around);
  if (grids.length > 0) return { placeOf: (at) => `${crossingAt(grids, at)}, ${signedLevel(at[2])}`, placesFrom: null };
  const storeys = [...around.storeys].sort((a, b) => a.level - b.level || (a.name < b.name ? -1 : 1));
  const placesFrom =
    (from: Vec3): PlaceNamer =>
    (at) => {
      const storey = storeyAt(storeys, at[2]);
      const away = `x ${metres(at[0] - from[0])}, y ${metres(at[1] - from[1])} from the lowest`;
      return `${storey === null ? '' : `${storey}, `}${away}, ${signedLevel(at[2])}`;
    };
  return { placeOf: corner === null ? () => null : placesFrom(corner), placesFrom };
}

const metres = (length: number): string => `${(Math.round(length * 10) / 10 || 0).toFixed(1)} m`;

const signedLevel = (z: number): string => {
  const level = z.toFixed(2);
  if (level === '-0.00' || level === '0.00') return '+0.00';
  return z > 0 ? `+${level}` : level;
};

/** Storeys and grids are drawn on the floor; what is set into it belongs to it still. */
const FLOOR = 0.3;

/** The storey a point belongs to: the highest whose floor is not above it, give or take a slab. */
function storeyAt(storeys: readonly Storey[], z: number): string | null {
  const below = storeys.filter((storey) => storey.level <= z + FLOOR);
  return (below.at(-1) ?? storeys[0])?.name ?? null;
}

/** A grid in plan: families of axes, and the levels it is drawn on. */
interface PlanGrid {
  readonly families: readonly (readonly Line[])[];
  readonly levels: number[];
}

/** The grids that name places; one that is drawn again on another level counts once. */
function planGrids({ grids, placements }: Surroundings): PlanGrid[] {
  const found = new Map<string, PlanGrid>();
  for (const grid of grids) {
    const world = worldLines(grid, placements);
    const families = world.families.filter((family) => family.length > 0);
    if (families.length < 2) continue;
    const key = JSON.stringify(families, (_, value) => (typeof value === 'number' ? Math.round(value * 1e3) : value));
    const same = found.get(key);
    if (same === undefined) found.set(key, { families: lettersFirst(families), levels: [world.level] });
    else same.levels.push(world.level);
  }
  return [...found.values()];
}

function worldLines(grid: Grid, placements: Placements): { families: Line[][]; level: number } {
  try {
    const world = placements.worldOf(grid.placement);
    const families = grid.families.map((family) => {
      let reference: Vec3 | null = null;
      return family.flatMap((axis): Line[] => {
        const from = mapPosition(world, axis.from);
        const to = mapPosition(world, axis.to);
        const d = unit([to[0] - from[0], to[1] - from[1], 0]);
        if (d === null || axis.tag === '') return [];
        // Axes of one family are turned the same way, so that "between" can be told by sign.
        const forward: Vec3 = reference !== null && dot(d, reference) < 0 ? [-d[0], -d[1], 0] : d;
        reference ??= forward;
        return [{ tag: axis.tag, at: [from[0], from[1], 0], left: [-forward[1], forward[0], 0] }];
      });
    });
    return { families, level: world.origin[2] };
  } catch (problem) {
    if (problem instanceof NotRead) return { families: [], level: 0 };
    throw problem;
  }
}

/** "C/4", not "4/C": letters stand before numbers, whichever family the file calls U. */
function lettersFirst(families: readonly (readonly Line[])[]): readonly (readonly Line[])[] {
  const isNumbered = (family: readonly Line[]) => /^[-+]?\d/.test(family[0]?.tag ?? '');
  return [...families.filter((f) => !isNumbered(f)), ...families.filter(isNumbered)];
}

/**
 * By the grid that a reader would take the drawing of: one whose axes run round the point before one it lies outside of, then
 * the one on the level below it, then the one with the nearest crossing.
 */
function crossingAt(grids: readonly PlanGrid[], at: Vec3): string {
  let best: { words: string; rank: readonly number[] } | null = null;
  for (const { families, levels } of grids) {
    const crossing = nearestTwo(families.map((family) => alongFamily(family, at)));
    const outside = Math.hypot(...crossing.map(({ beyond }) => Math.max(0, beyond - ON_AXIS)));
    const above = Math.min(...levels.map((level) => (level <= at[2] + FLOOR ? at[2] - level : ABOVE + level - at[2])));
    const rank = [outside, above, Math.hypot(...crossing.map(({ away }) => away))];
    if (best === null || isBefore(rank, best.rank)) best = { words: crossing.map(({ text }) => text).join('/'), rank };
  }
  return best?.words ?? '';
}

/** m; any grid below a point comes before any above it. */
const ABOVE = 1e6;

function isBefore(a: readonly number[], b: readonly number[]): boolean {
  const first = a.findIndex((value, i) => Math.abs(value - b[i]!) > 1e-9);
  return first >= 0 && a[first]! < b[first]!;
}

/** Two axes make a crossing; of a third family (the W axes of a triangular grid) the nearer two are named. */
function nearestTwo(families: readonly AlongFamily[]): readonly AlongFamily[] {
  if (families.length <= 2) return families;
  const nearest = families.map((_, i) => i).sort((i, j) => families[i]!.away - families[j]!.away || i - j);
  return nearest
    .slice(0, 2)
    .sort((i, j) => i - j)
    .map((i) => families[i]!);
}

interface AlongFamily {
  readonly text: string;
  /** m to the nearest axis. */
  readonly away: number;
  /** m outside the outermost axis; 0 between axes. */
  readonly beyond: number;
}

/** Where a point lies among the axes of one family: on "C", between "C-D", or beyond the last one. */
function alongFamily(family: readonly Line[], at: Vec3): AlongFamily {
  let left: { line: Line; distance: number } | null = null;
  let right: { line: Line; distance: number } | null = null;
  for (const line of family) {
    const side = dot(subtract([at[0], at[1], 0], line.at), line.left);
    const distance = Math.abs(side);
    if (side >= 0 && (right === null || distance < right.distance)) right = { line, distance };
    if (side < 0 && (left === null || distance < left.distance)) left = { line, distance };
  }
  const [near, far] = [left, right].sort((a, b) => (a?.distance ?? Infinity) - (b?.distance ?? Infinity));
  if (near === null || near === undefined) return { text: '', away: 0, beyond: 0 };
  const away = near.distance;
  const isOutside = far === null || far === undefined;
  const beyond = isOutside ? away : 0;
  if (away <= ON_AXIS) return { text: near.line.tag, away, beyond };
  if (isOutside) return { text: `${near.line.tag} (${away.toFixed(1)} m outside)`, away, beyond };
  return { text: inOrder(near.line.tag, far.line.tag), away, beyond };
}

const byTag = new Intl.Collator('en', { numeric: true });

/** 'C-D' and '9-10', whichever is nearer. */
function inOrder(a: string, b: string): string {
  return byTag.compare(a, b) > 0 ? `${b}-${a}` : `${a}-${b}`;
}
