import type { Result } from '../../domain/result.ts';
import type { BucklingJudgement } from '../../statics/buckling/judge-buckling.ts';
import type { IdleBar, IdleBars } from '../../statics/idle/idle-bars.ts';
import type { AskedLoad } from '../../statics/loads/asked.ts';
import type { HoldForce, LoadCase, OneWay, SolvedCase, SolvedCombination, Supports } from '../../statics/types.ts';
import { barId, extreme, nodalForces, nodeId, point } from './names.ts';

/** Movements below this share of the largest are left out of a mode. */
const TOLD = 1e-3;

export function resultBuckling({ governing }: BucklingJudgement): Pick<Result, 'buckling'> {
  if (governing === null) return {};
  const modes = governing.modes.map(({ factor, moves }) => {
    const vectorAt = (node: number): [number, number, number] => [
      moves[3 * node],
      moves[3 * node + 1],
      moves[3 * node + 2],
    ];
    const nodes = [...Array(moves.length / 3).keys()].filter((node) => vectorAt(node).some((v) => Math.abs(v) > TOLD));
    return { factor, nodes: nodes.map(nodeId), movement: nodes.map(vectorAt) };
  });
  return { buckling: { from: governing.from, modes } };
}

export function resultAsked({ asked, applied, ...load }: AskedLoad): NonNullable<Result['asked']>[number] {
  return { ...load, asked: asked && point(asked), applied: point(applied) };
}

export function oneWayBars({ tensionOnly, compressionOnly }: OneWay): Pick<Result, 'oneWay'> {
  if (tensionOnly.length + compressionOnly.length === 0) return {};
  return { oneWay: { tensionOnly: tensionOnly.map(barId), compressionOnly: compressionOnly.map(barId) } };
}

export function idleBars({ everywhere, cases }: IdleBars): Pick<Result, 'idle'> {
  const named = (bars: readonly IdleBar[]) =>
    bars.map(({ bar, rule, node }) => ({ bar: barId(bar), rule, node: node === null ? null : nodeId(node) }));
  if (cases.length === 0) return {};
  return {
    idle: { everywhere: named(everywhere), cases: cases.map((one) => ({ case: one.case, bars: named(one.bars) })) },
  };
}

export function resultHold(hold: HoldForce, { restraints, springs }: Supports): NonNullable<Result['holds']>[number] {
  const { node, direction, because, force, compression, usual } = hold;
  return {
    node: nodeId(node),
    direction: point(direction),
    because,
    supported: [...restraints, ...springs].some((support) => support.node === node),
    force: extreme(force),
    compression: extreme(compression),
    usual,
  };
}

export function resultCase(
  { refused, slack, unstable, ...solved }: SolvedCase,
  applied: readonly LoadCase[],
): Result['cases'][number] {
  return {
    ...solved,
    ...movesOf(applied.find(({ name }) => name === solved.name)),
    ...(refused === null ? {} : { refused }),
    ...(slack === undefined ? {} : { slack: slack.map(barId) }),
    ...(unstable === undefined ? {} : { unstable: { bars: unstable.bars.map(barId) } }),
    loads: nodalForces(solved.loads),
    loadSum: point(solved.loadSum),
    axialForce: [...solved.axialForce],
    displacement: solved.displacement.map((movement) => movement && point(movement)),
    reactions: nodalForces(solved.reactions),
  };
}

/** Of one bar all free stretch together. */
function movesOf(applied: LoadCase | undefined): Pick<Result['cases'][number], 'stretch' | 'settlements'> {
  const stretch = new Map<number, number>();
  for (const { bar, by } of applied?.freeStretch ?? []) stretch.set(bar, (stretch.get(bar) ?? 0) + by);
  const settlements = (applied?.settlements ?? []).map(({ node, movement }) => ({
    node: nodeId(node),
    movement: point(movement),
  }));
  return {
    ...(stretch.size === 0 ? {} : { stretch: [...stretch].map(([bar, by]) => ({ bar: barId(bar), by })) }),
    ...(settlements.length === 0 ? {} : { settlements }),
  };
}

export function resultCombination({
  refused,
  slack,
  unstable,
  ...solved
}: SolvedCombination): Result['combinations'][number] {
  return {
    ...solved,
    ...(refused === null ? {} : { refused }),
    ...(slack === undefined ? {} : { slack: slack.map(barId) }),
    ...(unstable === undefined ? {} : { unstable: { bars: unstable.bars.map(barId) } }),
    factors: { ...solved.factors },
    axialForce: [...solved.axialForce],
    displacement: solved.displacement.map((movement) => movement && point(movement)),
    reactions: nodalForces(solved.reactions),
  };
}
