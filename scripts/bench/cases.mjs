// Cases and combinations of a double-layer grid of 5,178 bars, 178 of them rods that cross in its upper layer.
import { factorise } from '../../dist/statics/engine/factor.js';
import { realStiffness } from '../../dist/statics/model/elastic.js';
import { findParts } from '../../dist/statics/model/parts.js';
import { buildSystem } from '../../dist/statics/model/system.js';
import { combine } from '../../dist/statics/solution/combine.js';
import { envelope } from '../../dist/statics/solution/envelope.js';
import { solveCombinations } from '../../dist/statics/solution/solve-combinations.js';
import { Solver } from '../../dist/statics/solution/solver.js';
import { assessStability } from '../../dist/statics/stability/assess-stability.js';
import { doubleLayerGrid } from './double-layer-grid.mjs';
import { race, seconds } from './measure.mjs';

const [CELLS, CROSSED, CASES, COMBINATIONS] = [25, 89, 10, 60];

/** The grid with rods in every seventh bay of its upper layer, on its edge. */
function makeGrid() {
  const { points, bars, held } = doubleLayerGrid(CELLS, 0.1);
  const upper = (i, j) => i * (CELLS + 1) + j;
  const rods = [];
  for (let bay = 0; bay < CROSSED; bay++) {
    const [i, j] = [Math.floor((7 * bay) / CELLS), (7 * bay) % CELLS];
    for (const rod of [
      [upper(i, j), upper(i + 1, j + 1)],
      [upper(i + 1, j), upper(i, j + 1)],
    ])
      rods.push(bars.push(rod) - 1);
  }
  const lengthOf = ([a, b]) => Math.hypot(...points[b].map((v, k) => v - points[a][k]));
  const truss = {
    nodes: points.map((at) => ({ at, members: [], carriedBy: null, overhangMass: 0, place: null })),
    bars: bars.map(([from, to], b) => ({
      name: `b${b}`,
      members: [b],
      from,
      to,
      length: lengthOf([from, to]),
      stiffnessEA: rods.includes(b) ? 6e7 : 4e8,
      massPerLength: 10,
      expansion: 1.2e-5,
    })),
    faith: [],
  };
  const restraints = held.flatMap((node) =>
    [
      [1, 0, 0],
      [0, 1, 0],
      [0, 0, 1],
    ].map((direction) => ({ node, direction })),
  );
  return { truss, supports: { restraints, springs: [] }, rods };
}

/** Loads of every node down or up and sideways, by the case's own waves. */
function makeCases({ nodes }) {
  return Array.from({ length: CASES }, (_, c) => ({
    name: `case ${c}`,
    nature: c === 0 ? 'permanent' : 'wind',
    loads: nodes.map(({ at: [x, y] }, node) => ({
      node,
      force: [900 * Math.cos(0.1 * c * y), 700 * Math.sin(0.3 * c + 0.1 * x), -3000 * Math.cos(0.05 * c * (x - y))],
    })),
  }));
}

const rules = Array.from({ length: COMBINATIONS }, (_, k) => ({
  name: `combination ${k}`,
  limit: 'strength',
  factors: { 'case 0': k % 2 ? 1.35 : 1, [`case ${1 + (k % 9)}`]: 1.5, [`case ${1 + ((k + 2 + (k % 5)) % 9)}`]: 0.9 },
}));

export async function run() {
  const { truss, supports, rods } = makeGrid();
  const stability = assessStability(truss, supports);
  const cases = makeCases(truss);
  console.log(`  ${truss.bars.length} bars, ${truss.nodes.length} nodes, ${CASES} cases, ${COMBINATIONS} combinations`);
  const problem = { truss, supports, parts: findParts(truss, supports) };
  const system = buildSystem(problem, [], realStiffness(truss));
  const { cases: solved } = new Solver(truss, supports, stability).solve(cases);
  const combined = combine(solved, rules);
  const [factor, enveloped, both, moved] = await race(
    [
      () => factorise(system.matrix),
      () => envelope(truss, solved, combined),
      () => envelope(truss, solved, combine(solved, rules)),
      () => combine(solved, rules).map(({ displacement }) => displacement),
    ],
    9,
  );
  const ratio = (value) => `${(value / factor).toFixed(2)} of a factorisation`;
  console.log(`  factorisation ${seconds(factor)}`);
  console.log(`  envelope of the combinations ${seconds(enveloped)}: ${ratio(enveloped)}`);
  console.log(`  forces and reactions of the combinations, and the envelope ${seconds(both)}: ${ratio(both)}`);

  console.log(`  the same with the movements of every node ${seconds(moved)}: ${ratio(moved)}`);

  const oneWay = { tensionOnly: rods, compressionOnly: [] };
  const [first, once] = await race(
    [
      () => solveCombinations(new Solver(truss, supports, stability, { oneWay }), cases, rules.slice(0, 1)),
      () => solveCombinations(new Solver(truss, supports, stability, { oneWay }), cases, rules),
    ],
    3,
  );
  const each = (once - first) / (COMBINATIONS - 1);
  const { combinations } = solveCombinations(new Solver(truss, supports, stability, { oneWay }), cases, rules);
  const slack = combinations.map((one) => one.slack.length);
  console.log(`  ${rods.length} rods that only pull, ${Math.min(...slack)} to ${Math.max(...slack)} slack`);
  console.log(
    `  with them: the first combination ${seconds(first)}, each further one ${seconds(each)}: ${ratio(each)}`,
  );
}
