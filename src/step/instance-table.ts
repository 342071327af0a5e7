/** Beyond this many slots for each instance a table by id wastes more memory than a hash table. */
const SPARSE_FROM = 4;
const FIRST_ROWS = 1024;

/**
 * Where each instance of a file stands: ids, offsets and keyword codes in typed arrays, 10 bytes an instance, and 4 to 16 more to find one by its id.
 * Rows are added in file order; `close` must follow before anything is looked up.
 */
export class InstanceTable {
  rows = 0;
  maxId = 0;
  private ids: Uint32Array;
  private offsets: Uint32Array;
  private codes: Uint16Array;
  /** Row + 1 by id, or by hash of the id; 0 where there is none. */
  private rowPlusOne = new Uint32Array(0);
  private hashMask = 0;
  /** Of the file, by which the tables grow. */
  private readonly length: number;
  /** By code: how many rows have it, and the first and the last of them. */
  private readonly spans: CodeSpan[] = [];

  /** @param length of the file, bytes */
  constructor(length: number) {
    this.length = length;
    this.ids = new Uint32Array(FIRST_ROWS);
    this.offsets = new Uint32Array(FIRST_ROWS);
    this.codes = new Uint16Array(FIRST_ROWS);
  }

  add(id: number, offset: number, code: number): void {
    const row = this.rows++;
    if (row === this.ids.length) this.grow(offset);
    this.ids[row] = id;
    this.offsets[row] = offset;
    this.codes[row] = code;
    if (id > this.maxId) this.maxId = id;
  }

  /** Adds the first `count` rows of these columns, the greatest of whose ids is `maxId`. */
  addRows(ids: Uint32Array, offsets: Uint32Array, codes: Uint16Array, count: number, maxId: number): void {
    const { rows } = this;
    this.rows += count;
    if (this.rows > this.ids.length) this.grow(offsets[count - 1]);
    this.ids.set(ids.subarray(0, count), rows);
    this.offsets.set(offsets.subarray(0, count), rows);
    this.codes.set(codes.subarray(0, count), rows);
    if (maxId > this.maxId) this.maxId = maxId;
  }

  /** The id in the last row; null where there is none. */
  get lastId(): number | null {
    return this.rows === 0 ? null : this.ids[this.rows - 1];
  }

  /** Makes instances findable. Of those that share an id the first stays; the others are given to `doubled` and left out. */
  close(doubled: (id: number) => void): void {
    this.hashMask = 0;
    if (this.maxId >= SPARSE_FROM * this.rows + FIRST_ROWS) {
      let slots = 4;
      while (slots < 2 * this.rows) slots *= 2;
      this.hashMask = slots - 1;
    }
    this.rowPlusOne = new Uint32Array(this.hashMask === 0 ? this.maxId + 1 : this.hashMask + 1);
    let kept = 0;
    for (let row = 0; row < this.rows; row++) {
      const id = this.ids[row];
      const slot = this.slotOf(id);
      if (this.rowPlusOne[slot] !== 0) {
        doubled(id);
        continue;
      }
      if (kept !== row) {
        this.ids[kept] = id;
        this.offsets[kept] = this.offsets[row];
        this.codes[kept] = this.codes[row];
      }
      this.countIn(this.codes[kept], kept);
      this.rowPlusOne[slot] = ++kept;
    }
    this.rows = kept;
  }

  /** The row of an id, or -1. */
  rowOf(id: number): number {
    if (!(id >= 0 && id <= this.maxId) || this.rows === 0) return -1;
    return this.rowPlusOne[this.slotOf(id)] - 1;
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
    for (let row = span.first, i = 0; row <= span.last; row++) if (this.codes[row] === code) ids[i++] = this.ids[row];
    return ids;
  }

  /** The first id in the file whose keyword has this code; -1 where there is none. */
  firstOf(code: number): number {
    const span = this.spans[code];
    return span === undefined ? -1 : this.ids[span.first];
  }

  /** All ids in file order. */
  *allIds(): Generator<number> {
    for (let row = 0; row < this.rows; row++) yield this.ids[row];
  }

  /** The slot of the id, or the free slot where it belongs. */
  private slotOf(id: number): number {
    if (this.hashMask === 0) return id;
    let slot = Math.imul(id, 0x9e3779b1);
    slot = (slot ^ (slot >>> 15)) & this.hashMask;
    for (;;) {
      const row = this.rowPlusOne[slot] - 1;
      if (row < 0 || this.ids[row] === id) return slot;
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
  private grow(offset: number): void {
    const expected = (this.rows * this.length) / offset;
    const capacity = Math.ceil(Math.min(Math.max(1.5 * this.rows, 1.05 * expected), 16 * this.rows));
    this.ids = enlarged(this.ids, new Uint32Array(capacity));
    this.offsets = enlarged(this.offsets, new Uint32Array(capacity));
    this.codes = enlarged(this.codes, new Uint16Array(capacity));
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
