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
  /** Least x and y of all members; null where there is none. */
  readonly corner: Vec3 | null;
}

/** "C/4, +6.20" by the grid; without one "Roof, 12.3 m x and 4.5 m y from the corner, +6.20". */
export function placeNamer(around: Surroundings): PlaceNamer {
  const families = gridFamilies(around);
  if (families.length > 0) return (at) => `${nearestCrossing(families, at)}, ${signedLevel(at[2])}`;
  const storeys = [...around.storeys].sort((a, b) => a.level - b.level || (a.name < b.name ? -1 : 1));
  const { corner } = around;
  if (corner === null) return () => null;
  return (at) => {
    const storey = storeyAt(storeys, at[2]);
    const away = `${(at[0] - corner[0]).toFixed(1)} m x and ${(at[1] - corner[1]).toFixed(1)} m y from the corner`;
    return `${storey === null ? '' : `${storey}, `}${away}, ${signedLevel(at[2])}`;
  };
}

const signedLevel = (z: number): string => {
  const level = z.toFixed(2);
  if (level === '-0.00' || level === '0.00') return '+0.00';
  return z > 0 ? `+${level}` : level;
};

/** The storey a point belongs to: the highest whose floor is not above it, give or take a slab. */
function storeyAt(storeys: readonly Storey[], z: number): string | null {
  const below = storeys.filter((storey) => storey.level <= z + 0.3);
  return (below.at(-1) ?? storeys[0])?.name ?? null;
}

type GridFamilies = readonly (readonly Line[])[];

/** Each grid's axis families in plan; a grid drawn again on another level counts once. */
function gridFamilies({ grids, placements }: Surroundings): GridFamilies[] {
  const found = new Map<string, GridFamilies>();
  for (const grid of grids) {
    const families = worldLines(grid, placements);
    if (families.filter((family) => family.length > 0).length < 2) continue;
    const key = JSON.stringify(families, (_, value) => (typeof value === 'number' ? Math.round(value * 1e3) : value));
    if (!found.has(key)) found.set(key, lettersFirst(families.filter((family) => family.length > 0)));
  }
  return [...found.values()];
}

function worldLines(grid: Grid, placements: Placements): Line[][] {
  try {
    const world = placements.worldOf(grid.placement);
    return grid.families.map((family) => {
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
  } catch (problem) {
    if (problem instanceof NotRead) return [];
    throw problem;
  }
}

/** "C/4", not "4/C": letters stand before numbers, whichever family the file calls U. */
function lettersFirst(families: readonly (readonly Line[])[]): readonly (readonly Line[])[] {
  const isNumbered = (family: readonly Line[]) => /^[-+]?\d/.test(family[0]?.tag ?? '');
  return [...families.filter((f) => !isNumbered(f)), ...families.filter(isNumbered)];
}

function nearestCrossing(grids: readonly GridFamilies[], at: Vec3): string {
  let best = '';
  let least = Number.POSITIVE_INFINITY;
  for (const families of grids) {
    const words = families.map((family) => alongFamily(family, at));
    const away = Math.hypot(...words.map((word) => word.away));
    if (away < least) {
      least = away;
      best = words.map((word) => word.text).join('/');
    }
  }
  return best;
}

/** Where a point lies among the axes of one family: on "C", between "C-D", or beyond the last one. */
function alongFamily(family: readonly Line[], at: Vec3): { text: string; away: number } {
  let left: { line: Line; distance: number } | null = null;
  let right: { line: Line; distance: number } | null = null;
  for (const line of family) {
    const side = dot(subtract([at[0], at[1], 0], line.at), line.left);
    const distance = Math.abs(side);
    if (side >= 0 && (right === null || distance < right.distance)) right = { line, distance };
    if (side < 0 && (left === null || distance < left.distance)) left = { line, distance };
  }
  const [near, far] = [left, right].sort((a, b) => (a?.distance ?? Infinity) - (b?.distance ?? Infinity));
  if (near === null || near === undefined) return { text: '', away: 0 };
  if (near.distance <= ON_AXIS) return { text: near.line.tag, away: near.distance };
  if (far === null || far === undefined) {
    return { text: `${near.line.tag} (${near.distance.toFixed(1)} m outside)`, away: near.distance };
  }
  return { text: inOrder(near.line.tag, far.line.tag), away: near.distance };
}

const byTag = new Intl.Collator('en', { numeric: true });

/** 'C-D' and '9-10', whichever is nearer. */
function inOrder(a: string, b: string): string {
  return byTag.compare(a, b) > 0 ? `${b}-${a}` : `${a}-${b}`;
}
