import { EigenvalueDecomposition, Matrix } from 'ml-matrix';
import { describe, expect, test } from 'vitest';
import type { Truss } from '../../../src/domain/truss.ts';
import type { Vec3 } from '../../../src/domain/vector.ts';
import { assemble } from '../../../src/statics/engine/assemble.ts';
import { countBelow } from '../../../src/statics/engine/spectrum.ts';
import { analysePattern } from '../../../src/statics/engine/symbolic.ts';
import { applyStiffness, joinRows } from '../../../src/statics/engine/system.ts';
import { type Elongations, mapElongations } from '../../../src/statics/model/elongation.ts';
import { forceDensities, mapTransverse, projectGeometric } from '../../../src/statics/model/geometric-stiffness.ts';
import { gatherForces, mapMovement, nodeMovements } from '../../../src/statics/model/movement.ts';
import { findParts } from '../../../src/statics/model/parts.ts';
import { randomFrom, randomTruss } from '../support/trusses.ts';

/** Forces that the bars put on the nodes of a truss whose nodes have moved, when their axial forces stay as they are. */
function nodeForces(truss: Truss, { bars }: Elongations, axial: Float64Array, moves: Float64Array): Float64Array {
  const out = new Float64Array(3 * truss.nodes.length);
  bars.forEach((b, row) => {
    const { from, to } = truss.bars[b];
    const at = (node: number, axis: number) => truss.nodes[node].at[axis] + moves[3 * node + axis];
    const between = [0, 1, 2].map((axis) => at(to, axis) - at(from, axis));
    const length = Math.hypot(...between);
    between.forEach((v, axis) => {
      out[3 * from + axis] -= (axial[row] * v) / length;
      out[3 * to + axis] += (axial[row] * v) / length;
    });
  });
  return out;
}

describe('geometric stiffness', () => {
  test('is what turning bars under a steady force do to the joints, carried nodes and skew supports included', () => {
    for (let seed = 1; seed <= 40; seed++) {
      const { truss, supports } = randomTruss(seed, 2);
      const movement = mapMovement(truss, findParts(truss, supports), supports.restraints);
      const elongations = mapElongations(truss, findParts(truss, supports), supports, movement);
      const random = randomFrom(seed);
      const axial = Float64Array.from(elongations.bars, () => 1e4 * (random() - 0.5));
      const q = Float64Array.from(movement.freedoms.active, (flag) => (flag ? random() - 0.5 : 0));
      const got = applyStiffness(mapTransverse(truss, movement, elongations), forceDensities(elongations, axial), q);
      // Central difference of the joint forces: an independent derivative of the bars' directions.
      const step = 1e-4;
      const moved = (sign: number) =>
        gatherForces(
          movement,
          nodeForces(
            truss,
            elongations,
            axial,
            nodeMovements(movement, q).map((v) => sign * step * v),
          ),
        );
      const [ahead, behind] = [moved(1), moved(-1)];
      const scale = Math.max(...got.map(Math.abs));
      got.forEach((v, u) => {
        expect(Math.abs(v - (ahead[u] - behind[u]) / (2 * step)) / scale).toBeLessThan(1e-6);
      });
      const moves = nodeMovements(movement, q);
      const energy = projectGeometric(truss, elongations, axial, [moves, moves.map((v) => 2 * v)]);
      const wanted = q.reduce((sum, v, u) => sum + v * got[u], 0);
      expect(energy.get(0, 0) / wanted).toBeCloseTo(1, 9);
      expect(energy.get(0, 1) / wanted).toBeCloseTo(2, 9);
    }
  });

  test('assembles with K into one matrix whose inertia is that of the dense sum', () => {
    let indefinite = 0;
    for (let seed = 41; seed <= 60; seed++) {
      const { truss, supports } = randomTruss(seed, 2);
      const movement = mapMovement(truss, findParts(truss, supports), supports.restraints);
      const elongations = mapElongations(truss, findParts(truss, supports), supports, movement);
      const random = randomFrom(seed);
      const rows = joinRows(elongations.rows, mapTransverse(truss, movement, elongations));
      const stiffness = Float64Array.from({ length: rows.count }, (_, r) =>
        r < elongations.rows.count ? 1 : 2 * (random() - 0.5),
      );
      const { active } = movement.freedoms;
      const unknown = [...active.keys()].filter((u) => active[u]);
      const columns = unknown.map((u) => {
        const image = applyStiffness(
          rows,
          stiffness,
          Float64Array.from(active, (_, v) => (u === v ? 1 : 0)),
        );
        return unknown.map((v) => image[v]);
      });
      const values = new EigenvalueDecomposition(new Matrix(columns), { assumeSymmetric: true }).realEigenvalues;
      const negative = values.filter((v) => v < 0).length;
      indefinite += negative;
      expect(countBelow(assemble(analysePattern(movement.freedoms, rows), rows, stiffness), 0)).toBe(negative);
    }
    expect(indefinite).toBeGreaterThan(0);
  });

  test('does not resist a bar that stretches and softens one that is turned under compression', () => {
    const { truss, supports } = randomTruss(3, 2);
    const movement = mapMovement(truss, findParts(truss, supports), supports.restraints);
    const elongations = mapElongations(truss, findParts(truss, supports), supports, movement);
    const axial = new Float64Array(elongations.bars.length);
    axial[0] = -5e3;
    const { from, to, length } = truss.bars[elongations.bars[0]];
    const along = elongations.directions[0];
    const across: Vec3 = [along[1], -along[0], 0];
    const movesBy = (direction: Vec3) => {
      const moves = new Float64Array(3 * truss.nodes.length);
      direction.forEach((v, axis) => {
        moves[3 * to + axis] = v;
        moves[3 * from + axis] = -v;
      });
      return moves;
    };
    const energy = projectGeometric(truss, elongations, axial, [movesBy(along), movesBy(across)]);
    expect(energy.get(0, 0)).toBeCloseTo(0, 6);
    expect(energy.get(1, 1)).toBeCloseTo((-5e3 / length) * 4 * (along[0] ** 2 + along[1] ** 2), 6);
  });
});
