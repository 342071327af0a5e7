import { Cursor } from './cursor.ts';
import type { InstanceTable } from './instance-table.ts';
import type { Keywords } from './keywords.ts';
import { ParameterReader, type StepRecord } from './parameters.ts';
import { ABSENT, MIXED, PlainLists } from './plain-list.ts';
import { plainNumbers, plainRefs } from './plain-values.ts';
import type { StepProblem, StepProblems } from './problems.ts';
import { asEnum, asNumber, asRef, asRefs, asString, type StepValue } from './values.ts';

/** What the index pass hands over. */
export interface IndexedInstances {
  readonly table: InstanceTable;
  readonly keywords: Keywords;
  readonly problems: StepProblems;
}

/** The instances of a file, found by id or by type in constant time and parsed out of the bytes whenever they are asked for. */
export class StepInstances {
  private readonly table: InstanceTable;
  private readonly keywords: Keywords;
  private readonly found: StepProblems;
  /** Of the whole file; they must not change. */
  readonly bytes: Uint8Array;
  private readonly reader: ParameterReader;
  private readonly plain: PlainLists;
  private readonly idsByType = new Map<string, readonly number[]>();

  constructor(bytes: Uint8Array, indexed: IndexedInstances) {
    this.table = indexed.table;
    this.keywords = indexed.keywords;
    this.found = indexed.problems;
    this.bytes = bytes;
    this.reader = new ParameterReader(bytes);
    this.plain = new PlainLists(bytes);
  }

  /** A reader of plain parameters in the order they stand in. */
  cursor(): Cursor {
    return new Cursor(this.bytes, this.table, this.keywords);
  }

  /** How many instances there are. */
  get size(): number {
    return this.table.count;
  }

  /** The highest id in use; 0 where there is no instance. */
  get maxId(): number {
    return this.table.maxId;
  }

  /**
   * What was found wrong so far. The index pass finds doubled ids, ids from 2^32 on and broken statements; broken strings and
   * values are found when `args` first reads the instance they stand in, so read this last.
   */
  get problems(): readonly StepProblem[] {
    return this.found.list;
  }

  /** How many problems are not listed because there are too many. */
  get problemsOmitted(): number {
    return this.found.omitted;
  }

  has(id: number): boolean {
    return this.table.rowOf(id) >= 0;
  }

  /** The upper-case keyword; '' where there is no such instance. An instance of several types has them joined by `+`. */
  typeOf(id: number): string {
    const row = this.table.rowOf(id);
    return row < 0 ? '' : this.keywords.names[this.table.codeOf(row)];
  }

  /** Ids of exactly this type (upper-case keyword; subtypes are not included), in file order. */
  idsOf(type: string): readonly number[] {
    let ids = this.idsByType.get(type);
    if (ids === undefined) {
      const code = this.keywords.names.indexOf(type);
      ids = code <= 0 ? [] : this.table.idsOf(code);
      this.idsByType.set(type, ids);
    }
    return ids;
  }

  /** The types that occur, in the order of their first instance. */
  types(): string[] {
    return this.keywords.names.filter((type, code) => type !== '' && this.table.firstOf(code) >= 0);
  }

  /** The first instance of exactly this type, found without gathering all of them; null where there is none. */
  firstOf(type: string): number | null {
    const code = this.keywords.names.indexOf(type);
    const id = code <= 0 ? -1 : this.table.firstOf(code);
    return id < 0 ? null : id;
  }

  /** All ids in file order. */
  ids(): Iterable<number> {
    return this.table.allIds();
  }

  /**
   * The parameters of an instance, parsed anew at each call (which is cheaper than keeping them). Empty where there is no such
   * instance or its brackets do not fit. An instance of several types gives the parameters of all, one after another.
   */
  args(id: number): readonly StepValue[] {
    const row = this.table.rowOf(id);
    if (row < 0) return [];
    if (this.isComplex(row)) return this.records(id).flatMap((record) => record.args);
    return this.reader.readList(this.table.offsetOf(row), this.faultsOf(id)) ?? [];
  }

