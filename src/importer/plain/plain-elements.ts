import type { Vec3 } from '../../domain/vector.ts';
import type { Cursor } from '../../step/cursor.ts';
import { writtenClass } from '../class-names.ts';
import { type ElementContext, layerOf } from '../context.ts';
import type { MadeOf } from '../materials/material-book.ts';
import { materialId, type Sources } from '../read-element.ts';
import { PlainLine } from './plain-line.ts';
import { PlainShape } from './plain-shape.ts';

/**
 * A short way for elements as most are written, which are read straight into the store's columns: the same to the last bit
 * that the general way (`readElement`) makes of them, with no object made for each. It holds to what is known already: the
 * first element of a material, a profile or a storey's placement goes the general way, as does all that there is
 * something to say of.
 */
export class PlainElements {
  private readonly sources: Sources;
  private readonly cursor: Cursor;
  private readonly shape: PlainShape;
  private readonly line: PlainLine;

  constructor(sources: Sources) {
    const { reading, placements } = sources;
    this.sources = sources;
    this.cursor = reading.file.cursor();
    this.shape = new PlainShape(this.cursor, placements, reading.units.length);
    this.line = new PlainLine(reading.units.length);
  }

  /** Reads element `id` into the store; its GlobalId, or null, with nothing done, where it has to be read the general way. */
  read(id: number): string | null {
    const { sources, shape, line, cursor } = this;
    const isTyped = sources.reading.family !== 'IFC2X3';
    cursor.enter(id);
    const globalId = cursor.string().trim();
    cursor.ref();
    for (let i = 0; i < 3; i++) cursor.text();
    const placement = cursor.ref();
    const shapeId = cursor.ref();
    cursor.text();
    const predefinedType = isTyped ? cursor.enumeration() : null;
    if (!cursor.leave() || globalId === '') return null;
    const made = sources.materials.known(materialId(sources.relations, id));
    if (made === null || !shape.readShape(shapeId)) return null;
    const profile = sources.sections.plainlyKnown(shape.profile);
    if (profile === null || !shape.readPlacement(placement)) return null;
    if (!line.find(shape, profile, sources.options.axes === 'given')) return null;
    this.remarkOn(made, globalId);
    this.keep(id, globalId, made, sources.contexts.ofTyped(id, predefinedType), shapeId);
    return globalId;
  }

  private keep(id: number, globalId: string, made: MadeOf, context: ElementContext, shapeId: number): void {
    const { sources, line } = this;
    const { zAxis, section } = line;
    const kind = {
      class: writtenClass(sources.reading.file.typeOf(id)),
      predefinedType: context.predefinedType,
      type: context.type,
      assembly: context.assembly,
      partOf: context.partOf,
      storey: context.storey,
      layer: layerOf(sources.reading, sources.relations, shapeId),
      axisFrom: this.isDrawn ? ('axis' as const) : ('extrusion' as const),
      zAxis: sources.directions.sharedOf(zAxis[0]!, zAxis[1]!, zAxis[2]!),
      section,
      material: sources.materials.inSection(made.material, section),
    };
    const centroid = line.isCentroid ? line.ends : this.isDrawn ? line.centroid : null;
    sources.members.add(id, globalId, 0, line.ends, centroid, kind);
  }

  private get isDrawn(): boolean {
    return this.shape.hasLine && this.sources.options.axes === 'given';
  }

  private remarkOn({ remark, doubts }: MadeOf, globalId: string): void {
    if (remark === null && doubts.length === 0) return;
    const { reading } = this.sources;
    const [a, b, c, d, e, f] = this.line.ends as unknown as [number, number, number, number, number, number];
    const [from, to]: [Vec3, Vec3] = [
      [a, b, c],
      [d, e, f],
    ];
    reading.about(globalId, from, to);
    if (remark !== null) reading.note(remark);
    for (const doubt of doubts) reading.note(doubt);
    reading.about(null);
  }
}
