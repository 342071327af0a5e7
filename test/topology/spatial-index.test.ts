import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { indexBoxes, searchBoxes } from '../../src/topology/spatial-index.ts';

const span = fc.tuple(fc.integer({ min: -50, max: 50 }), fc.integer({ min: 0, max: 20 }));
const box = fc
  .tuple(span, span, span)
  .map((spans) => [...spans.map(([a]) => a), ...spans.map(([a, size]) => a + size)]);

describe('the spatial index', () => {
  it('finds exactly the boxes that touch, as looking at every one does', () => {
    fc.assert(
      fc.property(fc.array(box, { maxLength: 120 }), box, (boxes, wanted) => {
        const found: number[] = [];
        searchBoxes(indexBoxes(Float64Array.from(boxes.flat())), wanted, (i) => found.push(i));
        const touching = boxes.flatMap((b, i) =>
          [0, 1, 2].every((k) => b[k] <= wanted[k + 3] && b[k + 3] >= wanted[k]) ? [i] : [],
        );
        expect(found.sort((a, b) => a - b)).toEqual(touching);
      }),
    );
  });
});
