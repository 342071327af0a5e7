import type { BodyMeshes } from './body-meshes.ts';
import { writtenClass } from './class-names.ts';
import { type ContextBook, layerOf } from './context.ts';
import { elementAxes } from './element-axes.ts';
import { NO_GLOBAL_ID, refusal, remarksOn, triedText } from './element-remarks.ts';
import type { FactsBook } from './facts.ts';
import type { MaterialBook } from './materials/material-book.ts';
import { compareRounded, isSound, type MemberAxis } from './member-axis.ts';
import type { MemberStore } from './member-store.ts';
import { namedAxis } from './named-axis.ts';
import { NotRead } from './not-read.ts';
import type { ImportOptions } from './options.ts';
import type { Placements } from './placements.ts';
import type { Reading } from './reading.ts';
import type { Relations } from './relations.ts';
import { readShape } from './representations.ts';
import { knownSections } from './sections/known-sections.ts';
import type { SectionBook } from './sections/section-book.ts';
import type { SharedDirections } from './shared-directions.ts';
import type { SiblingSections } from './siblings.ts';
import type { Transform } from './transform.ts';

/** What elements are read with. */
export interface Sources {
  readonly reading: Reading;
  readonly relations: Relations;
  readonly contexts: ContextBook;
  readonly placements: Placements;
  readonly sections: SectionBook;
  readonly siblings: SiblingSections;
  readonly materials: MaterialBook;
  readonly facts: FactsBook;
  readonly directions: SharedDirections;
  readonly members: MemberStore;
  readonly options: ImportOptions;
}

/** Reads the members that one element holds into the store; none, with a finding, where it cannot be read. */
export function readElement(sources: Sources, id: number, stated: string, meshes: BodyMeshes): void {
  const { reading, placements } = sources;
  const { file } = reading;
  const globalId = stated === '' ? `#${id}` : stated;
  reading.about(globalId);
  if (stated === '') reading.note(NO_GLOBAL_ID);
  try {
    const world = placements.worldOf(file.refAt(id, 5));
    reading.about(globalId, isSound(world.origin) ? world.origin : null);
    readMembers(sources, id, globalId, world, meshes);
  } catch (problem) {
    if (!(problem instanceof NotRead)) throw problem;
    reading.note(refusal(problem));
  } finally {
    reading.about(null);
  }
}

function readMembers(sources: Sources, id: number, globalId: string, world: Transform, meshes: BodyMeshes): void {
  const { reading, relations, materials, directions } = sources;
  const { file } = reading;
  const shape = file.refAt(id, 6);
  const made = materials.madeOf(materialId(relations, id));
  const context = sources.contexts.of(id);
  const texts = () => [context.type, file.stringAt(id, 4), file.stringAt(id, 2), file.stringAt(id, 3)];
  const known = () => knownSections(texts(), () => sources.siblings.of(id));
  const axes = elementAxes(sources, readShape(reading, shape), world, made.profiles, known, () => meshes.of(id));
  if (axes.length > 1)
    axes.sort((a, b) => compareRounded(a.ends[0], b.ends[0]) || compareRounded(a.ends[1], b.ends[1]));

  const layer = layerOf(reading, relations, shape);
  axes.forEach((found, part) => {
    reading.about(globalId, found.ends[0], found.ends[1]);
    const { axis, remarks } = namedAxis(found, texts);
    for (const remark of remarks) reading.note(remark);
    if (axis.noSection !== null) reading.note(refusal(axis.noSection, triedText(texts())));
    for (const remark of remarksOn(axis)) reading.note(remark);
    if (made.remark !== null) reading.note(made.remark);
    for (const doubt of made.doubts) reading.note(doubt);
    const kind = {
      class: writtenClass(file.typeOf(id)),
      predefinedType: context.predefinedType,
      type: context.type,
      assembly: context.assembly,
      partOf: context.partOf,
      storey: context.storey,
      layer,
      axisFrom: axis.axisFrom,
      zAxis: directions.shared(axis.zAxis),
      section: axis.section,
      material: materials.inSection(made.material, axis.section),
    };
    const line = numbersOf(axis.ends);
    const centroid = axis.centroidEnds === axis.ends ? line : axis.centroidEnds && numbersOf(axis.centroidEnds);
    sources.members.add(id, globalId, part, line, centroid, kind, axis.bow);
  });
}

const numbersOf = ([from, to]: MemberAxis['ends']): Float64Array => Float64Array.of(...from, ...to);

/** What the element, else its type, is made of. */
export function materialId(relations: Relations, id: number): number | null {
  const own = relations.materialOf.get(id);
  if (own !== undefined) return own;
  const type = relations.typeOf.get(id);
  return type === undefined ? null : (relations.materialOf.get(type) ?? null);
}
