import { describe, expect, test } from 'vitest';
import type { Vec3 } from '../../../src/domain/vector.ts';
import { assessStability } from '../../../src/statics/stability/assess-stability.ts';
import { makeTruss } from '../../brief/make-truss.ts';
import { fix } from '../support/trusses.ts';

const bending = ({ truss, members }: ReturnType<typeof makeTruss>, supports: ReturnType<typeof fix>) =>
  assessStability(truss, supports, { members }).findings.filter(({ code }) => code === 'works-in-bending');

describe('works-in-bending', () => {
  test('is said of beams and columns that meet without triangles, naming them and what to do', () => {
    const at: Vec3[] = [
      [0, 0, 0],
      [6, 0, 0],
      [0, 0, 4],
      [6, 0, 4],
    ];
    const portal = makeTruss(at, [
      { nodes: [0, 2], member: { tag: 'C1' } },
      { nodes: [1, 3], member: { tag: 'C2' } },
      { nodes: [2, 3], member: { tag: 'B1' } },
    ]);
    const [said] = bending(portal, fix({ 0: 'xyz', 1: 'xyz', 2: 'y', 3: 'y' }));
    expect(said.message).toMatch(/C1, (C2, B1|B1, C2)/);
    expect(said.advice).toContain('holds:');
    expect(said.advice).toContain('leave the columns out');
    const braced = makeTruss(at, [
      [0, 2],
      [1, 3],
      [2, 3],
      [0, 3],
    ]);
    expect(bending(braced, fix({ 0: 'xyz', 1: 'xyz' }))).toEqual([]);
  });

  test('is said of a member that runs through a joint which only its own bending holds, not of a bar with a loose end', () => {
    const at: Vec3[] = [
      [0, 0, 0],
      [3, 0, 0],
      [6, 0, 0],
    ];
    const supports = fix({ 0: 'xyz', 1: 'y', 2: 'xyz' });
    const beam = makeTruss(at, [{ nodes: [0, 1, 2], member: { tag: 'CH' } }]);
    expect(bending(beam, supports)[0].message).toContain('(CH)');
    const two = makeTruss(at, [
      [0, 1],
      [1, 2],
    ]);
    expect(bending(two, supports)).toEqual([]);
  });
});
