import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import { DERIVED, StepBinary, StepEnum, StepRef, StepTyped, type StepValue } from '../../src/step/values.ts';
import {
  encodeInteger,
  encodeReal,
  encodeString,
  enumeration,
  InstanceWriter,
  instanceLine,
  integer,
  ref,
  refs,
  typed,
  type ValueToWrite,
} from '../../src/step/write.ts';
import { argsOf, open } from './support.ts';

/** REAL = [SIGN] DIGIT {DIGIT} "." {DIGIT} ["E" [SIGN] DIGIT {DIGIT}], ISO 10303-21 table 2. */
const LEGAL_REAL = /^[+-]?\d+\.\d*(E[+-]?\d+)?$/;

describe('reals', () => {
  test.each([
    [1, '1.'],
    [0, '0.'],
    [-0, '0.'],
    [0.25, '0.25'],
    [-2.5e-5, '-2.5E-05'],
    [1e-5, '1.E-05'],
    [210e9, '210000000000.'],
    [1e21, '1.E+21'],
    [Number.MAX_VALUE, '1.7976931348623157E+308'],
    [5e-324, '5.E-324'],
  ])('%d is written %s', (value, text) => {
    expect(encodeReal(value)).toBe(text);
  });

  test('are legal and read back as the same number', () => {
    fc.assert(
      fc.property(fc.double({ noNaN: true, noDefaultInfinity: true }), (value) => {
        const text = encodeReal(value);
        expect(text).toMatch(LEGAL_REAL);
        expect(argsOf(text)[0]).toBe(value === 0 ? 0 : value);
      }),
      { numRuns: 2000 },
    );
  });

  test('that are not finite are never written', () => {
    for (const value of [Number.NaN, Number.POSITIVE_INFINITY, Number.NEGATIVE_INFINITY]) {
      expect(() => encodeReal(value)).toThrow(RangeError);
    }
  });

  test('differ from integers, which have no point', () => {
    expect([encodeInteger(12), encodeInteger(-0)]).toEqual(['12', '0']);
    expect(() => encodeInteger(1.5)).toThrow(RangeError);
    expect(() => encodeInteger(2 ** 60)).toThrow(RangeError);
  });
});

describe('strings', () => {
  test.each([
    ['plain', "'plain'"],
    ["it's", "'it''s'"],
    ['a\\b', "'a\\\\b'"],
    ['Träger', "'Tr\\X2\\00E4\\X0\\ger'"],
    ['Баа', "'\\X2\\041104300430\\X0\\'"],
    ['🔩', "'\\X4\\0001F529\\X0\\'"],
    ['é🔩', "'\\X2\\00E9\\X0\\\\X4\\0001F529\\X0\\'"],
    ['a\nb', "'a\\X2\\000A\\X0\\b'"],
    ['\ud800', "'\\X2\\FFFD\\X0\\'"],
  ])('%j is written %s', (text, written) => {
    expect(encodeString(text)).toBe(written);
  });

  test('of any characters are printable ASCII and read back the same', () => {
    fc.assert(
      fc.property(fc.string({ unit: 'binary', maxLength: 40 }), (text) => {
        const written = encodeString(text);
        expect(written).toMatch(/^[\x20-\x7e]*$/);
        const file = open(`#1=IFCX(${written});`);
        expect(file.args(1)).toEqual([text]);
        expect(file.problems).toEqual([]);
      }),
      { numRuns: 1000 },
    );
  });
});

describe('instances', () => {
  test('are one line with every kind of value', () => {
    const args: ValueToWrite[] = [
      null,
      DERIVED,
      ref(3),
      refs([4, 5]),
      1,
      integer(1),
      true,
      false,
      enumeration('FORCEUNIT'),
      "it's",
      typed('IFCREAL', 2),
      typed('IFCINTEGER', integer(2)),
      new StepBinary('0FF'),
      [],
    ];
    expect(instanceLine(12, 'IFCX', args)).toBe(
      `#12=IFCX($,*,#3,(#4,#5),1.,1,.T.,.F.,.FORCEUNIT.,'it''s',IFCREAL(2.),IFCINTEGER(2),"0FF",());`,
    );
  });

  test('that could not stand in a file are refused', () => {
    expect(() => instanceLine(0, 'IFCX', [])).toThrow(RangeError);
    expect(() => instanceLine(2 ** 32, 'IFCX', [])).toThrow(RangeError);
    expect(() => instanceLine(1, 'IfcX', [])).toThrow(RangeError);
    expect(() => instanceLine(1, 'IFCX', [new StepRef(Number.NaN)])).toThrow(RangeError);
    expect(() => instanceLine(1, 'IFCX', [enumeration('A.B')])).toThrow(RangeError);
    expect(() => instanceLine(1, 'IFCX', [new StepBinary('zz')])).toThrow(RangeError);
    expect(() => instanceLine(1, 'IFCX', [[Number.NaN]])).toThrow(RangeError);
  });

  test('of random values read back the same', () => {
    const leaf = fc.oneof(
      fc.constant(null),
      fc.constant(DERIVED),
      fc.boolean(),
      fc.double({ noNaN: true, noDefaultInfinity: true }).map((value) => (value === 0 ? 0 : value)),
      fc.string({ unit: 'grapheme', maxLength: 8 }),
      fc.integer({ min: 1, max: 2 ** 32 - 1 }).map((id) => new StepRef(id)),
      fc
        .stringMatching(/^[A-Z_][A-Z0-9_]{2,5}$/)
        .filter((name) => name[0] !== '_')
        .map((name) => new StepEnum(name)),
    );
    const value: fc.Arbitrary<StepValue> = fc.letrec<{ value: StepValue }>((tie) => ({
      value: fc.oneof(
        { depthSize: 'small' },
        leaf,
        fc.array(tie('value'), { maxLength: 4 }),
        fc.double({ min: -1, max: -0.5, noNaN: true }).map((number) => new StepTyped('IFCREAL', number)),
      ),
    })).value;
    fc.assert(
      fc.property(fc.array(value, { maxLength: 6 }), (args) => {
        const file = open(instanceLine(9, 'IFCX', args));
        expect(file.args(9)).toEqual(args);
        expect(file.problems).toEqual([]);
      }),
    );
  });

  test('are numbered one after another and taken in turn', () => {
    const writer = new InstanceWriter(100);
    const unit = writer.add('IFCSIUNIT', DERIVED, enumeration('FORCEUNIT'), null, enumeration('NEWTON'));
    writer.add('IFCX', unit);
    expect(writer.take()).toEqual(['#100=IFCSIUNIT(*,.FORCEUNIT.,$,.NEWTON.);', '#101=IFCX(#100);']);
    expect(writer.take()).toEqual([]);
    const free = [7, 9][Symbol.iterator]();
    const gaps = new InstanceWriter(() => free.next().value ?? 0);
    expect([gaps.add('IFCX').id, gaps.add('IFCX').id]).toEqual([7, 9]);
  });
});
