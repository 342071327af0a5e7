/** A stream of chance that a seed fixes: the same seed draws the same roof on every machine. */
export interface Chance {
  /** Between `low` and `high`. */
  readonly between: (low: number, high: number) => number;
  /** A whole number from `low` to `high`, both included. */
  readonly whole: (low: number, high: number) => number;
  readonly pick: <T>(choices: readonly T[]) => T;
  readonly happens: (probability: number) => boolean;
  readonly shuffled: <T>(list: readonly T[]) => T[];
}

export function chanceOf(seed: number): Chance {
  let state = (Math.imul(seed, 0x9e3779b1) ^ 0x85ebca6b) >>> 0;
  // mulberry32, a public-domain generator.
  const next = (): number => {
    state = (state + 0x6d2b79f5) >>> 0;
    let t = state;
    t = Math.imul(t ^ (t >>> 15), t | 1);
    t ^= t + Math.imul(t ^ (t >>> 7), t | 61);
    return ((t ^ (t >>> 14)) >>> 0) / 2 ** 32;
  };
  const between = (low: number, high: number): number => low + (high - low) * next();
  const whole = (low: number, high: number): number => low + Math.floor((high - low + 1) * next());
  return {
    between,
    whole,
    pick: (choices) => choices[whole(0, choices.length - 1)],
    happens: (probability) => next() < probability,
    shuffled: (list) => {
      const result = [...list];
      for (let i = result.length - 1; i > 0; i--) {
        const j = whole(0, i);
        [result[i], result[j]] = [result[j], result[i]];
      }
      return result;
    },
  };
}
