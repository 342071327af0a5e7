// Random roofs as detailers draw them, by two hands, joined as drawn and with planted faults: what is found, what is found in vain.
import { tsImport } from 'tsx/esm/api';
import { assessStability, joinMembers } from '../../dist/index.js';

const ROOFS = 50;

export async function run() {
  const { score } = await tsImport('./roofs/score.ts', import.meta.url);
  const { tableOf } = await tsImport('./roofs/table.ts', import.meta.url);
  const { randomRoof } = await tsImport('./roofs/random-roof.ts', import.meta.url);
  const { otherRoof } = await tsImport('./other-roofs/other-roof.ts', import.meta.url);
  const seeds = Array.from({ length: ROOFS }, (_, i) => i + 1);
  for (const [title, roofOf] of [
    ['roofs', randomRoof],
    ['roofs by another hand', otherRoof],
  ]) {
    console.log(`\n${ROOFS} ${title}, 0 to 10 faults in each`);
    console.log(tableOf(score(seeds, { join: joinMembers, judge: assessStability }, roofOf)));
  }
}
