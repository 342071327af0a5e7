import { describe, expect, it } from 'vitest';
import type { Result } from '../../src/domain/result.ts';
import { millimetres } from '../../src/domain/words.ts';
import { columns, kilonewtons, wrapped } from '../../src/exporter/summary/layout.ts';
import { summarise } from '../../src/exporter/summary.ts';
import { someResult } from './support.ts';

const MANY = Array.from({ length: 30 }, (_, k) => `${'0'.repeat(20)}${k + 10}`);

const flat = (text: string) => text.replace(/\s+/g, ' ');

function busyResult(): Result {
  const result = someResult(MANY);
  for (let k = 0; k < 12; k++) {
    result.findings.push({ ...result.findings[0]!, place: `D/${k}`, message: `Post ${k} does not meet the chord.` });
  }
  result.members[3]!.class = 'IfcColumn';
  result.members[4]!.section = null;
  return result;
}

describe('the summary', () => {
  const text = summarise(busyResult(), { extras: { elementCount: 31, mass: 24_300 } });

  it('keeps to 80 columns and ends in one line feed', () => {
    for (const line of text.split('\n')) expect([...line].length).toBeLessThanOrEqual(80);
    expect(text).toMatch(/[^\n]\n$/);
    expect(text).not.toMatch(/[ \t]\n/);
  });

  it('says what was read, by class and by kind of section', () => {
    expect(text).toContain('30 members of 31 elements: 29 IfcBeam, 1 IfcColumn');
    expect(text).toContain('sections: 29 circular hollow, 1 unknown');
    expect(text).toContain('24.3 t between the nodes');
  });

  it('says what was joined and how far axes were moved', () => {
    expect(text).toContain('75 nodes, 45 bars');
    expect(text).toContain('axes moved at most 12 mm (12 mm in the mean), turned at most 0.06 deg');
  });

  it('tells the first few findings of a code with place and gap, and counts the rest', () => {
    expect(text).toContain('Found    15 errors, 1 warning, no notes');
    expect(text).toContain('error    near-miss, 15 times');
    expect(text).toContain('C/4, +6.20: The end of "Chord 0" stops 32 mm short');
    expect(text).toContain('- and 12 more');
    expect(summarise(busyResult(), { findingsOfACode: 4 })).toContain('D/0, 32 mm: Post 0 does not meet the chord.');
  });

  it('says whether it stands, with the counts', () => {
    expect(flat(text)).toContain('It stands: no mechanism, no state of self-stress (statically determinate).');
    expect(text).toMatch(/75 nodes, 45 bars, 90 restraints, rank 45, gap in the spectrum 1e\+9/);
  });

  it('lists cases with load sum and imbalance, and the combinations by limit', () => {
    expect(text).toMatch(/ {2}dead +permanent +0\.00 +0\.00 +-1\.00 +1e-13\n/);
    expect(text).toContain('2 combinations: 2 strength');
  });

  it('says what the area loads cover, once for those that cover the same', () => {
    const coverage = ['snow', 'wind'].map((name) => ({ case: name, area: 888.04, planArea: 864 }));
    const covered = summarise(busyResult(), { extras: { coverage } });
    expect(covered).toContain('  area loads (snow, wind) cover 888.0 m2 (864.0 m2 in plan)\n');
  });

  it('names each combination that governs in full, once, below the bars', () => {
    const result = busyResult();
    const [first] = result.combinations;
    const terms = Object.entries(first!.factors)
      .map(([name, factor]) => `${factor} ${name}`)
      .join(' + ');
    expect(flat(summarise(result)).split(`${first!.name} = ${terms}`)).toHaveLength(2);
  });

  it('begins the worst bars with the worst', () => {
    const result = busyResult();
    const greatest = Math.max(
      ...result.envelope.map(({ tension, compression }) => Math.max(tension?.force ?? 0, -(compression?.force ?? 0))),
    );
    const after = text.slice(text.indexOf('Worst bars, kN (strength and accidental combinations)')).split('\n');
    expect(after[2]).toContain((greatest / 1000).toFixed(1));
    expect(after[12]).toBe('  and 35 more bars');
  });

  it('gives the reactions as what the supports bear', () => {
    expect(text).toMatch(/n1 +C\/4, \+6\.20 +-?\d+\.\d +-?\d+\.\d +1\.35 +0\.50 +0\.10\n/);
    expect(text).toContain('and 20 more supports');
  });

  it('ends with the caution, wrapped', () => {
    expect(text.replaceAll('\n', ' ')).toContain(busyResult().caution);
  });

  it('has neither loads nor forces in a survey', () => {
    const survey = summarise(someResult(MANY, { withCases: false }));
    for (const word of ['Load cases', 'Worst bars', 'Reactions']) expect(survey).not.toContain(word);
    for (const word of ['Read', 'Joined', 'Found', 'Stands']) expect(survey).toContain(word);
  });

  it('says that results of cases are unfactored', () => {
    const plain = summarise(someResult(MANY, { withCombinations: false }));
    expect(plain).toContain('Worst bars, kN (unfactored, case by case)');
    expect(plain).toContain('Reactions, kN (unfactored, case by case)');
  });

  it('says why a case is refused', () => {
    const result = busyResult();
    result.cases[1]!.refused = 'it works on mode 1, node n7 moving sideways';
    const refused = summarise(result);
    expect(refused).toMatch(/wind ünder .*refused\n/);
    expect(refused).toContain('refused (wind ünder): it works on mode 1, node n7 moving sideways');
    expect(refused).toContain('1 of 2 load cases cannot be carried.');
  });

  it('tells the modes in words and that a count is not certain', () => {
    const result = busyResult();
    const mode = (words: string): Result['stability']['modes'][number] => ({
      kind: 'local',
      nodes: ['n1'],
      movement: [[0, 1, 0]],
      order: 'finite',
      words,
      remedy: [],
    });
    const modes = Array.from({ length: 7 }, (_, k) => mode(`Node n${k} moves sideways.`));
    result.stability = { ...result.stability, mechanisms: 9, gap: null, modes, modesOmitted: 2 };
    const moving = summarise(result);
    expect(flat(moving)).toContain(
      'moves freely in 9 independent ways; no state of self-stress. The stiffness spectrum shows no clear gap',
    );
    expect(moving).toContain('- Node n4 moves sideways.');
    expect(moving).not.toContain('Node n5');
    expect(moving).toContain('- and 4 more');
  });

  it('judges a free body by what it does within itself', () => {
    const result = someResult(MANY, { withCases: false });
    const whole = { kind: 'whole' as const, nodes: [], movement: [], order: 'finite' as const, words: 'x', remedy: [] };
    result.stability = { ...result.stability, freeBody: true, mechanisms: 6, modes: Array(6).fill(whole) };
    expect(summarise(result)).toContain('keeps its shape');
    result.stability.mechanisms = 7;
    result.stability.modes.push({ ...whole, kind: 'local', words: 'Node n2 swings.' });
    const swings = summarise(result);
    expect(flat(swings)).toContain('moves within itself in 1 way');
    expect(swings).toContain('- Node n2 swings.');
  });

  it('survives an empty result', () => {
    const result = { ...someResult([]), findings: [], envelope: [] };
    expect(summarise(result)).toContain('There is no truss to judge: no bar was found.');
  });

  it('passes on no control characters of a model', () => {
    const result = busyResult();
    result.model.file = 'roof\u001b[31m\n.ifc';
    result.bars[0]!.name = 'C1\u0007\u202e';
    result.findings[0]!.message = 'one\r\ntwo\u009b2J';
    const shown = summarise(result, { bars: 100 });
    expect(shown).not.toMatch(/(?!\n)[\p{Cc}\u202e]/u);
    for (const line of shown.split('\n')) expect([...line].length).toBeLessThanOrEqual(80);
  });
});