  /** The keyword and parameters of each type of an instance; a single one except for instances of several types. */
  records(id: number): readonly StepRecord[] {
    const row = this.table.rowOf(id);
    if (row < 0) return [];
    if (!this.isComplex(row)) return [{ type: this.typeOf(id), args: this.args(id) }];
    return this.reader.readRecords(this.table.offsetOf(row), this.faultsOf(id)) ?? [];
  }

  /**
   * Parameter `index` alone, as `args(id)[index]` gives it. This and those below make no values of the other parameters,
   * which is most of what reading a large model costs.
   */
  valueAt(id: number, index: number): StepValue | undefined {
    const at = this.plainAt(id, index);
    return at > 0 ? this.reader.readPlain(at) : this.argAt(id, index, at);
  }

  /** The id that parameter `index` refers to; null where it refers to nothing. */
  refAt(id: number, index: number): number | null {
    const row = this.table.rowOf(id);
    if (row < 0) return null;
    const ref = this.isComplex(row) ? MIXED : this.plain.refOf(this.table.offsetOf(row), row, index);
    if (ref >= 0) return ref;
    return ref === MIXED ? asRef(this.args(id)[index]) : null;
  }

  /** The ids in the list of references that parameter `index` is; empty where it is none. */
  refsAt(id: number, index: number): number[] {
    return this.onlyRefsAt(id, index) ?? asRefs(this.valueAt(id, index));
  }

  /** The same; null where the list holds anything else, or what it holds has to be read with care. */
  onlyRefsAt(id: number, index: number): number[] | null {
    const at = this.plainAt(id, index);
    return at > 0 ? plainRefs(this.bytes, at) : null;
  }

  /** The string in parameter `index`; null where there is none. */
  stringAt(id: number, index: number): string | null {
    return asString(this.valueAt(id, index));
  }

  /** The enumeration name in parameter `index`; null where there is none. */
  enumAt(id: number, index: number): string | null {
    return asEnum(this.valueAt(id, index));
  }

  /** The number in parameter `index`; null where there is none. */
  numberAt(id: number, index: number): number | null {
    return asNumber(this.valueAt(id, index));
  }

  /**
   * Fills `into` with the numbers of the list that parameter `index` is, NaN for items that are none.
   * @returns how many items the list has, `into` or not; -1 where the parameter is no list.
   */
  numbersAt(id: number, index: number, into: Float64Array): number {
    const row = this.table.rowOf(id);
    // A point or a direction, `((1.,0.,0.))`, as half of a model's instances are: its parameters need not be told apart.
    const isFirst = index === 0 && row >= 0;
    const first = isFirst ? plainNumbers(this.bytes, this.table.offsetOf(row) + 1, into, true) : -1;
    if (first >= 0) return first;
    const at = this.plainAt(id, index);
    const count = at > 0 ? plainNumbers(this.bytes, at, into) : -1;
    if (count >= 0) return count;
    const list = this.argAt(id, index, at);
    if (!Array.isArray(list)) return -1;
    for (let i = 0; i < into.length && i < list.length; i++) into[i] = asNumber(list[i] as StepValue) ?? Number.NaN;
    return list.length;
  }

  /** Where parameter `index` begins, if it can be read alone; else ABSENT, or MIXED where the list has to be read whole. */
  private plainAt(id: number, index: number): number {
    const row = this.table.rowOf(id);
    if (row < 0) return ABSENT;
    return this.isComplex(row) ? MIXED : this.plain.startOf(this.table.offsetOf(row), row, index);
  }

  private argAt(id: number, index: number, at: number): StepValue | undefined {
    return at === ABSENT ? undefined : this.args(id)[index];
  }

  private isComplex(row: number): boolean {
    return this.keywords.isJoined(this.table.codeOf(row));
  }

  private faultsOf(id: number) {
    return (kind: StepProblem['kind'], what: string) =>
      this.found.add(kind, id, `In #${id}, an ${this.typeOf(id)}, ${what}.`);
  }
}
