import type { StepEnum } from '../../../step/values.ts';
import type { StepInteger, TypedToWrite } from '../../../step/write.ts';
import type { EntityShape } from './attribute-table.ts';

/** A reference to the instance with this id in the XML. */
export class XmlRef {
  readonly id: string;
  constructor(id: string) {
    this.id = id;
  }
}

/** A value whose references are not resolved yet. */
export type DraftValue =
  | null
  | number
  | string
  | boolean
  | StepInteger
  | StepEnum
  | TypedToWrite
  | Draft
  | XmlRef
  | DraftValue[];

/** An instance on its way from XML to STEP text. */
export class Draft {
  readonly shape: EntityShape;
  readonly id: string | null;
  /** By position; null where nothing is said. */
  readonly values: DraftValue[];
  /** What is referred to from a position, once that was asked: shared relationships can have very many objects. */
  private readonly referred = new Map<number, Set<Draft | string>>();

  constructor(shape: EntityShape, id: string | null) {
    this.shape = shape;
    this.id = id;
    this.values = shape.attributes.map(() => null);
  }

  /** Adds to a list; of single values the first stands. */
  put(position: number, value: DraftValue): void {
    const present = this.values[position];
    if (present === null || present === undefined) this.values[position] = value;
    else if (Array.isArray(present) && Array.isArray(value)) for (const item of value) present.push(item);
    else return;
    const known = this.referred.get(position);
    if (known !== undefined) gather(value, known);
  }

  /** Whether the instance is already referred to from that position. */
  refersTo(position: number, draft: Draft): boolean {
    let known = this.referred.get(position);
    if (known === undefined) {
      known = new Set();
      gather(this.values[position] ?? null, known);
      this.referred.set(position, known);
    }
    return known.has(draft) || (draft.id !== null && known.has(draft.id));
  }
}

function gather(value: DraftValue, into: Set<Draft | string>): void {
  if (Array.isArray(value)) for (const item of value) gather(item, into);
  else if (value instanceof Draft) into.add(value);
  else if (value instanceof XmlRef) into.add(value.id);
}
