import { readFileSync } from 'node:fs';
import { describe, expect, it } from 'vitest';
import { openModel } from '../../../src/importer/files/open-model.ts';
import type { StepFile } from '../../../src/step/step-file.ts';
import { openStep } from '../../../src/step/step-file.ts';
import { DERIVED, StepEnum, StepRef, StepTyped, type StepValue } from '../../../src/step/values.ts';
import { fixture, publicModel } from '../../support/shared.ts';
import { xmlOfStep } from './support/xml-of-step.ts';

/**
 * As text, so that a difference can be read; references to what is not in `kept` count as nothing. The parser adds
 * characters to texts that hold others than ASCII; those have tests of their own.
 */
function spelled(value: StepValue, kept: StepFile): string {
  if (value === null || value === DERIVED || value === '') return '$';
  if (value instanceof StepRef) return kept.has(value.id) ? `#${value.id}` : '$';
  if (value instanceof StepEnum) return JSON.stringify(value.name);
  if (value instanceof StepTyped) return `${value.type}(${spelled(value.value, kept)})`;
  if (Array.isArray(value)) {
    const items = (value as readonly StepValue[]).filter((item) => !(item instanceof StepRef) || kept.has(item.id));
    return items.length === 0 ? '$' : `(${items.map((item) => spelled(item, kept)).join(',')})`;
  }
  return typeof value === 'string' ? JSON.stringify(value.replace(/\P{ASCII}/gu, '')) : JSON.stringify(value);
}

/** The parser loses the types of its segments. */
const SPOILT_BY_THE_PARSER = new Set(['IFCINDEXEDPOLYCURVE']);

/** File, the least part of its instances that comes through; the rest are looks and the like. */
const MODELS: readonly (readonly [string, number])[] = [
  ['steel-frame.ifc', 0.9],
  ['mapped-axis-beam.ifc', 0.9],
  ['clipped-beam.ifc', 0.9],
  ['six-shapes.ifc', 0.9],
  ['beam-standard-case-ifc4.ifc', 0.9],
  ['analysis-view-portal-ifc4-inch.ifc', 0.9],
  ['cardinal-points-ifc4x3.ifc', 0.9],
  ['grid-placement-ifc4x3.ifc', 0.9],
  ['tessellated-beam-ifc4x3.ifc', 0.9],
];

async function expectSame(bytes: Uint8Array, leastPart: number): Promise<void> {
  const original = openStep(bytes);
  const { file, container, isConverted, findings } = await openModel(Buffer.from(await xmlOfStep(bytes)));
  expect({ container, isConverted }).toEqual({ container: 'ifcxml', isConverted: true });
  expect(findings.filter(({ code }) => code !== 'out-of-scope').map(({ message }) => message)).toEqual([]);
  expect(file.size / original.size).toBeGreaterThanOrEqual(leastPart);
  const differences: string[] = [];
  for (const id of file.ids()) {
    if (SPOILT_BY_THE_PARSER.has(file.typeOf(id))) continue;
    const length = Math.min(file.args(id).length, original.args(id).length);
    const [ours, theirs] = [file, original].map((each) => {
      const args = each
        .args(id)
        .slice(0, length)
        .map((value) => spelled(value, file));
      return `#${id}=${each.typeOf(id)}(${args.join(',')})`;
    });
    if (ours !== theirs) differences.push(`${theirs} became ${ours}`);
  }
  expect(differences).toEqual([]);
}

describe('ifcXML written with an independent parser’s names of entities and attributes gives the instances of the STEP text', () => {
  it.each(['boat-hall-a.ifc'])('the demo roof %s', { timeout: 60_000 }, async (name) => {
    await expectSame(readFileSync(fixture(name)), 0.9);
  });

  for (const [name, leastPart] of MODELS) {
    const path = publicModel(name);
    it.skipIf(path === null)(`public model ${name}`, { timeout: 60_000 }, async () => {
      await expectSame(readFileSync(path!), leastPart);
    });
  }
});
