import fc from 'fast-check';
import { expect, it } from 'vitest';
import { dot, norm, scale, type Vec3 } from '../../../../src/domain/vector.ts';
import { type Held, nodeCondition } from '../../../../src/exporter/ifc/view/node-conditions.ts';

const WORLD: readonly [Vec3, Vec3, Vec3] = [
  [1, 0, 0],
  [0, 1, 0],
  [0, 0, 1],
];

it('what holds along the axes of the world stays there', () => {
  const held: Held = { rigid: [[0, 0, 1]], springs: [{ direction: [1, 0, 0], stiffness: 5e6 }] };
  expect(nodeCondition(held)).toEqual({ frame: null, along: [5e6, 0, 'rigid'] });
});

it('a spring along what is held rigidly adds nothing', () => {
  const held: Held = { rigid: [[0, 0, 1]], springs: [{ direction: [0, 0, 1], stiffness: 5e6 }] };
  expect(nodeCondition(held).along).toEqual([0, 0, 'rigid']);
});

const direction = fc
  .tuple(fc.integer({ min: -9, max: 9 }), fc.integer({ min: -9, max: 9 }), fc.integer({ min: -9, max: 9 }))
  .filter((v) => norm(v) > 0)
  .map((v): Vec3 => scale(v, 1 / norm(v)));

it('leaning supports and springs hold as much after as before, in a right-handed frame', () => {
  const held = fc.record({
    rigid: fc.array(direction, { maxLength: 2 }),
    springs: fc.array(fc.record({ direction, stiffness: fc.double({ min: 1e3, max: 1e8, noNaN: true }) }), {
      maxLength: 3,
    }),
  });
  fc.assert(
    fc.property(held, direction, ({ rigid, springs }, push) => {
      const { frame, along } = nodeCondition({ rigid, springs });
      const axes = frame ?? WORLD;
      for (const [i, u] of axes.entries())
        for (const [j, v] of axes.entries()) expect(dot(u, v)).toBeCloseTo(i === j ? 1 : 0, 9);
      // A movement that every rigid direction allows meets the same springs.
      const free = axes.reduce<Vec3>(
        (rest, axis, i) =>
          along[i] === 'rigid'
            ? rest
            : [
                rest[0] + dot(push, axis) * axis[0],
                rest[1] + dot(push, axis) * axis[1],
                rest[2] + dot(push, axis) * axis[2],
              ],
        [0, 0, 0],
      );
      for (const way of rigid) expect(dot(way, free)).toBeCloseTo(0, 7);
      const before = springs.reduce((sum, one) => sum + one.stiffness * dot(one.direction, free) ** 2, 0);
      const after = axes.reduce(
        (sum, axis, i) => sum + (along[i] === 'rigid' ? 0 : (along[i] as number)) * dot(axis, free) ** 2,
        0,
      );
      const most = Math.max(1, ...springs.map(({ stiffness }) => stiffness));
      expect(Math.abs(after - before) / most).toBeLessThan(1e-7);
    }),
  );
});
