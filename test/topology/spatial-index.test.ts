import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { indexBoxes, nearestBox, searchBoxes, sharedLabels } from '../../src/topology/spatial-index.ts';

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

  it('finds the nearest box of another label, as looking at every one does', () => {
    const labelled = fc.array(fc.tuple(box, fc.integer({ min: 0, max: 2 })), { maxLength: 120 });
    const coordinate = fc.integer({ min: -90, max: 90 });
    fc.assert(
      fc.property(labelled, fc.tuple(coordinate, coordinate, coordinate), (all, point) => {
        const away = (i: number): number => {
          const [b, label] = all[i]!;
          const outside = [0, 1, 2].map((k) => Math.max(b[k]! - point[k]!, point[k]! - b[k + 3]!, 0));
          return label === 1 ? Number.POSITIVE_INFINITY : Math.hypot(...outside);
        };
        const index = indexBoxes(Float64Array.from(all.flatMap(([b]) => b)));
        const shared = sharedLabels(
          index,
          Int32Array.from(all, ([, label]) => label),
        );
        const found = nearestBox(index, point, away, (node) => shared[node] !== 1);
        const nearest = Math.min(...all.map((_, i) => away(i)));
        expect(found.distance).toBeCloseTo(nearest, 9);
        expect(found.box < 0 ? Number.POSITIVE_INFINITY : away(found.box)).toBeCloseTo(nearest, 9);
      }),
    );
  });
});
