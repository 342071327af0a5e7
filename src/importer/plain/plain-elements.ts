import type { Vec3 } from '../../domain/vector.ts';
import { writtenClass } from '../class-names.ts';
import { layerOf } from '../context.ts';
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
  private readonly shape: PlainShape;
  private readonly line: PlainLine;

  constructor(sources: Sources) {
    const { reading, placements } = sources;
    this.sources = sources;
    this.shape = new PlainShape(reading.file.cursor(), placements, reading.units.length);
    this.line = new PlainLine(reading.units.length);
  }

  /** Reads element `id` into the store; false, with nothing done, where it has to be read the general way. */
  read(id: number, globalId: string): boolean {
    const { sources, shape, line } = this;
    const { file } = sources.reading;
    const made = sources.materials.known(materialId(sources.relations, id));
    const placement = file.refAt(id, 5);
    const shapeId = file.refAt(id, 6);
    if (globalId === '' || made === null || placement === null || shapeId === null) return false;
    if (!shape.readShape(shapeId)) return false;
    const profile = sources.sections.plainlyKnown(shape.profile);
    if (profile === null || !shape.readPlacement(placement)) return false;
    if (!line.find(shape, profile, sources.options.axes === 'given')) return false;
    this.remarkOn(made, globalId);
    this.keep(id, globalId, made, shapeId);
    return true;
  }

  private keep(id: number, globalId: string, made: MadeOf, shapeId: number): void {
    const { sources, line } = this;
    const { zAxis, section } = line;
    const context = sources.contexts.of(id);
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
