// Random roofs as detailers draw them, joined as drawn and with planted faults: what is found, and what is found in vain.
import { tsImport } from 'tsx/esm/api';
import { joinMembers } from '../../dist/index.js';

const ROOFS = 50;

export async function run() {
  const { score } = await tsImport('./roofs/score.ts', import.meta.url);
  const { tableOf } = await tsImport('./roofs/table.ts', import.meta.url);
  const seeds = Array.from({ length: ROOFS }, (_, i) => i + 1);
  console.log(tableOf(score(seeds, joinMembers)));
}
