import { Matrix, solve } from 'ml-matrix';
import { describe, expect, test } from 'vitest';
import { anyNormal, cross, distance, dot, subtract, unit, type Vec3 } from '../../../src/domain/vector.ts';
import { assemble } from '../../../src/statics/engine/assemble.ts';
import { factorise } from '../../../src/statics/engine/factor.ts';
import { solveRefined } from '../../../src/statics/engine/refine.ts';
import type { Stiffness } from '../../../src/statics/engine/spectrum.ts';
import { analysePattern } from '../../../src/statics/engine/symbolic.ts';
import { applyStiffness, buildRows } from '../../../src/statics/engine/system.ts';
import { randomFrom } from '../support/trusses.ts';

interface Beam {
  readonly from: number;
  readonly to: number;
  readonly EA: number;
  readonly GJ: number;
  readonly EIy: number;
  readonly EIz: number;
}

type Form = readonly (readonly [unknown: number, value: number])[];

/**
 * A beam of Euler and Bernoulli as six linear forms of its ends' six freedoms (three movements, three turns) with a stiffness each: stretch, twist, and in either plane
 * bending with equal and with opposite end turns: EI/L (t1 - t2)^2 + 3 EI/L (t1 + t2 - 2 w / L)^2.
 */
function formsOf(points: readonly Vec3[], { from, to, EA, GJ, EIy, EIz }: Beam): { form: Form; stiffness: number }[] {
  const x = unit(subtract(points[to], points[from]))!;
  const y = anyNormal(x);
  const z = cross(x, y);
  const length = distance(points[from], points[to]);
  const move = (node: number, d: Vec3, factor: number) => d.map((v, k) => [6 * node + k, factor * v] as const);
  const turn = (node: number, d: Vec3, factor: number) => d.map((v, k) => [6 * node + 3 + k, factor * v] as const);
  const bending = (across: Vec3, about: Vec3, EI: number) => {
    // Turns about z tilt the axis to +y, turns about y to -z.
    const sign = dot(cross(about, x), across);
    return [
      { form: [...turn(from, about, sign), ...turn(to, about, -sign)], stiffness: EI / length },
      {
        form: [
          ...turn(from, about, sign),
          ...turn(to, about, sign),
          ...move(from, across, 2 / length),
          ...move(to, across, -2 / length),
        ],
        stiffness: (3 * EI) / length,
      },
    ];
  };
  return [
    { form: [...move(from, x, -1), ...move(to, x, 1)], stiffness: EA / length },
    { form: [...turn(from, x, -1), ...turn(to, x, 1)], stiffness: GJ / length },
    ...bending(y, z, EIz),
    ...bending(z, y, EIy),
  ];
}

function frame(points: readonly Vec3[], beams: readonly Beam[], held: readonly number[]): Stiffness {
  const forms = beams.flatMap((beam) => formsOf(points, beam));
  const active = new Uint8Array(6 * points.length).fill(1);
  for (const u of held) active[u] = 0;
  const rows = buildRows(forms.length, (row, put) => {
    for (const [unknown, value] of forms[row].form) if (active[unknown] && value !== 0) put(unknown, value);
  });
  const stiffness = Float64Array.from(forms, (form) => form.stiffness);
  const freedoms = { blocks: points.length, stride: 6, active };
  return { rows, stiffness, matrix: assemble(analysePattern(freedoms, rows), rows, stiffness) };
}

const clamped = (node: number) => [0, 1, 2, 3, 4, 5].map((k) => 6 * node + k);

function loadAt(points: readonly Vec3[], node: number, force: Vec3): Float64Array {
  const load = new Float64Array(6 * points.length);
  load.set(force, 6 * node);
  return load;
}

const stiff = { EA: 8e8, GJ: 3e5, EIy: 2e6, EIz: 5e6 };

