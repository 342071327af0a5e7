import { readFileSync, writeFileSync } from 'node:fs';
import { join } from 'node:path';
import { strFromU8, strToU8, unzipSync, zipSync } from 'fflate';
import { describe, expect, it } from 'vitest';
import { readBcf } from '../../src/bcf/read-bcf.ts';
import { withReplies } from '../../src/bcf/with-replies.ts';
import { writeBcf } from '../../src/bcf/write-bcf.ts';
import { RequestError } from '../../src/domain/errors.ts';
import { type Result, resultSchema } from '../../src/domain/result.ts';
import { summarise } from '../../src/exporter/summary.ts';
import { zipOf } from '../importer/files/support/zip.ts';
import { pinwright } from '../support/run-cli.ts';
import { fixture } from '../support/shared.ts';
import { temporaryFolder } from '../support/temporary-folder.ts';
import { faultyResult, filesOf, IDS, markupsOf } from './support.ts';

/** A BCF as another program would send it back: the texts of its topics changed. */
function edited(bytes: Uint8Array, change: (markup: string) => string): Uint8Array {
  const files = Object.entries(unzipSync(bytes)).map(([name, content]) => [
    name,
    name.endsWith('markup.bcf') ? strToU8(change(strFromU8(content))) : content,
  ]);
  return zipSync(Object.fromEntries(files) as Record<string, Uint8Array>);
}

const COMMENT =
  '<Comment Guid="11111111-2222-4333-8444-555555555555"><Date>2024-04-01T08:00:00Z</Date><Author>a@quay.example</Author><Comment>Will be &lt;moved&gt;.</Comment></Comment>';

const answered = (version: '2.1' | '3.0', status = 'Closed') =>
  edited(writeBcf(faultyResult(), { version }), (markup) => {
    if (!markup.includes('near-miss')) return markup;
    const said = markup
      .replace('TopicStatus="Open"', `TopicStatus="${status}"`)
      .replace('<Description>', '<AssignedTo>b@quay.example</AssignedTo><Description>');
    return version === '3.0'
      ? said.replace('<Viewpoints>', `<Comments>${COMMENT}</Comments><Viewpoints>`)
      : said.replace('</Topic>', `</Topic>${COMMENT}`);
  });

describe.each(['3.0', '2.1'] as const)('topics that came back as BCF %s', (version) => {
  it('stand beside the findings', async () => {
    const replied = withReplies(faultyResult(), await readBcf(answered(version, 'In progress')), 'back.bcf');
    expect(replied.findings[0]!.reply).toMatchObject({
      by: 'guid',
      status: 'In progress',
      closed: false,
      assignedTo: 'b@quay.example',
      comments: [{ author: 'a@quay.example', date: '2024-04-01T08:00:00Z', text: 'Will be <moved>.' }],
    });
    expect(replied.replies).toMatchObject({ topics: 3, matched: 3, others: 0, unreadable: 0, gone: [] });
    expect(() => resultSchema.parse(replied)).not.toThrow();
    const summary = summarise(replied, { width: 300 });
    expect(summary).toContain('Reply: In progress, assigned to b@quay.example. a@quay.example wrote: Will be <moved>.');
  });

  it('are told and opened again where they were closed though the fault stands', async () => {
    const returned = await readBcf(answered(version));
    const summary = summarise(withReplies(faultyResult(), returned, 'back.bcf'), { width: 300 });
    expect(summary).toContain('came back as Closed, but the finding stands');
    const next = writeBcf(faultyResult(), { version, replies: returned });
    const text = [...filesOf(next).values()].find((file) => file.includes('Will be &lt;moved&gt;'))!;
    expect(text).toContain('TopicStatus="Open"');
    expect(text).toContain('The finding still stands in roof.ifc.');
    expect(text).toContain('b@quay.example');
    // Writing it again over its own answer says nothing twice.
    const again = writeBcf(faultyResult(), { version, replies: await readBcf(next) });
    expect([...filesOf(again).values()].join('').split('still stands').length).toBe(2);
  });

  it('are offered as closed where the finding is gone', async () => {
    const returned = await readBcf(answered(version, 'Open'));
    const mended: Result = { ...faultyResult(), findings: faultyResult().findings.slice(1) };
    const replied = withReplies(mended, returned, 'back.bcf');
    expect(replied.replies!.gone.map(({ title }) => title)).toEqual([expect.stringContaining('misses C1')]);
    const markups = [...markupsOf(writeBcf(mended, { version, replies: returned })).values()];
    const closed = markups.filter(({ Topic }) => Topic['@TopicStatus'] === 'Closed');
    expect(closed).toHaveLength(1);
    expect(JSON.stringify(closed)).toContain('The finding is gone in roof.ifc.');
  });
});

