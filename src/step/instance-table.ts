/** Beyond this many ids for each instance a table by id wastes more memory than a hash table. */
const SPARSE_FROM = 4;
const FIRST_ROWS = 1024;

/**
 * Where each instance of a file stands, and its keyword's code. As long as ids ascend and lie close together, which is how most
 * exporters number, a row is the id itself: 6 bytes for each, and one look-up to find it. From the first id that does not fit in
 * there on, rows are in file order with their ids beside them: 10 bytes an instance, and 4 to 16 more to find one by its id.
 * Rows are added in file order; `close` must follow before anything is looked up.
 */
export class InstanceTable {
  /** How many instances there are. */
  count = 0;
  maxId = 0;
  /** The id that was added last; null where there is none. */
  lastId: number | null = null;
  /** By row; null while a row is its id. */
  private ids: Uint32Array | null = null;
  private offsets = new Uint32Array(FIRST_ROWS);
  /** 0 where an id has no instance. */
  private codes = new Uint16Array(FIRST_ROWS);
  /** Where rows are no ids: row + 1 by id, or by hash of the id; 0 where there is none. */
  private rowPlusOne = new Uint32Array(0);
  private hashMask = 0;
  /** Of the file, by which the tables grow. */
  private readonly length: number;
  /** By code: how many rows have it, and the first and the last of them. */
  private readonly spans: CodeSpan[] = [];

  /** @param length of the file, bytes */
  constructor(length: number) {
    this.length = length;
  }

  /** @param code above 0 */
  add(id: number, offset: number, code: number): void {
    if (this.ids === null && !this.fits(id)) this.ids = this.idsInOrder();
    const row = this.ids === null ? id : this.count;
    if (row >= this.codes.length) this.grow(row, offset);
    if (this.ids !== null) this.ids[row] = id;
    this.offsets[row] = offset;
    this.codes[row] = code;
    this.count++;
    this.lastId = id;
    if (id > this.maxId) this.maxId = id;
  }

  /** Adds the first `count` of these columns. */
  addAll(ids: Uint32Array, offsets: Uint32Array, codes: Uint16Array, count: number): void {
    for (let i = 0; i < count; i++) this.add(ids[i], offsets[i], codes[i]);
  }

  /** Whether the row of an instance that comes now can be its id. */
  private fits(id: number): boolean {
    return id > (this.lastId ?? -1) && id < SPARSE_FROM * this.count + FIRST_ROWS;
  }

  /** From rows that are ids to rows in file order, which is that of the ids so far. */
  private idsInOrder(): Uint32Array {
    const ids = new Uint32Array(this.codes.length);
    let row = 0;
    for (let id = 0; row < this.count; id++) {
      if (this.codes[id] === 0) continue;
      ids[row] = id;
      this.offsets[row] = this.offsets[id];
      this.codes[row] = this.codes[id];
      row++;
    }
    return ids;
  }

  /** Makes instances findable. Of those that share an id the first stays; the others are given to `doubled` and left out. */
  close(doubled: (id: number) => void): void {
    if (this.ids === null) {
      for (let id = 0; id <= this.maxId; id++) if (this.codes[id] !== 0) this.countIn(this.codes[id], id);
    } else this.closeRows(this.ids, doubled);
  }

  private closeRows(ids: Uint32Array, doubled: (id: number) => void): void {
    this.hashMask = 0;
    if (this.maxId >= SPARSE_FROM * this.count + FIRST_ROWS) {
      let slots = 4;
      while (slots < 2 * this.count) slots *= 2;
      this.hashMask = slots - 1;
    }
    this.rowPlusOne = new Uint32Array(this.hashMask === 0 ? this.maxId + 1 : this.hashMask + 1);
    let kept = 0;
    for (let row = 0; row < this.count; row++) {
      const id = ids[row];
      const slot = this.slotOf(ids, id);
      if (this.rowPlusOne[slot] !== 0) {
        doubled(id);
        continue;
      }
      if (kept !== row) {
        ids[kept] = id;
        this.offsets[kept] = this.offsets[row];
        this.codes[kept] = this.codes[row];
      }
      this.countIn(this.codes[kept], kept);
      this.rowPlusOne[slot] = ++kept;
    }
    this.count = kept;
  }

  /** The row of an id, or -1. */
  rowOf(id: number): number {
    if (!(id >= 0 && id <= this.maxId) || this.count === 0) return -1;
    if (this.ids === null) return this.codes[id] === 0 ? -1 : id;
    return this.rowPlusOne[this.slotOf(this.ids, id)] - 1;
  }

  offsetOf(row: number): number {
    return this.offsets[row];
  }

  codeOf(row: number): number {
    return this.codes[row];
  }

  /** Ids whose keyword has this code, in file order. */
  idsOf(code: number): number[] {
    const span = this.spans[code];
    if (span === undefined) return [];
    const ids = new Array<number>(span.count);
    for (let row = span.first, i = 0; row <= span.last; row++) if (this.codes[row] === code) ids[i++] = this.idOf(row);
    return ids;
  }

  /** The first id in the file whose keyword has this code; -1 where there is none. */
  firstOf(code: number): number {
    const span = this.spans[code];
    return span === undefined ? -1 : this.idOf(span.first);
  }

  /** All ids in file order. */
  *allIds(): Generator<number> {
    const rows = this.count === 0 ? 0 : this.ids === null ? this.maxId + 1 : this.count;
    for (let row = 0; row < rows; row++) if (this.codes[row] !== 0) yield this.idOf(row);
  }

  private idOf(row: number): number {
    return this.ids === null ? row : this.ids[row];
  }

  /** The slot of the id, or the free slot where it belongs. */
  private slotOf(ids: Uint32Array, id: number): number {
    if (this.hashMask === 0) return id;
    let slot = Math.imul(id, 0x9e3779b1);
    slot = (slot ^ (slot >>> 15)) & this.hashMask;
    for (;;) {
      const row = this.rowPlusOne[slot] - 1;
      if (row < 0 || ids[row] === id) return slot;
      slot = (slot + 1) & this.hashMask;
    }
  }

  private countIn(code: number, row: number): void {
    const span = this.spans[code];
    if (span === undefined) this.spans[code] = { count: 1, first: row, last: row };
    else {
      span.count++;
      span.last = row;
    }
  }

  /** To what the whole file takes if it goes on as it did up to `offset`: copying half a table costs more than a page too many. */
  private grow(row: number, offset: number): void {
    const expected = (row * this.length) / offset;
    const capacity = Math.ceil(Math.min(Math.max(1.5 * row, 1.05 * expected), 16 * row)) + 1;
    this.offsets = enlarged(this.offsets, new Uint32Array(capacity));
    this.codes = enlarged(this.codes, new Uint16Array(capacity));
    if (this.ids !== null) this.ids = enlarged(this.ids, new Uint32Array(capacity));
  }
}

interface CodeSpan {
  count: number;
  readonly first: number;
  last: number;
}

function enlarged<T extends Uint16Array | Uint32Array>(array: T, larger: T): T {
  larger.set(array);
  return larger;
}
