import { add, cross, dot, scale, subtract, unit, type Vec3 } from '../../domain/vector.ts';
import { asRef } from '../../step/values.ts';
import { noAxis } from '../not-read.ts';
import { readAxes } from '../placement-axes.ts';
import type { Reading } from '../reading.ts';
import type { SectionBook } from '../sections/section-book.ts';
import { compose, mapDirection, type Transform } from '../transform.ts';
import type { BodyAxis } from './body-axis.ts';
import { chordOf, mapPiece } from './curve-piece.ts';

/** IfcRevolvedAreaSolid and its tapered form: the chord of the arc that the profile's centroid runs through. */
export function revolutionAxis(reading: Reading, book: SectionBook, id: number, world: Transform): BodyAxis {
  const args = reading.args(id);
  const profile = asRef(args[0]);
  const axis = asRef(args[2]);
  if (profile === null || axis === null) throw noAxis('its revolved body has no profile or no axis');
  const [location, direction] = reading.args(axis);
  const pivot = reading.point(location);
  const turnAxis = unit(reading.direction(direction) ?? [0, 0, 1]) ?? ([0, 0, 1] as const);
  const angle = reading.angle(args[3]);
  const plane = compose(world, readAxes(reading, args[1]));
  const [x, y] = book.centroidOrOrigin(profile);
  const away = subtract([x, y, 0], pivot);
  const centre = add(pivot, scale(turnAxis, dot(away, turnAxis)));
  const u: Vec3 = subtract([x, y, 0], centre);
  const arc = { kind: 'arc', centre, u, v: cross(turnAxis, u), start: 0, end: angle } as const;
  const chord = chordOf([mapPiece(plane, arc)]);
  if (chord === null || unit(subtract(chord.to, chord.from)) === null) throw noAxis('its revolved body has no length');
  const isTapered = reading.file.typeOf(id) === 'IFCREVOLVEDAREASOLIDTAPERED';
  return {
    from: 'swept',
    start: chord.from,
    end: chord.to,
    ...sectionAxesAtMiddle(plane, turnAxis, angle),
    profile,
    endProfile: isTapered ? asRef(args[4]) : null,
    rise: chord.rise,
    bow: chord.bow ?? null,
    isRun: false,
    measured: null,
  };
}

/** Half way round, the swept plane stands square to the chord. */
function sectionAxesAtMiddle(plane: Transform, axis: Vec3, angle: number): { x: Vec3; y: Vec3 } {
  const turned = (d: Vec3): Vec3 => {
    // Rodrigues' rotation formula.
    const c = Math.cos(angle / 2);
    const s = Math.sin(angle / 2);
    return add(add(scale(d, c), scale(cross(axis, d), s)), scale(axis, dot(axis, d) * (1 - c)));
  };
  const image = (d: Vec3) => mapDirection(plane, turned(d));
  return { x: image([1, 0, 0]), y: image([0, 1, 0]) };
}
