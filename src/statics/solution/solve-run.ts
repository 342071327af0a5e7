import type { Brief } from '../../brief/types.ts';
import { RequestError } from '../../domain/errors.ts';
import type { Truss } from '../../domain/truss.ts';
import { analyseWhole, type Whole } from '../analyse-whole.ts';
import { NOT_JUDGED } from '../buckling/judge-buckling.ts';
import { combinationsFor } from '../combinations/combinations-for.ts';
import type { Generated, NamedCombination } from '../combinations/generate.ts';
import { withSway } from '../combinations/with-sway.ts';
import { findIdleBars, type IdleBars } from '../idle/idle-bars.ts';
import { idleFindings } from '../idle/words.ts';
import { slackNote } from '../one-way/slack-note.ts';
import type { Judgement } from '../stability/assess-stability.ts';
import type { Named } from '../stability/names.ts';
import type { BarEnvelope, HoldForce, LoadCase, OneWay, Supports } from '../types.ts';
import { forcesBeyondReason } from './beyond-reason.ts';
import { combine } from './combine.ts';
import { envelope } from './envelope.ts';
import { holdForces } from './hold-forces.ts';
import { solveCombinations } from './solve-combinations.ts';
import { Solver } from './solver.ts';
import { judgeBalance } from './stable-balance.ts';
import { supportLifts } from './support-lifts.ts';

export interface RunRules {
  readonly brief: Pick<Brief, 'combinations' | 'codeRule' | 'site' | 'analysis'>;
  /** The model's own combinations, where its cases are used; else null. */
  readonly given: readonly NamedCombination[] | null;
  readonly oneWay: OneWay;
  /** Those the truss was made of, for their marks. */
  readonly members: readonly Named[];
  /** Which of them brace. */
  readonly bracing: ReadonlySet<number>;
}

export interface RunSolution extends Whole {
  /** How a code made the combinations; null where they were listed. */
  readonly generated: Generated | null;
  readonly envelope: readonly BarEnvelope[];
  readonly holds: readonly HoldForce[];
  readonly idle: IdleBars;
  /** Every case is carried in stable balance. */
  readonly isStable: boolean;
}

/** Cases, their combinations and the envelope. Combinations are sums of cases, unless some bars only pull or only push. */
export function solveRun(
  truss: Truss,
  supports: Supports,
  stability: Judgement,
  cases: readonly LoadCase[],
  { brief, given, oneWay, members, bracing }: RunRules,
): RunSolution {
  const superposable = oneWay.tensionOnly.length + oneWay.compressionOnly.length === 0;
  refuseTogether(cases, brief.analysis === 'second-order', superposable);
  const solver = new Solver(truss, supports, stability, { oneWay });
  const solved = solver.solve(cases);
  const acting = cases.filter(({ swayOf }) => swayOf === undefined);
  const { combinations: upright, generated } = combinationsFor(acting, brief, given, superposable);
  const rules = withSway(upright, cases);
  const combined = superposable
    ? { combinations: combine(solved.cases, rules), findings: [] }
    : solveCombinations(solver, cases, rules);
  const balance = judgeBalance(truss, stability, solved.cases, combined.combinations, members);
  const whole = superposable
    ? analyseWhole(truss, supports, stability, balance.cases, balance.combinations, { analysis: brief.analysis })
    : { cases: balance.cases, combinations: balance.combinations, buckling: NOT_JUDGED, findings: [] };
  const idle = findIdleBars(truss, supports, whole, oneWay);
  return {
    ...whole,
    generated,
    idle,
    envelope: envelope(truss, whole.cases, whole.combinations),
    holds: holdForces(truss, supports, whole.cases, whole.combinations),
    isStable: balance.isStable,
    findings: [
      ...solved.findings,
      ...forcesBeyondReason(truss, cases, solved.cases),
      ...combined.findings,
      ...balance.findings,
      ...supportLifts(truss, whole.combinations),
      ...idleFindings(truss, members, idle.everywhere, bracing),
      ...slackNote(truss, oneWay, whole.cases, whole.combinations),
      ...whole.findings,
    ],
  };
}

/** The search for slack bars and the balance at moved nodes are not made together. */
function refuseTogether(cases: readonly LoadCase[], isSecondOrder: boolean, superposable: boolean): void {
  const strained = cases.find((one) => one.freeStretch?.length || one.settlements?.length);
  if (!isSecondOrder || (superposable && strained === undefined)) return;
  const what = superposable
    ? `temperature, misfit or settlement (case ${strained!.name})`
    : 'bars that only pull or only push';
  throw new RequestError(
    `the brief: analysis: second-order is not available together with ${what} yet; take one of them out`,
  );
}
