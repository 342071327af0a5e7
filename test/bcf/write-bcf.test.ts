import { readFileSync } from 'node:fs';
import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { groupFindings } from '../../src/bcf/group-findings.ts';
import { makeTopics } from '../../src/bcf/make-topics.ts';
import { xmlDate } from '../../src/bcf/words.ts';
import { writeBcf } from '../../src/bcf/write-bcf.ts';
import type { Result } from '../../src/domain/result.ts';
import { clippingDepth } from '../../src/drawing/snapshot.ts';
import { spotOf } from '../../src/drawing/spot.ts';
import { runModel } from '../../src/pipeline.ts';
import { checker, fixture } from '../support/shared.ts';
import { temporaryFolder } from '../support/temporary-folder.ts';
import { checkBothVersions, someFindings } from './check-both-versions.ts';
import { faultyResult, filesOf, IDS, markupsOf } from './support.ts';

const DATE = '2024-03-05T10:11:12';

describe('a BCF file', () => {
  it('holds a topic for each finding, with what it takes to act on it', () => {
    const result = faultyResult();
    const topics = makeTopics(result, DATE);
    expect(topics.map(({ labels }) => labels[1])).toEqual(['near-miss', 'lone-member', 'out-of-scope']);
    const [miss, , note] = topics;
    expect(miss).toMatchObject({ type: 'Error', priority: 'High', status: 'Open', created: DATE });
    expect(note).toMatchObject({ type: 'Information', priority: 'Low' });
    expect(miss!.title).toContain('C/4, +6.20');
    for (const words of ['32 mm', 'Mend it.', 'licensed engineer', 'roof.ifc'])
      expect(miss!.description).toContain(words);
  });

  it('keeps to the order and the places that each version asks for', () => {
    const result = faultyResult();
    const newer = [...markupsOf(writeBcf(result)).values()][0]!;
    expect(newer).toMatchObject({ Header: { Files: { File: { '@IfcProject': result.model.project!.globalId } } } });
    expect(newer.Topic).toMatchObject({
      '@TopicType': 'Error',
      '@TopicStatus': 'Open',
      Labels: { Label: ['Pinwright', 'near-miss'] },
    });
    expect(newer.Topic.Viewpoints).toBeDefined();
    const older = [...markupsOf(writeBcf(result, { version: '2.1' })).values()][0]!;
    expect(older.Topic).toMatchObject({ Labels: ['Pinwright', 'near-miss'], CreationDate: DATE });
    expect(older.Viewpoints).toBeDefined();
    expect(filesOf(writeBcf(result)).get('extensions.xml')).toContain('<TopicLabel>near-miss</TopicLabel>');
    expect(filesOf(writeBcf(result, { version: '2.1' })).has('extensions.xml')).toBe(false);
  });

  it('selects and colours the members, looks at the spot and cuts off what stands before it', () => {
    const result = faultyResult();
    const { camera, coloured, clipping } = makeTopics(result, DATE)[0]!.views[0]!;
    expect(coloured.flatMap(({ globalIds }) => globalIds)).toEqual([IDS[0], IDS[1]]);
    expect(new Set(coloured.map(({ colour }) => colour)).size).toBe(2);
    const spot = spotOf(result, result.findings[0]!);
    const away = [0, 1, 2].map((k) => spot.centre[k]! - camera.eye[k]!);
    const length = Math.hypot(...away);
    for (const k of [0, 1, 2]) expect(away[k]! / length).toBeCloseTo(camera.direction[k]!, 9);
    expect(camera.fieldOfView).toBeGreaterThanOrEqual(45);
    expect(camera.fieldOfView).toBeLessThanOrEqual(60);
    expect(clippingDepth(spot, camera)).toBeLessThan(length - spot.radius);
    expect(clipping!.hidden.map((value) => value + 0)).toEqual(camera.direction.map((value) => -value + 0));
  });

  it("names no time but the model's, and is the same bytes every time", () => {
    const result = faultyResult();
    expect(Buffer.compare(writeBcf(result), writeBcf(structuredClone(result)))).toBe(0);
    const stamped = [...markupsOf(writeBcf(result, { stamp: '2030-01-01T00:00:00Z' })).values()][0]!;
    expect(stamped.Topic.CreationDate).toBe('2030-01-01T00:00:00Z');
  });

  it('takes any date that a model may give, and no nonsense', () => {
    expect(xmlDate('2019-05-02T10:11:12')).toBe('2019-05-02T10:11:12');
    expect(xmlDate('2019-05-02T10:11:12+0200')).toBe('2019-05-02T10:11:12+02:00');
    expect(xmlDate('2019-05-02T10:11')).toBe('2019-05-02T10:11:00');
    for (const odd of [
      undefined,
      '',
      'yesterday',
      '2019-13-45T10:11:12',
      '2019-05-02T25:00:00',
      '2019-05-02T10:11:75',
    ]) {
      expect(xmlDate(odd)).toBe('1970-01-01T00:00:00Z');
    }
  });

  it('survives any words and names', () => {
    fc.assert(
      fc.property(fc.string({ unit: 'binary', maxLength: 40 }), (words) => {
        const base = faultyResult();
        const result: Result = {
          ...base,
          model: { ...base.model, file: words, project: { globalId: words, name: words } },
          findings: [{ ...base.findings[1]!, message: words, place: words, advice: words }],
          members: base.members.map((member) => ({ ...member, name: words })),
        };
        for (const version of ['2.1', '3.0'] as const) expect(markupsOf(writeBcf(result, { version })).size).toBe(1);
      }),
      { numRuns: 12 },
    );
  });
});

