import { add, scale, unit, type Vec3 } from '../../domain/vector.ts';
import { asRef } from '../../step/values.ts';
import type { Sources } from '../read-element.ts';
import { mapDirection, type Transform } from '../transform.ts';

/** Coordinate systems of the items of a structural analysis model. */
export class Frames {
  private readonly sources: Sources;
  /** The shared placement of the file's only analysis model, for items that are assigned to none. */
  private readonly only: number | null;

  constructor(sources: Sources) {
    this.sources = sources;
    const [first, ...others] = sources.reading.file.idsOf('IFCSTRUCTURALANALYSISMODEL');
    this.only = first === undefined || others.length > 0 ? null : this.sharedBy(first);
  }

  /**
   * What a structural item calls global (IfcStructuralAnalysisModel.SharedPlacement): the placement that its model shares,
   * else its own, which the standard wants to be the same.
   * @throws NotRead where the placement cannot be read
   */
  of(item: number): Transform {
    const own = asRef(this.sources.reading.args(item)[5]);
    return this.sources.placements.worldOf(own ?? this.sharedOf(item));
  }

  /** As `of`, for a group of loads, which has no placement. */
  ofGroup(group: number): Transform {
    return this.sources.placements.worldOf(this.sharedOf(group));
  }

  private sharedOf(item: number): number | null {
    for (const group of this.sources.relations.groupsOf.get(item) ?? []) {
      if (this.sources.reading.file.typeOf(group) === 'IFCSTRUCTURALANALYSISMODEL') return this.sharedBy(group);
    }
    return this.only;
  }

  private sharedBy(model: number): number | null {
    return asRef(this.sources.reading.args(model)[9]);
  }
}

/** What a vector given in a frame is in the world. Its length is kept: placements have no scale. */
export const turned = (frame: Transform, v: Vec3): Vec3 => mapDirection(frame, v);

/** The unit directions of a frame's axes. */
export const axesOf = (frame: Transform): readonly [Vec3, Vec3, Vec3] => [
  unit(frame.x) ?? [1, 0, 0],
  unit(frame.y) ?? [0, 1, 0],
  unit(frame.z) ?? [0, 0, 1],
];

/** A vector given along three unit axes. */
export const inAxes = (axes: readonly [Vec3, Vec3, Vec3], v: Vec3): Vec3 =>
  add(add(scale(axes[0], v[0]), scale(axes[1], v[1])), scale(axes[2], v[2]));