describe('six freedoms a node', () => {
  // Source: beam theory by hand, w = P L^3 / (3 EI), turn P L^2 / (2 EI), u = P L / EA.
  test('a skew cantilever of many beams bends, stretches and turns as beam theory says', () => {
    const axis: Vec3 = unit([2, -1, 1.5])!;
    const [pieces, length] = [7, 5];
    const points = Array.from({ length: pieces + 1 }, (_, i): Vec3 => {
      const s = (length * i) / pieces;
      return [s * axis[0], s * axis[1], s * axis[2]];
    });
    const beams = Array.from({ length: pieces }, (_, i) => ({ from: i, to: i + 1, ...stiff }));
    const system = frame(points, beams, clamped(0));
    const factor = factorise(system.matrix);
    expect(factor.negative).toBe(0);
    const y = anyNormal(axis);
    const z = cross(axis, y);
    const cases: [Vec3, number][] = [
      [y, (1e4 * length ** 3) / (3 * stiff.EIz)],
      [z, (1e4 * length ** 3) / (3 * stiff.EIy)],
      [axis, (1e4 * length) / stiff.EA],
    ];
    const loads = cases.map(([d]) => loadAt(points, pieces, [1e4 * d[0], 1e4 * d[1], 1e4 * d[2]]));
    solveRefined(system, factor, loads).forEach(({ q }, i) => {
      const [direction, wanted] = cases[i];
      const end = [...q.subarray(6 * pieces, 6 * pieces + 3)] as unknown as Vec3;
      expect(dot(end, direction) / wanted).toBeCloseTo(1, 9);
      cases.forEach(([other], k) => {
        if (k !== i) expect(Math.abs(dot(end, other)) / wanted).toBeLessThan(1e-8);
      });
      const turn = [...q.subarray(6 * pieces + 3, 6 * pieces + 6)] as unknown as Vec3;
      if (i === 0) expect(dot(turn, z) / ((1e4 * length ** 2) / (2 * stiff.EIz))).toBeCloseTo(1, 9);
    });
  });

  test('a random frame solves as its dense matrix does', () => {
    const random = randomFrom(11);
    const points = Array.from({ length: 14 }, (): Vec3 => [8 * random(), 8 * random(), 4 * random()]);
    const beams: Beam[] = [];
    for (let to = 1; to < points.length; to++)
      for (const from of new Set([to - 1, Math.floor(random() * to)]))
        beams.push({ from, to, ...stiff, EIz: 1e6 * (1 + random()) });
    const system = frame(points, beams, clamped(0));
    const { active } = system.matrix.symbolic.freedoms;
    const unknown = [...active.keys()].filter((u) => active[u]);
    const columns = unknown.map((u) => {
      const image = applyStiffness(
        system.rows,
        system.stiffness,
        Float64Array.from(active, (_, v) => (u === v ? 1 : 0)),
      );
      return unknown.map((v) => image[v]);
    });
    const load = Float64Array.from(active, (flag) => (flag ? 1e3 * (random() - 0.5) : 0));
    const wanted = solve(new Matrix(columns), Matrix.columnVector(unknown.map((u) => load[u]))).to1DArray();
    const [{ q }] = solveRefined(system, factorise(system.matrix), [load]);
    const scale = Math.max(...wanted.map(Math.abs));
    unknown.forEach((u, i) => {
      expect(Math.abs(q[u] - wanted[i]) / scale).toBeLessThan(1e-9);
    });
  });

  test('a frame that nothing supports has six motions as one body, with a pinned bar added or without', () => {
    const points: Vec3[] = [
      [0, 0, 0],
      [4, 0, 0],
      [4, 3, 1],
      [0, 3, 2],
    ];
    const ring = [0, 1, 2].map((i) => ({ from: i, to: i + 1, ...stiff }));
    expect(factorise(frame(points, ring, []).matrix, { shift: 1 }).negative).toBe(6);
    const pinned = { from: 3, to: 0, EA: 8e8, GJ: 0, EIy: 0, EIz: 0 };
    expect(factorise(frame(points, [...ring, pinned], []).matrix, { shift: 1 }).negative).toBe(6);
  });
});
