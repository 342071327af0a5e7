import type { InstanceTable } from './instance-table.ts';
import type { Keywords } from './keywords.ts';
import { ParameterReader, type StepRecord } from './parameters.ts';
import type { StepProblem, StepProblems } from './problems.ts';
import type { StepValue } from './values.ts';

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
  private readonly reader: ParameterReader;
  private readonly idsByType = new Map<string, readonly number[]>();

  constructor(bytes: Uint8Array, indexed: IndexedInstances) {
    this.table = indexed.table;
    this.keywords = indexed.keywords;
    this.found = indexed.problems;
    this.reader = new ParameterReader(bytes);
  }

  /** How many instances there are. */
  get size(): number {
    return this.table.rows;
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
    return this.keywords.names.filter((type) => type !== '' && this.idsOf(type).length > 0);
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

  private isComplex(row: number): boolean {
    return this.keywords.isJoined(this.table.codeOf(row));
  }

  private faultsOf(id: number) {
    return (kind: StepProblem['kind'], what: string) =>
      this.found.add(kind, id, `In #${id}, an ${this.typeOf(id)}, ${what}.`);
  }
}
