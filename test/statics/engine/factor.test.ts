import { EigenvalueDecomposition, Matrix } from 'ml-matrix';
import { describe, expect, test } from 'vitest';
import { assemble } from '../../../src/statics/engine/assemble.ts';
import { factorise } from '../../../src/statics/engine/factor.ts';
import { coupleBlocks } from '../../../src/statics/engine/graph.ts';
import { lowestEigenvalue } from '../../../src/statics/engine/lanczos.ts';
import { minimumDegree } from '../../../src/statics/engine/minimum-degree.ts';
import { nestedDissection } from '../../../src/statics/engine/nested-dissection.ts';
import { solveMany } from '../../../src/statics/engine/solve.ts';
import { highestEigenvalue, lowestEigenpairs } from '../../../src/statics/engine/spectrum.ts';
import { layOut } from '../../../src/statics/engine/symbolic.ts';
import { applyStiffness, buildRows, type Freedoms } from '../../../src/statics/engine/system.ts';
import { randomFrom } from '../support/trusses.ts';

/** Random rows over blocks of `stride` freedoms, some of them absent; each row joins neighbours on a ring and now and then a third. */
function randomSystem(seed: number, stride: number, blocks: number) {
  const random = randomFrom(seed);
  const active = Uint8Array.from({ length: blocks * stride }, () => (random() < 0.85 ? 1 : 0));
  const freedoms: Freedoms = { blocks, stride, active };
  const rows = buildRows(4 * stride * blocks, (row, put) => {
    const block = row % blocks;
    const touched = [block, (block + 1 + Math.floor(random() * 3)) % blocks];
    if (random() < 0.2) touched.push(Math.floor(random() * blocks));
    for (const b of touched)
      for (let c = 0; c < stride; c++) if (active[b * stride + c]) put(b * stride + c, random() - 0.5);
  });
  const stiffness = Float64Array.from({ length: rows.count }, () => 0.5 + random());
  return { freedoms, rows, stiffness };
}

function dense({ freedoms, rows, stiffness }: ReturnType<typeof randomSystem>): { matrix: Matrix; unknown: number[] } {
  const unknown = [...freedoms.active.keys()].filter((u) => freedoms.active[u]);
  const columns = unknown.map((u) => {
    const unit = new Float64Array(freedoms.active.length);
    unit[u] = 1;
    const image = applyStiffness(rows, stiffness, unit);
    return unknown.map((v) => image[v]);
  });
  return { matrix: new Matrix(columns), unknown };
}

describe.each([1, 2, 3, 4, 6])('with %i freedoms a block', (stride) => {
  const system = randomSystem(stride, stride, 30);
  const graph = coupleBlocks(system.freedoms, system.rows);
  const orders = { nestedDissection: nestedDissection(graph), minimumDegree: minimumDegree(graph) };
  const { matrix, unknown } = dense(system);
  const values = [...new EigenvalueDecomposition(matrix, { assumeSymmetric: true }).realEigenvalues].sort(
    (a, b) => a - b,
  );

  test.each(['nestedDissection', 'minimumDegree'] as const)('factors, solves and counts in the order of %s', (name) => {
    const order = orders[name];
    expect([...order].sort((a, b) => a - b)).toEqual(Array.from({ length: 30 }, (_, i) => i));
    const assembled = assemble(layOut(system.freedoms, graph, order), system.rows, system.stiffness);
    for (let i = 0; i + 1 < values.length; i += 3) {
      const shift = (values[i] + values[i + 1]) / 2;
      expect(factorise(assembled, { shift }).negative).toBe(i + 1);
    }
    const random = randomFrom(9);
    const loads = Array.from({ length: 11 }, () => system.freedoms.active.length).map((size) =>
      Float64Array.from({ length: size }, (_, u) => (system.freedoms.active[u] ? random() - 0.5 : 0)),
    );
    solveMany(factorise(assembled), loads).forEach((x, t) => {
      const image = applyStiffness(system.rows, system.stiffness, x);
      for (const u of unknown) expect(image[u]).toBeCloseTo(loads[t][u], 9);
    });
  });

  test('finds the ends of the spectrum', () => {
    const assembled = assemble(layOut(system.freedoms, graph, orders.minimumDegree), system.rows, system.stiffness);
    const full = { ...system, matrix: assembled };
    const factor = factorise(assembled);
    expect(lowestEigenvalue(factor) / values[0]).toBeCloseTo(1, 3);
    expect(highestEigenvalue(full) / values[values.length - 1]).toBeCloseTo(1, 1);
    lowestEigenpairs(full, factor, 2, 60).forEach((pair, i) => {
      expect(pair.value / values[i]).toBeCloseTo(1, 2);
    });
  });
});

describe('orderings', () => {
  test('a hub that everything meets is eliminated late', () => {
    const blocks = 400;
    const freedoms = { blocks, stride: 1, active: new Uint8Array(blocks).fill(1) };
    const rows = buildRows(blocks - 1, (row, put) => {
      put(0, 1);
      put(row + 1, -1);
    });
    const graph = coupleBlocks(freedoms, rows);
    for (const order of [nestedDissection(graph), minimumDegree(graph)])
      expect(layOut(freedoms, graph, order).columnStart[blocks]).toBe(blocks - 1);
  });

  test('nested dissection of a square grid fills no more than n log n asks for', () => {
    const side = 40;
    const blocks = side * side;
    const freedoms = { blocks, stride: 1, active: new Uint8Array(blocks).fill(1) };
    const ends: [number, number][] = [];
    for (let i = 0; i < side; i++)
      for (let j = 0; j < side; j++) {
        if (i + 1 < side) ends.push([i * side + j, (i + 1) * side + j]);
        if (j + 1 < side) ends.push([i * side + j, i * side + j + 1]);
      }
    const rows = buildRows(ends.length, (row, put) => {
      put(ends[row][0], 1);
      put(ends[row][1], -1);
    });
    const graph = coupleBlocks(freedoms, rows);
    // Source: 31/4 n log2 n (George 1973), the natural order fills n^1.5.
    const natural = layOut(
      freedoms,
      graph,
      Int32Array.from({ length: blocks }, (_, i) => i),
    ).columnStart[blocks];
    for (const order of [nestedDissection(graph), minimumDegree(graph)]) {
      const fill = layOut(freedoms, graph, order).columnStart[blocks];
      expect(fill).toBeLessThan(natural / 2);
      expect(fill).toBeLessThan((31 / 4) * blocks * Math.log2(blocks));
    }
  });
});
