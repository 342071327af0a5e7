// Timing for benchmarks: both sides of a ratio run in turn, so that a noisy machine slows both.

/** Least time in seconds of each side over `rounds` turns. Sides may be asynchronous. */
export async function race(sides, rounds) {
  const least = sides.map(() => Number.POSITIVE_INFINITY);
  for (let round = 0; round < rounds; round++) {
    for (const [i, side] of sides.entries()) {
      globalThis.gc?.();
      const began = performance.now();
      await side();
      least[i] = Math.min(least[i], (performance.now() - began) / 1000);
    }
  }
  return least;
}

export const seconds = (value) => (value < 0.1 ? `${(value * 1000).toFixed(1)} ms` : `${value.toFixed(2)} s`);
