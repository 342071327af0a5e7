import { createHash } from 'node:crypto';
import { readFileSync, writeFileSync } from 'node:fs';
import { join } from 'node:path';
import { describe, expect, it } from 'vitest';
import { parseBrief } from '../../../src/brief/parse-brief.ts';
import { ModelError } from '../../../src/domain/errors.ts';
import type { Result } from '../../../src/domain/result.ts';
import { joinChunks } from '../../../src/exporter/chunks.ts';
import { annotate, clean } from '../../../src/exporter/ifc/annotate.ts';
import { elementForces, listedByKey } from '../../../src/exporter/ifc/member-forces.ts';
import { elementLengths } from '../../../src/exporter/ifc/member-lengths.ts';
import type { PropertyValue, SetValues } from '../../../src/exporter/ifc/set-definitions.ts';
import { findingValues, forceValues, runValues } from '../../../src/exporter/ifc/set-values.ts';
import { runModel } from '../../../src/pipeline.ts';
import { openStep } from '../../../src/step/step-file.ts';
import { checkBothVersions, someFindings } from '../../bcf/check-both-versions.ts';
import { runChecker } from '../../support/run-cli.ts';
import { checker, fixture, PUBLIC_STEP_MODELS, publicModel } from '../../support/shared.ts';
import { temporaryFolder } from '../../support/temporary-folder.ts';
import { someResult } from '../support.ts';
import { BEAM, COLUMN, model, PROJECT } from './models.ts';
import { type ReadValue, readSets } from './read-sets.ts';

const BRIEF = parseBrief(
  'pinwright: 1\nsupports: [{at: {lowest: true}, fix: xyz}]\ncases: [{name: dead, nature: permanent, loads: [{selfWeight: 1}]}]\n',
  'brief.yaml',
);

/** What should stand in the model, by GlobalId and set, as it is read back. */
function expectedSets(result: Result, project: string): Map<string, Map<string, ReadValue>> {
  const expected = new Map<string, Map<string, ReadValue>>();
  const put = (globalId: string, name: string, values: SetValues | null) => {
    if (values === null) return;
    const filled = Object.entries(values as Record<string, PropertyValue>).filter(
      ([, value]) => value !== null && value !== undefined && !(Array.isArray(value) && value.length === 0),
    );
    expected.set(`${globalId} ${name}`, new Map(filled.map(([key, value]) => [key, asRead(key, value)])));
  };
  put(project, 'Pinwright_Run', runValues(result));
  const forcesOf = elementForces(result);
  const lengthsOf = elementLengths(result);
  const findingsOf = listedByKey(result.findings, ({ members }) => [...new Set(members)]);
  const barred = result.bars.flatMap((bar) => bar.members ?? [bar.member]);
  for (const globalId of new Set([...barred, ...findingsOf.keys()])) {
    const forces = result.cases.length > 0 ? forcesOf(globalId) : null;
    put(globalId, 'Pinwright_Forces', forces && forceValues(forces, result));
    put(globalId, 'Pinwright_Lengths', lengthsOf(globalId));
    const findings = findingsOf.get(globalId)?.map((k) => result.findings[k]!);
    put(globalId, 'Pinwright_Findings', findings === undefined ? null : findingValues(findings));
  }
  return expected;
}

/** Labels end at 255 characters; those of this test's results are shorter, but for lists of codes. */
function asRead(key: string, value: PropertyValue): ReadValue {
  const cut = (text: string) =>
    [...text].length > 255 && !LONG.has(key) ? `${[...text].slice(0, 254).join('')}…` : text;
  if (Array.isArray(value)) return value.map((item) => (typeof item === 'string' ? cut(item) : item)) as ReadValue;
  return typeof value === 'string' ? cut(value) : (value as number);
}
const LONG = new Set(['Findings', 'Sentences', 'Note', 'SupportNote', 'Verdict', 'Caution']);

const check = checker('check_ifc.py');
const bcfCheck = checker('check_bcf.py');
const folder = temporaryFolder();
const sha256 = (bytes: Uint8Array) => createHash('sha256').update(bytes).digest('hex');
const globalIdOf = (bytes: Uint8Array) => {
  const file = openStep(bytes);
  const [project] = file.idsOf('IFCPROJECT');
  return project === undefined ? '' : String(file.args(project)[0]);
};

const MODELS = [
  { name: 'the demo hall with faults', path: fixture('boat-hall-faults.ifc') },
  ...PUBLIC_STEP_MODELS.map((name) => ({ name, path: publicModel(name) ?? '' })).filter(({ path }) => path !== ''),
];

describe.each(MODELS)('results in $name', ({ name, path }) => {
  it('are read back by another parser, stand once however often they are written, and leave no trace', async () => {
    const original = new Uint8Array(readFileSync(path));
    const run = await runModel(original, { fileName: name, brief: BRIEF }).catch((error: unknown) => {
      if (error instanceof ModelError) return null;
      throw error;
    });
    if (run === null || run.result.members.length === 0) return;
    const once = joinChunks(annotate(run.file, run.result));
    expect(sha256(joinChunks(annotate(openStep(once), run.result)))).toBe(sha256(once));
    expect(sha256(joinChunks(clean(openStep(once))))).toBe(sha256(original));

    const read = await readSets(once);
    const expected = expectedSets(run.result, globalIdOf(original));
    expect([...read.keys()].sort()).toEqual([...expected.keys()].sort());
    for (const [key, values] of expected) expect(read.get(key), key).toEqual(values);

    if (bcfCheck !== null) checkBothVersions(bcfCheck, folder, someFindings(run.result, 2), path);
    if (check === null) return;
    const out = join(folder, 'out.ifc');
    writeFileSync(out, once);
    expect(runChecker(check, [out, '--block', 'Pinwright results: begin']).output).toMatch(/^0 problems in [1-9]/m);
  }, 120_000);
});

it.each(['IFC2X3', 'IFC4', 'IFC4X3_ADD2'] as const)(
  'words of any script come back from a model in %s',
  async (schema) => {
    const result = someResult([BEAM, COLUMN]);
    const words = `Ελλάδα 屋根 🏗️ it's "so" \\ \\X2\\ \u00e4\u00df`;
    for (const finding of result.findings) finding.message = words;
    for (const bar of result.bars) bar.name = `${bar.name} ${words}`;
    const bytes = joinChunks(annotate(openStep(Buffer.from(model(schema), 'latin1')), result));
    const read = await readSets(bytes);
    const expected = expectedSets(result, PROJECT);
    for (const [key, values] of expected) expect(read.get(key), key).toEqual(values);
    expect(JSON.stringify([...read.values()].map((set) => [...set]))).toContain(JSON.stringify(words).slice(1, -1));
  },
);
