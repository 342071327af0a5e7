import { describe, expect, it } from 'vitest';
import { isPlainlyNotSteel } from '../../src/brief/material-words.ts';
import { applyScope } from '../../src/brief/scope.ts';
import { hollow } from '../support/members.ts';
import { makeMember } from './make-truss.ts';

const NONE = { include: [], exclude: [] };
const material = (name: string) => ({ material: { ...makeMember().material, name } });
const member = (globalId: string, changes: Parameters<typeof makeMember>[0] = {}) =>
  makeMember({ globalId, ...changes });

describe('the default scope', () => {
  it('keeps beams, columns and members, their StandardCase forms and parts of assemblies', () => {
    const members = [
      ...['IfcBeam', 'IfcBeamStandardCase', 'IfcColumn', 'IfcMember'].map((name) => member(name, { class: name })),
      member('p', { class: 'IfcBuildingElementProxy', partOf: 'IfcElementAssembly' }),
    ];
    expect(applyScope(members, NONE)).toEqual({ members, findings: [], cleats: [] });
  });

  it('leaves out secondary parts and counts each kind in one note that names them', () => {
    const { members, findings } = applyScope(
      [
        member('a'),
        member('b', { partOf: 'IfcRailing' }),
        member('c', { partOf: 'IfcRailing' }),
        member('d', { predefinedType: 'MULLION' }),
        member('e', material('Brettschichtholz GL24h')),
        member('f', { class: 'IfcPile' }),
      ],
      NONE,
    );
    expect(members.map(({ globalId }) => globalId)).toEqual(['a']);
    expect(findings.map(({ code, severity, message, members: named }) => [code, severity, message, named])).toEqual([
      ['out-of-scope', 'note', '2 members left out: part of IfcRailing.', ['b', 'c']],
      ['out-of-scope', 'note', '1 member left out: of predefined type MULLION.', ['d']],
      ['out-of-scope', 'note', '1 member left out: not of steel (Brettschichtholz GL24h: 1).', ['e']],
      ['out-of-scope', 'note', '1 member left out: of class IfcPile.', ['f']],
    ]);
  });

  it('counts all that is not steel in one note, by material', () => {
    const others = ['Beton C25/30', 'Beton C25/30', 'Holz', 'Glass', 'Brick', 'STEEL/NEOPRENE', 'PVC'];
    const { findings } = applyScope([member('s'), ...others.map((name, i) => member(`o${i}`, material(name)))], NONE);
    expect(findings.map(({ message }) => message)).toEqual([
      '7 members left out: not of steel (Beton C25/30: 2, Brick: 1, Glass: 1, Holz: 1 and 2 more).',
    ]);
  });

  it('leaves out bars too thin to be any', () => {
    const flat = (depth: number, width: number, shape: 'rectangle' | 'circle' = 'rectangle') => ({
      section: { ...hollow(0.1), name: `${depth * 1000}x${width * 1000}`, shape, depth, width },
    });
    const { members, findings } = applyScope(
      [
        member('mark', flat(0.001, 0.001)),
        member('mark too', flat(0.001, 0.001)),
        member('surface', flat(0.2, 0.001)),
        member('strip', flat(0.04, 0.003)),
        member('rod', flat(0.006, 0.006, 'circle')),
        member('wire', flat(0.002, 0.002, 'circle')),
        member('unknown', { section: null }),
      ],
      NONE,
    );
    expect(members.map(({ globalId }) => globalId)).toEqual(['strip', 'rod', 'unknown']);
    expect(findings.map(({ message }) => message)).toEqual([
      '4 members left out: too thin to be bars (1x1: 2, 200x1: 1, 2x2: 1).',
    ]);
  });

  it('leaves out sheets, and plates and cleats drawn as members, but no stub post and no flat', () => {
    const drawn = (shape: 'rectangle' | 'L' | 'I' | 'other', depth: number, width: number, length: number) => ({
      section: { ...hollow(0.1), name: `${shape} ${depth * 1000}`, shape, depth, width },
      axis: [
        [0, 0, 0],
        [length, 0, 0],
      ] as const,
    });
    const { members, findings, cleats } = applyScope(
      [
        member('decking', drawn('other', 0.035, 1.04, 8.2)),
        member('end plate', drawn('rectangle', 0.3, 0.015, 0.3)),
        member('cleat', drawn('L', 0.21, 0.06, 0.16)),
        member('stub post', drawn('I', 0.3, 0.1, 0.43)),
        member('flat brace', drawn('rectangle', 0.1, 0.01, 3)),
        member('plate girder', drawn('I', 1.2, 0.1, 12)),
      ],
      NONE,
    );
    expect(members.map(({ globalId }) => globalId)).toEqual(['stub post', 'flat brace', 'plate girder']);
    expect(cleats.map(({ globalId }) => globalId)).toEqual(['end plate', 'cleat']);
    expect(findings.map(({ message, members: named }) => [message.slice(0, 40), named])).toEqual([
      ['1 member left out: sheets of decking or ', ['decking']],
      ['2 members left out: cleats and plates dr', ['end plate', 'cleat']],
    ]);
  });

  it('takes the members of an analysis view, whatever they are made of', () => {
    const view = member('v', { class: 'IfcStructuralCurveMember', ...material('Concrete') });
    expect(applyScope([view], NONE).members).toEqual([view]);
  });

  it('says so where nothing is left', () => {
    expect(applyScope([member('a', { partOf: 'IfcStair' })], NONE).findings.map(({ code }) => code)).toEqual([
      'out-of-scope',
      'no-members',
    ]);
    expect(applyScope([], NONE).findings.map(({ code }) => code)).toEqual(['no-members']);
  });
});

