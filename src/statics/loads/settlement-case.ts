import { SETTLEMENT } from '../../brief/check-names.ts';
import type { LoadCase, Settlement } from '../types.ts';

/** The settlements of all supports act together, in a case of their own after the others. */
export function withSettlement(cases: readonly LoadCase[], settlements: readonly Settlement[]): readonly LoadCase[] {
  if (settlements.length === 0) return cases;
  return [...cases, { name: SETTLEMENT, nature: 'permanent', isSettlement: true, loads: [], settlements }];
}
