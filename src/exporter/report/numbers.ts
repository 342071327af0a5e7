import type { Vec3 } from '../../domain/vector.ts';

/** A force (N) in kN; a dash where there is none. */
export function kN(force: number | null | undefined): string {
  if (force === null || force === undefined) return '–';
  const value = force / 1000;
  return signed(value, Math.abs(value) < 10 ? 2 : 1);
}

/** A typographic minus, and none before a zero. */
export function signed(value: number, decimals: number): string {
  const text = value.toFixed(decimals);
  return Number(text) === 0 ? text.replace('-', '') : text.replace('-', '−');
}

export const metres = (at: Vec3): readonly string[] => at.map((x) => signed(x, 3));

export const kNs = (force: readonly number[] | null): readonly string[] =>
  force === null ? ['–', '–', '–'] : force.map((part) => kN(part));
