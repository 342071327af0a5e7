import { cross, scale, subtract, unit } from '../../domain/vector.ts';
import { asNumber } from '../../step/values.ts';
import { noAxis } from '../not-read.ts';
import { readAxes } from '../placement-axes.ts';
import type { Reading } from '../reading.ts';
import type { SectionBook } from '../sections/section-book.ts';
import { compose, firstAcross, mapPosition, type Transform } from '../transform.ts';
import type { BodyAxis } from './body-axis.ts';
import { type Chord, mapPiece } from './curve-piece.ts';
import { readDirectrix } from './directrix.ts';
import { straightRuns } from './straight-runs.ts';

/** IfcSweptDiskSolid: a round bar or tube along its directrix, each long straight run of it. */
export function sweptDiskAxes(reading: Reading, book: SectionBook, id: number, world: Transform): BodyAxis[] {
  const args = reading.args(id);
  const drawn = readDirectrix(reading, args[0], args[3], args[4]).map((piece) => mapPiece(world, piece));
  const inner = asNumber(args[2]) === null ? null : reading.length(args[2]);
  const profile = book.disk(reading.length(args[1]), inner);
  return straightRuns(drawn).map((run) => diskAlong(run, profile, world));
}

/** IfcRightCircularCylinder: from the middle of its base along its z. */
export function cylinderAxis(reading: Reading, book: SectionBook, id: number, world: Transform): BodyAxis {
  const args = reading.args(id);
  const frame = compose(world, readAxes(reading, args[0]));
  const top = mapPosition(frame, [0, 0, reading.length(args[1])]);
  return diskAlong({ from: frame.origin, to: top, rise: 0 }, book.disk(reading.length(args[2]), null), world);
}

function diskAlong(run: Chord, profile: number, world: Transform): BodyAxis {
  const along = unit(subtract(run.to, run.from));
  if (along === null) throw noAxis('its directrix has no length');
  // A round section looks the same from all sides: its z axis is the one nearest to upright, at the size of the copy.
  const upright = firstAcross(along, Math.abs(along[2]) > 1 - 1e-9 ? [1, 0, 0] : [0, 0, 1]);
  const z = scale(upright, Math.cbrt(Math.abs(volume(world))));
  return {
    from: 'swept',
    start: run.from,
    end: run.to,
    x: cross(z, along),
    y: z,
    profile,
    endProfile: null,
    rise: run.rise,
    bow: run.bow ?? null,
    isRun: run.isRun ?? false,
    measured: null,
  };
}

const volume = (t: Transform): number =>
  t.x[0] * (t.y[1] * t.z[2] - t.y[2] * t.z[1]) -
  t.y[0] * (t.x[1] * t.z[2] - t.x[2] * t.z[1]) +
  t.z[0] * (t.x[1] * t.y[2] - t.x[2] * t.y[1]);
