import { asRef, asRefs } from '../../step/values.ts';
import { readAxes, readOperator } from '../placement-axes.ts';
import type { Reading } from '../reading.ts';
import { compose, type Transform } from '../transform.ts';

export interface MappedItems {
  readonly items: readonly number[];
  /** From the coordinates of the mapped representation to those of the one that holds the item. */
  readonly transform: Transform;
}

/**
 * What an IfcMappedItem shows. The mapping origin is applied before the target, as the modelling programs in use do it
 * (common practice; it is the identity nearly always).
 */
export function mappedItems(reading: Reading, id: number): MappedItems {
  const [source, target] = reading.args(id);
  const map = asRef(source);
  const [origin, representation] = map === null ? [] : reading.args(map);
  const shape = asRef(representation);
  return {
    items: shape === null ? [] : asRefs(reading.args(shape)[3]),
    transform: compose(readOperator(reading, target), readAxes(reading, origin)),
  };
}
