import { pushTo } from '../domain/group.ts';
import type { StepFile } from '../step/step-file.ts';
import { asRef, asRefs, asString } from '../step/values.ts';
import { IdMap, type ReadonlyIdMap } from './id-map.ts';

/** Who belongs to whom: each relationship class is passed over once. Keys and values are instance ids. */
export interface Relations {
  /** The whole that a part is aggregated or nested into. */
  readonly wholeOf: ReadonlyIdMap;
  /** The spatial structure element that contains an element. */
  readonly containerOf: ReadonlyIdMap;
  readonly typeOf: ReadonlyIdMap;
  /** What IfcRelAssociatesMaterial gives an element or a type. */
  readonly materialOf: ReadonlyIdMap;
  /** The groups, systems and zones that an element is assigned to. */
  readonly groupsOf: ReadonlyMap<number, readonly number[]>;
  /** Name of the layer that a representation or an item is on. */
  readonly layerOf: ReadonlyMap<number, string>;
}

export function readRelations(file: StepFile): Relations {
  const wholeOf = new IdMap();
  for (const type of ['IFCRELAGGREGATES', 'IFCRELNESTS']) toMany(file, type, 4, 5, wholeOf);
  const containerOf = new IdMap();
  toMany(file, 'IFCRELCONTAINEDINSPATIALSTRUCTURE', 5, 4, containerOf);
  const typeOf = new IdMap();
  toMany(file, 'IFCRELDEFINESBYTYPE', 5, 4, typeOf);
  const materialOf = new IdMap();
  toMany(file, 'IFCRELASSOCIATESMATERIAL', 5, 4, materialOf);
  return { wholeOf, containerOf, typeOf, materialOf, groupsOf: readGroups(file), layerOf: readLayers(file) };
}

function readGroups(file: StepFile): Map<number, number[]> {
  const groups = new Map<number, number[]>();
  for (const type of ['IFCRELASSIGNSTOGROUP', 'IFCRELASSIGNSTOGROUPBYFACTOR']) {
    for (const id of file.idsOf(type)) {
      const args = file.args(id);
      const group = asRef(args[6]);
      if (group !== null && file.has(group)) for (const object of asRefs(args[4])) pushTo(groups, object, group);
    }
  }
  return groups;
}

/** Instances have no ids from here on. */
const ID_LIMIT = 2 ** 32;

/** Files the one at attribute `one` under each of those in the list at attribute `many`; the first relationship stands. */
function toMany(file: StepFile, type: string, one: number, many: number, into: IdMap): void {
  for (const id of file.idsOf(type)) {
    const relating = file.refAt(id, one);
    if (relating === null || !file.has(relating)) continue;
    for (const related of file.refsAt(id, many)) if (related < ID_LIMIT) into.setFirst(related, relating);
  }
}

function readLayers(file: StepFile): Map<number, string> {
  const layers = new Map<number, string>();
  for (const type of ['IFCPRESENTATIONLAYERASSIGNMENT', 'IFCPRESENTATIONLAYERWITHSTYLE']) {
    for (const id of file.idsOf(type)) {
      const args = file.args(id);
      const name = asString(args[0]);
      if (name !== null) for (const item of asRefs(args[2])) layers.set(item, name);
    }
  }
  return layers;
}

const NONE: readonly number[] = [];

/** The wholes that `id` is part of, the nearest first. Ends where the file's own relations run in a circle. */
export function wholesAbove(relations: Relations, id: number): readonly number[] {
  if (!relations.wholeOf.has(id)) return NONE;
  const above: number[] = [];
  const seen = new Set([id]);
  for (let at = relations.wholeOf.get(id); at !== undefined && !seen.has(at); at = relations.wholeOf.get(at)) {
    seen.add(at);
    above.push(at);
  }
  return above;
}
