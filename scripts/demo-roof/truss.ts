import { along, type Vec3 } from '../../src/domain/vector.ts';
import { BOTTOM_POINTS, bottom, HALL, mirrored, onSide, range, sideOf, top, type WorkPoint } from './hall.ts';
import { directionOf, type GussetPlate, type Part, setback, span, uprightOn } from './parts.ts';
import { halfExtents, type SectionName } from './sections.ts';

export interface TrussDesign {
  readonly bottomChord: SectionName;
  readonly endDiagonal: SectionName;
  /** The fourth diagonal of each half falls towards midspan instead of rising to it. */
  readonly flipped: boolean;
}

export const TOP_CHORD: SectionName = 'HEA 160';
const ALONG_SPAN: Vec3 = [1, 0, 0];
const SIDES = ['L', 'R'] as const;
/** The top chord runs past the column, the bottom chord past its first panel point; both stop short at midspan. */
const EAVE_OVERHANG = 140;
const CHORD_OVERHANG = 100;
const MITRE_GAP = 5;
const POST_GAP = 25;
const DIAGONAL_GAP = 35;

/** Direction of the top chord on the side of panel point `i`, seen from left to right. */
export function chordDirection(i: number): Vec3 {
  const [from, to] = sideOf(i) === 'L' ? [0, HALL.ridge] : [HALL.ridge, HALL.panels];
  return directionOf(top(1, from).at, top(1, to).at);
}

export function trussParts(truss: number, design: TrussDesign): Part[] {
  return SIDES.flatMap((side) => [
    topChord(truss, side),
    bottomChord(truss, side, design.bottomChord),
    ...diagonals(truss, side, design),
    ...[1, 3].map((i) => post(truss, onSide(side, i), `V${i}${side}`, design)),
  ]).concat(post(truss, HALL.ridge, 'V5', design));
}

function topChord(truss: number, side: 'L' | 'R'): Part {
  const points = range(0, HALL.ridge).map((i) => top(truss, onSide(side, i)));
  return chord(truss, 'top chord', `TC${side}`, TOP_CHORD, points, EAVE_OVERHANG);
}

function bottomChord(truss: number, side: 'L' | 'R', section: SectionName): Part {
  const points = [1, 3, HALL.ridge].map((i) => bottom(truss, onSide(side, i)));
  return chord(truss, 'bottom chord', `BC${side}`, section, points, CHORD_OVERHANG);
}

function chord(
  truss: number,
  kind: 'top chord' | 'bottom chord',
  position: string,
  section: SectionName,
  points: readonly WorkPoint[],
  overhang: number,
): Part {
  const first = points[0];
  const last = points.at(-1)!;
  const zAxis = uprightOn(directionOf(first.at, last.at));
  const mark = `${position}-${section.replace(' ', '')}`;
  const label = { name: `T${truss}-${position}`, mark, kind, section, truss, zAxis } as const;
  return span(label, first, last, [-overhang, MITRE_GAP], points.slice(1, -1));
}

function diagonals(truss: number, side: 'L' | 'R', design: TrussDesign): Part[] {
  const upper = (i: number) => top(truss, onSide(side, i));
  const lower = (i: number) => bottom(truss, onSide(side, i));
  const diagonal = (mark: string, section: SectionName, above: WorkPoint, below: WorkPoint): Part => {
    const label = { name: `T${truss}-${mark}${side}`, mark, kind: 'diagonal', section, truss } as const;
    return span(label, above, below, webSetbacks(side, above, below, design, DIAGONAL_GAP));
  };
  return [
    diagonal('D1', design.endDiagonal, upper(0), lower(1)),
    diagonal('D2', 'SHS 80x80x5', upper(2), lower(1)),
    diagonal('D3', 'SHS 80x80x5', upper(2), lower(3)),
    design.flipped
      ? diagonal('D6', 'SHS 80x80x5', upper(3), lower(5))
      : diagonal('D4', 'SHS 60x60x4', upper(4), lower(3)),
    diagonal('D5', 'SHS 60x60x4', upper(4), lower(5)),
  ];
}

function post(truss: number, i: number, position: string, design: TrussDesign): Part {
  const label = {
    name: `T${truss}-${position}`,
    mark: position.slice(0, 2),
    kind: 'post',
    section: 'L 80x80x8',
    truss,
  } as const;
  const [above, below] = [top(truss, i), bottom(truss, i)];
  return span(label, above, below, webSetbacks(sideOf(i), above, below, design, POST_GAP));
}

function webSetbacks(
  side: 'L' | 'R',
  above: WorkPoint,
  below: WorkPoint,
  design: TrussDesign,
  gap: number,
): [number, number] {
  const web = directionOf(above.at, below.at);
  return [
    setback(web, chordDirection(onSide(side, 0)), halfExtents(TOP_CHORD).depth, gap),
    setback(web, ALONG_SPAN, halfExtents(design.bottomChord).depth, gap),
  ];
}

/** A plate on the inner flange at every panel point that a web member comes to. */
export function trussPlates(truss: number, design: TrussDesign): GussetPlate[] {
  const plate = (point: WorkPoint, direction: Vec3, towards: Vec3, half: number, size: readonly [number, number]) => ({
    name: `T${truss}-GP-${point.name.split('/')[1]}`,
    truss,
    at: along(point.at, towards, half + size[1] / 2),
    direction,
    length: size[0],
    height: size[1],
  });
  const below = halfExtents(TOP_CHORD).depth;
  const upper = range(0, HALL.panels).map((i) => {
    const direction = i === HALL.ridge ? ALONG_SPAN : chordDirection(i);
    const up = uprightOn(direction);
    const down: Vec3 = [-up[0], -up[1], -up[2]];
    const isPostOnly = Math.min(i, mirrored(i)) % 2 === 1 && i !== HALL.ridge && !design.flipped;
    const plated = plate(top(truss, i), direction, down, below, isPostOnly ? [140, 150] : [380, 180]);
    return i % HALL.panels === 0 ? clearOfColumn(plated, i === 0 ? 270 : -270) : plated;
  });
  const above = halfExtents(design.bottomChord).depth;
  const lower = BOTTOM_POINTS.map((i) => plate(bottom(truss, i), ALONG_SPAN, [0, 0, 1], above, [420, 200]));
  return [...upper, ...lower];
}

/** At the eave the plate stands beside the column's head. */
function clearOfColumn(plate: GussetPlate, shift: number): GussetPlate {
  return { ...plate, at: along(plate.at, plate.direction, shift), length: 300 };
}
