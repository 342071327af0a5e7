import type { Finding } from '../domain/finding.ts';
import type { Truss } from '../domain/truss.ts';
import { type BucklingJudgement, judgeBuckling } from './buckling/judge-buckling.ts';
import { solveSecondOrder } from './second-order/solve-second-order.ts';
import type { Judgement } from './stability/assess-stability.ts';
import type { NodalForce, SolvedCase, SolvedCombination, Supports } from './types.ts';

export interface WholeOptions {
  /** first-order: balance at the nodes as they stand in the model; second-order: at the nodes as they have moved. */
  readonly analysis: 'first-order' | 'second-order';
}

export const WHOLE_DEFAULTS: WholeOptions = { analysis: 'first-order' };

export interface Whole {
  readonly cases: readonly SolvedCase[];
  readonly combinations: readonly SolvedCombination[];
  readonly buckling: BucklingJudgement;
  readonly findings: readonly Finding[];
}

/**
 * What concerns the truss as a whole: how near it is to buckling, from first-order forces, and second order where it is asked for. That is of the combinations
 * (of the cases where there is no combination, else the cases stay first order, since their sum would mean nothing).
 */
export function analyseWhole(
  truss: Truss,
  supports: Supports,
  stability: Judgement,
  cases: readonly SolvedCase[],
  combinations: readonly SolvedCombination[],
  options: Partial<WholeOptions> = {},
): Whole {
  const isSecondOrder = { ...WHOLE_DEFAULTS, ...options }.analysis === 'second-order';
  const buckling = judgeBuckling(truss, stability, cases, combinations, { isSecondOrder });
  if (!isSecondOrder) return { cases, combinations, buckling, findings: buckling.findings };
  if (combinations.length === 0) {
    const again = cases.map((firstOrder) => ({ firstOrder, loads: firstOrder.loads }));
    const { solved, findings } = solveSecondOrder(truss, supports, stability, again);
    return { cases: solved, combinations, buckling, findings: [...buckling.findings, ...findings] };
  }
  const again = combinations.map((firstOrder) => ({ firstOrder, loads: loadsOf(firstOrder, cases) }));
  const { solved, findings } = solveSecondOrder(truss, supports, stability, again);
  return { cases, combinations: solved, buckling, findings: [...buckling.findings, ...findings] };
}

function loadsOf({ factors }: SolvedCombination, cases: readonly SolvedCase[]): NodalForce[] {
  return cases.flatMap(({ name, loads }) => {
    const factor = factors[name] ?? 0;
    if (factor === 0) return [];
    return loads.map(
      ({ node, force }): NodalForce => ({
        node,
        force: [factor * force[0], factor * force[1], factor * force[2]],
      }),
    );
  });
}
