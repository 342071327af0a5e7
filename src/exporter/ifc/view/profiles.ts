import type { Result } from '../../../domain/result.ts';
import { shapeFromDesignation } from '../../../importer/sections/designations/shape-from-designation.ts';
import { endOf, mapOutline, type Outline, pointOnArc, type Ring, startOf } from '../../../importer/sections/outline.ts';
import { centroidOf, type ProfileShape, sectionOf } from '../../../importer/sections/profile-shape.ts';
import type { StepRef } from '../../../step/values.ts';
import { enumeration, integer, typed, type ValueToWrite } from '../../../step/write.ts';
import { label } from '../block.ts';
import { type NewFile, single } from '../new-file.ts';

export type ResultSection = NonNullable<Result['members'][number]['section']>;

/** The section of a bar: of its one member, or of several an area alone, of which EA comes out right. */
export type BarSection = ResultSection | { readonly name: string; readonly area: number };

const isWhole = (section: BarSection): section is ResultSection => 'shape' in section;

/** Relative: an outline by designation is drawn only where it is the very section, so that forces come out the same. */
const SAME = 1e-7;

/**
 * A profile for the section (IFC4 and later): its outline where that is known exactly, round shapes and flats by their
 * dimensions; else its name. Its numbers stand beside it in any case.
 */
export function writeProfile(file: NewFile, section: BarSection): StepRef {
  const profile = drawn(file, section) ?? file.add('IFCPROFILEDEF', enumeration('AREA'), label(section.name));
  const number = (name: string, type: string, value: number) => single(file, name, type, value);
  const numbers = isWhole(section)
    ? [
        number('CrossSectionArea', 'IFCAREAMEASURE', section.area),
        number('MomentOfInertiaY', 'IFCMOMENTOFINERTIAMEASURE', section.inertiaY),
        number('MomentOfInertiaZ', 'IFCMOMENTOFINERTIAMEASURE', section.inertiaZ),
        number('MomentOfInertiaYZ', 'IFCMOMENTOFINERTIAMEASURE', section.inertiaYZ),
        number('TorsionalConstantX', 'IFCMOMENTOFINERTIAMEASURE', section.torsion),
        number('WarpingConstant', 'IFCWARPINGCONSTANTMEASURE', section.warping),
      ]
    : [number('CrossSectionArea', 'IFCAREAMEASURE', section.area)];
  file.add('IFCPROFILEPROPERTIES', 'Pset_ProfileMechanical', null, numbers, profile);
  return profile;
}

/** The numbers of the section (IFC2X3, which knows no profile that is a name). */
export function writeProfileProperties(file: NewFile, section: BarSection): StepRef {
  const { inertiaYZ, inertiaY, inertiaZ, torsion, warping } = isWhole(section)
    ? section
    : { inertiaYZ: null, inertiaY: null, inertiaZ: null, torsion: null, warping: null };
  const profile = roundProfile(file, section);
  const nothing = Array<null>(11).fill(null);
  return file.add(
    'IFCSTRUCTURALPROFILEPROPERTIES',
    ...[label(section.name), profile, null, null, null, null, section.area],
    ...[torsion, inertiaYZ, inertiaY, inertiaZ, warping],
    ...nothing,
  );
}

function drawn(file: NewFile, section: BarSection): StepRef | null {
  const round = roundProfile(file, section);
  if (round !== null || !isWhole(section)) return round;
  const outline = ['', ' hot', ' cold']
    .map((making) => shapeFromDesignation(section.name + making))
    .filter((shape) => shape !== null && (shape.outline.besides ?? []).length === 0)
    .flatMap((shape) => (shape === null ? [] : [shape, mirrored(shape)]))
    .find((shape) => isSame(shape, section));
  return outline === undefined ? null : writeOutline(file, section.name, aboutCentroid(outline));
}

