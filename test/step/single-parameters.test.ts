import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import { openStep } from '../../src/step/step-file.ts';
import { asNumber, asRef, asRefs, asString, type StepValue } from '../../src/step/values.ts';

const WRITTEN = [
  ...[
    '$',
    '*',
    '#12',
    '# 3',
    '#',
    "'plain'",
    "''",
    "'it''s'",
    "'\\X2\\00E9\\X0\\'",
    "'\xe9'",
    '.T.',
    '.MEMBER.',
    '.5',
    '1.',
    '-0.',
    '+2.5E-05',
  ],
  ...[
    '1e5',
    '1.E400',
    '123456789012345678901234567890123456789012345.',
    '1.5.2',
    '"0FF"',
    "IFCLABEL('x')",
    'IFCREAL(2.)',
    '',
    '/* c */ 7.',
  ],
  ...[
    '()',
    '(1.,2.,3.)',
    '( 1. , -2.E1 )',
    '(1.,$)',
    '(1.,(2.))',
    '(#1,#2)',
    '( #1 , #2 )',
    '(#1,$)',
    "(#1,'a)b')",
    '((1.,2.),(3.,4.))',
    '(#5',
    '1.)',
  ],
];

function filed(list: string) {
  const text = `ISO-10303-21;\nHEADER;\nFILE_SCHEMA(('IFC4'));\nENDSEC;\nDATA;\n#1=IFCTHING(${list});\n#2=IFCEND();\nENDSEC;\nEND-ISO-10303-21;\n`;
  return openStep(Buffer.from(text, 'latin1'));
}

function numbersOf(value: StepValue | undefined): (number | null)[] | null {
  return Array.isArray(value) ? value.slice(0, 3).map((item: StepValue) => asNumber(item) ?? Number.NaN) : null;
}

describe('a parameter read alone', () => {
  test('is what it is among all the others, and tells the same faults', () => {
    const lists = fc.array(fc.constantFrom(...WRITTEN), { minLength: 0, maxLength: 6 });
    fc.assert(
      fc.property(lists, fc.constantFrom(',', ' , ', ',\n'), (values, comma) => {
        const list = values.join(comma);
        const whole = filed(list);
        const args = whole.args(1);
        for (let i = 0; i <= args.length; i++) {
          const alone = filed(list);
          const into = new Float64Array(3);
          expect(alone.valueAt(1, i)).toEqual(args[i]);
          expect(alone.problems).toEqual(whole.problems);
          expect(alone.refAt(1, i)).toBe(asRef(args[i]));
          expect(alone.refsAt(1, i)).toEqual(asRefs(args[i]));
          expect(alone.stringAt(1, i)).toBe(asString(args[i]));
          expect(alone.numberAt(1, i)).toBe(asNumber(args[i]));
          const count = alone.numbersAt(1, i, into);
          const numbers = numbersOf(args[i]);
          expect(count < 0 ? null : [...into.subarray(0, count)]).toEqual(numbers);
        }
      }),
      { numRuns: 2000 },
    );
  });

  test('is absent where the file holds no such instance', () => {
    const file = filed('1.');
    expect([
      file.valueAt(99, 0),
      file.refAt(99, 0),
      file.stringAt(99, 0),
      file.numbersAt(99, 0, new Float64Array(3)),
    ]).toEqual([undefined, null, null, -1]);
  });

  test('keeps instances apart whose marks fall in one slot', () => {
    const lines = Array.from({ length: 500 }, (_, i) => `#${i + 1}=IFCTHING(${i}.,#${i + 2});`).join('\n');
    const text = `ISO-10303-21;\nHEADER;\nENDSEC;\nDATA;\n${lines}\nENDSEC;\nEND-ISO-10303-21;\n`;
    const file = openStep(Buffer.from(text, 'latin1'));
    for (const id of [1, 65, 129, 1, 500, 65])
      expect([file.numberAt(id, 0), file.refAt(id, 1)]).toEqual([id - 1, id + 1]);
  });
});
