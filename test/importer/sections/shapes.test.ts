import { describe, expect, it } from 'vitest';
import { NotRead } from '../../../src/importer/not-read.ts';
import { circle, ellipse, rectangle, rhs, trapezium } from '../../../src/importer/sections/closed-shapes.ts';
import { cShape, zShape } from '../../../src/importer/sections/folded-shapes.ts';
import { iShape } from '../../../src/importer/sections/i-shape.ts';
import { centroidOf, sectionOf } from '../../../src/importer/sections/profile-shape.ts';
import { lShape, tShape, uShape } from '../../../src/importer/sections/rolled-shapes.ts';

const flange = (width: number, thickness: number) => ({ width, thickness, fillet: 0, edgeRadius: 0, slope: 0 });
const u = { depth: 0.2, width: 0.08, web: 0.006, flange: 0.01, fillet: 0, edgeRadius: 0, slope: 0 };

describe('shapes with sharp corners against closed forms', () => {
  it('finds the centroid of an I of unequal flanges', () => {
    const shape = iShape('x', { depth: 0.3, web: 0.01, top: flange(0.1, 0.01), bottom: flange(0.2, 0.02) });
    const areas = [0.2 * 0.02, 0.27 * 0.01, 0.1 * 0.01];
    const levels = [-0.14, -0.15 + 0.02 + 0.135, 0.145];
    const total = areas.reduce((a, b) => a + b);
    expect(centroidOf(shape)[1]).toBeCloseTo(areas.reduce((sum, a, i) => sum + a * levels[i]!, 0) / total, 12);
    // Two flanges about the shear centre: h^2 I1 I2 / (I1 + I2), Timoshenko & Gere, from memory.
    const [i1, i2] = [(0.01 * 0.1 ** 3) / 12, (0.02 * 0.2 ** 3) / 12];
    expect(sectionOf(shape).warping / ((0.285 ** 2 * i1 * i2) / (i1 + i2))).toBeCloseTo(1, 6);
  });

  it('finds a channel: centroid towards the web, warping by its closed form', () => {
    const shape = uShape('x', u);
    const [b, h] = [0.08 - 0.003, 0.19];
    // Timoshenko & Gere, from memory.
    const warping =
      (((u.flange * b ** 3 * h ** 2) / 12) * (3 * b * u.flange + 2 * h * u.web)) / (6 * b * u.flange + h * u.web);
    expect(sectionOf(shape).warping / warping).toBeCloseTo(1, 9);
    expect(centroidOf(shape)[0]).toBeLessThan(-0.01);
    expect(sectionOf(shape).inertiaYZ).toBe(0);
  });

  it('finds a Z: area without overlap, warping by its closed form, inclined axes', () => {
    const shape = zShape('x', { depth: 0.2, width: 0.07, web: 0.004, flange: 0.004, fillet: 0, edgeRadius: 0 });
    const section = sectionOf(shape);
    expect(section.area).toBeCloseTo(0.2 * 0.004 + 2 * 0.066 * 0.004, 12);
    const [b, h, t] = [0.068, 0.196, 0.004];
    // Timoshenko & Gere, from memory.
    const warping = (((t * b ** 3 * h ** 2) / 12) * (b * t + 2 * h * t)) / (2 * b * t + h * t);
    expect(section.warping / warping).toBeCloseTo(1, 9);
    // Lower flange to the right, upper one to the left.
    expect(section.inertiaYZ).toBeLessThan(0);
    expect(section.inertiaMajor).toBeGreaterThan(section.inertiaY);
  });

  it('finds an angle with its corner at the lower left', () => {
    const shape = lShape('x', { depth: 0.1, width: 0.06, thickness: 0.01, fillet: 0, edgeRadius: 0, slope: 0 });
    const section = sectionOf(shape);
    expect(section.area).toBeCloseTo(0.15 * 0.01, 12);
    expect(centroidOf(shape)[0]).toBeLessThan(0);
    expect(centroidOf(shape)[1]).toBeLessThan(0);
    expect(section.inertiaYZ).toBeLessThan(0);
    expect(section.inertiaMajor + section.inertiaMinor).toBeCloseTo(section.inertiaY + section.inertiaZ, 14);
  });

  it('finds a tee with its flange on top', () => {
    const shape = tShape('x', {
      depth: 0.1,
      width: 0.1,
      web: 0.01,
      flange: 0.01,
      fillet: 0,
      flangeEdgeRadius: 0,
      webEdgeRadius: 0,
      webSlope: 0,
      flangeSlope: 0,
    });
    expect(sectionOf(shape).area).toBeCloseTo(0.19 * 0.01, 12);
    expect(centroidOf(shape)[1]).toBeCloseTo((0.1 * 0.01 * 0.045 + 0.09 * 0.01 * -0.005) / 0.0019, 12);
  });

  it('finds a lipped channel: a bent strip of even thickness', () => {
    const shape = cShape('x', { depth: 0.2, width: 0.07, wall: 0.002, girth: 0.02, innerRadius: 0 });
    expect(sectionOf(shape).area).toBeCloseTo(0.002 * (0.2 + 2 * 0.068 + 2 * 0.018), 12);
    const round = sectionOf(cShape('x', { depth: 0.2, width: 0.07, wall: 0.002, girth: 0.02, innerRadius: 0.003 }));
    // Each bend of inner radius r saves (1 - pi/4)((r + t)^2 - r^2).
    const saved = 4 * (1 - Math.PI / 4) * (0.005 ** 2 - 0.003 ** 2);
    expect(round.area).toBeCloseTo(sectionOf(shape).area - saved, 12);
    expect(round.warping).toBeGreaterThan(0);
  });

  it('finds solid shapes and a hollow rectangle', () => {
    expect(sectionOf(circle('x', 0.05)).torsion).toBeCloseTo((Math.PI / 2) * 0.05 ** 4, 12);
    expect(sectionOf(ellipse('x', 0.05, 0.05)).torsion).toBeCloseTo((Math.PI / 2) * 0.05 ** 4, 12);
    // 0.1406 b^4 of a square: St. Venant's series, from memory.
    expect(sectionOf(rectangle('x', 0.1, 0.1)).torsion / (0.1406 * 1e-4)).toBeCloseTo(1, 2);
    const sloped = sectionOf(trapezium('x', { bottom: 0.2, top: 0.1, depth: 0.1, topOffset: 0.05 }));
    expect(sloped.area).toBeCloseTo(0.015, 12);
    expect(sloped.inertiaYZ).toBe(0);
    const hollow = sectionOf(rhs('x', { width: 0.1, depth: 0.2, wall: 0.0063, inner: 0, outer: 0 }));
    expect(hollow.area).toBeCloseTo(0.1 * 0.2 - 0.0874 * 0.1874, 12);
    expect(hollow.depth).toBeCloseTo(0.2, 12);
    expect(hollow.width).toBeCloseTo(0.1, 12);
  });

  it('names a shape that has no name by its dimensions', () => {
    const d = { width: 0.1, depth: 0.2, wall: 0.0063, inner: 0, outer: 0 };
    expect(rhs(null, d).name).toBe('RHS 200x100x6.3');
    expect(rhs('Chord', d).name).toBe('Chord');
    expect(uShape(null, u).name).toBe('U 200x80x6x10');
  });

  it.each([
    ['zero thickness', () => rhs('x', { width: 0.1, depth: 0.1, wall: 0, inner: 0, outer: 0 })],
    ['walls that meet', () => rhs('x', { width: 0.1, depth: 0.1, wall: 0.05, inner: 0, outer: 0 })],
    ['a missing depth', () => uShape('x', { ...u, depth: Number.NaN })],
    ['flanges thicker than the depth', () => uShape('x', { ...u, flange: 0.1 })],
    ['a negative radius of a round', () => circle('x', -1)],
  ])('refuses %s', (_, make) => {
    expect(make).toThrow(NotRead);
  });
});
