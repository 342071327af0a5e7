import { existsSync, readFileSync } from 'node:fs';
import { join } from 'node:path';
import { describe, expect, it } from 'vitest';
import { pinwright, runChecker } from '../support/run-cli.ts';
import { checker, PUBLIC_STEP_MODELS, publicModel } from '../support/shared.ts';
import { temporaryFolder } from '../support/temporary-folder.ts';

const MODELS = [...PUBLIC_STEP_MODELS, 'brep-lintels.ifczip', 'surface-member.ifcxml', 'wall-ifcxml.ifczip'];

const folder = temporaryFolder();
const resultChecker = checker('check_result.py');
const ifcChecker = checker('check_ifc.py');

describe.each(MODELS)('the public model %s', (name) => {
  const model = publicModel(name);

  it.skipIf(model === null || resultChecker === null || ifcChecker === null)('gets an orderly answer', () => {
    const json = join(folder, `${name}.json`);
    const ifc = join(folder, `${name}.annotated.ifc`);
    const { code, stdout, stderr } = pinwright(['analyse', model!, '-o', json, '-o', ifc]);
    expect([0, 1, 3]).toContain(code);
    expect(stdout + stderr).not.toMatch(/\n\s+at .*:\d+:\d+|undefined|NaN|\[object/);
    if (code === 3) {
      expect(stderr).toMatch(/^[^\n]+\n$/);
      expect(existsSync(json)).toBe(false);
      return;
    }
    expect(stderr).toBe('');
    expect(runChecker(resultChecker!, [json])).toEqual({ code: 0, output: '0 problems\n' });
    expect(runChecker(ifcChecker!, [ifc, '--block', 'Pinwright results: begin']).output).toMatch(/^0 problems in/m);
    if (name.endsWith('.ifc')) expect(readFileSync(ifc).length).toBeGreaterThanOrEqual(readFileSync(model!).length);
  });
});
