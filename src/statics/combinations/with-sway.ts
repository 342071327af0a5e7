import { RequestError } from '../../domain/errors.ts';
import type { LoadCase } from '../types.ts';
import type { NamedCombination } from './generate.ts';

const MOST = 20_000;

const WAYS = [
  { way: 0, sign: 1 },
  { way: 0, sign: -1 },
  { way: 1, sign: 1 },
  { way: 1, sign: -1 },
] as const;

/**
 * Every strength and accidental combination once for each way the structure may lean, each of its cases bringing its own sway by its own factor. The one that
 * leans no way lies between two that do and is left out. Service and equilibrium stay as they are.
 * @throws RequestError where there are too many to be meant
 */
export function withSway(combinations: readonly NamedCombination[], cases: readonly LoadCase[]): NamedCombination[] {
  const sways = cases.flatMap(({ name, swayOf, swayWay }) =>
    swayOf === undefined ? [] : [{ name, swayOf, way: swayWay }],
  );
  if (sways.length === 0) return [...combinations];
  const swaying = combinations.flatMap((one): NamedCombination[] => {
    if (one.limit !== 'strength' && one.limit !== 'accidental') return [one];
    const leaning = WAYS.flatMap(({ way, sign }) => {
      const own = sways.filter((sway) => sway.way === way && one.factors[sway.swayOf] !== undefined);
      if (own.length === 0) return [];
      const direction = own[0].name.slice(own[0].swayOf.length + ': sway '.length);
      const factors = Object.fromEntries(own.map(({ name, swayOf }) => [name, sign * one.factors[swayOf]]));
      return [
        {
          ...one,
          name: `${one.name}, leaning ${sign > 0 ? '+' : '-'}${direction}`,
          factors: { ...one.factors, ...factors },
        },
      ];
    });
    return leaning.length > 0 ? leaning : [one];
  });
  if (swaying.length > MOST)
    throw new RequestError(
      `combinations: these cases make ${swaying.length} combinations with imperfections: give cases that never act together one \`alternative:\` name, or list the combinations`,
    );
  return swaying;
}
