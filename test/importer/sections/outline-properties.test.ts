import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { ellipseRing, mapOutline, type Point2 } from '../../../src/importer/sections/outline.ts';
import { outlineProperties } from '../../../src/importer/sections/outline-properties.ts';
import { corner, polygonRing, roundedRing } from '../../../src/importer/sections/rounded-ring.ts';

const solid = (outer: ReturnType<typeof polygonRing>) => ({ outer, voids: [] });
const rectangle = (b: number, h: number, r = 0) =>
  solid(roundedRing([corner(0, 0, r), corner(b, 0, r), corner(b, h, r), corner(0, h, r)]));

describe('properties of outlines', () => {
  it('finds b h^3 / 12 of a rectangle about its own centroid', () => {
    const found = outlineProperties(rectangle(0.1, 0.2))!;
    expect(found.area).toBeCloseTo(0.02, 15);
    expect(found.centroid[0]).toBeCloseTo(0.05, 15);
    expect(found.centroid[1]).toBeCloseTo(0.1, 15);
    expect(found.secondX).toBeCloseTo((0.1 * 0.2 ** 3) / 12, 16);
    expect(found.secondY).toBeCloseTo((0.2 * 0.1 ** 3) / 12, 16);
    expect(found.productXY).toBe(0);
  });

  it('finds b^2 h^2 / 72 as the product of a right triangle, negative with the right angle at its lower left', () => {
    const found = outlineProperties(
      solid(
        polygonRing([
          [0, 0],
          [3, 0],
          [0, 2],
        ]),
      ),
    )!;
    expect(found.productXY).toBeCloseTo(-36 / 72, 12);
  });

  it('takes (4 - pi) r^2 off a rectangle with round corners', () => {
    expect(outlineProperties(rectangle(3, 2, 0.5))!.area).toBeCloseTo(6 - (4 - Math.PI) * 0.25, 12);
  });

  it('finds a circle and an ellipse to twelve digits, with their extents', () => {
    const circle = outlineProperties(solid(ellipseRing(2, 2, [5, -3])))!;
    expect(circle.area).toBeCloseTo(4 * Math.PI, 12);
    expect(circle.secondX).toBeCloseTo((Math.PI * 16) / 4, 11);
    expect(circle.min[0]).toBeCloseTo(3, 12);
    expect(circle.max[1]).toBeCloseTo(-1, 12);
    const ellipse = outlineProperties(solid(ellipseRing(3, 1)))!;
    expect(ellipse.secondX).toBeCloseTo((Math.PI * 3) / 4, 11);
    expect(ellipse.secondY).toBeCloseTo((Math.PI * 27) / 4, 11);
  });

  it('rounds reentrant corners outwards: a fillet adds (1 - pi/4) r^2', () => {
    const ell = (r: number) =>
      solid(roundedRing([corner(0, 0), corner(4, 0), corner(4, 1), corner(1, 1, r), corner(1, 4), corner(0, 4)]));
    const gain = outlineProperties(ell(0.5))!.area - outlineProperties(ell(0))!.area;
    expect(gain).toBeCloseTo((1 - Math.PI / 4) * 0.25, 12);
  });

  it('makes radii that do not fit as large as they can be', () => {
    expect(outlineProperties(rectangle(2, 2, 50))!.area).toBeCloseTo(Math.PI, 12);
  });

  it('gives the same whichever way the outline is drawn', () => {
    const points: Point2[] = [
      [0, 0],
      [5, 1],
      [4, 3],
      [1, 2],
    ];
    const one = outlineProperties(solid(polygonRing(points)))!;
    const other = outlineProperties(solid(polygonRing([...points].reverse())))!;
    expect(other.area).toBeCloseTo(one.area, 12);
    expect(other.productXY).toBeCloseTo(one.productXY, 12);
  });

  it('takes holes off, and finds no properties where a hole is as large as its outline', () => {
    const outer = ellipseRing(2, 2);
    expect(outlineProperties({ outer, voids: [ellipseRing(1, 1)] })!.area).toBeCloseTo(3 * Math.PI, 12);
    expect(outlineProperties({ outer, voids: [ellipseRing(2, 2)] })).toBeNull();
  });

  it('finds no properties of a line or of nothing', () => {
    expect(outlineProperties(solid([]))).toBeNull();
    expect(
      outlineProperties(
        solid(
          polygonRing([
            [0, 0],
            [1, 1],
          ]),
        ),
      ),
    ).toBeNull();
  });

  it('does not depend on where or how turned the outline is drawn', () => {
    const place = fc.double({ min: -1e4, max: 1e4, noNaN: true });
    fc.assert(
      fc.property(place, place, fc.double({ min: 0, max: 6.3, noNaN: true }), (x, y, angle) => {
        const [c, s] = [Math.cos(angle), Math.sin(angle)];
        const base = outlineProperties(rectangle(0.3, 0.1, 0.02))!;
        const moved = outlineProperties(
          mapOutline({ x: [c, s], y: [-s, c], origin: [x, y] }, rectangle(0.3, 0.1, 0.02)),
        )!;
        expect(moved.area).toBeCloseTo(base.area, 10);
        expect(moved.secondX + moved.secondY).toBeCloseTo(base.secondX + base.secondY, 10);
        const invariant = (p: typeof base) => p.secondX * p.secondY - p.productXY ** 2;
        expect(invariant(moved)).toBeCloseTo(invariant(base), 10);
      }),
    );
  });
});
