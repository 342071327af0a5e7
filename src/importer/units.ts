import type { StepFile } from '../step/step-file.ts';
import { asEnum, asNumber, asRef, asRefs, asString } from '../step/values.ts';

/** What the file's own numbers are multiplied by. */
export interface Units {
  /** Metres in one length unit. */
  readonly length: number;
  /** Radians in one plane angle unit. */
  readonly angle: number;
  /** As people write it: mm, m, in, ft. */
  readonly lengthName: string;
  readonly lengthStated: boolean;
  readonly angleStated: boolean;
}

const PREFIX: Readonly<Record<string, number>> = {
  EXA: 1e18,
  PETA: 1e15,
  TERA: 1e12,
  GIGA: 1e9,
  MEGA: 1e6,
  KILO: 1e3,
  HECTO: 1e2,
  DECA: 1e1,
  DECI: 1e-1,
  CENTI: 1e-2,
  MILLI: 1e-3,
  MICRO: 1e-6,
  NANO: 1e-9,
  PICO: 1e-12,
  FEMTO: 1e-15,
  ATTO: 1e-18,
};

/** For conversion-based units whose factor cannot be read; ISO 16739, IfcConversionBasedUnit, table of names. */
const NAMED: Readonly<Record<string, number>> = {
  INCH: 0.0254,
  FOOT: 0.3048,
  YARD: 0.9144,
  MILE: 1609.344,
  DEGREE: Math.PI / 180,
};

const WORDS: readonly (readonly [factor: number, word: string])[] = [
  [1e-6, 'um'],
  [1e-3, 'mm'],
  [1e-2, 'cm'],
  [1e-1, 'dm'],
  [1, 'm'],
  [1e3, 'km'],
  [0.0254, 'in'],
  [0.3048, 'ft'],
  [0.9144, 'yd'],
  [1609.344, 'mi'],
];

/** The project's units; metres and radians where none are given (ISO 16739, IfcUnitAssignment). */
export function readUnits(file: StepFile): Units {
  const assignment = assignedUnits(file);
  const length = factorOf(file, assignment, 'LENGTHUNIT');
  const angle = factorOf(file, assignment, 'PLANEANGLEUNIT');
  return {
    length: length ?? 1,
    angle: angle ?? 1,
    lengthName: wordFor(length ?? 1),
    lengthStated: length !== null,
    angleStated: angle !== null,
  };
}

function assignedUnits(file: StepFile): number[] {
  const project = file.idsOf('IFCPROJECT')[0];
  const stated = project === undefined ? null : asRef(file.args(project)[8]);
  const assignment = stated ?? file.idsOf('IFCUNITASSIGNMENT')[0];
  return assignment === undefined ? [] : asRefs(file.args(assignment)[0]);
}

function factorOf(file: StepFile, units: readonly number[], type: string): number | null {
  for (const id of units) {
    if (asEnum(file.args(id)[1]) === type) {
      const factor = siFactor(file, id, 0);
      if (factor !== null) return factor;
    }
  }
  return null;
}

function siFactor(file: StepFile, id: number, depth: number): number | null {
  const args = file.args(id);
  if (file.typeOf(id) === 'IFCSIUNIT') {
    const prefix = asEnum(args[2]);
    return prefix === null ? 1 : (PREFIX[prefix] ?? null);
  }
  if (!file.typeOf(id).startsWith('IFCCONVERSIONBASEDUNIT') || depth > 8) return null;
  const measure = asRef(args[3]);
  const [value, base] = measure === null ? [] : file.args(measure);
  const number = asNumber(value);
  const unit = asRef(base);
  const factor = number === null || unit === null ? null : siFactor(file, unit, depth + 1);
  if (number !== null && factor !== null && number * factor > 0 && Number.isFinite(number * factor)) {
    return number * factor;
  }
  return NAMED[(asString(args[2]) ?? '').trim().toUpperCase()] ?? null;
}

function wordFor(factor: number): string {
  const found = WORDS.find(([known]) => Math.abs(factor / known - 1) < 1e-4);
  return found === undefined ? `${factor} m` : found[1];
}
