import {
  add,
  along,
  between,
  cross,
  distance,
  dot,
  norm,
  ORIGIN,
  subtract,
  unit,
  type Vec3,
} from '../../domain/vector.ts';
import type { BodyAxis, Measured } from './body-axis.ts';
import { type Chord, type CurvePiece, chordOf, linePiece } from './curve-piece.ts';
import { measuredSection } from './measured-section.ts';
import type { Mesh } from './mesh.ts';
import { type FlatPatch, flatPatches } from './mesh-caps.ts';
import { type Slice, Slicer, sidesAt, squareSlice } from './mesh-slice.ts';
import { type Walk, walkFrom } from './mesh-walk.ts';
import { sectionFrame, uprightAcross } from './prism.ts';
import { developedLength, straightRuns } from './straight-runs.ts';

/** A bent body is a bar where it is this many times as long, along its bends, as its section is large. */
const LEAST_SLENDER = 5;

/** The skin of a bar is its section's edge times its length, and its ends; this far off it has branches or other shapes. */
const SKIN = 0.1;

/** The box around a section in a frame of any direction is larger than its larger side by at most a root of 2. */
const SURELY_STOUT = Math.SQRT1_2 * (1 - SKIN);

/** An end face is a small part of the skin of a slender body. */
const LARGEST_END = 0.1;

/** A facet of a small bend may look like an end. */
const MOST_ENDS_TRIED = 3;

/** The last run before an end is at least as long, in sizes of the section; the broad face of a hook has less behind it. */
const SHORTEST_RUN = 0.3;

/** Far beyond any bar with bends: a lattice or a railing as one mesh is not searched. */
const MOST_FACES = 5000;

/**
 * The axes of a bar of one section that bends: each long straight run carried on to where the runs meet, the one run
 * between short hooks, or the chord of a bow. Null where the body is no such bar: plates, lumps, rings, lattices,
 * whatever branches, and bars whose ends are no flat faces.
 */
export function bentMeshAxes(mesh: Mesh, upright: Vec3): BodyAxis[] | null {
  if (mesh.faces.length > MOST_FACES) return null;
  const walk = bentWalk(mesh);
  if (walk === null) return null;
  const pieces = walk.line.slice(1).map((to, i) => linePiece(walk.line[i]!, to));
  const axes = runsOf(pieces).map((run) => axisAlong(run, mesh, walk, upright));
  const largest = Math.max(...axes.map(({ measured: { section } }) => Math.max(section.depth, section.width)));
  return developedLength(pieces) < LEAST_SLENDER * largest ? null : axes;
}

/** Meshes draw an arc in facets: several bends of less than 20 degrees, or none of 5, are a bow and not a polygon. */
const SHARP = Math.cos((20 * Math.PI) / 180);
const CLEAR = Math.cos((5 * Math.PI) / 180);
const FEW_RUNS = 3;

function runsOf(pieces: readonly CurvePiece[]): Chord[] {
  const runs = straightRuns(pieces);
  const directions = runs.map((run) => unit(subtract(run.to, run.from)) ?? ORIGIN);
  const turns = directions.slice(1).map((direction, i) => dot(direction, directions[i]!));
  const isBow = turns.length > 0 && turns.every((turn) => turn > (runs.length > FEW_RUNS ? SHARP : CLEAR));
  const whole = isBow ? chordOf(pieces) : null;
  return whole === null ? runs : [whole];
}

type MeasuredAxis = BodyAxis & { readonly measured: Measured };

