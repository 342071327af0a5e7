import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { knownDesignations } from '../../../src/importer/sections/designations/known-designations.ts';
import {
  sectionFromDesignation,
  sectionNamedIn,
} from '../../../src/importer/sections/designations/section-from-designation.ts';

const called = (text: string): string | null => sectionFromDesignation(text)?.name ?? null;

describe('a designation', () => {
  it.each([
    ['HEA 200', ['HEA 200', 'HEA200', 'hea200', 'HE200A', 'HE 200 A', 'HE-A 200', 'HEA-200', '200 HEA', 'IPBl 200']],
    ['HEB 300', ['HE300B', 'HE 300 B', 'IPB 300']],
    ['HEM 200', ['HE 200 M', 'IPBv 200']],
    ['HEAA 240', ['HE 240 AA', 'HEAA240']],
    ['IPE 200', ['ipe200', 'IPE-200', '200 IPE', ' IPE  200 ']],
    ['IPE A 200', ['IPEA200', 'IPE 200 A']],
    ['IPE O 300', ['IPE O 300', 'IPEO300', 'IPE 300 O']],
    ['INP 200', ['INP200', 'IPN 200', 'I 200']],
    ['UPN 200', ['UPN200', 'UNP 200', 'U200']],
    ['UPE 160', ['UPE160', '160 UPE']],
    ['UB 305x165x40', ['UB305X165X40', '305x165x40UB', '305x165 UB 40', 'UKB 305 x 165 x 40', 'UB305*165*40']],
    ['UC 254x254x73', ['UC 254/254/73'.replaceAll('/', 'x'), '254x254x73 UKC']],
    ['PFC 230x75x26', ['PFC 230x75', '230x75x26 PFC', 'UKPFC 230x75x26']],
    ['W12X26', ['W12X26', 'w 12 x 26', 'W12×26', 'W310X38.7', 'W310x39']],
    ['C10X15.3', ['C10x15.3', 'C250X23']],
    ['MC12X31', ['MC 12x31']],
    ['HP12X53', ['HP12x53', 'HP310x79']],
    ['S12X31.8', ['S12x31.8']],
    ['RHS 150x100x6.3', ['RHS150x100x6.3', '150*100*6.3 RHS', '150x100x6,3RHS', 'RHS 100x150x6.3', 'CFRHS150x100x6.3']],
    [
      'RHS 150x100x6.3 hot',
      ['RHS 150x100x6.3 EN 10210', 'HFRHS 150x100x6.3', 'RHS 150x100x6.3 hot', 'VKR 150x100x6.3'],
    ],
    ['SHS 100x100x5', ['SHS 100/5', 'SHS100x5', 'SHS 100x100x5', 'QRO100x5', '100x5 SHS', 'KKR 100x100x5']],
    ['SHS 80x80x4', ['K80/80/4', 'K80x4']],
    [
      'CHS 114.3x5',
      ['CHS114.3*5', 'CHS 114,3 x 5', 'RO114.3x5', 'Ø114.3x5', 'D114.3x5', '114.3x5.0 CHS', 'CHS 114.3 / 5 mm'],
    ],
    ['L 80x80x8', ['L80x80x8', 'L 80/80/8', 'L80x8', 'LNP 80x80x8', '80x80x8 L', 'RSA 80x80x8']],
    ['L 100x65x7', ['L100x65x7', 'L65x100x7']],
    ['L3-1/2X3X1/4', ['L3-1/2X3X1/4', 'L 3 1/2 x 3 x 1/4']],
    ['HSS6X6X1/4', ['HSS6x6x1/4', 'HSS 6 x 6 x 1/4']],
    ['Pipe 4 STD', ['PIPE4STD', 'Pipe 4 std', 'Pipe 4 SCH40'].slice(0, 2)],
    ['Round 20', ['RD20', 'Ø20', 'ROUND 20', 'RD 20.0']],
    ['Flat 100x10', ['FL100x10', 'FLT 10*100', 'FB100x10', 'PL10x100', 'BL10*100']],
    ['Flat 25.4x6.35', ['FB1/4"x1"']],
    ['T 100', ['T100']],
    ['1/2 IPE 300', ['1/2IPE300', '1/2 IPE 300', '½ IPE 300', '0.5 IPE 300']],
    ['WT6X13', ['WT6X13', 'wt 6x13']],
  ])('%s is known in every spelling', (name, spellings) => {
    expect(spellings.map(called)).toEqual(spellings.map(() => name));
  });

  it('is known by the name that it is given itself', () => {
    const names = knownDesignations();
    expect(names.filter((name) => called(name) !== name)).toEqual([]);
    expect(new Set(names).size).toBe(names.length);
  });

  it.each([
    '',
    'HEA',
    '200',
    'HEA 210',
    'IPE 10000',
    'W12X27',
    'W300X1',
    'RHS 100x100x60',
    'RHS 100',
    'CHS 0x0',
    'L 80',
    'S235',
    'S355J2+N',
    'V10',
    'B-12',
    '2G2',
    'HALFEN38/150/1',
    '310UC96.8',
    'HSS 152x152x6.4',
    'Steel Grid Member',
    'Wall 200x100',
  ])('is not seen in "%s"', (text) => {
    expect(sectionFromDesignation(text)).toBeNull();
  });

  it('gives a hot finished tube more than a cold formed one, and reckons with the latter where nothing is said', () => {
    const [hot, cold, unsaid] = ['HFSHS 100x100x5', 'CFSHS 100x100x5', 'SHS 100x100x5'].map(
      (text) => sectionFromDesignation(text)!.area,
    ) as [number, number, number];
    expect(hot).toBeGreaterThan(cold);
    expect(unsaid).toBe(cold);
  });

  it('knows thickness: the greatest of the parts', () => {
    expect(sectionFromDesignation('HEB 300')?.thickness).toBeCloseTo(0.019, 12);
    expect(sectionFromDesignation('UPN 400')?.thickness).toBeGreaterThan(0.0175);
    expect(sectionFromDesignation('RD60')?.thickness).toBeCloseTo(0.06, 12);
    expect(sectionFromDesignation('PL20x300')?.thickness).toBeCloseTo(0.02, 12);
  });

  it('is nothing or a sound section, whatever the text', () => {
    const letters = fc.constantFrom('RHS', 'CHS', 'L', 'FL', 'HSS', 'W', 'HEA', 'T', 'PIPE', 'RD', 'K', '1/2 IPE', 'U');
    const noise = fc.oneof(fc.string(), fc.stringMatching(/^[0-9xX*/., -]{0,20}$/));
    fc.assert(
      fc.property(letters, noise, (prefix, rest) => {
        for (const text of [rest, prefix + rest, rest + prefix]) {
          const section = sectionFromDesignation(text);
          if (section === null) continue;
          expect(section.area).toBeGreaterThan(0);
          expect(section.inertiaMinor).toBeGreaterThan(0);
          expect(section.torsion).toBeGreaterThan(0);
          expect(section.thickness).toBeGreaterThan(0);
          expect(sectionFromDesignation(section.name)?.area).toBeCloseTo(section.area, 6);
        }
      }),
      { numRuns: 500 },
    );
  });
});

