import { describe, expect, test } from 'vitest';
import { assessStability } from '../../../src/statics/stability/assess-stability.ts';
import { fix, trussOf } from '../support/trusses.ts';

describe('what is said of a mechanism', () => {
  test('two ways of one node are one finding, each way by its own direction', () => {
    // A tripod with a bar that leans from its top, 4 up in 3 along, and ends free.
    const truss = trussOf({
      points: [
        [0, 0, 0],
        [2, 0, 0],
        [1, 2, 0],
        [1, 1, 2],
        [4, 1, 6],
      ],
      bars: [
        [0, 3],
        [1, 3],
        [2, 3],
        [3, 4],
      ],
    });
    const { mechanisms, findings } = assessStability(truss, fix({ 0: 'xyz', 1: 'xyz', 2: 'xyz' }));
    expect(mechanisms).toBe(2);
    expect(findings).toHaveLength(1);
    const { message, at } = findings[0];
    expect(message).toContain('sideways (along y)');
    // Square to the bar in its own plane: neither straight up nor straight aside.
    expect(message).toMatch(/along \(-?0\.80, 0\.00, -?0\.60\)/);
    expect(at).toEqual([4, 1, 6]);
  });
});
