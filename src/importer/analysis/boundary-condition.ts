import { asNumber, asRef, StepTyped, type StepValue } from '../../step/values.ts';
import type { Reading } from '../reading.ts';

/** How one direction is held: nothing is said, not at all, rigidly, or by a spring (N/m). */
export type Hold =
  | { readonly kind: 'unstated' | 'free' | 'rigid' }
  | { readonly kind: 'spring'; readonly stiffness: number };

export interface NodeCondition {
  /** Along x, y and z. */
  readonly translations: readonly [Hold, Hold, Hold];
  readonly holdsTurning: boolean;
  readonly freesTurning: boolean;
}

/** N/m; nothing that is built is stiffer, and beyond it a spring drowns the bars in rounding. */
const RIGID_FROM = 1e14;

/**
 * IfcBoundaryNodeCondition, with warping or without. IFC2X3: a stiffness, -1 for rigid; IFC4: a boolean or a stiffness.
 */
export function readNodeCondition(reading: Reading, value: StepValue | undefined): NodeCondition | null {
  const id = asRef(value);
  if (id === null || !reading.typeOf(id).startsWith('IFCBOUNDARYNODECONDITION')) return null;
  const args = reading.args(id);
  const turning: readonly (StepValue | undefined)[] = [args[4], args[5], args[6]];
  return {
    translations: [hold(reading, args[1]), hold(reading, args[2]), hold(reading, args[3])],
    holdsTurning: turning.some((way) => isHeld(way)),
    freesTurning: turning.some((way) => bare(way) === false || bare(way) === 0),
  };
}

function hold(reading: Reading, value: StepValue | undefined): Hold {
  const stated = bare(value);
  if (stated === true) return { kind: 'rigid' };
  const number = asNumber(value);
  if (number === null) return { kind: stated === false ? 'free' : 'unstated' };
  if (number === 0) return { kind: 'free' };
  if (number < 0) return { kind: 'rigid' };
  const stiffness = reading.quantity(value, 'linearStiffness') ?? 0;
  return stiffness >= RIGID_FROM ? { kind: 'rigid' } : { kind: 'spring', stiffness };
}

function isHeld(value: StepValue | undefined): boolean {
  const stated = bare(value);
  return stated === true || (typeof stated === 'number' && stated !== 0);
}

const bare = (value: StepValue | undefined): StepValue | undefined =>
  value instanceof StepTyped ? value.value : value;
