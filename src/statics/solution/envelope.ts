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
  return truss.bars.map((_, bar): BarEnvelope => {
    let tension: ExtremeForce | null = null;
    let compression: ExtremeForce | null = null;
    for (const { name, axialForce } of carried) {
      const force = axialForce[bar] ?? 0;
      if (force > (tension?.force ?? NO_FORCE)) tension = { force, from: name };
      if (force < (compression?.force ?? -NO_FORCE)) compression = { force, from: name };
    }
    return { bar, tension, compression };
  });
}
