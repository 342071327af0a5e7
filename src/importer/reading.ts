import { between, ORIGIN, UP, type Vec3 } from '../domain/vector.ts';
import type { StepFile } from '../step/step-file.ts';
import { asNumber, asRef, type StepValue } from '../step/values.ts';
import type { FindingsLog, Remark } from './findings-log.ts';
import { whose } from './findings-log.ts';
import type { SchemaFamily } from './schema.ts';
import { AHEAD } from './transform.ts';
import { kindOf, type UnitKind } from './unit-kinds.ts';
import type { Units } from './units.ts';

/** One run over one file: the file, what its numbers mean, and whose part of it is being read. */
export class Reading {
  readonly file: StepFile;
  readonly family: SchemaFamily;
  readonly units: Units;
  private readonly log: FindingsLog;
  /** The element that findings are about at the moment; null between elements. */
  private subject: string | null = null;
  private subjectFrom: Vec3 | null = null;
  private subjectTo: Vec3 | null = null;
  private readonly numbers = new Float64Array(3);

  constructor(file: StepFile, family: SchemaFamily, units: Units, log: FindingsLog) {
    this.file = file;
    this.family = family;
    this.units = units;
    this.log = log;
  }

  /** Findings are placed in the middle between `from` and `to`. */
  about(globalId: string | null, from: Vec3 | null = null, to: Vec3 | null = from): void {
    this.subject = globalId;
    this.subjectFrom = globalId === null ? null : from;
    this.subjectTo = globalId === null ? null : to;
  }

  note(remark: Remark): void {
    const { subjectFrom: from, subjectTo: to } = this;
    this.log.add(remark, this.subject, from === null || to === null || from === to ? from : between(from, to, 0.5));
  }

  /** The instance's arguments; where the file does not hold it, none, and a finding. */
  args(id: number): readonly StepValue[] {
    if (!this.file.has(id)) this.noteDangling(id);
    return this.file.args(id);
  }

  /** The id that argument `index` refers to, read alone; null where it refers to nothing. */
  refAt(id: number, index: number): number | null {
    const found = this.file.refAt(id, index);
    if (found === null && !this.file.has(id)) this.noteDangling(id);
    return found;
  }

  /** The ids in the list that argument `index` is, read alone. */
  refsAt(id: number, index: number): readonly number[] {
    if (!this.file.has(id)) this.noteDangling(id);
    return this.file.refsAt(id, index);
  }

  typeOf(id: number): string {
    const type = this.file.typeOf(id);
    if (type === '') this.noteDangling(id);
    return type;
  }

  /** The length in `value`, metres; NaN where there is none. */
  length(value: StepValue | undefined): number {
    const number = asNumber(value);
    return number === null ? Number.NaN : number * this.units.length;
  }

  /** The length in `value`, metres; 0 where it is left out. */
  lengthOrZero(value: StepValue | undefined): number {
    const number = asNumber(value);
    return number === null ? 0 : number * this.units.length;
  }

  /** The plane angle in `value`, radians. */
  angle(value: StepValue | undefined): number {
    const number = asNumber(value) ?? 0;
    if (!this.units.angleStated && number !== 0) this.note(unitMissing(this.units, 'angle'));
    return number * this.units.angle;
  }

  /**
   * The number in `value` in SI, by the project's unit for its kind, with a finding where the file leaves that open;
   * null where there is no number.
   */
  quantity(value: StepValue | undefined, kind: UnitKind): number | null {
    const number = asNumber(value);
    if (number === null) return null;
    const { factor, stated } = this.units.unit(kind);
    if (!stated && number !== 0) this.note(unitMissing(this.units, kind));
    return number * factor;
  }

  /** A cartesian point in metres; a point of two coordinates lies at z = 0. */
  point(value: StepValue | undefined): Vec3 {
    return this.pointOf(asRef(value));
  }

  pointOf(id: number | null): Vec3 {
    if (id === null) return [0, 0, 0];
    if (!this.file.has(id)) this.noteDangling(id);
    return this.firstCoordinates(id, this.units.length) ?? [0, 0, 0];
  }

  /** A direction as written, not at unit length; null where it is left out. */
  direction(value: StepValue | undefined): Vec3 | null {
    return this.directionOf(asRef(value));
  }

  directionOf(id: number | null): Vec3 | null {
    if (id === null) return null;
    if (!this.file.has(id)) this.noteDangling(id);
    const direction = this.firstCoordinates(id, 1);
    return direction === null && this.file.valueAt(id, 0) === undefined ? null : (direction ?? [0, 0, 0]);
  }

  /** As `coordinates` of the first argument of `id`; null where that is no list. */
  private firstCoordinates(id: number, factor: number): Vec3 | null {
    const { numbers } = this;
    const count = this.file.numbersAt(id, 0, numbers);
    if (count < 0) return null;
    const x = count > 0 ? numbers[0]! * factor : 0;
    const y = count > 1 ? numbers[1]! * factor : 0;
    const z = count > 2 ? numbers[2]! * factor : 0;
    return known(x, y, z) ?? [x, y, z];
  }

  coordinates(list: StepValue | undefined | null, factor: number): Vec3 {
    if (!Array.isArray(list)) return [0, 0, 0];
    const at = (i: number) => (i < list.length ? (asNumber(list[i]) ?? Number.NaN) * factor : 0);
    return [at(0), at(1), at(2)];
  }

  private noteDangling(id: number): void {
    this.note({
      code: 'dangling-reference',
      key: `#${id}`,
      say: (count, first) =>
        count === 0
          ? `The file refers to instance #${id}, which it does not hold.`
          : `${whose(count, first, 'refer', 'refers')} to instance #${id}, which the file does not hold.`,
      advice: 'Export the model again: something was left out of the file or deleted from it.',
    });
  }
}

/** The origin and the directions that most placements name: each always the same triple, which `frame` knows by its address. */
function known(x: number, y: number, z: number): Vec3 | null {
  if (y !== 0) return null;
  if (x === 0) return z === 0 ? ORIGIN : z === 1 ? UP : null;
  return x === 1 && z === 0 ? AHEAD : null;
}

/** The file uses numbers of a kind and does not say their unit, or one that cannot be taken. */
export function unitMissing(units: Units, kind: UnitKind): Remark {
  const { words, si } = kindOf(kind);
  const { factor, fault } = units.unit(kind);
  const why = fault === null ? 'The file does not say' : `As ${fault}, the file does not say`;
  return {
    code: 'units-missing',
    key: kind,
    say: () => `${why} its unit of ${words}; such numbers are read in ${inSi(factor, si)}.`,
    advice: `Assign a unit of ${words} to the project and export again; check such values before using any result.`,
  };
}

const inSi = (factor: number, si: string): string =>
  factor === 1 ? si : `units of ${Number(factor.toPrecision(7))} ${si}`;
