import type { StepFile } from '../step/step-file.ts';
import { asEnum, asNumber, asRef, asRefs, asString } from '../step/values.ts';
import { kindOf, type UnitKind } from './unit-kinds.ts';
import { isSameDimension, NO_UNIT, namedUnit, siUnit, times, type UnitSize } from './unit-sizes.ts';

/** What numbers of one kind are multiplied by to be SI. */
export interface Unit {
  readonly factor: number;
  /** The file assigns it; else it follows from the other units, or is SI. */
  readonly stated: boolean;
  /** Why the unit that the file assigns is not taken: "'CUBIT' is not known"; null where it is, or none is assigned. */
  readonly fault: string | null;
}

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
  /** The project's unit of a kind. */
  unit(kind: UnitKind): Unit;
  /** The factor of `unit(kind)`. */
  unitFactor(kind: UnitKind): number;
  /** The factor of unit instance `id`, which a property carries itself; null where it cannot be read or is of another kind. */
  factorOf(id: number, kind: UnitKind): number | null;
}

/** The project's units; metres and radians where none are given (ISO 16739, IfcUnitAssignment). */
export function readUnits(file: StepFile): Units {
  const assigned = assignedUnits(file);
  const known = new Map<UnitKind, Unit>();

  function unit(kind: UnitKind): Unit {
    let found = known.get(kind);
    if (found === undefined) {
      found = find(kind);
      known.set(kind, found);
    }
    return found;
  }

  function find(kind: UnitKind): Unit {
    const { types, of, dimension } = kindOf(kind);
    let fault: string | null = null;
    for (const id of types.flatMap((type) => assigned.get(type) ?? [])) {
      const size = sizeOf(file, id, 0);
      if (size !== null && isSameDimension(size.dimension, dimension)) {
        return { factor: size.factor, stated: true, fault: null };
      }
      const name = nameOf(file, id);
      fault ??= size === null ? `${name} is not known` : `${name} is a unit of something else`;
    }
    const factor = of.reduce((product, [part, power]) => product * unit(part).factor ** power, 1);
    return { factor, stated: false, fault };
  }

  const [length, angle] = [unit('length'), unit('angle')];
  return {
    length: length.factor,
    angle: angle.factor,
    lengthName: wordFor(length.factor),
    lengthStated: length.stated,
    angleStated: angle.stated,
    unit,
    unitFactor: (kind) => unit(kind).factor,
    factorOf: (id, kind) => {
      const size = sizeOf(file, id, 0);
      return size !== null && isSameDimension(size.dimension, kindOf(kind).dimension) ? size.factor : null;
    },
  };
}

/** The instances of the project's assignment by IfcUnitEnum or IfcDerivedUnitEnum. */
function assignedUnits(file: StepFile): Map<string, number[]> {
  const project = file.idsOf('IFCPROJECT')[0];
  const stated = project === undefined ? null : asRef(file.args(project)[8]);
  const assignment = stated ?? file.idsOf('IFCUNITASSIGNMENT')[0];
  const byType = new Map<string, number[]>();
  for (const id of assignment === undefined ? [] : asRefs(file.args(assignment)[0])) {
    const type = asEnum(file.args(id)[1]);
    if (type !== null) byType.set(type, [...(byType.get(type) ?? []), id]);
  }
  return byType;
}

/** Units are defined by others; a file that defines one by itself would not end. */
const DEEPEST = 8;

function sizeOf(file: StepFile, id: number, depth: number): UnitSize | null {
  if (depth > DEEPEST) return null;
  const args = file.args(id);
  switch (file.typeOf(id)) {
    case 'IFCSIUNIT':
      return siUnit(asEnum(args[3]) ?? '', asEnum(args[2]));
    case 'IFCCONVERSIONBASEDUNIT':
    case 'IFCCONVERSIONBASEDUNITWITHOFFSET':
      return convertedUnit(file, asRef(args[3]), depth) ?? namedUnit(asString(args[2]) ?? '');
    // Has no factor by nature; some exporters write a foot this way.
    case 'IFCCONTEXTDEPENDENTUNIT':
      return namedUnit(asString(args[2]) ?? '');
    case 'IFCDERIVEDUNIT':
      return derivedUnit(file, asRefs(args[0]), depth);
    default:
      return null;
  }
}

/** By IfcMeasureWithUnit. The dimension is that of the unit it converts to: the one written beside it is often wrong. */
function convertedUnit(file: StepFile, measure: number | null, depth: number): UnitSize | null {
  const [value, base] = measure === null ? [] : file.args(measure);
  const number = asNumber(value);
  const unit = asRef(base);
  const size = number === null || unit === null ? null : sizeOf(file, unit, depth + 1);
  if (number === null || size === null) return null;
  const factor = number * size.factor;
  return factor > 0 && Number.isFinite(factor) ? { ...size, factor } : null;
}

function derivedUnit(file: StepFile, elements: readonly number[], depth: number): UnitSize | null {
  let product = NO_UNIT;
  for (const element of elements) {
    const [base, exponent] = file.args(element);
    const unit = asRef(base);
    const power = asNumber(exponent);
    const size = unit === null || power === null ? null : sizeOf(file, unit, depth + 1);
    if (size === null || power === null) return null;
    product = times(product, size, power);
  }
  return elements.length === 0 || !Number.isFinite(product.factor) ? null : product;
}

function nameOf(file: StepFile, id: number): string {
  const name = file.typeOf(id) === 'IFCDERIVEDUNIT' ? null : asString(file.args(id)[2]);
  return name === null ? `unit #${id}` : `the unit '${name}'`;
}

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

function wordFor(factor: number): string {
  const found = WORDS.find(([known]) => Math.abs(factor / known - 1) < 1e-4);
  return found === undefined ? `${factor} m` : found[1];
}
