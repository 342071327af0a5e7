import { describe, expect, test } from 'vitest';
import { ModelError } from '../../src/domain/errors.ts';
import { openStep } from '../../src/step/step-file.ts';
import { bytesOf, fileWith, HEAD, open, TAIL } from './support.ts';

describe('a file whose structure is broken is refused in one sentence', () => {
  test.each([
    ['an empty file', '', /is empty/],
    ['white space', ' \n\n', /white space/],
    ['other text', 'hello world', /not a STEP file/],
    ['UTF-16', '\xff\xfeI\0S\0O\0', /UTF-16/],
    ['no DATA section', `${HEAD}END-ISO-10303-21;`, /no DATA section/],
    ['only the first word', 'ISO-10303-21', /no DATA section/],
    ['a header cut off', HEAD.slice(0, HEAD.indexOf('Modeller')), /text that begins on line 4 is never closed/],
    [
      'an instance cut off',
      `${HEAD}DATA;\n#1=IFCX(1);\n#2=IFCX((1,`,
      /cut off: its DATA section ends after #2 without ENDSEC/,
    ],
    ['instances without ENDSEC', `${HEAD}DATA;\n#1=IFCX(1);\n`, /cut off: .* after #1 /],
    ['the end of the file without ENDSEC', `${HEAD}DATA;\n#1=IFCX(1);\nEND-ISO-10303-21;\n`, /cut off/],
    ['a second DATA section without ENDSEC', `${HEAD}DATA;\nENDSEC;\nDATA;\n#5=IFCX();\n`, /cut off: .* after #5 /],
    ['a new section without ENDSEC', `${HEAD}DATA;\n#5=IFCX();\nDATA;\n${TAIL}`, /cut off/],
    [
      'an unclosed text',
      fileWith("#1=IFCX('a');\n#2=IFCX('b);\n#3=IFCX('c');"),
      /text that begins on line 9 is never closed/,
    ],
    [
      'a comment in data never closed',
      fileWith('#1=IFCX(1);\n/* oops'),
      /comment that opens on line 9 is never closed/,
    ],
    ['a comment in the header never closed', 'ISO-10303-21; /* ', /comment that opens on line 1 /],
  ])('%s', (_, text, message) => {
    const attempt = () => openStep(bytesOf(text));
    expect(attempt).toThrow(ModelError);
    expect(attempt).toThrow(message);
    expect(attempt).not.toThrow(/\n/);
  });
});

describe('what is wrong inside a sound structure is told and the rest is read', () => {
  test('a doubled id: the first stays', () => {
    const file = open("#1=IFCX('first');\n#1=IFCY('second');\n#2=IFCY('other');");
    expect(file.args(1)).toEqual(['first']);
    expect([file.size, file.idsOf('IFCY'), [...file.types()]]).toEqual([2, [2], ['IFCX', 'IFCY']]);
    expect(file.problems).toMatchObject([{ kind: 'doubled-id', id: 1 }]);
  });

  test('a doubled id among sparse ones and over two sections', () => {
    const file = openStep(bytesOf(`${HEAD}DATA;\n#4000000000=IFCX(1);\nENDSEC;\nDATA;\n#4000000000=IFCX(2);\n${TAIL}`));
    expect([file.size, file.args(4000000000)]).toEqual([1, [1]]);
    expect(file.problems).toMatchObject([{ kind: 'doubled-id', id: 4000000000 }]);
  });

  test('a number of 2^32 or more does not overwrite another', () => {
    const file = open('#1=IFCX(1);\n#4294967297=IFCY(2);');
    expect([file.size, file.args(1), file.maxId]).toEqual([1, [1], 1]);
    expect(file.problems).toMatchObject([{ kind: 'unreadable-element', id: 4294967297 }]);
  });

  test.each([
    ['brackets that do not close', '#2=IFCX((1,2);'],
    ['no semicolon and no closing bracket', '#2=IFCX((1,2)'],
    ['no parameters', '#2=IFCX;'],
    ['no type', '#2=;'],
    ['no equals sign', '#2 IFCX(1);'],
    ['text after it', '#2=IFCX(1) junk;'],
    ['a number for a type', '#2=12(1);'],
    ['several types, one unfinished', '#2=(IFCX(1)IFCY);'],
  ])('an instance with %s does not take its neighbours along', (_, line) => {
    const file = open(`#1=IFCA(1);\n${line}\n#3=IFCB(3);`);
    expect([file.args(1), file.args(3)]).toEqual([[1], [3]]);
    expect(file.problems).toMatchObject([{ kind: 'unreadable-element', id: 2 }]);
    expect(file.problems[0]?.message).toContain('line 9');
  });

  test.each(['#2=IFCX((1,2);', '#2=IFCX((1,2)', '#2=IFCX'])(
    'an unfinished last instance (%s) does not take ENDSEC along',
    (line) => {
      const file = open(`#1=IFCA(1);\n${line}`);
      expect(file.args(1)).toEqual([1]);
      expect(file.problems).toMatchObject([{ kind: 'unreadable-element', id: 2 }]);
    },
  );

  test('a missing semicolon hides nothing', () => {
    const file = open('#1=IFCA(1)\n#2=IFCB(2)');
    expect([file.args(1), file.args(2), file.problems]).toEqual([[1], [2], []]);
  });

  test('text that is no instance', () => {
    const file = open('#1=IFCA(1);\nremark\x07 without number;\n# = IFCX();\n#3=IFCB(3);');
    expect([...file.ids()]).toEqual([1, 3]);
    expect(file.problems.map((problem) => [problem.kind, problem.id])).toEqual([
      ['unreadable-element', null],
      ['unreadable-element', null],
    ]);
    for (const problem of file.problems) expect(problem.message).toMatch(/^[\x20-\x7e]*$/);
  });

  test('the list of problems stays bounded in a file of nothing but faults', () => {
    const file = open(
      '#1=IFCX(;\n'.repeat(3).concat(Array.from({ length: 20_000 }, (_, i) => `#${i + 2}=;`).join('\n')),
    );
    expect(file.problems).toHaveLength(10_000);
    expect(file.problemsOmitted).toBeGreaterThan(9_000);
  });

  // Reading on to the end of the file from each of its lines would outlast the runner's patience.
  test('a large file without a single semicolon is refused', () => {
    const lines = '#1=IFCX((1,2\n'.repeat(50_000);
    expect(() => openStep(bytesOf(`${HEAD}DATA;\n${lines}`))).toThrow(/cut off/);
    expect(() => openStep(bytesOf(`${HEAD}DATA;\n${lines.replaceAll('IFCX(', '(IFCX(')}`))).toThrow(/cut off/);
  });
});
