import { readFileSync } from 'node:fs';
import { join } from 'node:path';
import { beforeAll, describe, expect, it } from 'vitest';
import { IFCMEMBER, IFCPROPERTYSET } from 'web-ifc';
import type { Result } from '../../src/domain/result.ts';
import { reopened } from '../support/ifc-parser.ts';
import { pinwright, runChecker } from '../support/run-cli.ts';
import { checker, fixture } from '../support/shared.ts';
import { temporaryFolder } from '../support/temporary-folder.ts';

const resultChecker = checker('check_result.py');
const ifcChecker = checker('check_ifc.py');
const folder = temporaryFolder();
const brief = fixture('boat-hall.yaml');

interface PropertySet {
  readonly Name: { readonly value: string };
  readonly HasProperties: readonly { readonly Name: { value: string }; readonly NominalValue?: { value: unknown } }[];
}

describe.each(['boat-hall-a', 'boat-hall-b', 'boat-hall-faults'])('what analyse writes for %s', (stem) => {
  const model = fixture(`${stem}.ifc`);
  const json = join(folder, `${stem}.json`);
  const ifc = join(folder, `${stem}.ifc`);
  let result: Result;
  beforeAll(() => {
    pinwright(['analyse', model, '--brief', brief, '--quiet', '-o', json, '-o', ifc]);
    result = JSON.parse(readFileSync(json, 'utf8')) as Result;
  });

  it.skipIf(resultChecker === null)('balances, by the independent checker of results', () => {
    expect(runChecker(resultChecker!, [json])).toEqual({ code: 0, output: '0 problems\n' });
  });

  it.skipIf(ifcChecker === null)('fits the schema, by the independent checker of IFC', () => {
    const { code, output } = runChecker(ifcChecker!, [ifc, '--block', 'Pinwright results: begin']);
    expect({ code, output }).toEqual({ code: 0, output: expect.stringMatching(/^0 problems in \d+ instances/) });
  });

  it('leaves the original bytes untouched before its block', () => {
    const original = readFileSync(model);
    const written = readFileSync(ifc);
    const at = written.indexOf('/* Pinwright results: begin */');
    expect(at).toBeGreaterThan(0);
    expect(written.subarray(0, at).equals(original.subarray(0, at))).toBe(true);
  });

  it('becomes the same file when it is analysed again', () => {
    const twice = join(folder, `${stem}-twice.ifc`);
    pinwright(['analyse', ifc, '--brief', brief, '--quiet', '-o', twice]);
    expect(readFileSync(twice).equals(readFileSync(ifc))).toBe(true);
  });

  it('opens in an independent parser with every member and the forces of the result', async () => {
    await reopened(readFileSync(ifc), (again) => {
      expect(again.schema).toBe('IFC4');
      expect(again.count(IFCMEMBER)).toBe(result.members.filter((member) => member.class === 'IfcMember').length);
      const sets = again.lines(IFCPROPERTYSET) as unknown as PropertySet[];
      const forces = sets.filter((set) => set.Name.value === 'Pinwright_Forces');
      const told = forces.flatMap((set) =>
        set.HasProperties.filter(({ Name }) => Name.value === 'GreatestTension').map((one) => one.NominalValue!.value),
      );
      const envelope = result.envelope.flatMap(({ tension }) => (tension === null ? [] : [tension.force]));
      // Where every combination is refused there is nothing to tell.
      expect(told.length > 0).toBe(envelope.length > 0);
      if (told.length > 0) expect(Math.max(...(told as number[]))).toBeCloseTo(Math.max(...envelope), 3);
    });
  });
});