describe('two back to back', () => {
  it.each([
    ['2L 80x80x8', 'L 80x80x8'],
    ['2L80/80/8', 'L 80x80x8'],
    ['2 x L 100x50x8', 'L 100x50x8'],
    ['2-L4X3X1/4', 'L4X3X1/4'],
    ['2L4X3X1/4X3/8LLBB', 'L4X3X1/4'],
    ['2UPN200', 'UPN 200'],
    ['Diagonal 2L 80x80x8', 'L 80x80x8'],
  ])('as in "%s" are reckoned as two single ones', (text, name) => {
    const [pair, one] = [sectionNamedIn(text)!, sectionFromDesignation(name)!];
    for (const key of ['area', 'inertiaY', 'inertiaZ', 'inertiaMajor', 'inertiaMinor', 'torsion'] as const) {
      expect(pair[key] / one[key], key).toBeCloseTo(2, 9);
    }
    expect(pair.depth).toBe(one.depth);
    expect(pair.width).toBeCloseTo(2 * one.width, 12);
    expect(sectionFromDesignation(pair.name)).toEqual(pair);
  });

  it('have the area that the tables give two equal angles', () => {
    // EN 10056-1: L 80x80x8 has 12.3 cm2.
    expect(sectionFromDesignation('2L 80x80x8')!.area / 24.6e-4).toBeCloseTo(1, 2);
  });

  it.each(['2 HEA 200', '2x', '2L', '2L 80', '22L 80x80x8'])('are not seen in "%s"', (text) => {
    expect(sectionFromDesignation(text)).toBeNull();
  });
});

