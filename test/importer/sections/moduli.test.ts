import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { circle, rectangle, rhs } from '../../../src/importer/sections/closed-shapes.ts';
import { cShape, zShape } from '../../../src/importer/sections/folded-shapes.ts';
import { iShape } from '../../../src/importer/sections/i-shape.ts';
import { sectionModuli } from '../../../src/importer/sections/moduli.ts';
import { mapOutline } from '../../../src/importer/sections/outline.ts';
import { centroidOf, type ProfileShape } from '../../../src/importer/sections/profile-shape.ts';
import { lShape, tShape, uShape } from '../../../src/importer/sections/rolled-shapes.ts';

const flange = (width: number, thickness: number) => ({ width, thickness, fillet: 0, edgeRadius: 0, slope: 0 });
const sharpT = {
  depth: 0.2,
  width: 0.1,
  web: 0.01,
  flange: 0.02,
  fillet: 0,
  flangeEdgeRadius: 0,
  webEdgeRadius: 0,
  webSlope: 0,
  flangeSlope: 0,
};

describe('moduli and radii of gyration', () => {
  it('are b h^2 / 6 and b h^2 / 4 of a rectangle', () => {
    const moduli = sectionModuli(rectangle('x', 0.1, 0.2));
    expect(moduli.elasticY).toBeCloseTo((0.1 * 0.2 ** 2) / 6, 15);
    expect(moduli.plasticY).toBeCloseTo((0.1 * 0.2 ** 2) / 4, 12);
    expect(moduli.plasticZ).toBeCloseTo((0.2 * 0.1 ** 2) / 4, 12);
    expect(moduli.radiusY).toBeCloseTo(0.2 / Math.sqrt(12), 12);
    expect(moduli.radiusMinor).toBeCloseTo(0.1 / Math.sqrt(12), 12);
    expect(moduli.principalAngle).toBeCloseTo(0, 12);
  });

  it('are 4 r^3 / 3 of a round bar, to what its chords leave', () => {
    expect(sectionModuli(circle('x', 0.05)).plasticY / ((4 * 0.05 ** 3) / 3)).toBeCloseTo(1, 2);
  });

  it('take holes off', () => {
    const moduli = sectionModuli(rhs('x', { width: 0.1, depth: 0.2, wall: 0.01, inner: 0, outer: 0 }));
    expect(moduli.plasticY).toBeCloseTo((0.1 * 0.2 ** 2 - 0.08 * 0.18 ** 2) / 4, 12);
  });

  it('halve the area of a tee for the plastic one, and take the far edge for the elastic one', () => {
    const moduli = sectionModuli(tShape('x', sharpT));
    // Flange 20 cm2, web 18 cm2: the halving axis lies 19 mm below the top.
    const top = 0.1 * 0.019 ** 2 * 0.5;
    const below = 0.1 * 0.001 ** 2 * 0.5 + 0.18 * 0.01 * (0.001 + 0.09);
    expect(moduli.plasticY).toBeCloseTo(top + below, 9);
    const level = (20 * 0.19 + 18 * 0.09) / 38;
    expect(level).toBeGreaterThan(0.1);
    const inertia =
      (0.1 * 0.02 ** 3) / 12 + 0.002 * (0.19 - level) ** 2 + (0.01 * 0.18 ** 3) / 12 + 0.0018 * (0.09 - level) ** 2;
    expect(moduli.elasticY).toBeCloseTo(inertia / level, 9);
  });

  it('turn with the outline: the principal angle follows, all else about the principal axes stays', () => {
    const base = lShape('x', { depth: 0.15, width: 0.1, thickness: 0.01, fillet: 0.012, edgeRadius: 0.006, slope: 0 });
    const own = sectionModuli(base);
    fc.assert(
      fc.property(fc.double({ min: -3, max: 3, noNaN: true }), (angle) => {
        const [c, s] = [Math.cos(angle), Math.sin(angle)];
        const turned: ProfileShape = {
          ...base,
          outline: mapOutline({ x: [c, s], y: [-s, c], origin: [0, 0] }, base.outline),
        };
        const moduli = sectionModuli(turned);
        expect(moduli.radiusMajor).toBeCloseTo(own.radiusMajor, 10);
        expect(moduli.radiusMinor).toBeCloseTo(own.radiusMinor, 10);
        expect(Math.abs(Math.sin(moduli.principalAngle - own.principalAngle - angle))).toBeLessThan(1e-8);
      }),
    );
  });
});

describe('the shear centre', () => {
  it('of a channel lies 3 b^2 t / (6 b t + h s) beyond its web (Timoshenko & Gere, from memory)', () => {
    const shape = uShape('x', {
      depth: 0.2,
      width: 0.08,
      web: 0.006,
      flange: 0.01,
      fillet: 0,
      edgeRadius: 0,
      slope: 0,
    });
    const [b, h] = [0.077, 0.19];
    const beyond = (3 * b * b * 0.01) / (6 * b * 0.01 + h * 0.006);
    expect(shape.shearCentre![0]).toBeCloseTo(-0.04 + 0.003 - beyond, 12);
    expect(shape.shearCentre![1]).toBeCloseTo(0, 12);
  });

  it('of an I of unequal flanges divides their distance as their inertias', () => {
    const shape = iShape('x', { depth: 0.3, web: 0.01, top: flange(0.1, 0.01), bottom: flange(0.2, 0.02) });
    const [top, bottom] = [0.01 * 0.1 ** 3, 0.02 * 0.2 ** 3];
    const [upper, lower] = [0.145, -0.14];
    expect(shape.shearCentre![1]).toBeCloseTo((top * upper + bottom * lower) / (top + bottom), 9);
  });

  it('of an angle and a tee lies where the middles of their parts meet, of a Z at the centroid', () => {
    const angle = lShape('x', { depth: 0.1, width: 0.06, thickness: 0.01, fillet: 0, edgeRadius: 0, slope: 0 });
    expect(angle.shearCentre![0]).toBeCloseTo(-0.025, 12);
    expect(angle.shearCentre![1]).toBeCloseTo(-0.045, 12);
    expect(tShape('x', sharpT).shearCentre![1]).toBeCloseTo(0.09, 12);
    const zed = zShape('x', { depth: 0.2, width: 0.07, web: 0.004, flange: 0.004, fillet: 0, edgeRadius: 0 });
    expect(zed.shearCentre![0]).toBeCloseTo(centroidOf(zed)[0], 12);
    expect(zed.shearCentre![1]).toBeCloseTo(centroidOf(zed)[1], 12);
  });

  it('of a lipped channel lies farther out than that of one without lips', () => {
    const [depth, width, t] = [0.2, 0.07, 0.002];
    const lipped = cShape('x', { depth, width, wall: t, girth: 0.02, innerRadius: 0 });
    const plain = uShape('x', { depth, width, web: t, flange: t, fillet: 0, edgeRadius: 0, slope: 0 });
    expect(lipped.shearCentre![0]).toBeLessThan(plain.shearCentre![0]);
  });
});