describe('the layout', () => {
  it('aligns numbers to the right and words to the left, and shortens words only', () => {
    const table = columns(
      [
        { head: 'bar', align: 'left', most: 5 },
        { head: 'kN', align: 'right' },
      ],
      [
        ['a long name', '1234567.8'],
        ['b', '-1.0'],
      ],
    );
    expect(table).toEqual(['  bar           kN', '  a lo…  1234567.8', '  b           -1.0']);
  });

  it('writes forces with as many decimals as the greatest deserves', () => {
    expect([1234_000, 5000, null].map(kilonewtons([1234_000]))).toEqual(['1234', '5', '-']);
    expect([12_340, -40].map(kilonewtons([12_340]))).toEqual(['12.3', '0.0']);
    expect([120, 5].map(kilonewtons([120]))).toEqual(['0.120', '0.005']);
  });

  it('writes lengths in whole millimetres from 10 mm on', () => {
    expect([0.0321, 0.0034, 0].map(millimetres)).toEqual(['32 mm', '3.4 mm', '0 mm']);
  });

  it('breaks lines between words and lets a word that is too long stand', () => {
    expect(wrapped('one two three four', 9, '- ', '  ')).toEqual(['- one two', '  three', '  four']);
    expect(wrapped('incomprehensible', 5, '- ')).toEqual(['- incomprehensible']);
  });
});

describe('members by section and material', () => {
  const kind = (i: number, inScope: number) => ({
    class: 'IfcBuildingElementProxy',
    section: i === 0 ? null : `A section with a very long name ${i}`,
    material: `Some material ${i}`,
    count: 1000 + i,
    inScope,
    length: 123_456.7,
  });
  const kinds = Array.from({ length: 15 }, (_, i) => kind(i, i === 0 ? 7 : 0));
  const text = summarise(busyResult(), { extras: { kinds } });

  it('are told a row a kind, at most twelve, within 80 columns', () => {
    expect(text).toContain('Members by section and material');
    expect(text).toContain('  and 3 more, 3039 members');
    for (const line of text.split('\n')) expect([...line].length).toBeLessThanOrEqual(80);
    expect(flat(text)).toContain('1000 7 IfcBuildingEleme… no section Some material… 123456.7');
    expect(flat(text)).toContain('1001 - IfcBuildingEleme…');
  });

  it('are left out where nobody counted them', () => {
    expect(summarise(busyResult())).not.toContain('Members by section');
  });
});
