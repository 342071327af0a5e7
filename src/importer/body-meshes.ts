import type { Polygon } from './geometry/mesh.ts';

/** Meshes of elements whose bodies only a geometry parser can tell of, by the element's id in the file. */
export interface BodyMeshes {
  /** Flat faces in world metres; null where there are none (yet). */
  of(element: number): readonly Polygon[] | null;
}

/** Gives no mesh and remembers what was asked for, so that a parser is loaded for those only. */
export class WantedMeshes implements BodyMeshes {
  readonly wanted = new Set<number>();

  of(element: number): null {
    this.wanted.add(element);
    return null;
  }
}
