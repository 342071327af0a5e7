import { describe, expect, test } from 'vitest';
import type { Vec3 } from '../../src/domain/vector.ts';
import { assessStability } from '../../src/statics/stability/assess-stability.ts';
import { alsoFlat, fix, trussOf } from '../statics/support/trusses.ts';

/** Inner mechanisms, states of self-stress and the orders of the inner modes of a free body. */
function inner(points: readonly Vec3[], bars: readonly (readonly [number, number])[]) {
  const { modes, mechanisms, selfStressStates } = assessStability(trussOf({ points, bars }), fix({}));
  return { m: mechanisms - 6, s: selfStressStates, orders: modes.slice(6).map(({ order }) => order) };
}

const ring = (count: number, z: number, turn: number): Vec3[] =>
  Array.from({ length: count }, (_, i) => {
    const angle = turn + (2 * Math.PI * i) / count;
    return [Math.cos(angle), Math.sin(angle), z];
  });

// Assemblies that break Maxwell's rule both ways at once, s = 1 with m = 1 (Calladine, Int. J. Solids Structures 14, 1978; Pellegrino & Calladine, ibid. 22,
// 1986). Which ones they are is from memory; the twist of the prism is in Connelly & Terrell, Structural Topology 21, 1995, from memory.
describe('what is both loose and stressed', () => {
  /** n struts between two rings of n cables each, with n cables from ring to ring. */
  const prism = (n: number, twist: number) => {
    const points = [...ring(n, 0, 0), ...ring(n, 1.3, twist)];
    const bars = Array.from({ length: n }, (_, i): [number, number][] => [
      [i, (i + 1) % n],
      [n + i, n + ((i + 1) % n)],
      [i, n + i],
      [i, n + ((i + n - 1) % n)],
    ]).flat();
    return inner(points, bars);
  };

  test.each([3, 4, 5])("a prism of %i struts is so at the one twist of 90 degrees less half the ring's step", (n) => {
    const twist = Math.PI / 2 + Math.PI / n;
    // 4 n bars on 2 n nodes: 6 n - 6 - 4 n = m - s.
    const { m, s, orders } = prism(n, twist);
    expect([m, s]).toEqual([2 * n - 5, 1]);
    expect(orders.every((order) => order === 'infinitesimal')).toBe(true);
    const beside = prism(n, twist + 0.1);
    expect([beside.m, beside.s]).toEqual([2 * n - 6, 0]);
  });

  test('six struts in three pairs, half as far apart as they are long, with 24 cables', () => {
    const points = [0, 1, 2].flatMap((axis) =>
      [-1, 1].flatMap((long) =>
        [-1, 1].map((apart): Vec3 => {
          const point = [0, 0, 0];
          point[axis] = 2 * long;
          point[(axis + 1) % 3] = apart;
          return point as unknown as Vec3;
        }),
      ),
    );
    const bars = points.flatMap((p, i) =>
      points.flatMap((q, j): [number, number][] => {
        const square = p.reduce((sum, v, k) => sum + (v - q[k]) ** 2, 0);
        return j > i && (Math.abs(square - 6) < 1e-9 || Math.abs(square - 16) < 1e-9) ? [[i, j]] : [];
      }),
    );
    expect(bars.length).toBe(30);
    expect(inner(points, bars)).toEqual({ m: 1, s: 1, orders: ['infinitesimal'] });
  });

  // Source: Bolker & Roth, Pacific J. Math. 90, 1980, from memory: three nodes joined to three others in the plane move where all six lie on a conic.
  test('two triples of nodes, each joined to each of the other triple, where the six lie on a circle', () => {
    const counts = (points: readonly Vec3[]) => {
      const bars = [0, 1, 2].flatMap((a) => [3, 4, 5].map((b) => [a, b] as const));
      const { mechanisms, selfStressStates } = assessStability(
        trussOf({ points, bars }),
        alsoFlat(fix({ 0: 'xy', 3: 'y' }), 6, 'z'),
      );
      return [mechanisms, selfStressStates];
    };
    const onCircle = [0.1, 0.9, 2, 3.1, 4, 5.2].map((angle): Vec3 => [Math.cos(angle), Math.sin(angle), 0]);
    expect(counts(onCircle)).toEqual([1, 1]);
    const off = onCircle.map((p, i): Vec3 => (i === 2 ? [p[0] * 1.3, p[1] * 1.3, 0] : p));
    expect(counts(off)).toEqual([0, 0]);
  });

  test.each([3, 6])(
    '%i bars in one line between fixed points: every node moves two ways, one state of stress holds all',
    (n) => {
      const points = Array.from({ length: n + 1 }, (_, i): Vec3 => [i, 0, 0]);
      const bars = points.slice(1).map((_, i) => [i, i + 1] as const);
      const judged = assessStability(trussOf({ points, bars }), fix({ 0: 'xyz', [n]: 'xyz' }));
      expect([judged.mechanisms, judged.selfStressStates]).toEqual([2 * (n - 1), 1]);
      expect(judged.modes.every(({ order }) => order === 'infinitesimal')).toBe(true);
    },
  );
});
