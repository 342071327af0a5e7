import { EigenvalueDecomposition, Matrix } from 'ml-matrix';
import type { Section } from '../../domain/member.ts';
import { add, along, cross, dot, norm, scale, subtract, unit, type Vec3 } from '../../domain/vector.ts';
import type { Point2 } from '../sections/outline.ts';
import type { BodyAxis } from './body-axis.ts';
import { measuredSection } from './measured-section.ts';
import type { Mesh } from './mesh.ts';
import { flatPatches } from './mesh-caps.ts';
import { boxOf, type Slice, Slicer } from './mesh-slice.ts';
import { rangeAlong, sectionFrame, uprightAcross } from './prism.ts';

/** The sections that an element is said to have, by its names or by its fellows; found only where they are asked for. */
export type KnownSections = () => readonly Section[];

/** Cuts at these parts of the length, off the even fractions that builders use. */
const STATIONS = [0.06, 0.17, 0.28, 0.39, 0.503, 0.61, 0.72, 0.83, 0.94];

/** Of the cuts so many show the section that is said; the rest of the body is split, joggled, notched or drawn out. */
const MOSTLY = 0.5;

/** A flat, or a body of which only part has the section, is a bar where it is this many times as long as that is large. */
const LEAST_LONG = 1.25;

/** Any rectangle cut from a plate fits some name of a flat: wider ones than flat bars are rolled (EN 10058, from memory) are plates. */
const WIDEST_FLAT = 0.15;

/** A cut has the section's area and box: what facets, left-out fillets and rounded names make. */
const SAME_AREA = 0.05;
const SAME_SIZE = 0.03;

/** Faces whose normals the axis may run along, those of the most area first. */
const MOST_DIRECTIONS = 4;

/** cos 15 degrees: what is split or joggled has its principal axis this near to its line. */
const NEAR = Math.cos((15 * Math.PI) / 180);

/** A lump of more faces than this is no short piece of one bar. */
const MOST_FACES = 1000;

/**
 * The line of a body too short to show by itself which way it runs, where a section is known that it should have: the
 * direction in which cuts show that section, over the whole length of a stub and over most of that of a bar with a split or
 * joggled end. Null where no direction shows it: walls, plates and lumps.
 */
export function shortBarAxis(mesh: Mesh, upright: Vec3, section: Section): BodyAxis | null {
  if (mesh.faces.length > MOST_FACES) return null;
  const isFlat = section.shape === 'rectangle';
  if (isFlat && Math.max(section.depth, section.width) > WIDEST_FLAT) return null;
  for (const direction of directionsOf(mesh)) {
    const found = barAlong(mesh, direction, upright, section);
    if (found === null) continue;
    const { axis, length, isWhole, strays } = found;
    const size = Math.max(section.depth, section.width);
    // A flat is a rectangle in all three views; other sections are told from one that shows them throughout.
    if (length < LEAST_LONG * size && (isFlat || !isWhole)) continue;
    if (strays <= size) return axis;
  }
  return null;
}

/** The principal axis of the skin, brought square to a face where one is near; then the normals of the largest faces. */
function directionsOf(mesh: Mesh): Vec3[] {
  const normals = flatPatches(mesh)
    .sort((a, b) => b.area - a.area)
    .map(({ normal }) => normal);
  const principal = principalAxis(mesh);
  const first = principal === null ? null : (nearest(normals, principal) ?? principal);
  const directions = first === null ? [] : [first];
  for (const normal of normals) {
    if (directions.length === MOST_DIRECTIONS) break;
    if (directions.every((known) => norm(cross(known, normal)) > 0.01)) directions.push(normal);
  }
  return directions;
}

function nearest(normals: readonly Vec3[], axis: Vec3): Vec3 | null {
  let [best, most] = [null as Vec3 | null, NEAR];
  for (const normal of normals) {
    const near = Math.abs(dot(normal, axis));
    if (near > most) [best, most] = [normal, near];
  }
  return best;
}

