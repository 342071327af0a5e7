import type { Vec3 } from '../domain/vector.ts';
import type { Given } from '../importer/given.ts';
import { SAME_POINT } from './point-finder.ts';
import type { Brief, NodeSelector } from './types.ts';

/** A place that a support or a point load names by its coordinates, and will look for a node at. */
export interface NamedPlace {
  readonly at: Vec3;
  /** m. */
  readonly within: number;
  readonly for: 'support' | 'load';
}

/** The places that the brief's supports and point loads name, and where it has none of its own those of the model. */
export function namedPlaces(brief: Pick<Brief, 'supports' | 'cases'>, given: Given | null): NamedPlace[] {
  const supports =
    given === null || brief.supports.length > 0
      ? brief.supports.flatMap((rule) => placesOf(rule.at, 'support'))
      : given.supports.map(({ at }): NamedPlace => ({ at, within: SAME_POINT, for: 'support' }));
  const points = brief.cases.flatMap(({ loads }) => loads).filter((load) => load.kind === 'point');
  return [...supports, ...points.flatMap((load) => placesOf(load.at, 'load'))];
}

function placesOf(selectors: readonly NodeSelector[], use: NamedPlace['for']): NamedPlace[] {
  return selectors.flatMap(({ near, within }) =>
    near === undefined || within === undefined ? [] : { at: near, within, for: use },
  );
}
