import type { Truss } from '../../domain/truss.ts';
import type { BarEnvelope, ExtremeForce, SolvedCase, SolvedCombination } from '../types.ts';
import { decisive } from './decisive.ts';

/** N; a force below this is rounding, not tension or compression. */
const NO_FORCE = 1e-3;

/**
 * Greatest tension and compression of each bar over the strength and accidental combinations, or over the cases where there is no
 * combination. What is refused has no part in it.
 */
export function envelope(
  truss: Truss,
  cases: readonly SolvedCase[],
  combinations: readonly SolvedCombination[],
): BarEnvelope[] {
  const carried = decisive(cases, combinations);
  const count = truss.bars.length;
  const most = new Float64Array(count).fill(NO_FORCE);
  const least = new Float64Array(count).fill(-NO_FORCE);
  const mostIn = new Int32Array(count).fill(-1);
  const leastIn = new Int32Array(count).fill(-1);
  // One answer after the other: each is one list, and walking along a list is what a machine does best.
  carried.forEach(({ axialForce }, from) => {
    for (let bar = 0; bar < count; bar++) {
      const force = axialForce[bar] ?? 0;
      if (force > most[bar]) {
        most[bar] = force;
        mostIn[bar] = from;
      }
      if (force < least[bar]) {
        least[bar] = force;
        leastIn[bar] = from;
      }
    }
  });
  const extreme = (values: Float64Array, from: Int32Array, bar: number): ExtremeForce | null =>
    from[bar] < 0 ? null : { force: values[bar], from: carried[from[bar]].name };
  return truss.bars.map((_, bar) => ({
    bar,
    tension: extreme(most, mostIn, bar),
    compression: extreme(least, leastIn, bar),
  }));
}
