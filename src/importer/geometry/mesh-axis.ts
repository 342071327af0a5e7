import { add, along, cross, norm, scale, subtract, unit, type Vec3 } from '../../domain/vector.ts';
import { NotRead, noAxis } from '../not-read.ts';
import type { Outline, Point2 } from '../sections/outline.ts';
import { outlineProperties } from '../sections/outline-properties.ts';
import { across } from '../transform.ts';
import { bentMeshAxes } from './bent-mesh.ts';
import type { BodyAxis } from './body-axis.ts';
import { measuredSection } from './measured-section.ts';
import { type Mesh, meshOf, type Polygon } from './mesh.ts';
import { separateBodies } from './mesh-bodies.ts';
import { MeshCutter } from './mesh-cut.ts';
import { prismDirection, prismEnds, rangeAlong, sectionFrame, uprightAcross } from './prism.ts';
import { type KnownSections, shortBarAxis } from './short-bar.ts';

/** A body not this many times as long as it is wide is a plate or a lump, no member. */
const LEAST_SLENDER = 2.5;

/** Cuts are made at these parts of the length: off the even fractions that builders use. */
const STATIONS = [0.103, 0.201, 0.302, 0.401, 0.503, 0.602, 0.703, 0.801, 0.902];

const NOTHING_KNOWN: KnownSections = () => [];

/** Areas within a hundredth are one section. */
const SAME_AREA = 0.01;

/** Centroids of cuts leave a straight line by as much where a mesh is drawn in whole millimetres. */
const STRAIGHT = 1e-3;

/**
 * The axes of each separate body of a mesh: one fitted to it as to a prism, else that of a short piece of a section that is
 * known, else those of a bar that bends. `upright` is the direction that the section's z axis is to be near.
 * @throws NotRead (no-axis, many-in-one, no-section) where no body is a single slender one.
 */
export function meshAxes(
  polygons: readonly Polygon[],
  upright: Vec3,
  known: KnownSections = NOTHING_KNOWN,
): BodyAxis[] {
  const mesh = meshOf(polygons);
  if (mesh.faces.length === 0) throw noAxis('its mesh has no faces');
  const axes: BodyAxis[] = [];
  let refusal: NotRead | null = null;
  for (const body of separateBodies(mesh)) {
    try {
      const { axis, isAstray } = meshAxis(body, upright);
      const bent = axis.rise > STRAIGHT || isAstray ? bentMeshAxes(body, upright) : null;
      axes.push(...(bent ?? [axis]));
    } catch (problem) {
      if (!(problem instanceof NotRead)) throw problem;
      const found = (problem instanceof Stout ? shortAxis(body, upright, known) : null) ?? bentMeshAxes(body, upright);
      if (found !== null) {
        axes.push(...found);
        continue;
      }
      // A lattice among single bars is the more telling of two refusals.
      refusal = refusal === null || problem.code === 'many-in-one' ? problem : refusal;
    }
  }
  if (refusal !== null && (axes.length === 0 || refusal.code === 'many-in-one')) throw refusal;
  return axes;
}

function shortAxis(mesh: Mesh, upright: Vec3, known: KnownSections): BodyAxis[] | null {
  for (const section of known()) {
    const axis = shortBarAxis(mesh, upright, section);
    if (axis !== null) return [axis];
  }
  return null;
}

interface Station {
  readonly area: number;
  /** World-sized, about the mesh's base. */
  readonly centroid: Vec3;
  readonly regions: readonly Outline[];
}

/** `isAstray`: some cut has its centroid outside of the section carried along the axis, as no straight bar has. */
function meshAxis(mesh: Mesh, upright: Vec3): { axis: BodyAxis; isAstray: boolean } {
  const first = prismDirection(mesh);
  if (first === null) throw noAxis('its mesh shows no direction');
  refuseStout(mesh, first, sectionFrame(mesh, first, uprightAcross(upright, first)));
  const { direction, frame, stations } = cutSquare(mesh, first, upright);
  const { prevailing, agreeing } = majority(stations);
  if (prevailing.regions.length > 1) throw severalBars();
  const section = measuredSection(prevailing.regions[0]!);
  const rise = riseOf(agreeing.length >= stations.length / 2 ? agreeing : stations, agreeing);
  const isBent = rise > STRAIGHT;
  const line = isBent ? bentChord(mesh, direction, frame) : straightChord(mesh, prevailing, direction);
  const ends = [line.start, line.end].map((p) => add(p, mesh.base));
  const astray = stations.map(({ centroid }) => norm(across(subtract(centroid, prevailing.centroid), direction)));
  const isAstray = Math.max(...astray) > Math.max(section.depth, section.width) / 2;
  const axis: BodyAxis = {
    from: 'mesh',
    start: ends[0]!,
    end: ends[1]!,
    x: frame.x,
    y: frame.y,
    profile: null,
    endProfile: null,
    rise,
    bow: null,
    isRun: false,
    measured: {
      section,
      zAxis: frame.y,
      confidence: agreeing.length / STATIONS.length,
      squareness: line.squareness,
      strays: null,
    },
  };
  return { axis, isAstray };
}

function refuseStout(mesh: Mesh, direction: Vec3, frame: Frame): void {
  const [length, width, depth] = [direction, frame.x, frame.y].map((axis) => {
    const [low, high] = rangeAlong(mesh, axis);
    return high - low;
  }) as [number, number, number];
  if (length < LEAST_SLENDER * Math.max(width, depth)) throw new Stout();
}

