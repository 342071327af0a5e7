import { countBelow } from '../engine/spectrum.ts';
import { buildSystem, type Problem, type System } from '../model/system.ts';
import type { Restraint } from '../types.ts';
import type { NewBar } from './remedy-bars.ts';
import type { Spectrum } from './slicing.ts';

/** Mechanisms left with some more directions held. */
export function leftWithHeld(base: System, held: readonly Restraint[], spectrum: Spectrum): number {
  return countBelow(buildSystem(base.problem, held, undefined, base).matrix, spectrum.cut * spectrum.highest);
}

/** Mechanisms left with some more bars, and some more directions held. */
export function leftWithBars(
  { problem }: System,
  bars: readonly NewBar[],
  held: readonly Restraint[],
  spectrum: Spectrum,
): number {
  const { truss, parts } = problem;
  const more = bars.map(([from, to]) => ({ ...truss.bars[0], from, to }));
  const braced: Problem = {
    ...problem,
    truss: { ...truss, bars: [...truss.bars, ...more] },
    parts: { ...parts, liveBar: Uint8Array.from([...parts.liveBar, ...more.map(() => 1)]) },
  };
  return countBelow(buildSystem(braced, held).matrix, spectrum.cut * spectrum.highest);
}
