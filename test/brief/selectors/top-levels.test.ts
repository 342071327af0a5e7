import { describe, expect, it } from 'vitest';
import { topLevels } from '../../../src/brief/selectors/top-levels.ts';
import { makeTruss } from '../make-truss.ts';

describe('the levels of top nodes', () => {
  it('are counted from below, and what lies under a bar is not among them', () => {
    const { truss } = makeTruss(
      [
        [0, 0, 0],
        [6, 0, 0],
        [3, 0, 2],
        [3, 0, 0],
      ],
      [
        [0, 2],
        [2, 1],
        [0, 3],
        [3, 1],
        [3, 2],
      ],
    );
    expect(topLevels(truss)).toEqual([
      { level: 0, count: 2 },
      { level: 2, count: 1 },
    ]);
  });
});
