import { execFileSync } from 'node:child_process';
import { readFileSync } from 'node:fs';
import { join } from 'node:path';
import { fileURLToPath } from 'node:url';
import fc from 'fast-check';
import { beforeAll, describe, expect, it, vi } from 'vitest';
import { InstanceTable } from '../../src/step/instance-table.ts';
import { PlainIndex } from '../../src/step/plain-index.ts';
import { openStepWith, type StepFile } from '../../src/step/step-file.ts';
import { fixture, PUBLIC_STEP_MODELS, publicModel } from '../support/shared.ts';
import { temporaryFolder } from '../support/temporary-folder.ts';

const script = fileURLToPath(new URL('../../scripts/build-kernel.mjs', import.meta.url));

let kernel: PlainIndex;
beforeAll(() => {
  const out = join(temporaryFolder(), 'plain-index.wasm');
  execFileSync(process.execPath, [script, out]);
  kernel = new PlainIndex(readFileSync(out));
});

/** What an index tells, or why there is none. */
function told(bytes: Uint8Array, plain: PlainIndex | null): unknown {
  let file: StepFile;
  try {
    file = openStepWith(bytes, plain);
  } catch (problem) {
    return String(problem);
  }
  const ids = [...file.ids()];
  return {
    ids,
    types: ids.map((id) => file.typeOf(id)),
    maxId: file.maxId,
    problems: file.problems,
    // Where each list opens shows in what is read there.
    firsts: ids.map((id) => file.valueAt(id, 0)),
    byType: file.types().map((type) => [type, file.idsOf(type)]),
    insertAt: file.insertAt,
    block: file.block === null ? null : [file.block.begin, file.block.end, [...file.block.instances.ids()]],
  };
}

const expectSame = (bytes: Uint8Array) => expect(told(bytes, kernel)).toEqual(told(bytes, null));

const fileOf = (data: string): Buffer =>
  Buffer.from(`ISO-10303-21;HEADER;FILE_SCHEMA(('IFC4'));ENDSEC;DATA;\n${data}\nENDSEC;END-ISO-10303-21;`, 'latin1');

describe('the index made with the kernel', () => {
  for (const name of ['boat-hall-a.ifc', 'boat-hall-faults.ifc']) {
    it(`is that of the scanner alone for ${name}`, () => expectSame(readFileSync(fixture(name))));
  }
  for (const name of PUBLIC_STEP_MODELS) {
    const path = publicModel(name);
    it.skipIf(path === null)(`is that of the scanner alone for the public model ${name}`, () =>
      expectSame(readFileSync(path!)),
    );
  }

  it('is made by the kernel but for the first of each keyword and the last few instances', () => {
    const lines = Array.from({ length: 5000 }, (_, i) => `#${i + 1}=IFCDIRECTION((0.,${i}.,1.));`).join('\n');
    const bytes = fileOf(lines);
    const added = vi.spyOn(InstanceTable.prototype, 'addAll');
    openStepWith(bytes, kernel);
    expect(added.mock.calls.reduce((sum, [, , , count]) => sum + count, 0)).toBeGreaterThan(4990);
    added.mockRestore();
  });

  it('holds where instances, texts and lists cross the end of a window or are longer than one', () => {
    const filler = Array.from(
      { length: 9000 },
      (_, i) => `#${i + 10}=IFCLABEL('text ${i}; with (brackets) = ''q''');\n`,
    );
    const refs = Array.from({ length: 60_000 }, (_, i) => `#${i + 10}`).join(',');
    const long = `#5=IFCRELATION('x',(${refs}),#10);\n#6=IFCTEXT('${'y'.repeat(300_000)}');\n`;
    for (const shift of [0, 1, 7, 31]) {
      expectSame(fileOf(`${' '.repeat(shift)}${filler.join('')}${long}${filler.join('').replaceAll('#', '#9')}`));
    }
  });

  it('holds for two files read one after the other', () => {
    expectSame(fileOf('#1=A();\n#2=BB(#1);\n'.repeat(40)));
    expectSame(fileOf('#1=BB();\n#2=A(#1);\n'.repeat(40)));
  });

  it('holds for whatever stands in a file', () => {
    const piece = fc.constantFrom(
      ...[
        '#1=A();',
        '#22=IFCWALL(#1,$);',
        "#3=B('x');",
        "#4=B('it''s');",
        "#5=B('\\S\\'');",
        "#6=B('\\X2\\00E4\\X0\\');",
      ],
      ...[
        '#7 = C(1.);',
        '#8= C (1.);',
        '#9=C(1.) ;',
        '#10=c(2.);',
        '#11=(A()B());',
        '#12=A()',
        '#13=A(;',
        '#14=A(1=2);',
      ],
      ...['/* note */', '#15=A(/* ) */);', '#16=A(1/2);', "#17=B('/* no comment */');", '#4294967296=A();', '#=A();'],
      ...['# 1=A();', '#18=();', '#19=A', 'A();', ';', "'", "#20=B('open);", '#0=A();', '#007=A();', '#21=A("0F");'],
      ...['ENDSEC;\nDATA;', '/* Pinwright results: begin */', '/* Pinwright results: end */', '\n', '\r\n', ' ', '\t'],
      ...['#23=LONGKEYWORDTHATGOESONFORMORETHANSIXTEENLETTERS((((#1))));', '#24=A1_B(.T.);', '#25=!USER(1);', '('],
    );
    const usual = fc.constantFrom(
      '#30=A();\n',
      "#31=IFCBEAM('g',$,'name',#1,.BEAM.);\n",
      '#32=IFCPOINT((0.,1.,2.));\n',
    );
    fc.assert(
      fc.property(fc.array(fc.oneof({ arbitrary: usual, weight: 3 }, piece), { maxLength: 40 }), (pieces) => {
        expectSame(fileOf(pieces.join('')));
        // So long that nothing lies close to the window's end, where the kernel stops early.
        expectSame(fileOf(`${pieces.join('')}\n${'#99=A();\n'.repeat(40)}`));
      }),
      { numRuns: 1500 },
    );
  });
});
