/** `#12`: a reference to another instance. */
export class StepRef {
  readonly id: number;
  constructor(id: number) {
    this.id = id;
  }
}

/** `.PIN_JOINED.`: an enumeration value, without its dots. `.T.` and `.F.` are read as booleans. */
export class StepEnum {
  readonly name: string;
  constructor(name: string) {
    this.name = name;
  }
}

/** `IFCLABEL('x')`: a value with its type, as it stands where the schema allows several types. */
export class StepTyped {
  readonly type: string;
  readonly value: StepValue;
  constructor(type: string, value: StepValue) {
    this.type = type;
    this.value = value;
  }
}

/** `"0FF"`: a binary value, digits as written. */
export class StepBinary {
  readonly digits: string;
  constructor(digits: string) {
    this.digits = digits;
  }
}

/** `*`: an attribute that the schema derives. */
export const DERIVED: unique symbol = Symbol('derived');

/** One value of an instance's parameter list. `$` is null; reals and integers are both numbers. */
export type StepValue =
  | null
  | number
  | string
  | boolean
  | StepRef
  | StepEnum
  | StepTyped
  | StepBinary
  | typeof DERIVED
  | readonly StepValue[];

/** The number in `value`, through a type wrapper; null where there is none. */
export function asNumber(value: StepValue | undefined): number | null {
  if (value instanceof StepTyped) return asNumber(value.value);
  return typeof value === 'number' ? value : null;
}

/** The string in `value`, through a type wrapper; null where there is none. */
export function asString(value: StepValue | undefined): string | null {
  if (value instanceof StepTyped) return asString(value.value);
  return typeof value === 'string' ? value : null;
}

/** The id that `value` refers to; null where it refers to nothing. */
export function asRef(value: StepValue | undefined): number | null {
  return value instanceof StepRef ? value.id : null;
}

/** The enumeration name in `value`; null where there is none. */
export function asEnum(value: StepValue | undefined): string | null {
  if (value instanceof StepTyped) return asEnum(value.value);
  return value instanceof StepEnum ? value.name : null;
}

/** The items of the list in `value`; empty where it is no list. */
export function asList(value: StepValue | undefined): readonly StepValue[] {
  if (value instanceof StepTyped) return asList(value.value);
  return Array.isArray(value) ? (value as readonly StepValue[]) : [];
}

/** The ids in a list of references. */
export function asRefs(value: StepValue | undefined): number[] {
  const ids: number[] = [];
  for (const item of asList(value)) if (item instanceof StepRef) ids.push(item.id);
  return ids;
}

/** The numbers in a list. */
export function asNumbers(value: StepValue | undefined): number[] {
  const numbers: number[] = [];
  for (const item of asList(value)) {
    const number = asNumber(item);
    if (number !== null) numbers.push(number);
  }
  return numbers;
}
