import type { Result } from '../../domain/result.ts';
import type { Judgement } from '../../statics/stability/assess-stability.ts';
import type { Mode, Remedy } from '../../statics/types.ts';
import { barId, nodeId, point } from './names.ts';

const MODES_LISTED = 100;

export function resultStability(stability: Judgement): Result['stability'] {
  const { modes, setAside } = stability;
  const listed = modes.slice(0, MODES_LISTED);
  const omitted = stability.mechanisms - listed.length;
  return {
    nodes: stability.nodes,
    bars: stability.bars,
    restraints: stability.restraints,
    springs: stability.springs,
    rank: stability.rank,
    mechanisms: stability.mechanisms,
    selfStressStates: stability.selfStressStates,
    freeBody: stability.freeBody,
    gap: stability.gap,
    ...(stability.criticalBars === null ? {} : { criticalBars: stability.criticalBars.map(barId) }),
    redundancy: stability.parts.map(({ part, freedoms, ...counts }) => ({ ...counts })),
    setAside: setAside.map(barId),
    modes: listed.map(resultMode),
    ...(omitted > 0 ? { modesOmitted: omitted } : {}),
  };
}

function resultMode({ nodes, movement, remedy, otherRemedy, ...mode }: Mode): Result['stability']['modes'][number] {
  return {
    ...mode,
    nodes: nodes.map(nodeId),
    movement: movement.map(point),
    remedy: remedy.map(resultRemedy),
    ...(otherRemedy.length === 0 ? {} : { otherRemedy: otherRemedy.map(resultRemedy) }),
  };
}

function resultRemedy(step: Remedy): Result['stability']['modes'][number]['remedy'][number] {
  return 'bar' in step
    ? { bar: [nodeId(step.bar[0]), nodeId(step.bar[1])] }
    : { node: nodeId(step.node), direction: point(step.direction) };
}
