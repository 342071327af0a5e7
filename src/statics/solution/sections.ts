import type { Truss } from '../../domain/truss.ts';
import type { Parts } from '../model/parts.ts';
import type { Problem } from '../model/system.ts';
import type { Judgement } from '../stability/assess-stability.ts';
import type { LoadCase } from '../types.ts';

/** The name of a bar that is solved and has no section; null where all have one. */
export function lacksSection(truss: Truss, parts: Parts): string | null {
  return truss.bars.find((bar, b) => bar.stiffnessEA === null && parts.liveBar[b])?.name ?? null;
}

export interface SectionJudgement {
  /** Why a case cannot be solved for want of a section; null where it can. */
  readonly refuse: (one: LoadCase) => string | null;
  /** Whether the displacement of a node is not known because a bar of its part has no section. */
  readonly withoutDisplacement: (node: number) => boolean;
}

/** In a determinate part forces do not hang on sections, displacements do; elsewhere both do. */
export function judgeSections({ truss, parts }: Problem, stability: Judgement): SectionJudgement {
  const lacking = new Map<number, number[]>();
  truss.bars.forEach((bar, b) => {
    if (bar.stiffnessEA !== null || !parts.liveBar[b]) return;
    const part = parts.partOf[bar.from];
    lacking.set(part, [...(lacking.get(part) ?? []), b]);
  });
  const indeterminate = new Set(
    stability.parts.filter((c) => c.selfStressStates > 0 && lacking.has(c.part)).map((c) => c.part),
  );
  return {
    refuse: (one) => {
      const strained = [
        ...one.loads.filter(({ force }) => force.some((component) => component !== 0)).map(({ node }) => node),
        ...(one.freeStretch ?? []).map(({ bar }) => truss.bars[bar].from),
        ...(one.settlements ?? []).map(({ node }) => node),
      ];
      const node = strained.find((n) => parts.liveNode[n] && indeterminate.has(parts.partOf[n]));
      if (node === undefined) return null;
      const bars = lacking.get(parts.partOf[node])!;
      const names = bars.slice(0, 3).map((b) => truss.bars[b].name);
      const rest = bars.length > 3 ? ` and ${bars.length - 3} more` : '';
      const verb = bars.length === 1 ? 'has' : 'have';
      return `load case ${one.name}: ${names.join(', ')}${rest} ${verb} no section, and the truss is statically indeterminate there, so that its forces hang on it`;
    },
    withoutDisplacement: (node) => lacking.has(parts.partOf[node]),
  };
}
