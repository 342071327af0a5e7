import { asRef } from '../../step/values.ts';
import { noAxis } from '../not-read.ts';
import type { Reading } from '../reading.ts';
import { compose, type Transform } from '../transform.ts';
import { readCurve } from './curve.ts';
import { type Chord, mapPiece } from './curve-piece.ts';
import { mappedItems } from './mapped-item.ts';
import { straightRuns } from './straight-runs.ts';

const DEEPEST = 16;

/**
 * The lines drawn in an Axis representation, in world metres. A straight curve or a bow gives one line, a polygon
 * its straight runs.
 * @throws NotRead (no-axis) where an item cannot be read.
 */
export function readAxisLines(reading: Reading, items: readonly number[], world: Transform, depth = 0): Chord[] {
  if (depth > DEEPEST) throw noAxis('its Axis refers to itself');
  const [only] = items;
  return only !== undefined && items.length === 1
    ? readItem(reading, only, world, depth)
    : items.flatMap((item) => readItem(reading, item, world, depth));
}

function readItem(reading: Reading, item: number, world: Transform, depth: number): Chord[] {
  const type = reading.typeOf(item);
  if (type === 'IFCMAPPEDITEM') {
    const mapped = mappedItems(reading, item);
    return readAxisLines(reading, mapped.items, compose(world, mapped.transform), depth + 1);
  }
  if (type === 'IFCGEOMETRICSET' || type === 'IFCGEOMETRICCURVESET') {
    const elements = reading.args(item)[0];
    const ids = Array.isArray(elements) ? elements.map(asRef).filter((id) => id !== null) : [];
    return readAxisLines(reading, ids, world, depth + 1);
  }
  return straightRuns(readCurve(reading, item).map((piece) => mapPiece(world, piece)));
}
