// The sparse engine against CHOLMOD on double-layer grids, both in one run; many right-hand sides; the stage on a real gridshell against what the
// bare parser takes to open its file.
import { existsSync, readFileSync } from 'node:fs';
import { join } from 'node:path';
import { fileURLToPath } from 'node:url';
import { IfcAPI } from 'web-ifc';
import { parseBrief, runModel } from '../../dist/index.js';
import { assemble } from '../../dist/statics/engine/assemble.js';
import { factorise } from '../../dist/statics/engine/factor.js';
import { solveRefined } from '../../dist/statics/engine/refine.js';
import { solveMany, solveOne } from '../../dist/statics/engine/solve.js';
import { analysePattern } from '../../dist/statics/engine/symbolic.js';
import { asColumns, compileCholmod } from './cholmod.mjs';
import { gridSystem } from './double-layer-grid.mjs';
import { race, seconds } from './measure.mjs';

/** Seconds of processor time of this process, collector and compiler included: on a shared machine the clock says little. */
const processorTime = () => {
  const { user, system } = process.cpuUsage();
  return (user + system) / 1e6;
};

const TURN = 0.35;
const SIDES = 16;

export async function run() {
  const cholmod = compileCholmod();
  console.log(
    'double-layer grids, processor time: ordering and layout, assembly, factor, one solution; CHOLMOD: analyse, factorise, solve',
  );
  for (const [cells, rounds] of [
    [21, 40],
    [69, 6],
    [128, 3],
  ])
    for (const turn of [0, TURN]) grid(cells, turn, rounds, cholmod);
  cholmod?.close();
  await gridshell();
}

function grid(cells, turn, rounds, cholmod) {
  const { load, ...system } = gridSystem(cells, turn);
  const unknowns = system.freedoms.active.reduce((sum, flag) => sum + flag, 0);
  const least = [0, 0, 0, 0, 0].map(() => Number.POSITIVE_INFINITY);
  let theirs = null;
  let factor = null;
  let matrix = null;
  const columns = cholmod === null ? null : asColumns(system, load);
  // No collection between rounds: it throws compiled code away, which costs the small grid more than all else.
  for (let round = 0; round < rounds; round++) {
    const times = [processorTime()];
    const lap = () => times.push(processorTime());
    const symbolic = analysePattern(system.freedoms, system.rows);
    lap();
    matrix = assemble(symbolic, system.rows, system.stiffness);
    lap();
    factor = factorise(matrix);
    lap();
    solveOne(factor, load);
    lap();
    const taken = times.slice(1).map((t, i) => t - times[i]);
    [...taken, taken.reduce((sum, t) => sum + t, 0)].forEach((t, i) => {
      least[i] = Math.min(least[i], t);
    });
    if (cholmod === null) continue;
    const answer = cholmod.run(columns, 1);
    if (theirs === null || answer.all < theirs.all) theirs = answer;
  }
  const [refined] = solveRefined({ ...system, matrix }, factor, [load]);
  if (!Number.isFinite(refined.q[2])) throw new Error('no solution');
  const name = `${unknowns} unknowns${turn === 0 ? '' : ', turned'}`;
  const [order, assembly, numeric, solution, all] = least;
  console.log(`${name}: ${seconds(all)} = ${[order, assembly, numeric, solution].map(seconds).join(' + ')}`);
  if (theirs !== null)
    console.log(
      `  CHOLMOD ${seconds(theirs.all)} = ${[theirs.analyse, theirs.factorise, theirs.solve].map(seconds).join(' + ')}; ratio ${(all / theirs.all).toFixed(2)}`,
    );
  const many = Array.from({ length: SIDES }, () => load);
  const began = processorTime();
  solveMany(factor, many);
  const together = processorTime() - began;
  console.log(
    `  ${SIDES} right-hand sides together: ${seconds(together)}, ${(together / solution).toFixed(1)} times one of them`,
  );
}

/** Eight cases, so that what the envelope adds to one is seen. */
const BRIEF = (count) => `pinwright: 1
supports:
  - {at: {lowest: true}, fix: xyz}
cases:
${Array.from({ length: count }, (_, i) => `  - {name: "case ${i + 1}", nature: permanent, loads: [{selfWeight: ${i + 1}}]}`).join('\n')}
`;

async function gridshell() {
  const root = fileURLToPath(new URL('../..', import.meta.url));
  const file = join(process.env.PINWRIGHT_SHARED ?? join(root, '../shared'), 'data/gridshell-roof.ifc');
  if (!existsSync(file)) return console.log('no gridshell to measure: no public models beside the checkout');
  const bytes = readFileSync(file);
  const parser = new IfcAPI();
  await parser.Init();
  parser.SetLogLevel(6);
  const stage = async (cases) => {
    const { seconds: spent } = await runModel(bytes, { brief: parseBrief(Buffer.from(BRIEF(cases)), 'brief') });
    return spent.stability + spent.solve;
  };
  const spent = { 1: Number.POSITIVE_INFINITY, 8: Number.POSITIVE_INFINITY };
  for (let round = 0; round < 6; round++)
    for (const cases of [1, 8]) spent[cases] = Math.min(spent[cases], await stage(cases));
  const [opens] = await race([() => parser.CloseModel(parser.OpenModel(bytes))], 6);
  console.log(
    `gridshell: stability, solution and buckling ${seconds(spent[1])} with one case, ${seconds(spent[8])} with eight; the parser opens it in ${seconds(opens)}; ratio ${(spent[1] / opens).toFixed(2)}`,
  );
}
