import { norm, subtract, type Vec3 } from '../domain/vector.ts';
import { asRef, asRefs, asString, type StepValue } from '../step/values.ts';
import type { Remark } from './findings-log.ts';
import { readCurve } from './geometry/curve.ts';
import { chordOf, isStraight } from './geometry/curve-piece.ts';
import { NotRead } from './not-read.ts';
import type { Reading } from './reading.ts';

/** A straight grid axis in its grid's own coordinates, metres, in its sense. */
export interface GridAxis {
  readonly id: number;
  readonly tag: string;
  readonly from: Vec3;
  readonly to: Vec3;
}

export interface Grid {
  readonly id: number;
  /** Its IfcObjectPlacement; null where it has none. */
  readonly placement: number | null;
  /** The U, V and W axes; curved ones are left out. */
  readonly families: readonly (readonly GridAxis[])[];
  /** The ids of all its axes, curved ones too. */
  readonly axisIds: readonly number[];
}

export function readGrids(reading: Reading): Grid[] {
  return reading.file.idsOf('IFCGRID').map((id) => {
    const args = reading.args(id);
    const families = [7, 8, 9].map((i) => readFamily(reading, args[i]));
    const axisIds = [7, 8, 9].flatMap((i) => asRefs(args[i]));
    const curved = axisIds.length - families.flat().length;
    if (curved > 0) reading.note(curvedAxes(asString(args[2]) ?? `#${id}`, curved));
    return { id, placement: asRef(args[5]), families, axisIds };
  });
}

const curvedAxes = (grid: string, count: number): Remark => ({
  code: 'out-of-scope',
  key: `curved axes of ${grid}`,
  say: () =>
    `${count === 1 ? '1 axis' : `${count} axes`} of grid ${grid} ${count === 1 ? 'is' : 'are'} curved or cannot be read, and no place is named by ${count === 1 ? 'it' : 'them'}.`,
  advice: 'Places are named by the straight axes alone.',
});

function readFamily(reading: Reading, value: StepValue | undefined): GridAxis[] {
  const axes: GridAxis[] = [];
  for (const id of asRefs(value)) {
    const args = reading.args(id);
    const curve = asRef(args[1]);
    const ends = curve === null ? null : straightCurve(reading, curve);
    if (ends === null) continue;
    const [from, to] = args[2] === false ? [ends[1], ends[0]] : ends;
    axes.push({ id, tag: (asString(args[0]) ?? '').trim(), from, to });
  }
  return axes;
}

function straightCurve(reading: Reading, id: number): readonly [Vec3, Vec3] | null {
  try {
    const chord = chordOf(readCurve(reading, id));
    if (chord === null) return null;
    const length = norm(subtract(chord.to, chord.from));
    return length > 0 && isStraight(chord.rise, length) ? [chord.from, chord.to] : null;
  } catch (problem) {
    // A grid axis that cannot be read names no place; nothing else depends on it.
    if (problem instanceof NotRead) return null;
    throw problem;
  }
}