describe('a returned topic', () => {
  it('is found again by its members when its id has changed, and by code and place when the GlobalIds have', async () => {
    const returned = await readBcf(answered('3.0', 'Open'));
    const result = faultyResult();
    const [miss] = result.findings;
    const grown = { ...result, findings: [{ ...miss!, members: [...miss!.members, IDS[3]] }] };
    expect(withReplies(grown, returned, 'x').findings[0]!.reply).toMatchObject({ by: 'members' });
    const renewed = { ...result, findings: [{ ...miss!, members: ['3zzzzzzzzzzzzzzzzzzzzz'] }] };
    expect(withReplies(renewed, returned, 'x').findings[0]!.reply).toMatchObject({ by: 'place' });
  });

  it('of another model or by somebody else is neither matched nor closed', async () => {
    const foreign = edited(answered('3.0', 'Open'), (markup) =>
      markup.replace(/IfcProject="[^"]*"/, 'IfcProject="2other00000000000000000"'),
    );
    const empty: Result = { ...faultyResult(), findings: [] };
    expect(withReplies(empty, await readBcf(foreign), 'x').replies).toMatchObject({ gone: [], others: 3 });
    const theirs = edited(answered('3.0', 'Open'), (markup) => markup.replaceAll('Pinwright', 'Somebody'));
    expect(withReplies(empty, await readBcf(theirs), 'x').replies).toMatchObject({ gone: [], others: 3 });
  });

  it('about loads is not gone because a survey has none', async () => {
    const result = faultyResult();
    const moved = { ...result, findings: [{ ...result.findings[1]!, code: 'load-moves-it' as const }] };
    const returned = await readBcf(writeBcf(moved));
    const survey: Result = { ...result, findings: [], cases: [], combinations: [] };
    expect(withReplies(survey, returned, 'x').replies!.gone).toEqual([]);
    expect(withReplies({ ...result, findings: [] }, returned, 'x').replies!.gone).toHaveLength(1);
  });
});

