import { mkdtempSync, readFileSync, rmSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { afterAll, describe, expect, it } from 'vitest';
import { contentOf } from '../../src/exporter/content.ts';
import { planOutputs } from '../../src/exporter/outputs.ts';
import { writeOutputs } from '../../src/exporter/write-outputs.ts';
import { openStep } from '../../src/step/step-file.ts';
import { BEAM, COLUMN, model } from './ifc/models.ts';
import { someResult } from './support.ts';

const folder = mkdtempSync(join(tmpdir(), 'pinwright-content-'));
afterAll(() => rmSync(folder, { recursive: true }));

describe('the outputs of a result', () => {
  it('hold in every format what was asked for', async () => {
    const input = join(folder, 'frame.ifc');
    writeFileSync(input, model('IFC4'));
    const result = someResult([BEAM, COLUMN]);
    const read = (name: string) => readFileSync(join(folder, name), 'utf8');
    const paths = ['r.json', 'r.ifc', 'bars.csv', 'all.csv/'].map((name) => `${folder}/${name}`);
    await writeOutputs(planOutputs(paths, input), contentOf(result, openStep(readFileSync(input))));

    expect(JSON.parse(read('r.json'))).toEqual(result);
    expect(openStep(readFileSync(join(folder, 'r.ifc'))).block?.instances.idsOf('IFCPROPERTYSET')).toHaveLength(5);
    expect(read('bars.csv')).toBe(read('all.csv/bars.csv'));
    expect(read('all.csv/nodes.csv').split('\r\n')).toHaveLength(1 + 5 + 1);
    expect(read('frame.ifc')).toBe(model('IFC4'));
  });
});
