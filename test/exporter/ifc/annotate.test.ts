import { execFileSync } from 'node:child_process';
import { mkdtempSync, rmSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { afterAll, describe, expect, it } from 'vitest';
import { joinChunks } from '../../../src/exporter/chunks.ts';
import { annotate, clean } from '../../../src/exporter/ifc/annotate.ts';
import { openStep } from '../../../src/step/step-file.ts';
import { checker } from '../../support/shared.ts';
import { someResult } from '../support.ts';
import { BEAM, COLUMN, model, PROJECT } from './models.ts';

const bytesOf = (text: string) => new Uint8Array(Buffer.from(text, 'latin1'));
const open = (text: string) => openStep(bytesOf(text));
const annotated = (text: string, result = someResult([BEAM, COLUMN])) =>
  Buffer.from(joinChunks(annotate(open(text), result))).toString('latin1');

const SCHEMAS = ['IFC2X3', 'IFC4', 'IFC4X3_ADD2'] as const;

describe.each(SCHEMAS)('a model in %s', (schema) => {
  it('keeps its own bytes and gets one block before its last ENDSEC', () => {
    const before = model(schema);
    const after = annotated(before);
    const at = before.lastIndexOf('ENDSEC;');
    expect(after.startsWith(before.slice(0, at))).toBe(true);
    expect(after.endsWith(before.slice(at))).toBe(true);
    const block = after.slice(at, after.length - (before.length - at));
    expect(block).toMatch(/^\/\* Pinwright results: begin \*\/\n[\s\S]*\n\/\* Pinwright results: end \*\/\n$/);
  });

  it('is the same annotated twice as once, and as it was when the block is taken out', () => {
    const before = model(schema);
    const once = annotated(before);
    expect(annotated(once)).toBe(once);
    expect(Buffer.from(joinChunks(clean(open(once)))).toString('latin1')).toBe(before);
  });

  it.each([
    ['with other line ends', (text: string) => text.replaceAll('\n', '\r\n')],
    ['with all data on one line', (text: string) => text.replaceAll('\n', '')],
    ['with a mark and bytes beyond ASCII', (text: string) => `\xef\xbb\xbf${text.replace('Beam', 'Tr\xe4ger')}`],
  ])('comes back byte for byte %s', (_, changed) => {
    const before = changed(model(schema));
    const once = annotated(before);
    expect(once.length).toBeGreaterThan(before.length);
    expect(annotated(once)).toBe(once);
    expect(Buffer.from(joinChunks(clean(open(once)))).toString('latin1')).toBe(before);
  });

  it('gets the block of the new result in place of the old one', () => {
    const before = model(schema);
    const other = someResult([COLUMN]);
    expect(annotated(annotated(before), other)).toBe(annotated(before, other));
  });

  it('carries the headline values as single values with their unit', () => {
    const result = someResult([BEAM, COLUMN]);
    const after = annotated(model(schema), result);
    const envelope = result.envelope.slice(0, 2);
    const tension = Math.max(...envelope.map((entry) => entry.tension?.force ?? 0));
    const compression = Math.min(...envelope.map((entry) => entry.compression?.force ?? 0));
    const newton = /#(\d+)=IFCSIUNIT\(\*,\.FORCEUNIT\.,\$,\.NEWTON\.\)/.exec(after)![1];
    const single = (name: string) =>
      new RegExp(`IFCPROPERTYSINGLEVALUE\\('${name}',\\$,IFCFORCEMEASURE\\(([^)]*)\\),#${newton}\\)`).exec(after)?.[1];
    expect(Number(single('GreatestTension'))).toBe(tension);
    expect(Number(single('GreatestCompression'))).toBe(compression);
    expect(after).toContain("'NumberOfBars',$,IFCINTEGER(2)");
    expect(after).toContain("'TensionFrom',$,IFCLABEL('");
  });

  it('uses ids above the highest in use, each once', () => {
    const before = model(schema);
    const appended = annotated(before).slice(before.lastIndexOf('ENDSEC;'));
    const ids = [...appended.matchAll(/^#(\d+)=/gm)].map((match) => Number(match[1]));
    expect(ids.length).toBeGreaterThan(10);
    expect(new Set(ids).size).toBe(ids.length);
    expect(Math.min(...ids)).toBe(open(before).maxId + 1);
  });
});

describe('what is appended', () => {
  it('takes a gap where ids above the highest would pass 2^31 - 1', () => {
    const before = model('IFC4').replaceAll('#11=', '#2147483600=').replaceAll('#11)', '#2147483600)');
    const ids = [...annotated(before).matchAll(/^#(\d+)=IFCPROPERTY/gm)].map((match) => Number(match[1]));
    expect(Math.max(...ids)).toBeLessThan(10_000);
    expect(Math.min(...ids)).toBeGreaterThan(10);
  });

  it('does not take a number that a dangling reference of the model names, which would then point at us', () => {
    const dangling = model('IFC4').replace('#13=', "#14=IFCRELASSOCIATES('x',$,$,$,(#10,#77));\n#13=");
    const ids = [...annotated(dangling).matchAll(/^#(\d+)=IFCPROPERTY/gm)].map((match) => Number(match[1]));
    expect(Math.min(...ids)).toBeGreaterThan(77);
  });

  it('draws another GlobalId, always the same, where the model has one already', () => {
    const before = model('IFC4');
    const first = /IFCPROPERTYSET\('([^']{22})',\$,'Pinwright_Forces'/.exec(annotated(before))![1];
    const taken = before.replace('ENDSEC;\nEND', `#900=IFCPROXY('${first}',$,'x',$,$,$,$,.PRODUCT.,$);\nENDSEC;\nEND`);
    expect(taken).not.toBe(before);
    const after = annotated(taken);
    expect(after.split(first)).toHaveLength(2);
    expect(annotated(taken)).toBe(after);
    expect(annotated(after)).toBe(after);
  });

  it('says no force that was not found', () => {
    const result = someResult([BEAM, COLUMN]);
    for (const run of [...result.cases, ...result.combinations]) {
      run.axialForce = result.bars.map(() => null);
      run.reactions = [];
    }
    result.envelope = result.bars.map(({ id }) => ({ bar: id, tension: null, compression: null }));
    const after = annotated(model('IFC4'), result);
    expect(after).not.toContain("IFCPROPERTYSINGLEVALUE('GreatestTension'");
    expect(after).not.toContain('IFCFORCEMEASURE');
    expect(after).toContain("'Note',$,IFCTEXT('No force could be found");
  });

  it('says zero for a bar that is never in tension', () => {
    const result = someResult([BEAM, COLUMN]);
    result.envelope = result.envelope.map((entry) => ({ ...entry, tension: null }));
    expect(annotated(model('IFC4'), result)).toContain("'GreatestTension',$,IFCFORCEMEASURE(0.)");
  });

  it('carries lengths as quantities in metres, whatever the unit of the project', () => {
    const result = someResult([BEAM]);
    const after = annotated(model('IFC4'), result);
    const metre = /#(\d+)=IFCSIUNIT\(\*,\.LENGTHUNIT\.,\$,\.METRE\.\)/.exec(after)![1];
    expect(after).toContain(`IFCQUANTITYLENGTH('AxisAsDrawn',$,#${metre},6.,$)`);
    expect(after).toContain(`IFCQUANTITYLENGTH('LongestBar',$,#${metre},3.,$)`);
    expect(after).toMatch(/IFCELEMENTQUANTITY\('[^']{22}',\$,'Pinwright_Lengths',\$,'Pinwright',\(#/);
    expect(annotated(model('IFC2X3'), result)).toMatch(/IFCQUANTITYLENGTH\('LongestBar',\$,#\d+,3\.\)/);
  });

  it('says what comes to the supports at its ends, and nothing of that on an element that stands on none', () => {
    const result = someResult([BEAM, COLUMN]);
    for (const run of [...result.cases, ...result.combinations]) run.reactions = [];
    result.combinations[0].reactions = [{ node: result.bars[0].from, force: [3000, -4000, 12_000] }];
    result.combinations[0].limit = 'strength';
    const after = annotated(model('IFC4'), result);
    expect(after).toMatch(/'SupportDown',\$,IFCFORCEMEASURE\(12000\.\)/);
    expect(after).toMatch(/'SupportHorizontal',\$,IFCFORCEMEASURE\(5000\.\)/);
    expect(after).toMatch(/'SupportUplift',\$,IFCFORCEMEASURE\(0\.\)/);
    expect(after.match(/IFCPROPERTYSINGLEVALUE\('SupportDown',/g)).toHaveLength(1);
  });

  it('lists the bars in order along the member, whichever way the result has them', () => {
    const result = someResult([BEAM]);
    result.bars.reverse();
    result.envelope.reverse();
    for (const run of [...result.cases, ...result.combinations]) run.axialForce.reverse();
    expect(annotated(model('IFC4'), result)).toContain(
      "IFCPROPERTYLISTVALUE('BarNames',$,(IFCLABEL('C1.1'),IFCLABEL('C1.2'))",
    );
  });

  it('puts the forces of a bar that stands for two elements on both, and says so', () => {
    const result = someResult([BEAM]);
    for (const bar of result.bars) bar.members = [BEAM, COLUMN];
    const after = annotated(model('IFC4'), result);
    expect(after.match(/'Pinwright_Forces',\$,\(#/g)).toHaveLength(2);
    expect(after).toContain(`together with ${COLUMN}.`);
  });

  it('has no force set in a survey, but findings and run', () => {
    const after = annotated(model('IFC4'), someResult([BEAM, COLUMN], { withCases: false }));
    expect(after).not.toContain('Pinwright_Forces');
    expect(after).toContain('Pinwright_Findings');
    expect(after).toContain('Pinwright_Run');
  });

  it('goes onto every element of a doubled GlobalId', () => {
    const doubled = model('IFC4').replace(COLUMN, BEAM);
    const after = annotated(doubled, someResult([BEAM]));
    expect(after).toMatch(/IFCRELDEFINESBYPROPERTIES\('[^']{22}',\$,\$,\$,\(#10,#11\),#\d+\)/);
  });

  it('has no templates in IFC2X3, and declared ones in IFC4', () => {
    expect(annotated(model('IFC2X3'))).not.toContain('TEMPLATE');
    const after = annotated(model('IFC4'));
    expect(after.match(/=IFCPROPERTYSETTEMPLATE\(/g)).toHaveLength(4);
    expect(after.match(/=IFCRELDEFINESBYTEMPLATE\(/g)).toHaveLength(4);
    expect(after).toMatch(/=IFCRELDECLARES\('[^']{22}',\$,\$,\$,#1,\(#\d+,#\d+,#\d+,#\d+\)\)/);
  });

  it('uses the owner history of an IFC2X3 project, or brings its own with the time of the file', () => {
    expect(annotated(model('IFC2X3'))).toMatch(/IFCPROPERTYSET\('[^']{22}',#5,/);
    const orphan = model('IFC2X3')
      .replace(`'${PROJECT}',#5`, `'${PROJECT}',$`)
      .replace(/^#5=.*\n/m, '');
    const after = annotated(orphan);
    expect(after).toMatch(/=IFCOWNERHISTORY\(#\d+,#\d+,\$,\.NOCHANGE\.,\$,\$,\$,1735732800\)/);
    expect(annotated(after)).toBe(after);
  });

  it('holds labels of 255 characters at most, and keeps combinations apart that only differ later', () => {
    const result = someResult([BEAM]);
    for (const [k, combination] of result.combinations.entries()) combination.name = `${'ü'.repeat(300)}${k}`;
    const after = annotated(model('IFC4'), result);
    const table = /IFCPROPERTYTABLEVALUE\('ForceByCombination',\$,\(IFCLABEL\('([^']*)'\),IFCLABEL\('([^']*)'\)\)/.exec(
      after,
    )!;
    expect(table[1]).not.toBe(table[2]);
    expect(table[1].match(/00FC/g)!.length).toBe(254);
  });

  it('is refused where something foreign stands in an earlier one', () => {
    const foreign = annotated(model('IFC4')).replace(
      '/* Pinwright results: end',
      "#9000=IFCWALL('0000000000000000000009',$,$,$,$,$,$,$,$);\n/* Pinwright results: end",
    );
    expect(() => annotated(foreign)).toThrow(/#9000, an IFCWALL, stands between the comments/);
    expect(() => clean(open(foreign))).toThrow(/IFCWALL/);
  });

  it('stands in a model without a project too', () => {
    const after = annotated(model('IFC4').replace(/^#1=.*\n/m, ''));
    expect(after).toContain('Pinwright_Forces');
    expect(after).not.toContain('Pinwright_Run');
  });

  it('does not depend on the name under which the model was read', () => {
    const result = someResult([BEAM, COLUMN]);
    const renamed = { ...result, model: { ...result.model, file: 'other.ifc' } };
    expect(annotated(model('IFC4'), renamed)).toBe(annotated(model('IFC4'), result));
  });
});

const check = checker('check_ifc.py');
const folder = mkdtempSync(join(tmpdir(), 'pinwright-annotate-'));
afterAll(() => rmSync(folder, { recursive: true }));

function problems(path: string): string {
  try {
    return execFileSync('python3', [check!, path, '--block', 'Pinwright results: begin'], { encoding: 'utf8' });
  } catch (error) {
    return String((error as { stdout?: string }).stdout ?? error);
  }
}

describe.skipIf(check === null)('the independent checker', () => {
  it.each(SCHEMAS)('finds no problem in a small annotated model of %s', (schema) => {
    const path = join(folder, `${schema}.ifc`);
    writeFileSync(path, annotated(model(schema)), 'latin1');
    expect(problems(path)).toMatch(/^0 problems in [1-9]/);
  });

  it.each([
    [
      'orphan',
      () =>
        model('IFC2X3')
          .replace(`'${PROJECT}',#5`, `'${PROJECT}',$`)
          .replace(/^#5=.*\n/m, ''),
    ],
    ['gap', () => model('IFC4').replaceAll('#11=', '#2147483600=').replaceAll('#11)', '#2147483600)')],
    ['doubled', () => model('IFC4').replace(COLUMN, BEAM)],
  ])('finds no problem in the block of a model with a peculiarity (%s)', (name, text) => {
    const path = join(folder, `${name}.ifc`);
    writeFileSync(path, annotated(text()), 'latin1');
    expect(problems(path)).toMatch(/^0 problems in [1-9]/);
  });
});