/** A plate, a lump, or a piece too short to show which way it runs. */
class Stout extends NotRead {
  constructor() {
    super(
      'no-axis',
      `it is a plate or a lump, not ${LEAST_SLENDER} times as long as it is wide`,
      'Leave plates, anchors and panels out of the scope; export a short member as a profile extruded along its length.',
    );
  }
}

const severalBars = () =>
  new NotRead(
    'many-in-one',
    'its body is one mesh of several bars grown together',
    'Export each bar as an element of its own, or as a solid of its own within the element.',
  );

interface Cuts {
  readonly direction: Vec3;
  readonly frame: Frame;
  readonly stations: readonly Station[];
}

/** The centroids of a prism's cuts lie in line even where the cuts are not quite square to it: a second look is square. */
function cutSquare(mesh: Mesh, direction: Vec3, upright: Vec3): Cuts {
  const frame = sectionFrame(mesh, direction, uprightAcross(upright, direction));
  const stations = cutAll(mesh, direction, frame);
  const { agreeing } = majority(stations);
  const [first, last] = [agreeing[0], agreeing.at(-1)];
  const line = first === undefined || last === undefined ? null : unit(subtract(last.centroid, first.centroid));
  const turn = line === null ? 0 : norm(cross(line, direction));
  // More than a degree is a bow or a notched side, not an inexact direction.
  if (line === null || turn < 1e-9 || turn > Math.PI / 180) return { direction, frame, stations };
  const better = sectionFrame(mesh, line, uprightAcross(upright, line));
  return { direction: line, frame: better, stations: cutAll(mesh, line, better) };
}

interface Frame {
  readonly x: Vec3;
  readonly y: Vec3;
}

function cutAll(mesh: Mesh, direction: Vec3, frame: Frame): Station[] {
  const cutter = new MeshCutter(mesh, direction, frame.x, frame.y);
  const [low, high] = rangeAlong(mesh, direction);
  return STATIONS.flatMap((t) => stationAt(cutter, direction, frame, low + t * (high - low)) ?? []);
}

function stationAt(cutter: MeshCutter, direction: Vec3, { x, y }: Frame, height: number): Station | null {
  let area = 0;
  let moment: Point2 = [0, 0];
  const regions = cutter.at(height).filter((region) => {
    const plane = outlineProperties(region);
    if (plane === null) return false;
    area += plane.area;
    moment = [moment[0] + plane.area * plane.centroid[0], moment[1] + plane.area * plane.centroid[1]];
    return true;
  });
  if (!(area > 0)) return null;
  const centroid = along(along(scale(direction, height), x, moment[0] / area), y, moment[1] / area);
  return { area, centroid, regions };
}

/** The section that most cuts show; holes and notches make others smaller, so that of two as frequent the larger counts. */
function majority(stations: readonly Station[]): { prevailing: Station; agreeing: readonly Station[] } {
  let best: readonly Station[] = [];
  for (const station of stations) {
    const alike = stations.filter((other) => Math.abs(other.area / station.area - 1) <= SAME_AREA);
    const isBetter =
      alike.length > best.length || (alike.length === best.length && station.area > (best[0]?.area ?? 0));
    if (isBetter) best = alike;
  }
  const prevailing = best[Math.floor(best.length / 2)];
  if (prevailing === undefined) {
    throw new NotRead(
      'no-axis',
      'its mesh is not closed, so no cut through it shows a section',
      'Export the member as a closed solid, or as a profile extruded along its length.',
    );
  }
  // Where no two cuts agree the body tapers: its least section is the safe one.
  if (best.length > 1) return { prevailing, agreeing: best };
  const least = stations.reduce((a, b) => (b.area < a.area ? b : a));
  return { prevailing: least, agreeing: [least] };
}

/** How far the centroids of the cuts leave the line from the first to the last of them. */
function riseOf(stations: readonly Station[], agreeing: readonly Station[]): number {
  const judged = agreeing.length > 1 ? stations : [];
  const [first, last] = [judged[0], judged.at(-1)];
  if (first === undefined || last === undefined) return 0;
  const line = unit(subtract(last.centroid, first.centroid));
  if (line === null) return 0;
  return Math.max(...judged.map(({ centroid }) => norm(across(subtract(centroid, first.centroid), line))));
}

interface Line {
  readonly start: Vec3;
  readonly end: Vec3;
  readonly squareness: number | null;
}

function straightChord(mesh: Mesh, { centroid, area }: Station, direction: Vec3): Line {
  const [from, to] = prismEnds(mesh, centroid, direction, area);
  const squareness =
    from.squareness === null || to.squareness === null ? null : Math.min(from.squareness, to.squareness);
  return { start: along(centroid, direction, from.at), end: along(centroid, direction, to.at), squareness };
}

/** Of a bent body: between the centroids right at its two extremes. */
function bentChord(mesh: Mesh, direction: Vec3, frame: Frame): Line {
  const cutter = new MeshCutter(mesh, direction, frame.x, frame.y);
  const [low, high] = rangeAlong(mesh, direction);
  const near = 0.02 * (high - low);
  const at = (height: number): Vec3 => {
    const station = stationAt(cutter, direction, frame, height);
    if (station === null) throw noAxis('its mesh is not closed at its ends');
    return station.centroid;
  };
  const [a, b, c, d] = [at(low + near), at(low + 2 * near), at(high - 2 * near), at(high - near)];
  // The last step is carried on to the end.
  return { start: along(a, subtract(a, b), 1), end: along(d, subtract(d, c), 1), squareness: null };
}
