import { distance } from '../../domain/vector.ts';
import { asRef } from '../../step/values.ts';
import { noAxis } from '../not-read.ts';
import type { Reading } from '../reading.ts';
import { compose, mapPosition, type Transform } from '../transform.ts';
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
  if (type === 'IFCPOLYLINE') {
    const line = straightLine(reading, item, world);
    if (line !== null) return [line];
  }
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

/** A polyline of two points, as most axes are, with no pieces made of it; null where it is another, or has no length. */
function straightLine(reading: Reading, polyline: number, world: Transform): Chord | null {
  const points = reading.file.onlyRefsAt(polyline, 0);
  if (points === null || points.length !== 2) return null;
  const from = mapPosition(world, reading.pointOf(points[0]!));
  const to = mapPosition(world, reading.pointOf(points[1]!));
  const length = distance(from, to);
  return length > 0 && length < Number.POSITIVE_INFINITY ? { from, to, rise: 0 } : null;
}
