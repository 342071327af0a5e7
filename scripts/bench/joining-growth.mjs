// Joining per member as models grow, in one run: near-linear means that time and memory per member stay flat.
import { joinMembers } from '../../dist/index.js';
import { growthHall } from './growth-hall.mjs';
import { race, seconds } from './measure.mjs';

export async function run() {
  console.log('members    joining     per member   against 1k   kept per member');
  let first = 0;
  for (const [count, rounds] of [
    [1_000, 12],
    [10_000, 4],
    [100_000, 2],
    [1_000_000, 1],
  ]) {
    const members = growthHall(count);
    globalThis.gc?.();
    const before = process.memoryUsage().heapUsed;
    let joined = null;
    const [taken] = await race(
      [
        () => {
          joined = null;
          joined = joinMembers(members);
        },
      ],
      rounds,
    );
    globalThis.gc?.();
    const kept = (process.memoryUsage().heapUsed - before) / count;
    if (joined.truss.bars.length < count) throw new Error(`${joined.truss.bars.length} bars of ${count} members`);
    const each = (taken / count) * 1e6;
    first ||= each;
    const cells = [
      String(count).padEnd(9),
      seconds(taken).padStart(9),
      `${each.toFixed(1)} us`.padStart(12),
      (each / first).toFixed(2).padStart(10),
      `${(kept / 1000).toFixed(2)} kB`.padStart(15),
    ];
    console.log(cells.join('  '));
  }
}