describe('a scope that the brief gives', () => {
  it('is what include names, secondary parts too, less what exclude names', () => {
    const { members, findings } = applyScope(
      [
        member('a', { name: 'T1' }),
        member('b', { name: 'rail', partOf: 'IfcRailing' }),
        member('c', { name: 'x' }),
        member('d', { name: 'T2' }),
      ],
      {
        include: [
          { line: 3, name: 'T*' },
          { line: 3, name: 'rail' },
        ],
        exclude: [{ line: 4, name: 'T2' }],
      },
    );
    expect(members.map(({ globalId }) => globalId)).toEqual(['a', 'b']);
    expect(findings.map(({ message, members: named }) => [message, named])).toEqual([
      ['1 member left out: not caught by the include of the brief.', ['c']],
      ['1 member left out: caught by the exclude of line 4 of the brief, {name: T2}.', ['d']],
    ]);
  });

  it('warns of a selector that catches nothing, naming its line', () => {
    const { findings } = applyScope([member('a')], { include: [], exclude: [{ line: 7, name: 'Z*' }] });
    expect(findings).toHaveLength(1);
    expect(findings[0]).toMatchObject({ code: 'selector-empty', severity: 'warning' });
    expect(findings[0]!.message).toBe('Line 7 of the brief: no member is caught by {name: Z*}.');
  });
});

describe('a material', () => {
  it.each([
    'Holz',
    'Stahlbeton C30/37',
    'Bois massif',
    'béton armé',
    'Madera',
    'Hormigón',
    'Legno lamellare',
    'Træ',
    'Hout',
    'GL 28h',
    'C25/30',
    'EN AW-6060',
    'Aluminium',
    'Glass',
    'Concrete, cast in situ',
    'C24',
    'c 24 / EN 338',
    'Träkvalitet C30',
    'D30',
    'GL24h',
    'GL 28c',
    'C30/37',
    'LC25/28',
    'EN AW-6060',
    'EN-AW 6082 T6',
    'AW-5083',
    '6061-T6',
    'AlMgSi0.5',
    'Alu 6061',
  ])('%s is plainly not steel', (name) => expect(isPlainlyNotSteel(name)).toBe(true));
  it.each([
    'S355',
    'Steel',
    'Stahl S235JR',
    'A992',
    'Default',
    'Acier',
    'Steel, concrete encased',
    'C45',
    'C35E',
    'Steel C24',
    'UPE 240',
    'A36',
    'W24',
    'D355',
    'S420NL',
    'EN 10025 S355',
    'RAL 6011',
    'Metal - painted',
    'Aluminized steel',
  ])('%s may be steel', (name) => expect(isPlainlyNotSteel(name)).toBe(false));
});
