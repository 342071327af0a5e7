import { readdirSync, readFileSync } from 'node:fs';
import { dirname, join } from 'node:path';
import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import { ModelError } from '../../src/domain/errors.ts';
import { withBlock, withoutBlock } from '../../src/step/splice.ts';
import { openStep } from '../../src/step/step-file.ts';
import { publicModel } from '../support/shared.ts';
import { bytesOf, fileWith, HEAD, open, TAIL, textOf } from './support.ts';

const LINES = ["#101=IFCX('one');", "#102=IFCX('/* Pinwright results: end */');"];
const BEGIN = '/* Pinwright results: begin */';
const END = '/* Pinwright results: end */';

function annotated(text: string, lines: readonly string[] = LINES): string {
  return textOf(withBlock(openStep(bytesOf(text)), lines));
}

function cleaned(text: string): string {
  return textOf(withoutBlock(openStep(bytesOf(text))));
}

describe('a block', () => {
  test('stands right before the last ENDSEC in lines of its own', () => {
    expect(annotated(fileWith('#1=IFCA(1);'))).toBe(
      fileWith(`#1=IFCA(1);\n${BEGIN}\n${LINES[0]}\n${LINES[1]}\n${END}`),
    );
  });

  test('is not read as part of the model, and read apart', () => {
    const file = openStep(bytesOf(annotated(fileWith('#1=IFCA(1);'))));
    expect([[...file.ids()], file.maxId, file.problems]).toEqual([[1], 1, []]);
    expect([...(file.block?.instances.ids() ?? [])]).toEqual([101, 102]);
    expect(file.block?.instances.args(102)).toEqual([END]);
    expect(open('#1=IFCA(1);').block).toBeNull();
  });

  test('begins and ends only at comments of its own, not in texts or other comments', () => {
    const text = fileWith(`#1=IFCA('${BEGIN}');\n/* see ${BEGIN.slice(2)}\n/* ${END.slice(3)}\n#2=IFCA('${END}');`);
    const file = openStep(bytesOf(text));
    expect([[...file.ids()], file.block]).toEqual([[1, 2], null]);
    expect(cleaned(annotated(text))).toBe(text);
  });

  test('is found where another program has put instances after it', () => {
    const text = annotated(fileWith('#1=IFCA(1);')).replace(`${END}\n`, `${END}\n#2=IFCB(2);\n`);
    const file = openStep(bytesOf(text));
    expect([...file.ids()]).toEqual([1, 2]);
    expect(cleaned(text)).toBe(fileWith('#1=IFCA(1);\n#2=IFCB(2);'));
    expect(annotated(text)).toBe(annotated(fileWith('#1=IFCA(1);\n#2=IFCB(2);')));
  });

  test('that is open, doubled or cut is refused', () => {
    for (const data of [`${BEGIN}\n#5=IFCX();`, `${BEGIN}\n${END}\n${BEGIN}\n${END}`, `${BEGIN}\n${BEGIN}\n${END}`]) {
      expect(() => open(data)).toThrow(ModelError);
    }
  });

  test('holds printable ASCII only', () => {
    expect(() => annotated(fileWith(''), ["#1=IFCX('ä');"])).toThrow(RangeError);
    expect(() => annotated(fileWith(''), ['#1=IFCX();\n'])).toThrow(RangeError);
  });

  test('leaves the original bytes untouched in memory', () => {
    const bytes = bytesOf(fileWith('#1=IFCA(1);'));
    const [first] = withBlock(openStep(bytes), LINES);
    expect(first?.buffer).toBe(bytes.buffer);
    expect(Buffer.from(bytes).toString('latin1')).toBe(fileWith('#1=IFCA(1);'));
  });

  test('of many lines is streamed in pieces', () => {
    const lines = Array.from({ length: 20_000 }, (_, i) => `#${i + 10}=IFCX(${i});`);
    const chunks = [...withBlock(open('#1=IFCA(1);'), lines)];
    expect(chunks.length).toBeGreaterThan(4);
    expect(openStep(Buffer.concat(chunks)).block?.instances.size).toBe(20_000);
  });
});

