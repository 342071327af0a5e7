import { expect } from 'vitest';
import { developedLength, type Member } from '../../../src/domain/member.ts';
import { between, distance, type Vec3 } from '../../../src/domain/vector.ts';

/** The member's bow runs from end to end of its axis on a circle, and is as long as the arc of this angle. */
export function expectBow(member: Member, centre: Vec3, radius: number, angle: number, within = 1e-6): void {
  const bow = member.bow ?? [];
  expect(distance(bow[0]!, member.axis[0])).toBeLessThan(within);
  expect(distance(bow.at(-1)!, member.axis[1])).toBeLessThan(within);
  bow.forEach((point, i) => {
    expect(Math.abs(distance(point, centre) - radius)).toBeLessThan(within);
    // Half way between two points, straight pieces leave the arc most.
    const half = between(point, bow[i + 1] ?? point, 0.5);
    expect(radius - distance(half, centre)).toBeLessThan(0.0011 + within);
  });
  expect(Math.abs(developedLength(member) / (radius * angle) - 1)).toBeLessThan(0.001);
}
