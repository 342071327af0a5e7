import { typed } from '../../../step/write.ts';
import type { AttributeTable, EntityShape, Inverse, Kind } from './attribute-table.ts';
import { Draft, type DraftValue, XmlRef } from './drafts.ts';
import type { XmlRemarks } from './remarks.ts';
import { simpleList, simpleValue } from './simple-values.ts';
import type { XmlElement } from './xml-element.ts';

/** A reference to be set once all instances are known, from the one with that id to the draft. */
interface Join {
  readonly from: string;
  readonly attribute: string;
  readonly to: Draft;
}

/**
 * Reads instances out of ifcXML. One reading serves both dialects, since what differs can be told apart where it stands:
 * IFC2X3 writes every attribute as an element that holds the value's own element; IFC4 and later write simple values as XML
 * attributes, let the attribute's element be the instance itself, and write inverse attributes with what refers inside them.
 */
export class InstanceReader {
  readonly drafts: Draft[] = [];
  readonly byId = new Map<string, Draft>();
  /** Ids of instances whose entity is not read: what refers to them is left empty. */
  readonly leftOut = new Set<string>();
  private readonly joins: Join[] = [];
  private readonly table: AttributeTable;
  private readonly remarks: XmlRemarks;

  constructor(table: AttributeTable, remarks: XmlRemarks) {
    this.table = table;
    this.remarks = remarks;
  }

  /** Reads what stands in the outer element. */
  read(outer: XmlElement): void {
    for (const element of outer.children()) if (isValue(element)) this.instanceOf(element, null);
  }

  /** To be called once, when everything is read. */
  join(): void {
    for (const { from, attribute, to } of this.joins) {
      const draft = this.byId.get(from);
      if (draft !== undefined) refer(draft, attribute, to);
    }
  }

  /** The instance that an element is or refers to; null for one that is not read. `declared` is what it is if it does not say. */
  private instanceOf(element: XmlElement, declared: string | null): Draft | XmlRef | null {
    if (element.target !== null) return new XmlRef(element.target);
    const entity = element.type ?? (isValue(element) ? bareName(element.name) : declared);
    const shape = entity === null ? null : this.table.shapeOf(entity);
    if (shape === null) {
      if (element.id !== null) this.leftOut.add(element.id);
      this.remarks.leaveOut(entity ?? element.name);
      this.readInside(element);
      return null;
    }
    return this.draftOf(element, shape);
  }

  private draftOf(element: XmlElement, shape: EntityShape): Draft {
    const draft = new Draft(shape, element.id);
    this.drafts.push(draft);
    if (element.id !== null && !this.byId.has(element.id)) this.byId.set(element.id, draft);
    for (const [name, text] of element.data) {
      const position = shape.position.get(name.toLowerCase());
      if (position !== undefined) draft.put(position, this.valueOfText(text, shape, position));
    }
    for (const child of element.children()) {
      const name = child.name.toLowerCase();
      const position = shape.position.get(name);
      const inverse = shape.inverses.get(name);
      if (position !== undefined) draft.put(position, this.valueOf(child, shape, position));
      else if (inverse !== undefined) this.readInverse(child, inverse, draft);
      else this.readInside(child);
    }
    return draft;
  }

  /** What an element of no known meaning holds may still be referred to. */
  private readInside(element: XmlElement): void {
    for (const child of element.children()) {
      if (isValue(child) ? this.table.simpleTypeOf(bareName(child.name)) === null : child.type !== null) {
        this.instanceOf(child, null);
      } else this.readInside(child);
    }
  }

  private readInverse(element: XmlElement, { entity, attribute }: Inverse, to: Draft): void {
    const held = element.children().filter(isValue);
    for (const item of held.length > 0 ? held : [element]) {
      const from = isEmpty(item) ? null : this.instanceOf(item, entity);
      if (from instanceof Draft) refer(from, attribute, to);
      else if (from !== null) this.joins.push({ from: from.id, attribute, to });
    }
  }

  private valueOfText(text: string, shape: EntityShape, position: number): DraftValue {
    const { kind } = shape.attributes[position]!;
    const where = whereOf(shape, position);
    if (kind.base === '@') return kind.lists > 0 ? refsIn(text) : (refsIn(text)[0] ?? null);
    if (kind.lists === 2) return this.innerLists(simpleList(text, kind.base, where, this.remarks), kind, where);
    if (kind.lists === 1) return simpleList(text, kind.base, where, this.remarks);
    return simpleValue(text, kind.base, where, this.remarks);
  }

