import type { Member } from '../../../domain/member.ts';
import type { Truss } from '../../../domain/truss.ts';
import type { Vec3 } from '../../../domain/vector.ts';
import { removeCrossings } from './crossings.ts';
import { findFaces } from './faces.ts';
import { convexHull } from './hull.ts';
import { planArea, planDistance, SAME_PLACE, turn } from './plan.ts';
import { planEdges } from './plan-edges.ts';
import { sharePatch } from './share-patch.ts';
import { Triangulation } from './triangulation.ts';

/** A surface over nodes: convex patches that do not overlap in plan, corners going round to the left. */
export interface Surface {
  readonly patches: readonly (readonly number[])[];
  /** `bars`: the cells that bars close; `outline`: too few do, and the nodes were joined within their convex outline. */
  readonly formedBy: 'bars' | 'outline';
  /** Cells that no cladding spans, by their corners: taken as openings. */
  readonly openings: readonly (readonly number[])[];
}

/** Why there is no surface, in a clause, and the nodes that show it. */
export interface NoSurface {
  readonly fault: string;
  readonly nodes: readonly number[];
}

/** Below this share of the nodes at corners of cells, the bars do not show the surface. */
const ENOUGH_CORNERS = 0.5;

/**
 * A cell with more corners than this and this many times larger than the usual one is no panel: a court, a void between
 * roofs. Common practice has no number for it; panels have four corners, now and then eight.
 */
const OPENING = { corners: 8, timesUsualArea: 8 };

/** Beyond this ratio of true area to plan area (some 48 degrees all over) joined nodes are no roof. */
const STEEPEST = 1.5;

/** The surface that the chosen nodes and the bars between them form, seen in plan. */
export function formSurface(truss: Truss, members: readonly Member[], nodes: readonly number[]): Surface | NoSurface {
  const points = truss.nodes.map((node) => node.at);
  const stacked = findStacked(points, nodes);
  if (stacked.length > 0) return { fault: 'some of its nodes lie one above another', nodes: stacked };
  const { edges, layered } = removeCrossings(points, planEdges(truss, members, nodes));
  if (layered.length > 0) {
    return { fault: 'bars between its nodes pass one above another', nodes: [...new Set(layered.flat())] };
  }
  const { cells, islands } = findFaces(points, edges);
  if (islands.length > 0)
    return { fault: 'some of its nodes stand alone inside a larger cell of bars', nodes: islands };
  if (new Set(cells.flat()).size < ENOUGH_CORNERS * nodes.length) return formWithinOutline(points, nodes);
  const openings = findOpenings(points, cells);
  const patches: number[][] = [];
  for (const cell of cells) {
    if (openings.includes(cell)) continue;
    const divided = divide(points, cell);
    if (divided === null) return { fault: 'a cell of its bars touches itself', nodes: cell };
    patches.push(...divided);
  }
  return { patches, formedBy: 'bars', openings };
}

function formWithinOutline(points: readonly Vec3[], nodes: readonly number[]): Surface | NoSurface {
  const outline = convexHull(points, nodes);
  const onOutline = new Set(outline);
  const inner = nodes.filter((node) => !onOutline.has(node));
  const triangulation = outline.length < 3 ? null : Triangulation.of(points, outline, inner);
  if (triangulation === null) return { fault: 'its nodes span no area in plan', nodes: [...nodes] };
  const patches = triangulation.patches();
  const shares = patches.flatMap((patch) => sharePatch(points, patch));
  const [area, plan] = shares.reduce(([sum, flat], share) => [sum + share.area, flat + share.normalArea[2]], [0, 0]);
  if (area > STEEPEST * plan) return { fault: 'its nodes lie at too different heights to be one surface', nodes };
  return { patches, formedBy: 'outline', openings: [] };
}

function findOpenings(points: readonly Vec3[], cells: readonly (readonly number[])[]): (readonly number[])[] {
  const areas = cells.map((cell) => planArea(cell.map((node) => points[node])));
  const usual = [...areas].sort((a, b) => a - b)[areas.length >> 1] ?? 0;
  return cells.filter((cell, i) => cell.length > OPENING.corners && areas[i] > OPENING.timesUsualArea * usual);
}

/** A cell of four true corners stays whole; others are cut into triangles and polygons inscribed in a circle. */
function divide(points: readonly Vec3[], cell: readonly number[]): number[][] | null {
  if (cell.length === 3 || (cell.length === 4 && isConvex(points, cell))) return [[...cell]];
  if (new Set(cell).size < cell.length) return null;
  const triangulation = Triangulation.of(points, cell);
  return triangulation === null ? null : triangulation.patches();
}

/** Whether every corner turns left by more than three degrees. */
function isConvex(points: readonly Vec3[], cell: readonly number[]): boolean {
  return cell.every((node, i) => {
    const [a, b, c] = [points[cell.at(i - 1)!], points[node], points[cell[(i + 1) % cell.length]]];
    return turn(a, b, c) > 0.05 * planDistance(a, b) * planDistance(b, c);
  });
}

/** Nodes in one place in plan, at different heights. */
function findStacked(points: readonly Vec3[], nodes: readonly number[]): number[] {
  const ordered = nodes.toSorted((a, b) => points[a][0] - points[b][0]);
  const stacked = new Set<number>();
  ordered.forEach((node, i) => {
    for (let j = i + 1; j < ordered.length && points[ordered[j]][0] - points[node][0] <= SAME_PLACE; j++) {
      if (planDistance(points[node], points[ordered[j]]) <= SAME_PLACE) stacked.add(node).add(ordered[j]);
    }
  });
  return [...stacked];
}
