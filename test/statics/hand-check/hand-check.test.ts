import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { RequestError } from '../../../src/domain/errors.ts';
import type { Vec3 } from '../../../src/domain/vector.ts';
import { checkCut, planeAcross, planeThrough } from '../../../src/statics/hand-check/check-cut.ts';
import { checkJoint, nearestNode, worstStateAt } from '../../../src/statics/hand-check/check-joint.ts';
import { checkWhole } from '../../../src/statics/hand-check/check-whole.ts';
import { carriedStates, stateOf } from '../../../src/statics/hand-check/state.ts';
import { solveCases } from '../../../src/statics/solution/solve-cases.ts';
import { assessStability } from '../../../src/statics/stability/assess-stability.ts';
import { alsoFlat, caseOf, fix, randomTruss, trussOf } from '../support/trusses.ts';
import { told } from './support.ts';

/** A Warren truss of three panels of 4 m, 3 m deep, 12 kN at the middle of the top: forces by hand from the method of sections. */
const points: Vec3[] = [
  [0, 0, 0],
  [4, 0, 0],
  [8, 0, 0],
  [12, 0, 0],
  [2, 0, 3],
  [6, 0, 3],
  [10, 0, 3],
];
const warren = trussOf({
  points,
  bars: [
    [0, 1],
    [1, 2],
    [2, 3],
    [4, 5],
    [5, 6],
    [0, 4],
    [4, 1],
    [1, 5],
    [5, 2],
    [2, 6],
    [6, 3],
  ],
});
const supports = alsoFlat(fix({ 0: 'xz', 3: 'z' }), points.length, 'y');
const [middle] = solveCases(warren, supports, assessStability(warren, supports), [
  caseOf([{ node: 5, force: [0, 0, -12e3] }]),
]).cases;
const result = told(warren, [middle]);
const state = stateOf(result, 'dead');

describe('a cut through a Warren truss', () => {
  const cut = checkCut(result, planeAcross([1, 0, 0], 5), state);

  it('cuts chord, diagonal and chord with the forces that moments by hand give', () => {
    const force = new Map(cut.bars.map(({ name, axialForce }) => [name, axialForce]));
    expect([...force.keys()].toSorted()).toEqual(['bar 1', 'bar 3', 'bar 7']);
    // About the top joint at 6: 6 kN x 6 m / 3 m; about the lower one at 4: 6 kN x 4 m / 3 m; the diagonal takes the shear of 6 kN.
    expect(force.get('bar 1')).toBeCloseTo(12e3, 6);
    expect(force.get('bar 3')).toBeCloseTo(-8e3, 6);
    expect(force.get('bar 7')).toBeCloseTo((-6e3 * Math.hypot(2, 3)) / 3, 6);
  });

  it('leaves nothing over, of forces and of moments', () => {
    expect(cut.outOfBalance).toBeLessThan(1e-12);
    expect(cut.kept).toBe(3);
    expect(cut.reaction[2]).toBeCloseTo(6e3, 6);
  });
});

describe('a joint of it', () => {
  it('shows unit vectors, forces and the sum', () => {
    const joint = checkJoint(result, 'n1', state);
    expect(joint.bars.map(({ name, to }) => [name, to])).toEqual([
      ['bar 0', 'n2'],
      ['bar 5', 'n5'],
    ]);
    expect(joint.bars[1].unit[0]).toBeCloseTo(2 / Math.hypot(2, 3), 12);
    // 6 kN of reaction against the diagonal: N = -6 / (3 / sqrt 13), H = 4 kN.
    expect(joint.bars[0].axialForce).toBeCloseTo(4e3, 6);
    expect(joint.bars[1].axialForce).toBeCloseTo((-6e3 * Math.hypot(2, 3)) / 3, 6);
    expect(joint.outOfBalance).toBeLessThan(1e-12);
  });

  it('is found by its place, and the state with most force there is shown', () => {
    expect(nearestNode(result, [6.1, 0, 2.9])).toEqual({ node: 'n6', away: expect.closeTo(Math.hypot(0.1, 0.1), 9) });
    expect(worstStateAt(result, 'n1', carriedStates(result))?.name).toBe('dead');
  });

  it('that is not there is a wrong request, and so is a case', () => {
    expect(() => checkJoint(result, 'n99', state)).toThrow(RequestError);
    expect(() => stateOf(result, 'snow')).toThrow(/there are: dead/);
  });

  it('shows a wrong force by what is left over', () => {
    const wrong = { ...state, axialForce: state.axialForce.map((force, bar) => (bar === 0 ? force! + 100 : force)) };
    expect(checkJoint(result, 'n1', wrong).outOfBalance).toBeGreaterThan(0.005);
    expect(checkCut(result, planeAcross([1, 0, 0], 1), wrong).outOfBalance).toBeGreaterThan(0.005);
    const lifted = { ...state, reactions: new Map([...state.reactions, ['n4', [0, 0, 0] as Vec3]]) };
    expect(checkWhole(result, lifted).outOfBalance).toBeGreaterThan(0.1);
  });
});

describe('joints, sections and the whole balance', () => {
  it('on random space trusses with carried nodes, springs and slanted supports, for any plane', () => {
    let cuts = 0;
    const coordinate = fc.double({ min: -1, max: 1, noNaN: true });
    fc.assert(
      fc.property(
        fc.integer({ min: 1, max: 1e6 }),
        fc.tuple(coordinate, coordinate, coordinate),
        fc.tuple(coordinate, coordinate, coordinate),
        (seed, normal, place) => {
          const random = randomTruss(seed, 2);
          const stability = assessStability(random.truss, random.supports);
          if (stability.mechanisms > 0 || Math.hypot(...normal) < 0.1) return;
          const { cases } = solveCases(random.truss, random.supports, stability, random.cases);
          const solved = told(random.truss, cases);
          const plane = planeThrough([5 + 4 * place[0], 5 + 4 * place[1], 3 + 2 * place[2]], normal);
          for (const one of carriedStates(solved)) {
            expect(checkWhole(solved, one).outOfBalance).toBeLessThan(1e-9);
            expect(checkCut(solved, plane, one).outOfBalance).toBeLessThan(1e-8);
            for (const { id, carriedBy } of solved.nodes)
              if (carriedBy === null) expect(checkJoint(solved, id, one).outOfBalance).toBeLessThan(1e-8);
            cuts++;
          }
        },
      ),
      { numRuns: 60, seed: 3 },
    );
    expect(cuts).toBeGreaterThan(40);
  });
});
