import { along, scale, UP, type Vec3 } from '../../src/domain/vector.ts';
import { BAYS, BOTTOM_POINTS, base, bottom, GABLE_POSTS, HALL, range, TRUSSES, top, type WorkPoint } from './hall.ts';
import { directionOf, type Part, setback, span, uprightOn } from './parts.ts';
import { halfExtents, type SectionName } from './sections.ts';
import { chordDirection, TOP_CHORD, type TrussDesign } from './truss.ts';

const PURLIN: SectionName = 'IPE 160';
const CAP_PLATE = 20;
const END_GAP = 20;
const TIE_GAP = 30;
/** Purlins meet over the chord with a small gap and run past the gable trusses. */
const PURLIN_GAP = 4;
const VERGE = 120;
/** First and last truss of each purlin: single spans in the end bays, two bays in one piece between them. */
const PURLIN_RUNS = [
  [1, 2],
  [2, 4],
  [4, 6],
  [6, 7],
] as const;

export const POINTS_WITH_COLUMNS = [0, HALL.panels];
export const gablePostPoints = (truss: number, isDoorWidened: boolean): number[] =>
  (GABLE_POSTS[truss] ?? []).filter((i) => !(isDoorWidened && i === HALL.ridge));

export function columns(): Part[] {
  return TRUSSES.flatMap((truss) =>
    POINTS_WITH_COLUMNS.map((i) => {
      const chordAbove = setback(UP, chordDirection(i), halfExtents(TOP_CHORD).depth, CAP_PLATE);
      const label = {
        name: `C-${i === 0 ? 'A' : 'E'}${truss}`,
        mark: 'C1',
        kind: 'column',
        section: 'HEA 240',
        zAxis: [1, 0, 0] as Vec3,
      } as const;
      return span(label, base(truss, i), top(truss, i), [0, chordAbove]);
    }),
  );
}

/** They stand under the gable trusses' bottom chords, their webs across the wall. */
export function gablePosts(truss: number, points: readonly number[], design: TrussDesign): Part[] {
  const letter = (i: number) => ({ 3: 'B', 5: 'C', 7: 'D' })[i];
  return points.map((i) => {
    const label = {
      name: `GP-${letter(i)}${truss}`,
      mark: 'GP1',
      kind: 'gable post',
      section: 'HEA 180',
      zAxis: [0, 1, 0] as Vec3,
    } as const;
    const chordAbove = halfExtents(design.bottomChord).depth + CAP_PLATE;
    return span(label, base(truss, i), bottom(truss, i), [0, chordAbove]);
  });
}

/** On the top chords at every panel point between the eaves: axes half the two depths apart, square to the roof. */
export function purlins(): Part[] {
  return range(1, HALL.panels - 1).flatMap((i) =>
    PURLIN_RUNS.map(([first, last]) => {
      const zAxis = i === HALL.ridge ? UP : uprightOn(chordDirection(i));
      const lift = scale(zAxis, halfExtents(TOP_CHORD).depth + halfExtents(PURLIN).depth);
      const seats = range(first, last).map((truss) => top(truss, i));
      const mark = last - first === 1 ? 'P1' : 'P2';
      const label = { name: `P${i}-${first}${last}`, mark, kind: 'purlin', section: PURLIN, zAxis } as const;
      const ends = [first === 1 ? -VERGE : PURLIN_GAP, last === HALL.trusses ? -VERGE : PURLIN_GAP] as const;
      const atChordLevel = span(label, seats[0], seats.at(-1)!, ends, seats.slice(1, -1));
      const [from, to] = atChordLevel.axis;
      return { ...atChordLevel, axis: [along(from, lift, 1), along(to, lift, 1)] as const };
    }),
  );
}

export function eavesStruts(): Part[] {
  const cut = halfExtents(TOP_CHORD).width + END_GAP;
  return BAYS.flatMap((bay) =>
    POINTS_WITH_COLUMNS.map((i) => {
      const name = `ES-${i === 0 ? 'A' : 'E'}${bay}`;
      const label = { name, mark: 'ES1', kind: 'eaves strut', section: 'SHS 100x100x5' } as const;
      return lengthways(label, top(bay, i), top(bay + 1, i), [cut, cut]);
    }),
  );
}

/** They hold the bottom chords sideways. */
export function ties(designOf: (truss: number) => TrussDesign): Part[] {
  const cut = (truss: number) => halfExtents(designOf(truss).bottomChord).width + TIE_GAP;
  return BAYS.flatMap((bay) =>
    BOTTOM_POINTS.map((i) => {
      const label = { name: `BT${i}-${bay}`, mark: 'BT1', kind: 'tie', section: 'CHS 76.1x3.2' } as const;
      return lengthways(label, bottom(bay, i), bottom(bay + 1, i), [cut(bay), cut(bay + 1)]);
    }),
  );
}

function lengthways(
  label: Pick<Part, 'name' | 'mark' | 'kind' | 'section'>,
  from: WorkPoint,
  to: WorkPoint,
  cut: readonly [number, number],
): Part {
  return span({ ...label, zAxis: uprightOn(directionOf(from.at, to.at)) }, from, to, cut);
}
