import { asNumber, StepTyped, type StepValue } from '../step/values.ts';
import type { Reading } from './reading.ts';
import { kindOf, kindOfMeasure, type UnitKind } from './unit-kinds.ts';
import { isSameDimension } from './unit-sizes.ts';

/**
 * The number in a property's value, SI: by the unit it carries itself, else by the project's for the measure it is written as
 * (a modulus of elasticity may be written as a pressure), else by the project's for `kind`. Null where there is no number.
 */
export function propertyNumber(
  { units }: Reading,
  value: StepValue | undefined,
  unit: number | null,
  kind: UnitKind,
): number | null {
  const number = asNumber(value);
  if (number === null || !Number.isFinite(number)) return null;
  const own = unit === null ? null : units.factorOf(unit, kind);
  return number * (own ?? units.unitFactor(writtenKind(value, kind)));
}

function writtenKind(value: StepValue | undefined, kind: UnitKind): UnitKind {
  const written = value instanceof StepTyped ? kindOfMeasure(value.type) : null;
  return written !== null && isSameDimension(kindOf(written).dimension, kindOf(kind).dimension) ? written : kind;
}