describe("topics' ids", () => {
  it('do not change when findings, members and nodes stand in another order or under other numbers', () => {
    const result = faultyResult();
    const shuffled: Result = {
      ...result,
      members: [...result.members].reverse(),
      findings: [...result.findings].reverse().map((finding) => ({ ...finding, nodes: ['n99'] })),
    };
    const ids = (of: Result) => groupFindings(of).map(({ guid }) => guid);
    expect(ids(shuffled).sort()).toEqual(ids(result).sort());
    expect(new Set(ids(result)).size).toBe(3);
  });

  it('stay when the next revision changes words, gap and neighbours', () => {
    const result = faultyResult();
    const [miss] = result.findings;
    const revised = {
      ...result,
      findings: [
        { ...miss!, message: 'By 35 mm.', gap: 0.035, place: 'C/5', at: [5.99, 0, 0] as [number, number, number] },
      ],
    };
    expect(groupFindings(revised)[0]!.guid).toBe(groupFindings(result)[0]!.guid);
  });

  it('tell the two ends of a member apart', () => {
    const result = faultyResult();
    const [miss] = result.findings;
    const both = { ...result, findings: [miss!, { ...miss!, at: [0, 0, 0] as [number, number, number] }] };
    expect(new Set(groupFindings(both).map(({ guid }) => guid)).size).toBe(2);
  });

  it('are one for a cause that repeats, and hold when one of its places is mended', () => {
    const result = faultyResult();
    const loose = result.members.map(({ globalId }, k) => ({
      ...result.findings[1]!,
      code: 'loose-end' as const,
      severity: 'warning' as const,
      members: [globalId],
      at: [0, k, 0] as [number, number, number],
      place: `A/${k}`,
    }));
    const all = groupFindings({ ...result, findings: loose });
    const mended = groupFindings({ ...result, findings: loose.slice(1) });
    expect(all.map(({ findings }) => findings.length)).toEqual([4]);
    expect(mended[0]!.guid).toBe(all[0]!.guid);
    expect(makeTopics({ ...result, findings: loose }, DATE)[0]!.views).toHaveLength(4);
  });

  it('are one for findings of the same members', () => {
    const result = faultyResult();
    const [, lone] = result.findings;
    const cases = ['dead', 'snow'].map((name) => ({
      ...lone!,
      code: 'load-moves-it' as const,
      message: `${name} moves it.`,
    }));
    const [topic, ...more] = makeTopics({ ...result, findings: cases }, DATE);
    expect(more).toEqual([]);
    for (const name of ['dead', 'snow']) expect(topic!.description).toContain(`${name} moves it.`);
    expect(topic!.views).toHaveLength(1);
  });
});

const bcfChecker = checker('check_bcf.py');
const folder = temporaryFolder();

describe.skipIf(bcfChecker === null)('an independent checker finds nothing wrong with the topics of', () => {
  it('the demo hall with faults', async () => {
    const model = fixture('boat-hall-faults.ifc');
    const { result } = await runModel(readFileSync(model), { fileName: 'boat-hall-faults.ifc', extent: 'survey' });
    checkBothVersions(bcfChecker!, folder, someFindings(result, 4), model);
  });
});
