import { expect, test } from 'vitest';
import { shapeCoefficient } from '../../src/statics/loads/snow-shape.ts';

/** EN 1991-1-3:2003 Table 5.2, mu1 (from memory): 0.8 to 30 degrees, 0.8 (60 - a) / 30 to 60 degrees, 0 beyond. */
test('mu1 is that of Table 5.2, and with guards never below 0.8 (5.3.2(2))', () => {
  const table: [pitch: number, mu: number][] = [
    [0, 0.8],
    [15, 0.8],
    [30, 0.8],
    [36, 0.64],
    [45, 0.4],
    [52.5, 0.2],
    [60, 0],
    [75, 0],
  ];
  for (const [pitch, mu] of table) {
    expect(shapeCoefficient(pitch, false)).toBeCloseTo(mu, 12);
    expect(shapeCoefficient(pitch, true)).toBe(0.8);
  }
});
