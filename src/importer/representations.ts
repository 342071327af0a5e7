import { asRefs, asString } from '../step/values.ts';
import type { Reading } from './reading.ts';

/** What an element's shape offers: the items of its Axis, and those of its body. */
export interface Shape {
  readonly axis: readonly number[];
  readonly body: readonly number[];
}

/** Representations that show something else than the solid or its line. */
const ASIDE = new Set(['FOOTPRINT', 'ANNOTATION', 'PROFILE', 'CLEARANCE', 'SURFACE', 'LIGHTING', 'COG', 'PLAN']);

/** The best body first; what exporters call it varies. */
const BODY_RANK = ['BODY', '', 'BODY-FALLBACK', 'FACETATION', 'TESSELLATION', 'REFERENCE'];

/** The bounding box: better than nothing, and than nothing only. */
const LAST = 'BOX';

export function readShape(reading: Reading, id: number | null): Shape {
  let axis: readonly number[] = [];
  let body: readonly number[] = [];
  let best = Number.POSITIVE_INFINITY;
  if (id === null) return { axis, body };
  for (const representation of asRefs(reading.args(id)[2])) {
    const args = reading.args(representation);
    const name = (asString(args[1]) ?? '').toUpperCase();
    const items = asRefs(args[3]);
    if (ASIDE.has(name) || items.length === 0) continue;
    if (name === 'AXIS') {
      axis = items;
      continue;
    }
    const rank = BODY_RANK.indexOf(name);
    const place = rank >= 0 ? rank : BODY_RANK.length + (name === LAST ? 1 : 0);
    if (place < best) {
      best = place;
      body = items;
    }
  }
  return { axis, body };
}