function roundProfile(file: NewFile, section: BarSection): StepRef | null {
  if (!isWhole(section)) return null;
  const { area, inertiaY, inertiaZ, shape } = section;
  const isRound = shape === 'circle' || shape === 'CHS' || shape === 'rectangle';
  if (!isRound) return null;
  const head = [enumeration('AREA'), label(section.name), file.isIfc2x3 ? writePosition(file) : null] as const;
  if (shape === 'circle') return file.add('IFCCIRCLEPROFILEDEF', ...head, Math.sqrt(area / Math.PI));
  if (shape === 'rectangle' && isNear(inertiaY * inertiaZ * 144, area ** 4)) {
    return file.add(
      'IFCRECTANGLEPROFILEDEF',
      ...head,
      Math.sqrt((12 * inertiaZ) / area),
      Math.sqrt((12 * inertiaY) / area),
    );
  }
  if (shape !== 'CHS') return null;
  // R2 + r2 = 4 I / A and R2 - r2 = A / pi.
  const [sum, difference] = [(4 * inertiaY) / area, area / Math.PI];
  const outer = Math.sqrt((sum + difference) / 2);
  const wall = outer - Math.sqrt(Math.max(0, (sum - difference) / 2));
  return wall > 0 && wall < outer ? file.add('IFCCIRCLEHOLLOWPROFILEDEF', ...head, outer, wall) : null;
}

/** IFC2X3 wants it said that a profile lies where it lies. */
const writePosition = (file: NewFile): StepRef =>
  file.add('IFCAXIS2PLACEMENT2D', file.add('IFCCARTESIANPOINT', [0, 0]), null);

const isNear = (a: number, b: number): boolean => Math.abs(a - b) <= SAME * Math.abs(b);

function isSame(shape: ProfileShape, section: ResultSection): boolean {
  const own = sectionOf(shape);
  const isDiagonal = Math.abs(own.inertiaYZ - section.inertiaYZ) <= SAME * section.inertiaMajor;
  return (
    isDiagonal &&
    isNear(own.area, section.area) &&
    isNear(own.inertiaY, section.inertiaY) &&
    isNear(own.inertiaZ, section.inertiaZ)
  );
}

const mirrored = (shape: ProfileShape): ProfileShape => ({
  ...shape,
  outline: mapOutline({ x: [-1, 0], y: [0, 1], origin: [0, 0] }, shape.outline),
});

function aboutCentroid(shape: ProfileShape): Outline {
  const [x, y] = centroidOf(shape);
  return mapOutline({ x: [1, 0], y: [0, 1], origin: [-x, -y] }, shape.outline);
}

function writeOutline(file: NewFile, name: string, { outer, voids }: Outline): StepRef {
  const head = [enumeration('AREA'), label(name)] as const;
  const ring = writeRing(file, outer);
  if (voids.length === 0) return file.add('IFCARBITRARYCLOSEDPROFILEDEF', ...head, ring);
  return file.add(
    'IFCARBITRARYPROFILEDEFWITHVOIDS',
    ...head,
    ring,
    voids.map((hole) => writeRing(file, hole)),
  );
}

/** Lines and arcs through points that neighbours share; a full circle is two arcs. */
function writeRing(file: NewFile, ring: Ring): StepRef {
  const points: ValueToWrite[] = [];
  const segments: ValueToWrite[] = [];
  const put = (point: readonly [number, number]) => points.push([point[0], point[1]]);
  const pieces = ring.flatMap((edge) => {
    if (edge.kind === 'line' || Math.abs(edge.end - edge.start) < 6) return [edge];
    const middle = (edge.start + edge.end) / 2;
    return [
      { ...edge, end: middle },
      { ...edge, start: middle },
    ];
  });
  pieces.forEach((edge, i) => {
    const from = put(startOf(edge));
    if (edge.kind === 'arc') put(pointOnArc(edge, (edge.start + edge.end) / 2));
    const last = points.length;
    if (i === pieces.length - 1) put(endOf(edge));
    const corners = edge.kind === 'arc' ? [from, last, last + 1] : [from, last + 1];
    segments.push(typed(edge.kind === 'arc' ? 'IFCARCINDEX' : 'IFCLINEINDEX', corners.map(integer)));
  });
  const list = file.add('IFCCARTESIANPOINTLIST2D', points, ...(file.family === 'IFC4X3' ? [null] : []));
  return file.add('IFCINDEXEDPOLYCURVE', list, segments, false);
}