describe('adding twice is adding once, and taking out gives the file back byte for byte', () => {
  const plain = fileWith('#1=IFCA(1);\n#2=IFCB(#1);');
  const cases: [string, string][] = [
    ['line feeds', plain],
    ['carriage returns and line feeds', plain.replaceAll('\n', '\r\n')],
    ['carriage returns', plain.replaceAll('\n', '\r')],
    ['no line ends at all', plain.replaceAll('\n', '')],
    ['a line end only after ENDSEC', `${plain.replaceAll('\n', '')}\r\n`],
    ['ENDSEC on the line of the last instance', plain.replace('\nENDSEC;\nEND', 'ENDSEC;\nEND')],
    ['ENDSEC indented', plain.replace('\nENDSEC;\nEND', '\n\t  ENDSEC ;\nEND')],
    ['blank lines and a comment before ENDSEC', plain.replace('\nENDSEC;\nEND', '\n\n/* end */ \n\nENDSEC;\nEND')],
    ['no trailing line end', plain.trimEnd()],
    ['no semicolon after the last instance', plain.replace('#2=IFCB(#1);', '#2=IFCB(#1)')],
    ['an unfinished last instance', plain.replace('#2=IFCB(#1);', '#2=IFCB((#1)')],
    ['a last instance without parameters', plain.replace('#2=IFCB(#1);', '#2=IFCB')],
    ['a last instance that is only a number', plain.replace('#2=IFCB(#1);', '#2')],
    ['text that is no instance before ENDSEC', plain.replace('#2=IFCB(#1);', 'remark')],
    ['an empty DATA section', fileWith('')],
    ['several DATA sections', `${HEAD}DATA;\n#1=IFCA(1);\nENDSEC;\nDATA;\n#2=IFCA(2);\n${TAIL}`],
    ['a byte order mark and high bytes', `\xef\xbb\xbf${plain.replace('(1)', "('Tr\xe4ger\r')")}`],
  ];

  test.each(cases)('%s', (_, text) => {
    const once = annotated(text);
    expect(once).not.toBe(text);
    expect(annotated(once)).toBe(once);
    expect(annotated(once, ['#200=IFCZ();'])).toBe(annotated(text, ['#200=IFCZ();']));
    expect(cleaned(once)).toBe(text);
    expect(cleaned(text)).toBe(text);
    expect(cleaned(annotated(text, []))).toBe(text);
  });

  test('whatever stands in the DATA section', () => {
    const piece = fc.constantFrom(
      '#1',
      '=',
      'IFCX',
      '(',
      ')',
      ';',
      '1',
      "'a'",
      "''",
      '\n',
      '\r\n',
      ' ',
      '/* c */',
      '/',
      '*',
      'ENDSEC ;',
      ',',
      '#',
      BEGIN,
      END,
    );
    fc.assert(
      fc.property(fc.array(piece, { maxLength: 25 }), (pieces) => {
        const text = `${HEAD}DATA;${pieces.join('')}ENDSEC;${TAIL}`;
        const original = openOrNull(text);
        if (original === null || original.block !== null) return;
        const once = annotated(text);
        expect(openOrNull(once)?.block).not.toBeNull();
        expect(annotated(once)).toBe(once);
        expect(cleaned(once)).toBe(text);
        expect(openStep(bytesOf(once)).problems).toEqual(original.problems);
      }),
      { numRuns: 5000 },
    );
  });

  function openOrNull(text: string) {
    try {
      return openStep(bytesOf(text));
    } catch (error) {
      if (error instanceof ModelError) return null;
      throw error;
    }
  }
});

const gridshell = publicModel('gridshell-roof.ifc');
describe.skipIf(gridshell === null)('the public models', () => {
  const folder = dirname(gridshell ?? '');
  const names = gridshell === null ? [] : readdirSync(folder).filter((name) => name.endsWith('.ifc'));

  test.each(names)('%s takes a block and gives it back', (name) => {
    const original = readFileSync(join(folder, name));
    const file = openStep(original);
    const once = Buffer.concat([...withBlock(file, LINES)]);
    const again = openStep(once);
    expect(again.size).toBe(file.size);
    expect(Buffer.concat([...withBlock(again, LINES)]).equals(once)).toBe(true);
    expect(Buffer.concat([...withoutBlock(again)]).equals(original)).toBe(true);
    for (const id of again.ids()) again.args(id);
    expect(again.problems.map((problem) => problem.kind)).toEqual(
      name === 'large-id.ifc' ? ['unreadable-element'] : [],
    );
  });
});