function axisAlong(run: Chord, mesh: Mesh, walk: Walk, upright: Vec3): MeasuredAxis {
  const slice = typicalSlice(run, walk.slices);
  const { x, y } = sectionFrame(sidesAt(mesh, slice), slice.normal, uprightAcross(upright, slice.normal));
  const cut = new Slicer(mesh, slice.normal, x).nearest(slice.centroid) ?? slice;
  const agreeing = walk.slices.filter(({ area }) => Math.abs(area / cut.area - 1) <= 0.01);
  return {
    from: 'mesh',
    start: add(run.from, mesh.base),
    end: add(run.to, mesh.base),
    x,
    y,
    profile: null,
    endProfile: null,
    rise: run.rise,
    bow: run.bow?.map((p) => add(p, mesh.base)) ?? null,
    isRun: run.isRun ?? false,
    measured: {
      section: measuredSection(cut.outline),
      zAxis: y,
      confidence: agreeing.length / walk.slices.length,
      squareness: walk.squareness,
      strays: null,
    },
  };
}

/** The slice nearest to the middle of the run, of those square to it where there are any (a bow may have none). */
function typicalSlice(run: Chord, slices: readonly Slice[]): Slice {
  const direction = unit(subtract(run.to, run.from));
  const middle = between(run.from, run.to, 0.5);
  const square = slices.filter(({ normal }) => direction !== null && norm(cross(normal, direction)) < 0.01);
  const judged = square.length > 0 ? square : slices;
  return judged.reduce((a, b) => (distance(b.centroid, middle) < distance(a.centroid, middle) ? b : a));
}

function bentWalk(mesh: Mesh): Walk | null {
  const skin = mesh.faces.reduce((sum, face) => sum + norm(face.area), 0);
  const patches = flatPatches(mesh);
  const ends = patches.filter(({ area }) => area < LARGEST_END * skin).sort((a, b) => a.area - b.area);
  let tried = 0;
  for (const end of ends) {
    const first = firstSlice(mesh, end, skin);
    if (first === null) continue;
    const walk = walkFrom(mesh, patches, end, first);
    if (walk !== null && isBar(walk, first, skin)) return walk;
    if (++tried === MOST_ENDS_TRIED) return null;
  }
  return null;
}

/** A square slice near an end face that could be that of a slender bar; null for other faces. */
function firstSlice(mesh: Mesh, end: FlatPatch, skin: number): Slice | null {
  const slicer = new Slicer(mesh, end.normal);
  const inset = 0.02 * Math.sqrt(end.area);
  for (const side of [1, -1]) {
    const inside = slicer.nearest(along(end.centroid, end.normal, side * inset));
    if (inside === null || Math.abs(inside.area / end.area - 1) > 0.02) continue;
    if (distance(inside.centroid, end.centroid) > 0.1 * inside.size) continue;
    // Of whatever bar this is the end of: its length by its skin, against the least that its larger side can be.
    if (skin < SURELY_STOUT * LEAST_SLENDER * inside.perimeter * inside.size) continue;
    const into: Vec3 = [side * end.normal[0], side * end.normal[1], side * end.normal[2]];
    const seen = squareSlice(mesh, inside.centroid, into);
    if (seen === null) continue;
    const lean = dot(seen.normal, into);
    if (lean < 0.25) continue;
    // Beyond the skew of the end face.
    const clear = (seen.size * Math.sqrt(1 - Math.min(1, lean ** 2))) / lean;
    const depths = [clear + inset, clear + SHORTEST_RUN * seen.size];
    const [first, deeper] = depths.map((depth) =>
      squareSlice(mesh, along(end.centroid, seen.normal, depth), seen.normal),
    );
    const isRun = [first, deeper].every(
      (slice) =>
        slice &&
        Math.abs(slice.area / (end.area * lean) - 1) < 0.03 &&
        norm(cross(subtract(slice.centroid, end.centroid), seen.normal)) < 0.02 * seen.size,
    );
    if (first && isRun) return first;
  }
  return null;
}

function isBar(walk: Walk, first: Slice, skin: number): boolean {
  const length = walk.line.slice(1).reduce((sum, p, i) => sum + distance(p, walk.line[i]!), 0);
  return Math.abs((length * first.perimeter + 2 * first.area) / skin - 1) < SKIN;
}
