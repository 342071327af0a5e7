import type { Section } from '../../domain/member.ts';
import { NotRead } from '../not-read.ts';
import { chs, circle, rectangle, rhs } from '../sections/closed-shapes.ts';
import { type Outline, type Point2, type Ring, startOf } from '../sections/outline.ts';
import { ringSize } from '../sections/outline-properties.ts';
import { inMillimetres, type ProfileShape, sectionOf } from '../sections/profile-shape.ts';

/** Corners of a faceted circle lie on it: to this part of its radius. */
const ROUND = 0.01;
const FEWEST_FACETS = 8;
/** The corners of a rectangle lie on a circle too, but not all round it: radians between two neighbours. */
const WIDEST_FACET = Math.PI / 3;

/** A rectangle fills its box, but for rounded corners. */
const BOXY = 0.995;

/**
 * The section that a cut through a body shows. Circles and rectangles are known again, so that a tube drawn with facets
 * has the area of a round one.
 * @throws NotRead (no-section) where the outline encloses no area.
 */
export function measuredSection(outline: Outline): Section {
  const section = sectionOf(knownShape(outline) ?? anyShape(outline));
  return { ...section, name: nameOf(section), from: 'mesh' };
}

const nameOf = ({ shape, depth, width, area }: Section): string => {
  const size = shape === 'CHS' || shape === 'circle' ? inMillimetres(rounded(depth)) : sizeOf(depth, width);
  return `Measured ${shape === 'other' ? '' : `${shape} `}${size}, ${Math.round(area * 1e6)} mm2`;
};

const rounded = (length: number): number => Math.round(length * 1e4) / 1e4;
const sizeOf = (depth: number, width: number): string => inMillimetres(rounded(depth), rounded(width));

const anyShape = (outline: Outline): ProfileShape => ({ name: '', shape: 'other', outline, torsion: null, warping: 0 });

function knownShape(outline: Outline): ProfileShape | null {
  const [hole, ...more] = outline.voids;
  if (more.length > 0) return null;
  try {
    return roundShape(outline.outer, hole) ?? rectangularShape(outline.outer, hole);
  } catch (problem) {
    // Dimensions that make no such shape after all: the outline stands for itself.
    if (problem instanceof NotRead) return null;
    throw problem;
  }
}

function roundShape(outer: Ring, hole: Ring | undefined): ProfileShape | null {
  const around = circleOf(outer);
  if (around === null) return null;
  if (hole === undefined) return circle(null, around.radius);
  const within = circleOf(hole);
  if (within === null) return null;
  const apart = Math.hypot(around.centre[0] - within.centre[0], around.centre[1] - within.centre[1]);
  return apart > ROUND * around.radius ? null : chs(null, around.radius, around.radius - within.radius);
}

function circleOf(ring: Ring): { centre: Point2; radius: number } | null {
  const corners = trueCorners(cornersOf(ring));
  if (corners.length < FEWEST_FACETS) return null;
  const [low, high] = boxOf(corners);
  const centre: Point2 = [(low[0] + high[0]) / 2, (low[1] + high[1]) / 2];
  const radii = corners.map((p) => Math.hypot(p[0] - centre[0], p[1] - centre[1]));
  const radius = Math.max(...radii);
  if (Math.min(...radii) < (1 - ROUND) * radius) return null;
  const angles = corners.map((p) => Math.atan2(p[1] - centre[1], p[0] - centre[0])).sort((a, b) => a - b);
  const gaps = angles.map((angle, i) => (angles[i + 1] ?? angles[0]! + 2 * Math.PI) - angle);
  return Math.max(...gaps) > WIDEST_FACET ? null : { centre, radius };
}

/** About its own axes only: one that stands askew keeps its outline. */
function rectangularShape(outer: Ring, hole: Ring | undefined): ProfileShape | null {
  const box = boxFilled(outer);
  if (box === null) return null;
  if (hole === undefined) return rectangle(null, box.width, box.depth);
  const bore = boxFilled(hole);
  if (bore === null) return null;
  const walls = [(box.width - bore.width) / 2, (box.depth - bore.depth) / 2] as const;
  if (Math.abs(walls[0] - walls[1]) > 0.05 * Math.min(...walls)) return null;
  return rhs(null, { width: box.width, depth: box.depth, wall: walls[0], inner: 0, outer: 0 });
}

function boxFilled(ring: Ring): { width: number; depth: number } | null {
  const [low, high] = boxOf(cornersOf(ring));
  const [width, depth] = [high[0] - low[0], high[1] - low[1]];
  return ringSize(ring).area < BOXY * width * depth ? null : { width, depth };
}

/** A facet of two triangles is cut into two edges in one line (sine of the turn between them). */
const IN_LINE = 1e-3;

function trueCorners(corners: readonly Point2[]): Point2[] {
  return corners.filter((p, i) => {
    const [before, after] = [corners.at(i - 1)!, corners[(i + 1) % corners.length]!];
    const [a, b, c, d] = [p[0] - before[0], p[1] - before[1], after[0] - p[0], after[1] - p[1]];
    return Math.abs(a * d - b * c) > IN_LINE * Math.hypot(a, b) * Math.hypot(c, d);
  });
}

const cornersOf = (ring: Ring): Point2[] => ring.map(startOf);

function boxOf(corners: readonly Point2[]): readonly [low: Point2, high: Point2] {
  const xs = corners.map((p) => p[0]);
  const ys = corners.map((p) => p[1]);
  return [
    [Math.min(...xs), Math.min(...ys)],
    [Math.max(...xs), Math.max(...ys)],
  ];
}
