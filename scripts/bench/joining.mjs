// Joining per member as models grow: near-linear means that the last column stays flat.
import { importModel, joinMembers, openStep } from '../../dist/index.js';
import { race, seconds } from './measure.mjs';
import { syntheticModel } from './synthetic-model.mjs';

export async function run() {
  console.log('members   joining     per member');
  for (const [count, rounds] of [
    [1_000, 5],
    [10_000, 3],
    [100_000, 2],
  ]) {
    const { members } = await importModel(openStep(syntheticModel(count)));
    const [taken] = await race([() => joinMembers(members)], rounds);
    console.log(
      `${String(count).padEnd(8)}  ${seconds(taken).padStart(8)}  ${((taken / count) * 1e6).toFixed(1).padStart(8)} us`,
    );
  }
}
