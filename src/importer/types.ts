import type { Finding } from '../domain/finding.ts';
import type { GridLine } from '../domain/grid-line.ts';
import type { Member } from '../domain/member.ts';
import type { PlaceNamer } from '../domain/place.ts';
import type { Vec3 } from '../domain/vector.ts';
import type { Evidence } from './evidence/types.ts';
import type { Given } from './given.ts';

export interface Project {
  readonly globalId: string;
  readonly name: string | null;
}

/** What was read of a model, before any scope is applied. */
export interface ImportedModel {
  readonly schema: string;
  /** The file's own length unit as people write it: mm, m, in, ft. */
  readonly lengthUnit: string;
  readonly source: 'physical' | 'analysis';
  /** In the order of geometry, not of the file. */
  readonly members: readonly Member[];
  readonly findings: readonly Finding[];
  readonly placeOf: PlaceNamer;
  /** The same told from another corner (world x and y); null where a grid names places. */
  readonly placesFrom: ((corner: Vec3) => PlaceNamer) | null;
  /** The building's grid, for drawings. */
  readonly gridLines: readonly GridLine[];
  /** The model's IfcProject; null where there is none. */
  readonly project: Project | null;
  /** Elements of the classes asked for, whether or not they could be read. */
  readonly elementCount: number;
  /** The model's own supports, loads and combinations; null where its physical elements were read. */
  readonly given: Given | null;
  /** What is fastened to what, besides the members' own lines; null for an analysis view. */
  readonly evidence: Evidence | null;
}
