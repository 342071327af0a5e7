import { describe, expect, test } from 'vitest';
import { DERIVED, StepBinary, StepEnum, StepRef, StepTyped } from '../../src/step/values.ts';
import { argsOf, open, stringOf } from './support.ts';

describe('values', () => {
  test('of every kind are read', () => {
    expect(argsOf(`$,*,#12,.BEAM.,.T.,.F.,.U.,"0FF",IFCLABEL('x'),(1,(2,3)),()`)).toEqual([
      null,
      DERIVED,
      new StepRef(12),
      new StepEnum('BEAM'),
      true,
      false,
      new StepEnum('U'),
      new StepBinary('0FF'),
      new StepTyped('IFCLABEL', 'x'),
      [1, [2, 3]],
      [],
    ]);
  });

  test('in lower case are the same keywords and enumerations', () => {
    expect(argsOf('ifcboolean(.t.),.Beam.')).toEqual([new StepTyped('IFCBOOLEAN', true), new StepEnum('BEAM')]);
  });

  test('of a type that holds a list keep the list', () => {
    expect(argsOf('IFCLINEINDEX((1,2))')).toEqual([new StepTyped('IFCLINEINDEX', [1, 2])]);
  });
});

describe('numbers', () => {
  test.each([
    ['0', 0],
    ['-0.', -0],
    ['1.', 1],
    ['.5', 0.5],
    ['-.5E1', -5],
    ['+7', 7],
    ['1e5', 1e5],
    ['2.5E-05', 2.5e-5],
    ['4.440892098500626e-016', 4.440892098500626e-16],
    ['0.1', 0.1],
    ['123456789.123456789012', 123456789.12345679],
    ['9007199254740993', 9007199254740992],
    ['1.7976931348623157E308', Number.MAX_VALUE],
    ['5E-324', 5e-324],
    ['1E-400', 0],
    ['0.000000000000000000000000000001', 1e-30],
    ['1190000000000.', 1.19e12],
  ])('%s is read to the last digit', (text, value) => {
    expect(argsOf(text)).toEqual([value]);
  });

  test.each(['1e400', '-1E999', 'NaN', '-nan(ind)', '1.#IND', '1.#QNAN0', 'inf', '1E', '-', '.', '1.2.3', '12abc'])(
    '%s is no number: absent, said so, and the rest of the list is kept',
    (text) => {
      const file = open(`#1=IFCX((1.,${text},3.),'after');`);
      expect(file.args(1)).toEqual([[1, null, 3], 'after']);
      expect(file.problems).toHaveLength(1);
      expect(file.problems[0]).toMatchObject({ kind: 'unreadable-element', id: 1 });
      expect(file.problems[0]?.message).toContain(`"${text}"`);
    },
  );
});

describe('strings', () => {
  test.each([
    ["it''s", "it's"],
    ["''''", "''"],
    ['', ''],
    ['a\\\\b', 'a\\b'],
    ['Tr\\S\\dger', 'Träger'],
    ['\\PB\\\\S\\9', 'š'],
    ['\\PE\\\\S\\2 \\S\\X', 'В и'],
    ['Tr\\X\\E4ger', 'Träger'],
    ['\\X2\\00D8\\X0\\ 88,9', 'Ø 88,9'],
    ['\\X2\\041104300430\\X0\\x', 'Баа'.concat('x')],
    ['\\X2\\D83DDD29\\X0\\', '🔩'],
    ['\\X4\\0001F529\\X0\\', '🔩'],
    ['C:\\\\S\\\\', 'C:\\S\\'],
    ["see \\S\\' 5", 'see § 5'],
    ['Tr\xc3\xa4ger', 'Träger'],
    ['first\nsecond', 'first\nsecond'],
    ['a\tb', 'a\tb'],
  ])('%j reads %j', (written, text) => {
    expect(stringOf(written)).toEqual({ text, problems: [] });
  });

  test.each([
    ['Tr\xe4ger', 'Träger'],
    ['\x80 100 \x96 200', '€ 100 – 200'],
    ['C:\\Temp\\new', 'C:\\Temp\\new'],
    ['C:\\S\\', 'C:\\S\\'],
    ['\\X\\G1', '\\X\\G1'],
    ['\\X2\\00E4', 'ä'],
    ['\\X2\\00E\\X0\\', '00E'],
    ['\\X2\\', '\\X2\\'],
    ['\\X2\\D83D\\X0\\', '\ufffd'],
    ['\\X4\\00110000\\X0\\', '\ufffd'],
    ['end\\', 'end\\'],
  ])('%j is not properly encoded: read as %j, and said so', (written, text) => {
    expect(stringOf(written)).toEqual({ text, problems: ['encoding-broken'] });
  });

  test('a broken one is told once for its instance however often it is read', () => {
    const file = open("#1=IFCX('\\Q','\\R');");
    file.args(1);
    file.args(1);
    expect(file.problems).toHaveLength(1);
    expect(file.problems[0]?.message).not.toMatch(/[^\x20-\x7e]/);
  });

  test('a path that ends in \\S\\ does not swallow what follows', () => {
    expect(open("#1=IFCX('C:\\S\\','b');\n#2=IFCY();").args(1)).toEqual(['C:\\S\\', 'b']);
  });
});

describe('lists that do not fit', () => {
  test('a missing value is absent and said so', () => {
    const file = open('#1=IFCX(1,,3);\n#2=IFCX(1,);');
    expect([file.args(1), file.args(2)]).toEqual([
      [1, null, 3],
      [1, null],
    ]);
    expect(file.problems.map((problem) => problem.id)).toEqual([1, 2]);
  });

  test('an instance nested beyond reason has no parameters and is said to be unreadable', () => {
    const file = open(`#1=IFCX(${'('.repeat(100_000)}${')'.repeat(100_000)});`);
    expect(file.args(1)).toEqual([]);
    expect(file.problems).toMatchObject([{ kind: 'unreadable-element', id: 1 }]);
  });
});
