import { pushTo } from '../domain/group.ts';
import type { ElementFacts } from '../domain/member.ts';
import type { StepFile } from '../step/step-file.ts';
import { asRef, asRefs, asString, StepEnum, StepTyped, type StepValue } from '../step/values.ts';
import type { Relations } from './relations.ts';
import { kindOfMeasure, type UnitKind } from './unit-kinds.ts';
import type { Units } from './units.ts';

type Value = string | number | boolean;

/** Looks up what the file says of elements besides what every member carries: groups, property sets and quantities. */
export class FactsBook {
  private readonly file: StepFile;
  private readonly units: Units;
  private readonly relations: Relations;
  /** Sets by the element they are given to; made at the first question, since most runs ask none. */
  private sets: ReadonlyMap<number, readonly number[]> | null = null;

  constructor(file: StepFile, units: Units, relations: Relations) {
    this.file = file;
    this.units = units;
    this.relations = relations;
  }

  of(id: number): ElementFacts {
    return new Facts(this, id);
  }

  groupsOf(id: number): string[] {
    const names = (this.relations.groupsOf.get(id) ?? []).map((group) => asString(this.file.args(group)[2]));
    return [...new Set(names.filter((name) => name !== null))];
  }

  /** Of "Set.Property" the values in the element's own sets, else in those of its type; each dot may be the one that divides. */
  valuesOf(id: number, name: string): Value[] {
    this.sets ??= setsByElement(this.file);
    const type = this.relations.typeOf.get(id);
    const own = this.sets.get(id) ?? [];
    const ofType = type === undefined ? [] : asRefs(this.file.args(type)[5]);
    for (let dot = name.indexOf('.'); dot >= 0; dot = name.indexOf('.', dot + 1)) {
      const [set, property] = [name.slice(0, dot), name.slice(dot + 1)];
      for (const sets of [own, ofType]) {
        const values = sets.flatMap((at) => this.valuesIn(at, set, property));
        if (values.length > 0) return values;
      }
    }
    return [];
  }

  private valuesIn(id: number, setName: string, propertyName: string): Value[] {
    const type = this.file.typeOf(id);
    if (type !== 'IFCPROPERTYSET' && type !== 'IFCELEMENTQUANTITY') return [];
    const args = this.file.args(id);
    if (setName !== '*' && !isSameName(asString(args[2]), setName)) return [];
    return asRefs(args[type === 'IFCPROPERTYSET' ? 4 : 5]).flatMap((item) => {
      const itemArgs = this.file.args(item);
      return isSameName(asString(itemArgs[0]), propertyName) ? this.read(this.file.typeOf(item), itemArgs) : [];
    });
  }

  private read(type: string, args: readonly StepValue[]): Value[] {
    const quantity = QUANTITY_KINDS.get(type);
    if (quantity !== undefined) return this.plain(args[3], asRef(args[2]), quantity);
    switch (type) {
      case 'IFCPROPERTYSINGLEVALUE':
        return this.plain(args[2], asRef(args[3]), null);
      case 'IFCPROPERTYENUMERATEDVALUE':
        return listed(args[2]).flatMap((value) => this.plain(value, null, null));
      case 'IFCPROPERTYLISTVALUE':
        return listed(args[2]).flatMap((value) => this.plain(value, asRef(args[3]), null));
      default:
        return [];
    }
  }

  /** A value as it stands, a measure in SI by its own unit or the project's. */
  private plain(value: StepValue | undefined, unit: number | null, quantity: UnitKind | null): Value[] {
    const bare = value instanceof StepTyped ? value.value : value;
    if (bare instanceof StepEnum) return [logical(bare.name)];
    if (typeof bare === 'string' || typeof bare === 'boolean') return [bare];
    if (typeof bare !== 'number') return [];
    const kind = quantity ?? (value instanceof StepTyped ? kindOfMeasure(value.type) : null);
    if (kind === null) return [bare];
    const own = unit === null ? null : this.units.factorOf(unit, kind);
    return [bare * (own ?? this.units.unitFactor(kind))];
  }
}

/** Holds nothing but whom it is about. */
class Facts implements ElementFacts {
  readonly #book: FactsBook;
  readonly #id: number;

  constructor(book: FactsBook, id: number) {
    this.#book = book;
    this.#id = id;
  }

  get groups(): readonly string[] {
    return this.#book.groupsOf(this.#id);
  }

  property(name: string): readonly Value[] {
    return this.#book.valuesOf(this.#id, name);
  }
}

const QUANTITY_KINDS: ReadonlyMap<string, UnitKind | null> = new Map([
  ['IFCQUANTITYLENGTH', 'length'],
  ['IFCQUANTITYAREA', 'area'],
  ['IFCQUANTITYVOLUME', 'volume'],
  ['IFCQUANTITYWEIGHT', 'mass'],
  ['IFCQUANTITYCOUNT', null],
]);

/** Sets of either kind, by IfcRelDefinesByProperties; IFC4 may relate several at once. */
function setsByElement(file: StepFile): Map<number, number[]> {
  const sets = new Map<number, number[]>();
  for (const id of file.idsOf('IFCRELDEFINESBYPROPERTIES')) {
    const args = file.args(id);
    const single = asRef(args[5]);
    const related = single === null ? asRefs(args[5]) : [single];
    for (const element of asRefs(args[4])) for (const set of related) pushTo(sets, element, set);
  }
  return sets;
}

const listed = (value: StepValue | undefined): readonly StepValue[] => (Array.isArray(value) ? value : []);

const isSameName = (name: string | null, asked: string): boolean => name?.trim().toLowerCase() === asked.toLowerCase();

/** IfcLogical has a third value. */
const logical = (name: string): Value => (name === 'U' ? 'unknown' : name);
