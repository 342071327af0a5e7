import type { Vec3 } from '../domain/vector.ts';
import type { StepFile } from '../step/step-file.ts';
import { asNumber, asRef, type StepValue } from '../step/values.ts';
import type { FindingsLog, Remark } from './findings-log.ts';
import { whose } from './findings-log.ts';
import type { SchemaFamily } from './schema.ts';
import type { Units } from './units.ts';

/** One run over one file: the file, what its numbers mean, and whose part of it is being read. */
export class Reading {
  readonly file: StepFile;
  readonly family: SchemaFamily;
  readonly units: Units;
  private readonly log: FindingsLog;
  /** The element that findings are about at the moment; null between elements. */
  private subject: { globalId: string; at: Vec3 | null } | null = null;

  constructor(file: StepFile, family: SchemaFamily, units: Units, log: FindingsLog) {
    this.file = file;
    this.family = family;
    this.units = units;
    this.log = log;
  }

  about(globalId: string | null, at: Vec3 | null = null): void {
    this.subject = globalId === null ? null : { globalId, at };
  }

  note(remark: Remark): void {
    this.log.add(remark, this.subject?.globalId ?? null, this.subject?.at ?? null);
  }

  /** The instance's arguments; where the file does not hold it, none, and a finding. */
  args(id: number): readonly StepValue[] {
    if (!this.file.has(id)) this.noteDangling(id);
    return this.file.args(id);
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
    if (!this.units.angleStated && number !== 0) this.note(ANGLE_UNIT_MISSING);
    return number * this.units.angle;
  }

  /** A cartesian point in metres; a point of two coordinates lies at z = 0. */
  point(value: StepValue | undefined): Vec3 {
    const id = asRef(value);
    const list = id === null ? null : this.args(id)[0];
    return this.coordinates(list, this.units.length);
  }

  /** A direction as written, not at unit length; null where it is left out. */
  direction(value: StepValue | undefined): Vec3 | null {
    const id = asRef(value);
    if (id === null) return null;
    const [ratios] = this.args(id);
    return ratios === undefined ? null : this.coordinates(ratios, 1);
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

const ANGLE_UNIT_MISSING: Remark = {
  code: 'units-missing',
  key: 'angle',
  say: () => 'The file uses angles and does not say their unit; they are read as radians.',
  advice: 'Assign a plane angle unit to the project and export again.',
};
