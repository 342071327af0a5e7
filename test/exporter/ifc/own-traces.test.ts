import { describe, expect, it } from 'vitest';
import { joinChunks } from '../../../src/exporter/chunks.ts';
import { annotate, clean } from '../../../src/exporter/ifc/annotate.ts';
import { setTracesAside } from '../../../src/exporter/ifc/own-traces.ts';
import { openStep } from '../../../src/step/step-file.ts';
import { someResult } from '../support.ts';
import { BEAM, COLUMN, model } from './models.ts';

const SCHEMAS = ['IFC2X3', 'IFC4', 'IFC4X3_ADD2'] as const;

const open = (text: string) => openStep(Buffer.from(text, 'latin1'));
const textOf = (bytes: Uint8Array) => Buffer.from(bytes).toString('latin1');
const annotated = (text: string) => textOf(joinChunks(annotate(open(text), someResult([BEAM, COLUMN]))));

/** As a program that reads and writes the whole model leaves it: no comments, other numbers, one instance a line. */
function rewritten(text: string): string {
  return text
    .replace(/^\/\* Pinwright.*\n/gm, '')
    .replace(/#(\d+)(?=[=,)])/g, (_, id: string) => `#${Number(id) + 1000}`)
    .replace(/^#(\d+)=/gm, '#$1= ');
}

describe.each(SCHEMAS)('results in %s that another program has written anew', (schema) => {
  const plain = rewritten(model(schema));
  const stale = rewritten(annotated(model(schema)));

  it('are known without their comments and taken out, and nothing else is', () => {
    const { file, removed, kept } = setTracesAside(open(stale));
    expect(textOf(file.bytes)).toBe(plain);
    expect(removed).toBe(open(stale).size - open(plain).size);
    expect(kept).toBe(0);
  });

  it('are replaced by the next run like a block of ours', () => {
    const { file } = setTracesAside(open(stale));
    expect(textOf(joinChunks(annotate(file, someResult([BEAM, COLUMN]))))).toBe(annotated(plain));
  });

  it('stay where an instance of another refers to them, with what they refer to', () => {
    const set = /#(\d+)= IFCPROPERTYSET\('[^']{22}',[^,]*,'Pinwright_Forces'/.exec(stale)![1];
    const held = stale.replace('ENDSEC;\nEND-', `#9999= IFCRELASSOCIATES('x',$,$,$,(#${set}));\nENDSEC;\nEND-`);
    const { file, kept } = setTracesAside(open(held));
    expect(kept).toBe(1);
    expect(file.has(Number(set))).toBe(true);
    for (const property of file.refsAt(Number(set), 4)) expect(file.has(property)).toBe(true);
    expect(textOf(file.bytes).match(/Pinwright_Forces/g)).toHaveLength(1);
  });
});

describe('what only looks like ours', () => {
  it('stays: a set of one of our names with a GlobalId that we would not have drawn', () => {
    const forged = model('IFC4').replace(
      'ENDSEC;\nEND-',
      "#20=IFCPROPERTYSET('0000000000000000000009',$,'Pinwright_Forces',$,(#21));\n" +
        "#21=IFCPROPERTYSINGLEVALUE('GreatestTension',$,IFCLABEL('none'),$);\n" +
        "#22=IFCRELDEFINESBYPROPERTIES('0000000000000000000008',$,$,$,(#10),#20);\nENDSEC;\nEND-",
    );
    const file = open(forged);
    expect(setTracesAside(file)).toEqual({ file, removed: 0, kept: 0 });
  });

  it('costs nothing but a look where there is nothing: the file itself is given back', () => {
    const file = open(model('IFC4'));
    expect(setTracesAside(file).file).toBe(file);
  });
});

describe('an instance of another that refers into our block', () => {
  const once = annotated(model('IFC4'));
  const target = /#(\d+)=IFCPROPERTYSET\(/.exec(once)![1];
  const holding = once.replace('#13=', `#14=IFCRELASSOCIATES('x',$,'#1 /*',$,(#10,#${target}));\n#13=`);

  it.each([
    ['clean', () => clean(open(holding))],
    ['annotate', () => annotate(open(holding), someResult([BEAM]))],
  ])('stops %s, which would leave it referring to nothing', (_, work) => {
    expect(work).toThrow(`#14, an IFCRELASSOCIATES, refers to #${target} among Pinwright's results`);
  });
});
