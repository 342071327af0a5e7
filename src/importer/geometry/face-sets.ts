import type { Vec3 } from '../../domain/vector.ts';
import { asList, asNumbers, asRef, asRefs, type StepValue } from '../../step/values.ts';
import { noAxis } from '../not-read.ts';
import { readAxes } from '../placement-axes.ts';
import type { Reading } from '../reading.ts';
import { compose, mapPosition, type Transform } from '../transform.ts';
import { readCurve } from './curve.ts';
import { pieceStart, reversed } from './curve-piece.ts';
import type { Polygon } from './mesh.ts';

/**
 * The flat faces of a boundary representation, a face set, a surface model or a block, in world metres; null where `id`
 * is none of these, or has faces that are not flat.
 * @throws NotRead (no-axis) where it names corners that it does not have.
 */
export function readFaces(reading: Reading, id: number, world: Transform): Polygon[] | null {
  const args = reading.args(id);
  const shells = (list: readonly number[]) => facesOfShells(reading, list, world);
  switch (reading.file.typeOf(id)) {
    case 'IFCFACETEDBREP':
    case 'IFCADVANCEDBREP':
      return shells(asRefs([args[0] ?? null]));
    case 'IFCFACETEDBREPWITHVOIDS':
    case 'IFCADVANCEDBREPWITHVOIDS':
      return shells([...asRefs([args[0] ?? null]), ...asRefs(args[1])]);
    case 'IFCSHELLBASEDSURFACEMODEL':
    case 'IFCFACEBASEDSURFACEMODEL':
      return shells(asRefs(args[0]));
    case 'IFCCLOSEDSHELL':
    case 'IFCOPENSHELL':
    case 'IFCCONNECTEDFACESET':
      return shells([id]);
    case 'IFCTRIANGULATEDFACESET':
      return indexedFaces(
        reading,
        args[0],
        asList(args[3]).map((corners) => [corners]),
        args[4],
        world,
      );
    case 'IFCPOLYGONALFACESET':
      return polygonalFaces(reading, args, world);
    case 'IFCBLOCK':
      return blockFaces(
        compose(world, readAxes(reading, args[0])),
        [1, 2, 3].map((i) => reading.length(args[i])),
      );
    default:
      return null;
  }
}

function facesOfShells(reading: Reading, shells: readonly number[], world: Transform): Polygon[] | null {
  const polygons: Polygon[] = [];
  for (const face of shells.flatMap((shell) => asRefs(reading.args(shell)[0]))) {
    const polygon = readFace(reading, face, world);
    if (polygon === null) return null;
    if (polygon.length > 0) polygons.push(polygon);
  }
  return polygons;
}

/** IfcFace and its kinds that lie in a plane; null where the surface is another. */
function readFace(reading: Reading, id: number, world: Transform): Polygon | null {
  const [boundList, surface] = reading.args(id);
  const surfaceId = asRef(surface);
  if (surfaceId !== null && reading.typeOf(surfaceId) !== 'IFCPLANE') return null;
  let outer: Vec3[] | null = null;
  const rings: Vec3[][] = [];
  for (const bound of asRefs(boundList)) {
    const [loop, orientation] = reading.args(bound);
    const loopId = asRef(loop);
    const drawn = loopId === null ? [] : readLoop(reading, loopId);
    if (drawn === null) return null;
    const corners = drawn.map((p) => mapPosition(world, p));
    if (orientation === false) corners.reverse();
    if (corners.length < 3) continue;
    if (outer === null && reading.file.typeOf(bound) === 'IFCFACEOUTERBOUND') outer = corners;
    else rings.push(corners);
  }
  return outer === null ? rings : [outer, ...rings];
}

/** Null where an edge is neither straight nor of straight pieces. */
function readLoop(reading: Reading, id: number): Vec3[] | null {
  const [list] = reading.args(id);
  if (reading.typeOf(id) !== 'IFCEDGELOOP') return asList(list).map((point) => reading.point(point));
  const corners: Vec3[] = [];
  for (const edge of asRefs(list)) {
    const along = readEdge(reading, edge);
    if (along === null) return null;
    corners.push(...along);
  }
  return corners;
}

const STRAIGHT = new Set(['', 'IFCLINE', 'IFCPOLYLINE']);

/** The corners along an edge but its last, which the next edge begins with. */
function readEdge(reading: Reading, id: number): Vec3[] | null {
  const oriented = reading.args(id);
  const isOriented = reading.typeOf(id) === 'IFCORIENTEDEDGE';
  const edge = isOriented ? asRef(oriented[2]) : id;
  if (edge === null) return [];
  const isForward = !isOriented || oriented[3] !== false;
  const [start, end, geometry, sense] = reading.args(edge);
  const curve = asRef(geometry);
  const type = curve === null ? '' : reading.typeOf(curve);
  if (!STRAIGHT.has(type)) return null;
  const vertex = asRef(isForward ? start : end);
  const first = reading.point(vertex === null ? null : reading.args(vertex)[0]);
  if (curve === null || type !== 'IFCPOLYLINE') return [first];
  const pieces = readCurve(reading, curve);
  const inOrder = (sense !== false) === isForward ? pieces : reversed(pieces);
  return [first, ...inOrder.slice(1).map(pieceStart)];
}

function polygonalFaces(reading: Reading, args: readonly StepValue[], world: Transform): Polygon[] {
  const faces = asRefs(args[2]).map((face) => {
    const [outer, inner] = reading.args(face);
    return [outer ?? null, ...asList(inner)] as readonly StepValue[];
  });
  return indexedFaces(reading, args[0], faces, args[3], world);
}

function indexedFaces(
  reading: Reading,
  coordinates: StepValue | undefined,
  faces: readonly (readonly StepValue[])[],
  again: StepValue | undefined,
  world: Transform,
): Polygon[] {
  const list = asRef(coordinates);
  const rows = list === null ? [] : asList(reading.args(list)[0]);
  const points = rows.map((row) => mapPosition(world, reading.coordinates(row, reading.units.length)));
  const renumbered = asNumbers(again);
  return faces.map((rings) =>
    rings.map((ring) =>
      asNumbers(ring).map((index) => {
        const point = points[(renumbered.length > 0 ? (renumbered[index - 1] ?? 0) : index) - 1];
        if (point === undefined) throw noAxis(`its mesh names corner ${index} of ${points.length}`);
        return point;
      }),
    ),
  );
}

/** The six faces of a box with one corner in the frame's origin. */
export function blockFaces(frame: Transform, sizes: readonly number[]): Polygon[] {
  const [x, y, z] = sizes;
  if (!(x! > 0 && y! > 0 && z! > 0)) throw noAxis('its block has no size');
  const corner = (i: number): Vec3 => mapPosition(frame, [i & 1 ? x! : 0, i & 2 ? y! : 0, i & 4 ? z! : 0]);
  const quads = [
    [0, 2, 3, 1],
    [4, 5, 7, 6],
    [0, 1, 5, 4],
    [2, 6, 7, 3],
    [0, 4, 6, 2],
    [1, 3, 7, 5],
  ];
  return quads.map((quad) => [quad.map(corner)]);
}
