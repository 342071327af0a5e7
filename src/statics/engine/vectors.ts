export function inner(x: Float64Array, y: Float64Array): number {
  let sum = 0;
  for (let i = 0; i < x.length; i++) sum += x[i] * y[i];
  return sum;
}

export function largest(x: Float64Array): number {
  let most = 0;
  for (const v of x) most = Math.max(most, Math.abs(v));
  return most;
}

/** A start vector with some of everything in it, the same at every run (a linear congruential sequence). */
export function scatter(active: Uint8Array, seed: number): Float64Array {
  let state = (seed * 2654435761) >>> 0;
  return Float64Array.from(active, (flag) => {
    state = (Math.imul(state, 1664525) + 1013904223) >>> 0;
    return flag ? state / 2 ** 31 - 1 : 0;
  });
}
