import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import { ModelError } from '../../src/domain/errors.ts';
import { openStep } from '../../src/step/step-file.ts';
import { bytesOf, fileWith } from './support.ts';

const SOUND = bytesOf(
  fileWith(
    [
      "#1=IFCBEAM('0abcdefghijklmnopqrstu',#2,'it''s \\X2\\00E4\\X0\\',$,*,.BEAM.);",
      '#2=IFCCARTESIANPOINT((1.,-2.5E-05,.5));',
      "/* a comment */ #3=IFCPROPERTYSINGLEVALUE('p',$,IFCREAL(1.),$);",
      '#4=(LENGTH_UNIT()NAMED_UNIT(*)SI_UNIT(.MILLI.,.METRE.));',
      '/* Pinwright results: begin */',
      '#5=IFCX("0FF",((1,2),(3)));',
      '/* Pinwright results: end */',
    ].join('\n'),
  ),
);
const TELLING = Array.from('\'/*();=#,\\.$"\n\r \0\xff\xc3X2S0159E-+aND');

interface Change {
  readonly at: number;
  readonly removed: number;
  readonly put: string;
}

const change: fc.Arbitrary<Change> = fc.record({
  at: fc.nat(SOUND.length - 1),
  removed: fc.oneof(fc.constant(0), fc.constant(1), fc.nat(40)),
  put: fc.oneof(
    fc.constant(''),
    fc.constantFrom(...TELLING),
    fc.constantFrom('ENDSEC;', 'DATA;', '#1=', '\\X2\\', '/*', '*/', '((('),
  ),
});

function changed(changes: readonly Change[]): Uint8Array {
  let text = Buffer.from(SOUND).toString('latin1');
  for (const { at, removed, put } of changes) text = text.slice(0, at) + put + text.slice(at + removed);
  return bytesOf(text);
}

/** Opens and reads all there is; the outcome is readable or a ModelError, anything else is thrown on. */
function readAll(bytes: Uint8Array): void {
  try {
    const file = openStep(bytes);
    for (const instances of [file, file.block?.instances]) {
      if (instances === undefined) continue;
      for (const id of instances.ids()) {
        expect(instances.typeOf(id)).not.toBe('');
        instances.args(id);
        instances.records(id);
      }
      expect(instances.types().reduce((count, type) => count + instances.idsOf(type).length, 0)).toBe(instances.size);
      for (const problem of instances.problems) expect(problem.message).toMatch(/^[\x20-\x7e]+$/);
    }
    expect(
      Buffer.from(bytes.subarray(file.insertAt, file.insertAt + 6))
        .toString()
        .toUpperCase(),
    ).toBe('ENDSEC');
  } catch (error) {
    if (!(error instanceof ModelError)) throw error;
    expect(error.message).toMatch(/^[\x20-\x7e]+$/);
  }
}

describe('whatever is done to a file, it opens or is refused as a model', () => {
  test('with pieces changed, removed and put in', () => {
    fc.assert(
      fc.property(fc.array(change, { minLength: 1, maxLength: 4 }), (changes) => readAll(changed(changes))),
      { numRuns: 10_000 },
    );
  });

  test('cut off after every byte', () => {
    for (let length = 0; length <= SOUND.length; length++) readAll(SOUND.subarray(0, length));
  });

  test('of random bytes after the first word', () => {
    fc.assert(
      fc.property(fc.uint8Array({ maxLength: 200 }), (bytes) => {
        readAll(Buffer.concat([bytesOf('ISO-10303-21;DATA;'), bytes, bytesOf('ENDSEC;')]));
        readAll(bytes);
      }),
      { numRuns: 2000 },
    );
  });
});