describe('a BCF file of others', () => {
  const topic = (inside: string, guid = 'aaaaaaaa-bbbb-4ccc-8ddd-eeeeeeeeeeee') =>
    ({ name: `${guid}/markup.bcf`, content: `<?xml version="1.0"?><Markup>${inside}</Markup>` }) as const;

  it('is read with parts missing, in the oldest form, with ids in capitals and braces', async () => {
    const bytes = zipOf([
      topic(
        '<Topic Guid="{AAAAAAAA-BBBB-4CCC-8DDD-EEEEEEEEEEEE}"><Title>Old</Title></Topic><Comment Guid="x"><Status>Error</Status><Comment>Hm</Comment></Comment>',
      ),
      topic('<Topic/>', 'bbbbbbbb-bbbb-4ccc-8ddd-eeeeeeeeeeee'),
      topic('', 'cccccccc-bbbb-4ccc-8ddd-eeeeeeeeeeee'),
      { name: 'not-a-guid/markup.bcf', content: '<Markup><Topic/></Markup>' },
      { name: 'dddddddd-bbbb-4ccc-8ddd-eeeeeeeeeeee/markup.bcf', content: '<Markup><Topic' },
    ]);
    const { topics, unreadable, version } = await readBcf(bytes);
    expect(version).toBeNull();
    expect(unreadable).toBe(3);
    expect(topics.map(({ title, status, comments }) => [title, status, comments.length])).toEqual([
      ['Old', 'Error', 1],
      ['', '', 0],
    ]);
    const replied = withReplies(faultyResult(), await readBcf(bytes), 'x');
    expect(replied.replies).toMatchObject({ matched: 0, others: 2, gone: [] });
    expect(() => writeBcf(faultyResult(), { replies: { topics, unreadable, version } })).not.toThrow();
  });

  it('expands no entities', async () => {
    const bomb =
      '<!DOCTYPE x [<!ENTITY a "aaaa"><!ENTITY b "&a;&a;">]><Markup><Topic><Title>&b;</Title></Topic></Markup>';
    const { topics, unreadable } = await readBcf(
      zipOf([{ name: 'aaaaaaaa-bbbb-4ccc-8ddd-eeeeeeeeeeee/markup.bcf', content: bomb }]),
    );
    expect([topics.length, unreadable]).toEqual([0, 1]);
  });

  it('that would unpack to far too much is refused or passed over', async () => {
    const large = topic(`<Topic><Title>${'a'.repeat(3_000_000)}</Title></Topic>`);
    expect((await readBcf(zipOf([large]))).unreadable).toBe(1);
    await expect(readBcf(zipOf([large]), { largestTogether: 1000 })).rejects.toThrow(RequestError);
    const deep = topic(`<Topic>${'<a>'.repeat(300)}${'</a>'.repeat(300)}</Topic>`);
    expect((await readBcf(zipOf([deep]))).unreadable).toBe(1);
  });

  it('that is none is refused in words', async () => {
    await expect(readBcf(Buffer.from('hello'))).rejects.toThrow(/no BCF file/);
    await expect(readBcf(zipOf([{ name: 'readme.txt', content: 'x' }]))).rejects.toThrow(/no topics/);
    const whole = Buffer.from(answered('3.0'));
    await expect(readBcf(whole.subarray(0, whole.length - 30))).rejects.toThrow(RequestError);
  });

  it('gives an answer or a RequestError when any of its bytes are changed', async () => {
    const whole = Buffer.from(answered('3.0'));
    for (let k = 0; k < 150; k++) {
      const broken = Buffer.from(whole);
      broken[(k * 7919) % whole.length] ^= 1 + (k % 255);
      await readBcf(broken).catch((error: unknown) => expect(error).toBeInstanceOf(RequestError));
    }
  });
});

describe('the command', () => {
  const folder = temporaryFolder();
  const at = (name: string) => join(folder, name);
  const survey = (...more: string[]) =>
    pinwright(['survey', fixture('boat-hall-faults.ifc'), '--brief', fixture('boat-hall.yaml'), ...more]);

  it('writes topics of the version asked for and takes them back', () => {
    expect(survey('-o', at('out.bcf'), '--bcf-version', '2.1', '--quiet').code).toBe(1);
    expect(filesOf(readFileSync(at('out.bcf'))).get('bcf.version')).toContain('VersionId="2.1"');
    writeFileSync(
      at('back.bcf'),
      edited(readFileSync(at('out.bcf')), (text) => text.replace('"Open"', '"Closed"')),
    );
    const { stdout } = survey('--replies', at('back.bcf'), '-o', at('next.bcfzip'), '-o', at('r.json'));
    expect(stdout.replace(/\s+/g, ' ')).toContain('came back as Closed, but the finding stands');
    expect(filesOf(readFileSync(at('next.bcfzip'))).get('bcf.version')).toContain('VersionId="3.0"');
    expect(JSON.parse(readFileSync(at('r.json'), 'utf8')).replies.file).toBe('back.bcf');
  });

  it('says in one line what is wrong with a file of replies', () => {
    writeFileSync(at('broken.bcf'), 'no zip');
    for (const name of ['broken.bcf', 'missing.bcf']) {
      const { code, stderr } = survey('--replies', at(name));
      expect(code).toBe(2);
      expect(stderr).toMatch(new RegExp(`^[^\\n]*${name}: [^\\n]+\\n$`));
    }
    expect(survey('--replies', at('broken.bcf'), '-o', at('broken.bcf')).stderr).toContain('is the input itself');
    expect(survey('--bcf-version', '1.0').code).toBe(2);
  });
});