  private valueOf(element: XmlElement, shape: EntityShape, position: number): DraftValue {
    const { kind } = shape.attributes[position]!;
    const where = whereOf(shape, position);
    const held = element.children().filter(isValue);
    if (kind.lists === 0)
      return held[0] === undefined ? this.single(element, kind, where) : this.item(held[0], kind, where);
    if (held.length > 0) return this.list(inOrder(held), kind, where);
    if (kind.base !== '@' && kind.base !== '?') return this.valueOfText(element.text(), shape, position);
    const alone = isEmpty(element) ? null : this.instanceOf(element, kind.entity);
    return alone === null ? [] : [alone];
  }

  /** The value of an attribute's own element, which holds none by itself. */
  private single(element: XmlElement, kind: Kind, where: string): DraftValue {
    if (kind.base !== '@' && kind.base !== '?') return simpleValue(element.text(), kind.base, where, this.remarks);
    if (element.type !== null && this.table.simpleTypeOf(element.type) !== null) return this.item(element, kind, where);
    if (!isEmpty(element)) return this.instanceOf(element, kind.entity);
    if (element.text().trim() !== '') this.remarks.cannotRead(where, element.text());
    return null;
  }

  /** The value of an element that is named by its type. */
  private item(element: XmlElement, kind: Kind, where: string): DraftValue {
    if (kind.base !== '@' && kind.base !== '?') return simpleValue(element.text(), kind.base, where, this.remarks);
    const name = element.type ?? bareName(element.name);
    const simple = this.table.simpleTypeOf(name);
    if (simple === null) return this.instanceOf(element, null);
    const value =
      simple.lists > 0
        ? simpleList(element.text(), simple.base, where, this.remarks)
        : simpleValue(element.text(), simple.base, where, this.remarks);
    return value === null ? null : typed(name.toUpperCase(), value as Parameters<typeof typed>[1]);
  }

  private list(items: readonly XmlElement[], kind: Kind, where: string): DraftValue[] {
    const isSequence = ({ name }: XmlElement) => name.startsWith(SEQUENCE);
    if (kind.lists === 2 && items.every(isSequence)) {
      return items.map((item) => simpleList(item.text(), kind.base, where, this.remarks));
    }
    const values = items.flatMap((item) =>
      isSequence(item) ? simpleList(item.text(), kind.base, where, this.remarks) : [this.item(item, kind, where)],
    );
    if (kind.lists === 2) return this.innerLists(values, kind, where);
    return kind.base === '@' || kind.base === '?' ? values.filter((value) => value !== null) : values;
  }

  /** IFC4 writes lists of lists in one row where the inner ones are equally long. */
  private innerLists(values: readonly DraftValue[], { inner }: Kind, where: string): DraftValue[] {
    if (values.length === 0) return [];
    if (inner === null || values.length % inner !== 0) {
      this.remarks.cannotRead(where, `a list of ${values.length}`);
      return [];
    }
    return Array.from({ length: values.length / inner }, (_, i) => values.slice(i * inner, (i + 1) * inner));
  }
}

const SEQUENCE = 'Seq-';

const whereOf = (shape: EntityShape, position: number): string =>
  `${shape.attributes[position]!.name} of an ${shape.name}`;

/** Elements named by a type and not by an attribute: `IfcLine`, `IfcLabel-wrapper`, `double-wrapper`. */
const isValue = ({ name }: XmlElement): boolean => /^ifc/i.test(name) || name.endsWith('-wrapper');

const bareName = (name: string): string => name.replace(/-wrapper$/, '').replace(/^Seq-/, '');

/** An element that says nothing of an instance. */
function isEmpty(element: XmlElement): boolean {
  const says = element.target !== null || element.data.length > 0 || element.id !== null || element.type !== null;
  return !says && element.children().length === 0;
}

const refsIn = (text: string): XmlRef[] =>
  text.split(/\s+/).flatMap((word) => (word === '' ? [] : [new XmlRef(word.replace(/^#/, ''))]));

/** By `pos`, where all have it. */
function inOrder(items: readonly XmlElement[]): readonly XmlElement[] {
  const places = items.map(({ pos }) => (pos ?? '').split(/\s+/).map((part) => Number.parseInt(part, 10)));
  if (places.some((place) => place.some(Number.isNaN))) return items;
  const order = items.map((_, i) => i).sort((a, b) => compare(places[a]!, places[b]!) || a - b);
  return order.map((i) => items[i]!);
}

function compare(a: readonly number[], b: readonly number[]): number {
  for (let i = 0; i < Math.min(a.length, b.length); i++) if (a[i] !== b[i]) return a[i]! - b[i]!;
  return a.length - b.length;
}

/** Lets one instance refer to another, as it would have done had the reference not been left out. */
function refer(from: Draft, attribute: string, to: Draft): void {
  const position = from.shape.position.get(attribute);
  if (position === undefined || from.refersTo(position, to)) return;
  const isList = from.shape.attributes[position]!.kind.lists > 0;
  from.put(position, isList ? [to] : to);
}
