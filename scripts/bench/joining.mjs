// Joining: recall and precision on random roofs, then time and memory per member as models grow.
import { run as faults } from './joining-faults.mjs';
import { run as growth } from './joining-growth.mjs';

export async function run() {
  await faults();
  console.log();
  await growth();
}
