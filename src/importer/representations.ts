import type { Reading } from './reading.ts';

/** What an element's shape offers: the items of its Axis, and those of its body. */
export interface Shape {
  readonly axis: readonly number[];
  readonly body: readonly number[];
}

/** Representations that show something else than the solid or its line. */
const OTHERS = new Set(['FOOTPRINT', 'ANNOTATION', 'PROFILE', 'CLEARANCE', 'SURFACE', 'LIGHTING', 'COG', 'PLAN']);

/** The best body first; what exporters call it varies. */
const BODY_RANK = ['BODY', '', 'BODY-FALLBACK', 'FACETATION', 'TESSELLATION', 'REFERENCE'];

/** The bounding box: better than nothing, and than nothing only. */
const LAST = 'BOX';

const ASIDE = -1;
const AXIS = -2;

/** AXIS, ASIDE, or how good a body it is, the lowest best. */
function placeOf(name: string): number {
  if (OTHERS.has(name)) return ASIDE;
  if (name === 'AXIS') return AXIS;
  const rank = BODY_RANK.indexOf(name);
  return rank >= 0 ? rank : BODY_RANK.length + (name === LAST ? 1 : 0);
}

/** Of the names as the standard spells them, which most exporters do: every member has one or two. */
const PLACES: ReadonlyMap<string, number> = new Map(
  ['Axis', 'Body', 'Box', 'FootPrint'].map((name) => [name, placeOf(name.toUpperCase())]),
);

export function readShape(reading: Reading, id: number | null): Shape {
  let axis: readonly number[] = [];
  let body: readonly number[] = [];
  let best = Number.POSITIVE_INFINITY;
  if (id === null) return { axis, body };
  for (const representation of reading.refsAt(id, 2)) {
    const items = reading.refsAt(representation, 3);
    const name = reading.file.stringAt(representation, 1) ?? '';
    const place = PLACES.get(name) ?? placeOf(name.toUpperCase());
    if (place === ASIDE || items.length === 0) continue;
    if (place === AXIS) {
      axis = items;
      continue;
    }
    if (place < best) {
      best = place;
      body = items;
    }
  }
  return { axis, body };
}