describe('a steel grade behind a designation', () => {
  it.each([
    ['HEA200-S355', 'HEA 200'],
    ['HEA 200 S355J2+N', 'HEA 200'],
    ['IPE300/S235JR', 'IPE 300'],
    ['IPE 300 (S355)', 'IPE 300'],
    ['RHS150x100x6.3-S355J2H', 'RHS 150x100x6.3'],
    ['W12X26-A992', 'W12X26'],
    ['HSS6X6X3/8 A500 Gr.B', 'HSS6X6X3/8'],
    ['2L 80x80x8 S355', '2L 80x80x8'],
  ])('is passed over: %s', (text, name) => {
    expect(sectionFromDesignation(text)?.name).toBe(name);
  });

  it('is no designation by itself', () => {
    for (const text of ['S355', 'S 235', 'A992']) expect(sectionFromDesignation(text)).toBeNull();
  });
});

describe('how a hollow section was made', () => {
  it.each([
    ['SHS 100x100x5', 'cold', true],
    ['CHS 114.3x5', 'cold', true],
    ['SHS 100x100x5 EN 10219', 'cold', false],
    ['CFRHS 150x100x5', 'cold', false],
    ['RHS 150x100x5 EN 10210', 'hot', false],
    ['VKR 100x100x5', 'hot', false],
    ['CHS 114.3x5 EN 10210', 'hot', false],
  ] as const)('is known of %s, or known to be assumed', (text, finish, isAssumed) => {
    const section = sectionFromDesignation(text)!;
    expect(section.making).toEqual({ finish, isAssumed });
    if (!isAssumed && finish === 'hot') expect(sectionFromDesignation(section.name)).toEqual(section);
  });

  it('is no question of an I', () => {
    expect(sectionFromDesignation('HEA 200')!.making).toBeUndefined();
  });
});

describe('a text that says more', () => {
  it.each([
    ['UB-Universal Beam:305x165x40UB:31045', 'UB 305x165x40'],
    ['Column HEA 200', 'HEA 200'],
    ['BEAM - IPE 300 - S355', 'IPE 300'],
    ['Diagonal_CHS88.9x4', 'CHS 88.9x4'],
    ['M_HSS Column:HSS6X6X1/4:123', 'HSS6X6X1/4'],
    ['Chord RHS 100 x 100 x 5 (top)', 'SHS 100x100x5'],
    ['L-Angle-Column:L2-1/2X2-1/2X1/4', 'L2-1/2X2-1/2X1/4'],
    ['HE 200 A', 'HEA 200'],
  ])('is searched for its designation: %s', (text, name) => {
    expect(sectionNamedIn(text)?.name).toBe(name);
  });

  it.each(['Level 2 T 100', 'Panel U 200', 'Line 4 / C 12', 'Fill 1515460218 200 x 240', 'B1', ''])(
    'names no section where it only looks so: %s',
    (text) => {
      expect(sectionNamedIn(text)).toBeNull();
    },
  );

  it('is left alone in no time where it is long', () => {
    const start = performance.now();
    expect(sectionNamedIn('HEA '.repeat(50000))).toBeNull();
    expect(sectionNamedIn(`${'1'.repeat(100000)}X`)).toBeNull();
    expect(performance.now() - start).toBeLessThan(1000);
  });
});
