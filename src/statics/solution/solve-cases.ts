import type { Truss } from '../../domain/truss.ts';
import type { Judgement } from '../stability/assess-stability.ts';
import type { LoadCase, Supports } from '../types.ts';
import { type Solution, type SolveOptions, Solver } from './solver.ts';

/** As `Solver`, where all cases are at hand at once. */
export function solveCases(
  truss: Truss,
  supports: Supports,
  stability: Judgement,
  asked: readonly LoadCase[],
  options: Partial<SolveOptions> = {},
): Solution {
  return new Solver(truss, supports, stability, options).solve(asked);
}
