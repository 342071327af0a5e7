import { UP, type Vec3 } from '../../src/domain/vector.ts';
import { BAYS, BOTTOM_POINTS, BRACED_BAYS, base, bottom, HALL, mirrored, range, top, type WorkPoint } from './hall.ts';
import { directionOf, type Part, setback, span, uprightOn } from './parts.ts';
import { halfExtents } from './sections.ts';
import { chordDirection, TOP_CHORD, type TrussDesign } from './truss.ts';

const ROD_GAP = 35;
/** Wall rods reach in between the column's flanges, to its web. */
const WALL_ROD_SETBACK = 130;
const FLAT_GAP = 30;
/** The flats' upper ends lie on the gusset in the corner of upright and chord. */
const FLAT_HEAD_SETBACK = 150;
/** Lines of the upright crosses that tie the bottom chords to the roof plane. */
const CROSS_BRACE_POINTS = [3, 7];

type Label = Pick<Part, 'name' | 'mark' | 'kind' | 'section'>;
type Rung = readonly [WorkPoint, WorkPoint];

/** Both diagonals of the panel between two rungs. `met` is the direction of what the rods meet, `half` its half extent. */
function crossedRods(label: Label, [a, b]: Rung, [c, d]: Rung, met: Vec3, half: number): Part[] {
  const rod = (suffix: string, from: WorkPoint, to: WorkPoint): Part => {
    const cut = setback(directionOf(from.at, to.at), met, half, ROD_GAP);
    return span({ ...label, name: `${label.name}${suffix}` }, from, to, [cut, cut]);
  };
  return [rod('a', a, d), rod('b', b, c)];
}

/**
 * Crosses in the roof plane: every panel of the end bays; in all the others a strip along eave A, which holds the trusses
 * against swaying. On that side only: strips along both eaves would hold the span and take the trusses' thrust.
 */
export function roofBraces(): Part[] {
  return BAYS.flatMap((bay) => {
    const panels = BRACED_BAYS.includes(bay) ? range(0, HALL.panels - 1) : [0];
    return panels.flatMap((i) => {
      const label = { name: `RB${i}-${bay}`, mark: 'RB1', kind: 'roof brace', section: 'RD 20' } as const;
      const met = chordDirection(i < HALL.ridge ? 0 : HALL.panels);
      return crossedRods(
        label,
        [top(bay, i), top(bay, i + 1)],
        [top(bay + 1, i), top(bay + 1, i + 1)],
        met,
        halfExtents(TOP_CHORD).width,
      );
    });
  });
}

/** Crosses in the plane of the bottom chords. */
export function chordBraces(designOf: (truss: number) => TrussDesign): Part[] {
  return BRACED_BAYS.flatMap((bay) =>
    BOTTOM_POINTS.slice(0, -1).flatMap((i) => {
      const label = { name: `CB${i}-${bay}`, mark: 'CB1', kind: 'chord brace', section: 'RD 20' } as const;
      return crossedRods(
        label,
        [bottom(bay, i), bottom(bay, i + 2)],
        [bottom(bay + 1, i), bottom(bay + 1, i + 2)],
        [1, 0, 0],
        halfExtents(designOf(bay).bottomChord).width,
      );
    }),
  );
}

/** Upright crosses between neighbouring trusses, from top chord to bottom chord. */
export function crossBraces(bays: readonly number[] = BRACED_BAYS, points = CROSS_BRACE_POINTS): Part[] {
  return bays.flatMap((bay) =>
    points.flatMap((i) => {
      const label = { name: `XB${i}-${bay}`, mark: 'XB1', kind: 'cross brace', section: 'RD 20' } as const;
      return crossedRods(
        label,
        [top(bay, i), bottom(bay, i)],
        [top(bay + 1, i), bottom(bay + 1, i)],
        [1, 0, 0],
        halfExtents(TOP_CHORD).width,
      );
    }),
  );
}

/** Rods from the foot of one column to the head of the next. */
export function wallBraces(): Part[] {
  return BRACED_BAYS.flatMap((bay) =>
    [0, HALL.panels].flatMap((i) => {
      const name = `WB-${i === 0 ? 'A' : 'E'}${bay}`;
      const label = { mark: 'WB1', kind: 'wall brace', section: 'RD 24' } as const;
      const cut = [WALL_ROD_SETBACK, WALL_ROD_SETBACK] as const;
      return [
        span({ ...label, name: `${name}a` }, base(bay, i), top(bay + 1, i), cut),
        span({ ...label, name: `${name}b` }, base(bay + 1, i), top(bay, i), cut),
      ];
    }),
  );
}

/** Flats in the gable walls, between corner column and first gable post. */
export function gableBraces(): Part[] {
  return [1, HALL.trusses].flatMap((truss) =>
    [0, HALL.panels].flatMap((corner) => {
      const inner = corner === 0 ? 3 : mirrored(3);
      const letter = corner === 0 ? 'A' : 'E';
      return [
        flat(`GB-${letter}${truss}a`, base(truss, corner), halfExtents('HEA 240').depth, bottom(truss, inner)),
        flat(`GB-${letter}${truss}b`, base(truss, inner), halfExtents('HEA 180').width, top(truss, corner)),
      ];
    }),
  );
}

/** From a foot, clear of the upright that stands there, up to a chord. */
function flat(name: string, foot: WorkPoint, footHalf: number, head: WorkPoint): Part {
  const direction = directionOf(foot.at, head.at);
  const footSetback = setback(direction, UP, footHalf, FLAT_GAP);
  const label = { name, mark: 'GB1', kind: 'gable brace', section: 'FL 80x10', zAxis: uprightOn(direction) } as const;
  return span(label, foot, head, [footSetback, FLAT_HEAD_SETBACK]);
}
