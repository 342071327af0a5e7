import type { System } from '../model/system.ts';
import type { Restraint } from '../types.ts';

/** Maxwell's count for one part that hangs together. */
export interface PartCounts {
  readonly part: number;
  readonly freedoms: number;
  /** Bars and springs. */
  readonly bars: number;
  readonly mechanisms: number;
  readonly selfStressStates: number;
}

export function countParts(base: System, pivots: readonly Restraint[], mechanisms: number): PartCounts[] {
  const { parts, truss } = base.problem;
  const { bars, springs } = base.elongations;
  const freedoms = new Int32Array(parts.count);
  base.movement.freedoms.active.forEach((flag, unknown) => {
    const part = parts.partOf[Math.floor(unknown / 3)];
    if (flag) freedoms[part] = freedoms[part] + 1;
  });
  const rows = new Int32Array(parts.count);
  for (const b of bars) rows[parts.partOf[truss.bars[b].from]]++;
  for (const spring of springs) rows[parts.partOf[spring.node]]++;
  const moving = new Int32Array(parts.count);
  for (const pivot of pivots) moving[parts.partOf[pivot.node]]++;
  const live = [...new Set(parts.partOf.filter((part, node) => part >= 0 && parts.liveNode[node]))];
  return live.map((part) => {
    // Where one part is all there is, its mechanisms are known without the pivots.
    const m = live.length === 1 ? mechanisms : moving[part];
    const rank = freedoms[part] - m;
    return { part, freedoms: freedoms[part], bars: rows[part], mechanisms: m, selfStressStates: rows[part] - rank };
  });
}
