import { describe, expect, test } from 'vitest';
import { slackNote } from '../../../src/statics/one-way/slack-note.ts';
import type { SolvedCase } from '../../../src/statics/types.ts';
import { trussOf } from '../support/trusses.ts';

const truss = trussOf({
  points: [
    [0, 0, 0],
    [4, 0, 0],
    [4, 0, 3],
    [0, 0, 3],
  ],
  bars: [
    [0, 2],
    [1, 3],
    [0, 1],
  ],
});

const under = (name: string, slack: readonly number[]): SolvedCase => ({
  name,
  nature: 'wind',
  refused: null,
  loads: [],
  loadSum: [0, 0, 0],
  axialForce: [0, 0, 0],
  displacement: [],
  reactions: [],
  residual: 0,
  slack,
});

const rods = { tensionOnly: [0, 1], compressionOnly: [] };

describe('the note on slack bars', () => {
  test('counts those slack somewhere and names those slack everywhere', () => {
    const found = slackNote(truss, rods, [under('west', [0]), under('east', [0, 1])], []);
    expect(found.map(({ code, severity }) => [code, severity])).toEqual([['slack-bar', 'note']]);
    expect(found[0].message).toBe(
      '2 of the 2 bars that only pull would have to push in some load case and are slack there, one of them in every one (bar 0).',
    );
    expect(found[0].nodes).toEqual([0, 2]);
  });

  test('says where each takes its turn, and nothing where none is slack or the case is refused', () => {
    const turns = slackNote(truss, rods, [under('west', [0]), under('east', [1])], []);
    expect(turns[0].message).toContain('each of them carries something in another');
    expect(slackNote(truss, rods, [under('west', [])], [])).toEqual([]);
    expect(slackNote(truss, rods, [{ ...under('west', [0]), refused: 'no' }], [])).toEqual([]);
  });
});
