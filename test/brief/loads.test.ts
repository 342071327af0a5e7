import { describe, expect, it } from 'vitest';
import { parseBrief } from '../../src/brief/parse-brief.ts';
import { resolveSettlements } from '../../src/brief/settlements.ts';
import { makeGrid, makeTruss } from './make-truss.ts';

const brief = (lines: string) => parseBrief(`pinwright: 1\n${lines}\n`, 'brief.yaml');
const loadsOf = (load: string) => brief(`cases:\n  - {name: a, nature: wind, loads: [${load}]}`).cases[0].loads;

describe('loads of a brief', () => {
  it('temperature, misfit, outlines and edges come out in SI', () => {
    expect(loadsOf('{temperature: 25 K, on: {name: a}}, {misfit: 2 mm, on: {name: a}}')).toMatchObject([
      { kind: 'temperature', change: 25 },
      { kind: 'misfit', by: 0.002 },
    ]);
    const surface = 'area: 1 kN/m2, over: {top: true}, acts: down, per: plan';
    expect(
      loadsOf(`{${surface}, outline: [[0, 0], [10 m, 0], [10, 5000 mm]], openings: [[[1, 1], [2, 1], [2, 2]]]}`),
    ).toMatchObject([
      {
        outline: [
          [0, 0],
          [10, 0],
          [10, 5],
        ],
        openings: [
          [
            [1, 1],
            [2, 1],
            [2, 2],
          ],
        ],
      },
    ]);
    expect(loadsOf(`{${surface}, edge: 300 mm}`)).toMatchObject([{ edge: 0.3 }]);
  });

  it('snow on the ground is an area load per plan area, with exposure and thermal coefficients', () => {
    expect(
      loadsOf(
        '{snow: 0.8 kN/m2, over: {top: true}, arrangement: half-left, exposure: 0.8, thermal: 1.2, left: [0, 1]}',
      ),
    ).toMatchObject([
      {
        kind: 'area',
        pressure: expect.closeTo(768, 9),
        acts: 'down',
        per: 'plan',
        snow: { arrangement: 'half-left', left: [0, 1], guards: false },
      },
    ]);
  });

  it('wind is an area load at right angles for each zone: pressure x (external - internal)', () => {
    expect(
      loadsOf(
        '{wind: 0.6 kN/m2, internal: 0.2, zones: [{over: {top: true}, coefficient: -1.2}, {over: {level: [5, 6]}, coefficient: 0.7}]}',
      ),
    ).toMatchObject([
      { kind: 'area', pressure: expect.closeTo(-840, 9), acts: 'normal', per: 'slope', called: 'wind zone 1' },
      { kind: 'area', pressure: expect.closeTo(300, 9), called: 'wind zone 2' },
    ]);
  });

  it.each([
    [
      '{area: 1, over: {top: true}, acts: down, per: plan, outline: [[0, 0], [1, 0], [1, 1]], edge: 1}',
      'leave "edge" out',
    ],
    ['{snow: 0.8 kN/m2, over: {top: true}, exposure: 12}', 'this coefficient lies between 0 and 2'],
    ['{snow: 0.8 kN/m2, over: {top: true}, arangement: undrifted}', 'did you mean "arrangement"?'],
    ['{temperature: 25 mm, on: {name: a}}', 'this is a length'],
  ])('says what is wrong with %s', (load, expected) => {
    expect(() => loadsOf(load)).toThrow(expected);
  });
});

describe('a settlement', () => {
  it('makes a case named settlement, which a combination may name and a case may not be called', () => {
    const supports = 'supports: [{at: {lowest: true}, fix: xyz, settle: {z: -5 mm}}]';
    expect(brief(supports).supports[0].settle).toEqual([0, 0, -0.005]);
    const list = 'combinations: [{name: c, limit: strength, factors: {settlement: 1.2}}]';
    expect(brief(`${supports}\n${list}`).combinations[0].factors).toEqual({ settlement: 1.2 });
    expect(() => brief(list)).toThrow('"settlement": there is no such case');
    expect(() => brief(`${supports}\ncases: [{name: settlement, nature: wind, loads: []}]`)).toThrow(
      'this name is taken',
    );
  });

  it('only goes along what its support fixes', () => {
    expect(() => brief('supports: [{at: {lowest: true}, fix: xy, settle: {z: -5 mm}}]')).toThrow(
      'settles only in a direction',
    );
    expect(() => brief('supports: [{at: {lowest: true}, spring: {z: 1 MN/m}, settle: {z: -5 mm}}]')).toThrow(
      'settles only',
    );
    expect(
      brief('supports: [{at: {lowest: true}, fix: {along: [0, 0, 2]}, settle: {z: 1 mm}}]').supports[0].settle,
    ).toEqual([0, 0, 0.001]);
  });

  it('may stand twice on a node, but not in two sizes', () => {
    const { at, runs } = makeGrid([0, 4], [0, 4]);
    const { truss, members } = makeTruss(at, runs);
    const rules = (second: string) =>
      resolveSettlements(
        truss,
        members,
        brief(
          `supports:\n  - {at: {lowest: true}, fix: z, settle: {z: -5 mm}}\n  - {at: {near: [0, 0, 0], within: 20 m}, fix: z, settle: {z: ${second}}}`,
        ),
      );
    expect(rules('-5 mm')).toHaveLength(4);
    expect(() => rules('-6 mm')).toThrow('lines 3 and 4: two different settlements');
  });
});
