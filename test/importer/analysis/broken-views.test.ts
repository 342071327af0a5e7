import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { ModelError } from '../../../src/domain/errors.ts';
import { resultSchema } from '../../../src/domain/result.ts';
import { runModel } from '../../../src/pipeline.ts';
import { towerView } from './truss-models.ts';

/** What replaces a value: nothing, wrong kinds, absurd numbers, references to anything. */
const WRONG = [
  '$',
  '*',
  '0.',
  '-1.',
  '1.E300',
  '1.E400',
  "'x'",
  '.T.',
  '()',
  '(#1)',
  '#1',
  '#60',
  '#99999',
  'IFCREAL(3.)',
];

describe('an analysis view with a wrong value somewhere', () => {
  it.each(['IFC2X3', 'IFC4', 'IFC4X3'] as const)(
    'ends in a valid result or a refusal, never otherwise, in %s',
    async (schema) => {
      const text = towerView(schema);
      const data = text.indexOf('DATA;');
      const values = [...text.matchAll(/(?<=[(,])[^(),;]+(?=[),])/g)].filter(({ index }) => index > data);
      await fc.assert(
        fc.asyncProperty(
          fc.integer({ min: 0, max: values.length - 1 }),
          fc.constantFrom(...WRONG),
          async (at, wrong) => {
            const { index, 0: value } = values[at]!;
            const broken = text.slice(0, index) + wrong + text.slice(index + value.length);
            try {
              const { result } = await runModel(new TextEncoder().encode(broken));
              expect(() => resultSchema.parse(result)).not.toThrow();
              expect(JSON.stringify(result)).not.toMatch(/NaN|Infinity/);
            } catch (error) {
              if (!(error instanceof ModelError)) throw error;
            }
          },
        ),
        // A profile 1e300 m thick has an area, but no moments.
        { numRuns: 150, examples: [[82, '1.E300']] },
      );
    },
  );
});
