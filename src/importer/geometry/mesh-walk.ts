import { along, cross, distance, dot, norm, scale, subtract, unit, type Vec3 } from '../../domain/vector.ts';
import { across } from '../transform.ts';
import type { Face, Mesh } from './mesh.ts';
import type { FlatPatch } from './mesh-caps.ts';
import { crossingOf, type Slice, Slicer, sidesAt, squareSlice } from './mesh-slice.ts';

/** The centre line of a bar of one section, from one end face to the other; metres, about the mesh's base. */
export interface Walk {
  /** End faces' centroids, slices' centroids, and where the lines of two runs meet in a sharp bend. */
  readonly line: readonly Vec3[];
  readonly slices: readonly Slice[];
  /** The lesser cosine between the line and an end face's normal. */
  readonly squareness: number;
}

/** Slices whose areas are this near are one section: facets of a bend show a hundredth or two less. */
const SAME_AREA = 0.03;
/** Centroids may leave the line ahead by this part of the section's size in one step. */
const SIDESTEP = 0.25;
/** Between two slices the line turns by less than this, else it is a sharp bend. */
const TURN = Math.cos((20 * Math.PI) / 180);
/** Steps, as parts of the section's size. */
const FIRST_STEP = 0.25;
const LEAST_STEP = 0.02;
const LONGEST_STEP = 10;
const MOST_SLICES = 400;

/** Step by step along the bar, from just within an end face; null where the section changes or the way is lost. */
export function walkFrom(mesh: Mesh, patches: readonly FlatPatch[], start: FlatPatch, first: Slice): Walk | null {
  const line: Vec3[] = [start.centroid, first.centroid];
  const slices: Slice[] = [first];
  const ends = patches.filter((patch) => patch !== start);
  const { area, size } = first;
  let [at, step] = [first, FIRST_STEP * size];
  while (slices.length < MOST_SLICES) {
    const end = endAhead(ends, at, first, step);
    if (end !== null) {
      line.push(along(at.centroid, at.normal, end.away));
      const squareness = Math.min(
        Math.abs(dot(start.normal, first.normal)),
        Math.abs(dot(end.patch.normal, at.normal)),
      );
      return { line, slices, squareness };
    }
    const next = stepped(mesh, at, step, first);
    if (next === null && step > LEAST_STEP * size) {
      step /= 2;
      continue;
    }
    const bend = next === null ? roundBend(mesh, at, area, size) : null;
    const reached = next ?? bend?.slice;
    if (reached === undefined) return null;
    const corner = bend?.corner ?? cornerBetween(at, reached, size);
    if (corner !== null) line.push(corner);
    line.push(reached.centroid);
    slices.push(reached);
    const isStraightOn = bend === null && norm(cross(reached.normal, at.normal)) < 1e-4;
    step = isStraightOn
      ? Math.min(2 * step, LONGEST_STEP * size)
      : Math.max(step, FIRST_STEP * size) / (bend === null ? 1 : 2);
    at = reached;
  }
  return null;
}

/** Where the lines of two neighbouring slices meet between them, as they do from one facet of a bend to the next. */
function cornerBetween(at: Slice, next: Slice, size: number): Vec3 | null {
  const meeting = crossingOf(at.centroid, at.normal, next.centroid, next.normal);
  if (meeting === null || meeting.gap > 0.01 * size) return null;
  return meeting.onFirst > 0 && meeting.onSecond < 0 ? meeting.point : null;
}

const isSameArea = (a: number, b: number): boolean => Math.abs(a / b - 1) <= SAME_AREA;

/** The end face that the line meets within the next step. */
function endAhead(
  ends: readonly FlatPatch[],
  at: Slice,
  first: Slice,
  step: number,
): { patch: FlatPatch; away: number } | null {
  for (const patch of ends) {
    const lean = dot(patch.normal, at.normal);
    if (!isSameArea(patch.area * Math.abs(lean), first.area)) continue;
    const away = dot(subtract(patch.centroid, at.centroid), patch.normal) / lean;
    if (away < 0 || away > step) continue;
    if (distance(along(at.centroid, at.normal, away), patch.centroid) < 0.05 * first.size) return { patch, away };
  }
  return null;
}

function stepped(mesh: Mesh, at: Slice, step: number, { area, size }: Slice): Slice | null {
  const ahead = along(at.centroid, at.normal, step);
  const next = squareSlice(mesh, ahead, at.normal);
  if (next === null || !isSameArea(next.area, area) || dot(next.normal, at.normal) < TURN) return null;
  const moved = subtract(next.centroid, at.centroid);
  const isOn = dot(moved, at.normal) > 0.3 * step && norm(across(moved, at.normal)) <= SIDESTEP * Math.min(step, size);
  return isOn ? next : null;
}

