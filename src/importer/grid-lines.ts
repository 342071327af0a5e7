import type { GridLine } from '../domain/grid-line.ts';
import type { Grid } from './grids.ts';
import { NotRead } from './not-read.ts';
import type { Placements } from './placements.ts';
import { mapPosition } from './transform.ts';

/** The straight axes of all grids that have a tag; one that is drawn again on another level stands once. */
export function gridLines(grids: readonly Grid[], placements: Placements): GridLine[] {
  const found = new Map<string, GridLine>();
  for (const grid of grids) {
    for (const line of worldLines(grid, placements)) {
      const key = [line.tag, ...[...line.from.slice(0, 2), ...line.to.slice(0, 2)].map(inMillimetres)].join('|');
      if (!found.has(key)) found.set(key, line);
    }
  }
  return [...found.values()];
}

function worldLines(grid: Grid, placements: Placements): GridLine[] {
  try {
    const world = placements.worldOf(grid.placement);
    return grid.families
      .flat()
      .filter(({ tag }) => tag !== '')
      .map(({ tag, from, to }) => ({ tag, from: mapPosition(world, from), to: mapPosition(world, to) }));
  } catch (problem) {
    if (problem instanceof NotRead) return [];
    throw problem;
  }
}

const inMillimetres = (length: number): number => Math.round(length * 1e3);
