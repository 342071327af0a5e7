import type { SchemaFamily } from '../../schema.ts';
import { GEOMETRY } from './schema/geometry.ts';
import { INVERSES } from './schema/inverses.ts';
import { OBJECTS } from './schema/objects.ts';
import { RESOURCES } from './schema/resources.ts';
import { SIMPLE_TYPES } from './schema/simple-types.ts';

/** By the letters of the tables; `?` is a choice of types, `@` an instance. */
export type Base = 'r' | 'i' | 's' | 'b' | 'l' | 'e' | 'x' | '@' | '?';

/** What an attribute may hold. */
export interface Kind {
  readonly base: Base;
  /** The entity of `@`, unless only its subtypes can be instantiated. */
  readonly entity: string | null;
  /** 0 for a single value, 1 for a list, 2 for a list of lists. */
  readonly lists: number;
  /** How long each inner list is; null where the schema leaves that open. */
  readonly inner: number | null;
}

export interface Attribute {
  readonly name: string;
  readonly kind: Kind;
  readonly isDerived: boolean;
}

/** The entity that refers, and the attribute by which it does. */
export interface Inverse {
  readonly entity: string;
  readonly attribute: string;
}

export interface EntityShape {
  readonly name: string;
  /** In the order of STEP text. */
  readonly attributes: readonly Attribute[];
  /** The position of an attribute; undefined where there is none of the name. */
  readonly position: ReadonlyMap<string, number>;
  readonly inverses: ReadonlyMap<string, Inverse>;
}

interface Row {
  readonly name: string;
  readonly supertype: string;
  readonly own: readonly string[];
}

/** What is known of the entities of one schema. Names are found in any case, since exporters differ in theirs. */
export class AttributeTable {
  private readonly rows = new Map<string, Row>();
  private readonly inverseRows = new Map<string, readonly string[]>();
  private readonly simpleTypes = new Map<string, Kind>();
  private readonly shapes = new Map<string, EntityShape>();

  constructor(family: SchemaFamily) {
    for (const part of [...OBJECTS, ...GEOMETRY, ...RESOURCES]) {
      if (part.of.includes(family)) for (const line of linesOf(part.entities)) this.addEntities(line);
    }
    for (const line of linesOf(INVERSES)) {
      const [entity, inverses] = halves(line, ':');
      this.inverseRows.set(entity.toLowerCase(), words(inverses));
    }
    for (const line of linesOf(SIMPLE_TYPES)) {
      const [kind, names] = halves(line, ':');
      for (const name of words(names)) this.simpleTypes.set(name.toLowerCase(), kindOf(kind));
    }
  }

  private addEntities(line: string): void {
    const [names, attributes] = halves(line, '|');
    const [supertype, entities] = halves(names, ':');
    for (const name of words(entities)) {
      this.rows.set(name.toLowerCase(), { name, supertype: supertype.toLowerCase(), own: words(attributes) });
    }
  }

  /** Null for what is no entity or none that is read. */
  shapeOf(name: string): EntityShape | null {
    const key = name.toLowerCase();
    const known = this.shapes.get(key);
    if (known !== undefined) return known;
    const row = this.rows.get(key);
    if (row === undefined) return null;
    const shape = this.makeShape(key, row);
    this.shapes.set(key, shape);
    return shape;
  }

  private makeShape(key: string, row: Row): EntityShape {
    const above = this.shapeOf(row.supertype);
    const attributes = [...(above?.attributes ?? [])];
    for (const word of row.own) {
      if (word.startsWith('-')) {
        const at = attributes.findIndex(({ name }) => name === word.slice(1));
        if (at >= 0) attributes[at] = { ...attributes[at]!, isDerived: true };
      } else {
        const [name, kind] = halves(word, '=');
        attributes.push({ name, kind: kindOf(kind), isDerived: false });
      }
    }
    const inverses = new Map(above?.inverses);
    for (const word of this.inverseRows.get(key) ?? []) {
      const [name, target] = halves(word, '=');
      const [entity, attribute] = halves(target, '.');
      inverses.set(name.toLowerCase(), { entity, attribute: attribute.toLowerCase() });
    }
    const position = new Map(attributes.map(({ name }, i) => [name.toLowerCase(), i]));
    return { name: row.name, attributes, position, inverses };
  }

  /** What a defined type such as IfcLengthMeasure holds; null for what is none. */
  simpleTypeOf(name: string): Kind | null {
    return this.simpleTypes.get(name.toLowerCase()) ?? null;
  }
}

const linesOf = (text: string): string[] => text.replaceAll('\n  ', ' ').trim().split('\n');
const words = (text: string): string[] => text.split(' ').filter((word) => word !== '');

function halves(text: string, separator: string): [string, string] {
  const at = text.indexOf(separator);
  return at < 0 ? [text.trim(), ''] : [text.slice(0, at).trim(), text.slice(at + 1).trim()];
}

function kindOf(text: string): Kind {
  const match = /^([risblex?@])(\w*?)(?:\*(\d?)(\*)?)?$/.exec(text);
  if (match === null) throw new Error(`the table of attributes has an unknown kind: ${text}`);
  const [, base, entity, inner, second] = match;
  const lists = second !== undefined ? 2 : text.includes('*') ? 1 : 0;
  return { base: base as Base, entity: entity || null, lists, inner: inner ? Number(inner) : null };
}
