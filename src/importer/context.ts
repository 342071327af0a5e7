import { writtenClass } from './class-names.ts';
import type { Reading } from './reading.ts';
import { type Relations, wholesAbove } from './relations.ts';

/** What stands around an element: words for selectors and reports. */
export interface ElementContext {
  readonly predefinedType: string | null;
  readonly type: string | null;
  readonly assembly: string | null;
  readonly partOf: string | null;
  readonly storey: string | null;
}

const SPATIAL = new Set([
  'IFCPROJECT',
  'IFCSITE',
  'IFCBUILDING',
  'IFCBUILDINGSTOREY',
  'IFCSPACE',
  'IFCFACILITY',
  'IFCFACILITYPART',
  'IFCBRIDGE',
  'IFCBRIDGEPART',
]);

const WHOLE_ITSELF = { assembly: null, partOf: null };

interface Shared {
  readonly own: string | null;
  readonly typeId: number | undefined;
  readonly container: number;
  readonly context: ElementContext;
}

/** What stands around the elements of a file; what many share is read once. */
export class ContextBook {
  private readonly reading: Reading;
  private readonly relations: Relations;
  private readonly names = new Map<number, string | null>();
  /** Of the last element that is part of nothing: most have the same type and storey as the one before them. */
  private last: Shared | null = null;
  private readonly storeysAbove = new Map<number, number | null>();

  constructor(reading: Reading, relations: Relations) {
    this.reading = reading;
    this.relations = relations;
  }

  of(id: number): ElementContext {
    return this.ofTyped(id, this.reading.family === 'IFC2X3' ? null : this.reading.file.enumAt(id, 8));
  }

  /** The same of an element whose own predefined type is known. */
  ofTyped(id: number, own: string | null): ElementContext {
    const typeId = this.relations.typeOf.get(id);
    const container = this.relations.containerOf.get(id);
    const isWhole = container !== undefined && !this.relations.wholeOf.has(id);
    const { last } = this;
    if (isWhole && last !== null && last.own === own && last.typeId === typeId && last.container === container) {
      return last.context;
    }
    const context = this.read(id, typeId, own);
    if (isWhole) this.last = { own, typeId, container, context };
    return context;
  }

  private read(id: number, typeId: number | undefined, own: string | null): ElementContext {
    const wholes = wholesAbove(this.relations, id);
    const storey = this.storeyOf(id, wholes);
    const { assembly, partOf } = wholes.length === 0 ? WHOLE_ITSELF : this.wholeAmong(wholes);
    return {
      predefinedType: this.predefinedType(own, typeId),
      type: typeId === undefined ? null : this.named(typeId),
      assembly,
      partOf,
      storey: storey === null ? null : this.named(storey),
    };
  }

  private wholeAmong(wholes: readonly number[]): Pick<ElementContext, 'assembly' | 'partOf'> {
    const { file } = this.reading;
    const elements = wholes.filter((whole) => !SPATIAL.has(file.typeOf(whole)));
    const assembly = elements.find((whole) => file.typeOf(whole) === 'IFCELEMENTASSEMBLY') ?? elements[0];
    // A baluster within an assembly within a stair is part of the stair.
    const foreign = elements.find((whole) => file.typeOf(whole) !== 'IFCELEMENTASSEMBLY');
    const whole = foreign ?? assembly;
    return {
      assembly: assembly === undefined ? null : assemblyName(this.reading, assembly),
      partOf: whole === undefined ? null : writtenClass(file.typeOf(whole)),
    };
  }

  private named(id: number): string | null {
    let name = this.names.get(id);
    if (name === undefined) {
      name = this.reading.file.stringAt(id, 2);
      this.names.set(id, name);
    }
    return name;
  }

  /** IFC2X3 has a predefined type on the element's type only. */
  private predefinedType(own: string | null, typeId: number | undefined): string | null {
    const { file } = this.reading;
    if (own !== null && own !== 'NOTDEFINED') return own;
    return (typeId === undefined ? null : file.enumAt(typeId, 9)) ?? own;
  }

  /** From the element or the first of its wholes that is contained somewhere, up to a storey. */
  private storeyOf(id: number, wholes: readonly number[]): number | null {
    let storey = this.storeyAt(id);
    for (let i = 0; storey === null && i < wholes.length; i++) storey = this.storeyAt(wholes[i]!);
    return storey;
  }

  private storeyAt(id: number): number | null {
    const { file } = this.reading;
    const container = this.relations.containerOf.get(id);
    if (container === undefined) return file.typeOf(id) === 'IFCBUILDINGSTOREY' ? id : null;
    let storey = this.storeysAbove.get(container);
    if (storey === undefined) {
      const up = [container, ...wholesAbove(this.relations, container)];
      storey = up.find((at) => file.typeOf(at) === 'IFCBUILDINGSTOREY') ?? null;
      this.storeysAbove.set(container, storey);
    }
    return storey;
  }
}

function assemblyName(reading: Reading, id: number): string | null {
  const { file } = reading;
  const texts = [file.stringAt(id, 2), file.stringAt(id, 7), file.stringAt(id, 0)];
  return texts.find((text) => text !== null && text.trim() !== '') ?? null;
}

/** The layer of an element's shape: of one of its representations, or of an item in one. */
export function layerOf(reading: Reading, relations: Relations, shape: number | null): string | null {
  if (shape === null || relations.layerOf.size === 0) return null;
  for (const id of reading.file.refsAt(shape, 2)) {
    for (const candidate of [id, ...reading.file.refsAt(id, 3)]) {
      const layer = relations.layerOf.get(candidate);
      if (layer !== undefined) return layer;
    }
  }
  return null;
}