/** A sharp bend is looked round as far as this, in sizes of the section. */
const ROUND_THE_CORNER = [0.05, 0.1, 0.2, 0.35, 0.5, 0.75, 1, 1.5, 2];
const MOST_NORMALS = 16;

/** The nearest slice of a run that goes on in another direction, and where its line meets the one so far. */
function roundBend(mesh: Mesh, at: Slice, area: number, size: number): { slice: Slice; corner: Vec3 } | null {
  let best: { slice: Slice; corner: Vec3; away: number } | null = null;
  for (const direction of directionsRound(mesh, at, 2.5 * size)) {
    const slicer = new Slicer(mesh, direction);
    for (const reach of ROUND_THE_CORNER) {
      const found = runAt(slicer, along(at.centroid, direction, reach * size), area, size);
      if (found === null) continue;
      const meeting = crossingOf(at.centroid, at.normal, found.centroid, direction);
      if (meeting === null || meeting.gap > 0.02 * size || meeting.onFirst < 0 || meeting.onSecond > 0) continue;
      const away = meeting.onFirst - meeting.onSecond;
      if (away < 4 * size && (best === null || away < best.away)) best = { slice: found, corner: meeting.point, away };
      break;
    }
  }
  return best;
}

/** A slice of the right area near a point, where the next one beyond it says that a run goes that way. */
function runAt(slicer: Slicer, point: Vec3, area: number, size: number): Slice | null {
  const near = slicer
    .at(point)
    .filter((slice) => isSameArea(slice.area, area) && distance(slice.centroid, point) < 3 * size);
  return (
    near.find((slice) => {
      const next = slicer.nearest(along(slice.centroid, slice.normal, 0.05 * size));
      if (next === null || !isSameArea(next.area, area)) return false;
      const moved = unit(subtract(next.centroid, slice.centroid));
      return moved !== null && norm(cross(moved, slice.normal)) < 0.02;
    }) ?? null
  );
}

/** A bend turns each side of the run before it into one of the run behind it: to this sine. */
const SIDE_TURNED = 0.02;

/** The directions that a run behind a bend may have: those of pairs of faces near it, where its sides would be faces too. */
function directionsRound(mesh: Mesh, at: Slice, radius: number): Vec3[] {
  const near = distinctNormals(mesh.faces.filter((face) => reachesNear(mesh, face, at.centroid, radius)));
  const sides = distinctNormals(sidesAt(mesh, at).faces);
  const largest = near.slice(0, MOST_NORMALS);
  const directions: Vec3[] = [];
  largest.forEach((a, i) => {
    for (const b of largest.slice(0, i)) {
      const direction = unit(cross(a, b));
      if (direction === null || directions.some((known) => norm(cross(known, direction)) < 1e-3)) continue;
      for (const sense of [direction, scale(direction, -1)]) {
        const turned = sides.map((side) => turnedWith(side, at.normal, sense));
        if (turned.every((side) => side !== null && near.some((n) => norm(cross(n, side)) < SIDE_TURNED))) {
          directions.push(sense);
        }
      }
    }
  });
  return directions;
}

const reachesNear = (mesh: Mesh, { rings }: Face, point: Vec3, radius: number): boolean =>
  rings[0]!.some((corner) => distance(mesh.points[corner]!, point) < radius);

/** Of opposite and like normals one, those of the most area first. */
function distinctNormals(faces: readonly Face[]): Vec3[] {
  const normals: { normal: Vec3; size: number }[] = [];
  for (const { area } of faces) {
    const normal = unit(area);
    if (normal === null) continue;
    const same = normals.find((known) => norm(cross(known.normal, normal)) < 0.01);
    if (same === undefined) normals.push({ normal, size: norm(area) });
    else same.size += norm(area);
  }
  return normals.sort((a, b) => b.size - a.size).map(({ normal }) => normal);
}

/** `v` turned by the least turn that takes the unit vector `from` to `to`; null where these are the same or opposite. */
function turnedWith(v: Vec3, from: Vec3, to: Vec3): Vec3 | null {
  const axis = unit(cross(from, to));
  if (axis === null) return null;
  const [before, after] = [cross(axis, from), cross(axis, to)];
  return along(along(scale(axis, dot(v, axis)), to, dot(v, from)), after, dot(v, before));
}
