import { asRef, asRefs, asString, type StepValue } from '../../step/values.ts';
import { readCurve } from '../geometry/curve.ts';
import type { CurvePiece } from '../geometry/curve-piece.ts';
import { NotRead, noSection } from '../not-read.ts';
import { planeOf, readOperator, readPlaneAxes } from '../placement-axes.ts';
import type { Reading } from '../reading.ts';
import { inWords } from '../words.ts';
import { orImpossible } from './impossible-profile.ts';
import { composeMaps, type Edge, mapOutline, type PlaneMap, type Point2, type Ring, SAME_PLANE } from './outline.ts';
import { parametricShape } from './parametric-profile.ts';
import { type ProfileShape, sectionOf } from './profile-shape.ts';
import { stripShape } from './strip-shape.ts';

/** A profile definition of the file. */
export interface Profile {
  readonly id: number;
  readonly shape: ProfileShape;
  /** From the shape's own axes to the plane that is swept. */
  readonly map: PlaneMap;
}

const DEEPEST = 16;

/** Classes that say no more of a profile than what it is called. */
export const MERE_NAMES: ReadonlySet<string> = new Set(['IFCPROFILEDEF', 'IFCPARAMETERIZEDPROFILEDEF']);

/** @throws NotRead (no-section) where the profile's class is not read or its dimensions make no section. */
export function readProfile(reading: Reading, id: number, depth = 0): Profile {
  if (depth > DEEPEST) throw noSection('its profile refers to itself');
  const args = reading.args(id);
  const type = reading.typeOf(id);
  const stated = asString(args[1])?.trim() ?? '';
  const name = stated === '' ? null : stated;
  if (type === 'IFCDERIVEDPROFILEDEF' || type === 'IFCMIRROREDPROFILEDEF') {
    return derivedProfile(reading, id, args, name, depth);
  }
  if (type === 'IFCARBITRARYCLOSEDPROFILEDEF' || type === 'IFCARBITRARYPROFILEDEFWITHVOIDS') {
    return { id, shape: arbitraryShape(reading, args, name), map: SAME_PLANE };
  }
  if (type === 'IFCCOMPOSITEPROFILEDEF') {
    return { id, shape: compositeShape(reading, args, name, depth), map: SAME_PLANE };
  }
  if (type === 'IFCCENTERLINEPROFILEDEF') {
    return { id, shape: centreLineShape(reading, args, name), map: SAME_PLANE };
  }
  const shape = orImpossible(name, () => parametricShape(reading, type, args, name));
  if (shape !== null) return { id, shape, map: readPlaneAxes(reading, args[2]) };
  if (MERE_NAMES.has(type) && name !== null) throw noSection(`its profile is the mere name '${name}'`);
  throw noSection(type === '' ? 'its profile is missing' : `its profile is ${inWords(type)}, which is not read`);
}

function derivedProfile(
  reading: Reading,
  id: number,
  args: readonly StepValue[],
  name: string | null,
  depth: number,
): Profile {
  const parentId = asRef(args[2]);
  if (parentId === null) throw noSection('its derived profile has no parent');
  const parent = readProfile(reading, parentId, depth + 1);
  // The operator of a mirrored profile is derived by the standard: the image in the y axis.
  const isMirrored = reading.typeOf(id) === 'IFCMIRROREDPROFILEDEF';
  const operator: PlaneMap = isMirrored
    ? { x: [-1, 0], y: [0, 1], origin: [0, 0] }
    : planeOf(readOperator(reading, args[3]));
  return {
    id,
    shape: name === null ? parent.shape : { ...parent.shape, name },
    map: composeMaps(operator, parent.map),
  };
}

/** Pieces that keep apart between their connectors: they twist side by side, and do not warp as one. */
function compositeShape(
  reading: Reading,
  args: readonly StepValue[],
  name: string | null,
  depth: number,
): ProfileShape {
  const parts = asRefs(args[2]).map((part) => readProfile(reading, part, depth + 1));
  const sections = parts.map(({ shape }) => sectionOf(shape));
  const [first, ...besides] = parts.map(({ shape, map }) => mapOutline(map, shape.outline));
  if (first === undefined) throw noSection('its composite profile has no parts');
  return {
    name: name ?? parts.map(({ shape }) => shape.name).join(' + '),
    shape: 'other',
    outline: { ...first, besides: [...(first.besides ?? []), ...besides] },
    torsion: sections.reduce((sum, { torsion }) => sum + torsion, 0),
    warping: 0,
    thickness: Math.max(...sections.map(({ thickness }) => thickness)),
  };
}

function centreLineShape(reading: Reading, args: readonly StepValue[], name: string | null): ProfileShape {
  const curve = asRef(args[2]);
  if (curve === null) throw noSection('its profile has no centre line');
  return stripShape(name, readRing(reading, curve), reading.length(args[3]));
}

function arbitraryShape(reading: Reading, args: readonly StepValue[], name: string | null): ProfileShape {
  const outer = asRef(args[2]);
  if (outer === null) throw noSection('its profile has no outline');
  return {
    name: name ?? 'Unnamed profile',
    shape: 'other',
    outline: { outer: readRing(reading, outer), voids: asRefs(args[3]).map((hole) => readRing(reading, hole)) },
    torsion: null,
    warping: 0,
  };
}

function readRing(reading: Reading, id: number): Ring {
  try {
    const edges = readCurve(reading, id).map(flatten);
    if (edges.some((edge) => !isFinite2(edge))) throw noSection('its outline has a coordinate that is no number');
    return edges;
  } catch (problem) {
    if (problem instanceof NotRead && problem.code === 'no-axis') throw noSection(problem.message);
    throw problem;
  }
}

function flatten(piece: CurvePiece): Edge {
  const flat = (v: readonly [number, number, number]): Point2 => [v[0], v[1]];
  if (piece.kind === 'line') return { kind: 'line', from: flat(piece.from), to: flat(piece.to) };
  return { ...piece, centre: flat(piece.centre), u: flat(piece.u), v: flat(piece.v) };
}

function isFinite2(edge: Edge): boolean {
  const numbers =
    edge.kind === 'line' ? [...edge.from, ...edge.to] : [...edge.centre, ...edge.u, ...edge.v, edge.start, edge.end];
  return numbers.every(Number.isFinite);
}
