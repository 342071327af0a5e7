import { beforeAll, describe, expect, it } from 'vitest';
import type { Result } from '../../src/domain/result.ts';
import { runModel } from '../../src/pipeline.ts';
import { compareResults } from '../../src/revisions/compare-results.ts';
import { comparisonSchema } from '../../src/revisions/comparison.ts';
import { type Edit, editedHall, fileOf, soundHall } from './edited-halls.ts';

const survey = async (bytes: Uint8Array): Promise<Result> => (await runModel(bytes, { extent: 'survey' })).result;

/** What a comparison says was done, by name. */
function toldEdits(old: Result, now: Result): Edit[] {
  const { added, removed, changed } = comparisonSchema.parse(compareResults(old, now));
  const nameIn = ({ members }: Result, globalId: string) =>
    members.find((member) => member.globalId === globalId)?.name ?? '';
  return [
    ...removed.map((id): Edit => ({ kind: 'removed', name: nameIn(old, id) })),
    ...added.map((id): Edit => ({ kind: 'added', name: nameIn(now, id) })),
    ...changed.map((change): Edit => {
      const name = nameIn(now, change.new);
      if (change.section) return { kind: 'resized', name, section: [change.section[0] ?? '', change.section[1] ?? ''] };
      return { kind: 'moved', name };
    }),
  ];
}

const inOrder = (edits: readonly Edit[]): Edit[] => [...edits].sort((a, b) => (a.name < b.name ? -1 : 1));

describe('comparing a hall with one that was edited at random', () => {
  let old: Result;
  beforeAll(async () => {
    old = await survey(fileOf(soundHall()));
  });

  it.each([1, 2, 3, 4, 5])(
    'tells exactly the ten edits of draw %i, whatever became of GlobalIds and order',
    async (seed) => {
      const { model, edits } = editedHall(seed, 10);
      for (const exporter of [{}, { renewed: true }, { renewed: true, shuffledBy: seed }]) {
        const now = await survey(fileOf(model, exporter));
        expect(inOrder(toldEdits(old, now)), JSON.stringify(exporter)).toEqual(inOrder(edits));
      }
    },
  );

  it('tells nothing of a file that is only written anew', async () => {
    const now = await survey(fileOf(soundHall(), { renewed: true, shuffledBy: 9 }));
    const comparison = compareResults(old, now);
    expect(comparison.matched.every(({ by }) => by === 'geometry')).toBe(true);
    expect(comparison.matched).toHaveLength(old.members.length);
    expect([comparison.added, comparison.removed, comparison.changed, comparison.supports]).toEqual([[], [], [], []]);
    expect([comparison.findings.new, comparison.findings.gone]).toEqual([[], []]);
  });
});