/** The direction in which the skin spreads most (greatest eigenvector of its faces' second moment). */
function principalAxis(mesh: Mesh): Vec3 | null {
  const faces = mesh.faces.map(({ rings, area }) => {
    const corners = rings[0]!.map((corner) => mesh.points[corner]!);
    const sum = corners.reduce((whole, corner) => add(whole, corner));
    return { size: norm(area), middle: scale(sum, 1 / corners.length) };
  });
  const skin = faces.reduce((sum, { size }) => sum + size, 0);
  if (!(skin > 0)) return null;
  const middle = faces.reduce<Vec3>((sum, face) => along(sum, face.middle, face.size / skin), [0, 0, 0]);
  const spread = new Matrix(3, 3);
  for (const face of faces) {
    const away = subtract(face.middle, middle);
    for (let i = 0; i < 3; i++) {
      for (let j = 0; j < 3; j++) spread.set(i, j, spread.get(i, j) + face.size * away[i]! * away[j]!);
    }
  }
  const { realEigenvalues, eigenvectorMatrix } = new EigenvalueDecomposition(spread, { assumeSymmetric: true });
  return unit(eigenvectorMatrix.getColumn(realEigenvalues.indexOf(Math.max(...realEigenvalues))) as unknown as Vec3);
}

interface Frame {
  readonly x: Vec3;
  readonly y: Vec3;
}

interface Found {
  readonly axis: BodyAxis;
  readonly length: number;
  /** Whether every cut shows the section. */
  readonly isWhole: boolean;
  readonly strays: number;
}

function barAlong(mesh: Mesh, direction: Vec3, upright: Vec3, section: Section): Found | null {
  const [low, high] = rangeAlong(mesh, direction);
  const { x, y } = sectionFrame(mesh, direction, uprightAcross(upright, direction));
  const slicer = new Slicer(mesh, direction, x);
  const alike: Slice[] = [];
  for (const [i, part] of STATIONS.entries()) {
    const [only, ...others] = slicer.at(scale(direction, low + part * (high - low)));
    if (only !== undefined && others.length === 0 && isOf(section, only)) alike.push(only);
    // What is left could not make it up.
    if (alike.length + (STATIONS.length - 1 - i) < MOSTLY * STATIONS.length) return null;
  }
  const typical = alike[Math.floor(alike.length / 2)];
  if (typical === undefined) return null;
  const middle = scale(
    alike.reduce<Vec3>((sum, { centroid }) => add(sum, centroid), [0, 0, 0]),
    1 / alike.length,
  );
  const foot = subtract(middle, scale(direction, dot(middle, direction)));
  const [least, most] = boxOf(typical.outline);
  const shift = subtract(foot, typical.centroid);
  const moved = (p: Point2): Point2 => [p[0] + dot(shift, x), p[1] + dot(shift, y)];
  const strays = straying(mesh, { x, y }, [moved(least), moved(most)]);
  const isWhole = alike.length === STATIONS.length;
  const axis: BodyAxis = {
    from: 'mesh',
    start: add(mesh.base, along(foot, direction, low)),
    end: add(mesh.base, along(foot, direction, high)),
    x,
    y,
    profile: null,
    endProfile: null,
    rise: 0,
    bow: null,
    isRun: false,
    measured: {
      section: measuredSection(typical.outline),
      zAxis: y,
      confidence: alike.length / STATIONS.length,
      squareness: null,
      strays,
    },
  };
  return { axis, length: high - low, isWhole, strays };
}

function isOf(section: Section, { area, outline }: Slice): boolean {
  if (Math.abs(area / section.area - 1) > SAME_AREA) return false;
  const [low, high] = boxOf(outline);
  const [width, depth] = [high[0] - low[0], high[1] - low[1]];
  const near = (a: number, b: number) => Math.abs(a - b) <= SAME_SIZE * Math.max(section.depth, section.width);
  return (
    (near(depth, section.depth) && near(width, section.width)) ||
    (near(depth, section.width) && near(width, section.depth))
  );
}

/** How far corners lie outside of a box carried along the axis, metres. */
function straying(mesh: Mesh, { x, y }: Frame, [low, high]: ReturnType<typeof boxOf>): number {
  const beyond = (value: number, i: 0 | 1) => Math.max(0, low[i] - value, value - high[i]);
  let farthest = 0;
  for (const { rings } of mesh.faces) {
    for (const corner of rings[0]!) {
      const p = mesh.points[corner]!;
      farthest = Math.max(farthest, Math.hypot(beyond(dot(p, x), 0), beyond(dot(p, y), 1)));
    }
  }
  return farthest;
}
