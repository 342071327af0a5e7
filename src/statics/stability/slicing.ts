import { type Factor, factorise } from '../engine/factor.ts';
import { lowestEigenvalue } from '../engine/lanczos.ts';
import { countBelow, highestEigenvalue, type Stiffness } from '../engine/spectrum.ts';
import { countFreedoms } from '../engine/system.ts';
import type { StabilityOptions } from './options.ts';

/** Rounding level: eigenvalues below this share of the highest cannot be told from zero. */
export const ROUNDING = 1e-15;
/** Where the ladder ends: what is stiffer than this is no matter of doubt. */
const LADDER_TOP = -6;
/** Unknowns up to which the gap's edges are bisected to 15 %; above, they are known to half a decade. */
const BISECTED = 20_000;

export interface Rung {
  /** Share of the highest eigenvalue. */
  readonly ratio: number;
  /** Eigenvalues below it. */
  readonly count: number;
}

/** What the eigenvalues of the unit stiffness say. */
export interface Spectrum {
  readonly highest: number;
  readonly mechanisms: number;
  readonly gap: number | null;
  /** Share of the highest eigenvalue between what counts as nothing and what does not. */
  readonly cut: number;
  /** Eigenvalues above the mechanisms and below `options.nearly`. */
  readonly nearly: number;
  /** Share of the lowest eigenvalue that is no mechanism, where it was found. */
  readonly lowest: number | null;
  /** Of the system itself, where nothing moves freely. */
  readonly factor: Factor | null;
  /** The counts found on the way, by ratio. */
  readonly ladder: readonly Rung[];
}

/** Spectrum slicing: counts eigenvalues below a ladder of shifts and looks for the gap between mechanisms and stiffness. */
export function sliceSpectrum(system: Stiffness, options: StabilityOptions): Spectrum {
  const freedoms = countFreedoms(system.matrix.symbolic.freedoms);
  const highest = freedoms === 0 ? 0 : highestEigenvalue(system);
  const plain = {
    highest,
    gap: 1 / ROUNDING,
    cut: options.threshold,
    nearly: 0,
    lowest: null,
    factor: null,
    ladder: [],
  };
  if (highest === 0) return { ...plain, mechanisms: freedoms };
  const counts = new Counts(system, highest, freedoms);

  if (counts.below(options.threshold) === 0) {
    const factor = factorise(system.matrix);
    const lowest = lowestEigenvalue(factor) / highest;
    const nearly = lowest < options.nearly ? counts.below(options.nearly) : 0;
    return { ...plain, mechanisms: 0, gap: lowest / ROUNDING, nearly, lowest, factor, ladder: counts.rungs() };
  }
  const gap = widestGap(counts, options, freedoms <= BISECTED);
  if (gap === null || gap.upper / gap.lower < options.clearGap) {
    const mechanisms = counts.below(options.threshold);
    return { ...plain, mechanisms, gap: null, ladder: counts.rungs() };
  }
  return {
    ...plain,
    mechanisms: gap.count,
    gap: gap.upper / gap.lower,
    cut: Math.sqrt(gap.lower * gap.upper),
    nearly: Math.max(counts.below(options.nearly) - gap.count, 0),
    lowest: gap.upper,
    ladder: counts.rungs(),
  };
}

interface Gap {
  readonly count: number;
  readonly lower: number;
  readonly upper: number;
}

/** Among the plateaus that begin no higher than the threshold, the widest. */
function widestGap(counts: Counts, options: StabilityOptions, bisect: boolean): Gap | null {
  const ratios: number[] = [];
  for (let e = 2 * Math.log10(ROUNDING); e <= 2 * LADDER_TOP; e++) ratios.push(10 ** (Math.round(e) / 2));
  const count: number[] = new Array(ratios.length);
  const fill = (i: number, j: number): void => {
    if (j - i < 2) return;
    if (count[i] === count[j]) {
      count.fill(count[i], i + 1, j);
      return;
    }
    const middle = (i + j) >> 1;
    count[middle] = counts.below(ratios[middle]);
    fill(i, middle);
    fill(middle, j);
  };
  count[0] = counts.below(ratios[0]);
  count[ratios.length - 1] = counts.below(ratios[ratios.length - 1]);
  fill(0, ratios.length - 1);

  let widest: Gap | null = null;
  for (let i = 0; i < ratios.length; ) {
    let j = i;
    while (j + 1 < ratios.length && count[j + 1] === count[i]) j++;
    const next = j + 1 < ratios.length ? ratios[j + 1] : 2;
    const before = i > 0 ? ratios[i - 1] : ROUNDING;
    if (ratios[i] <= options.threshold && next / before >= options.clearGap) {
      const lower = i === 0 || !bisect ? ratios[i] : counts.edge(before, ratios[i], count[i], false);
      const upper = bisect || j + 1 === ratios.length ? counts.edge(ratios[j], next, count[i], true) : ratios[j];
      if (widest === null || upper / lower > widest.upper / widest.lower) widest = { count: count[i], lower, upper };
    }
    i = j + 1;
  }
  return widest;
}

class Counts {
  private readonly known = new Map<number, number>();
  private readonly system: Stiffness;
  private readonly highest: number;
  private readonly freedoms: number;

  constructor(system: Stiffness, highest: number, freedoms: number) {
    this.system = system;
    this.highest = highest;
    this.freedoms = freedoms;
  }

  below(ratio: number): number {
    if (ratio >= 2) return this.freedoms;
    let count = this.known.get(ratio);
    if (count === undefined) {
      count = countBelow(this.system.matrix, ratio * this.highest);
      this.known.set(ratio, count);
    }
    return count;
  }

  /** Where between two ratios the count changes: its last ratio with `count` below (`after` true) or its first (false), to 15 %. */
  edge(low: number, high: number, count: number, after: boolean): number {
    let from = low;
    let to = high;
    while (to / from > 1.15) {
      const middle = Math.sqrt(from * to);
      if ((this.below(middle) === count) === after) from = middle;
      else to = middle;
    }
    return after ? from : to;
  }

  rungs(): Rung[] {
    return [...this.known].map(([ratio, count]) => ({ ratio, count })).sort((a, b) => a.ratio - b.ratio);
  }
}
