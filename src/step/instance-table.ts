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
  /** Rows by code, and where each code's rows begin; made when first asked for. */
  private rowsByCode: { readonly order: Uint32Array; readonly starts: Uint32Array } | null = null;

  constructor(expectedRows: number) {
    const capacity = Math.max(FIRST_ROWS, Math.ceil(expectedRows));
    this.ids = new Uint32Array(capacity);
    this.offsets = new Uint32Array(capacity);
    this.codes = new Uint16Array(capacity);
  }

  add(id: number, offset: number, code: number): void {
    const row = this.rows++;
    if (row === this.ids.length) this.grow();
    this.ids[row] = id;
    this.offsets[row] = offset;
    this.codes[row] = code;
    if (id > this.maxId) this.maxId = id;
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
      this.ids[kept] = id;
      this.offsets[kept] = this.offsets[row];
      this.codes[kept] = this.codes[row];
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
    this.rowsByCode ??= this.groupByCode();
    const { order, starts } = this.rowsByCode;
    const ids: number[] = [];
    if (code + 1 >= starts.length) return ids;
    for (let i = starts[code]; i < starts[code + 1]; i++) ids.push(this.ids[order[i]]);
    return ids;
  }

  /** The first id in the file whose keyword has this code; -1 where there is none. */
  firstOf(code: number): number {
    this.rowsByCode ??= this.groupByCode();
    const { order, starts } = this.rowsByCode;
    return code + 1 < starts.length && starts[code] < starts[code + 1] ? this.ids[order[starts[code]]] : -1;
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

  /** A counting sort: stable, so file order is kept within a code. */
  private groupByCode(): { order: Uint32Array; starts: Uint32Array } {
    const { codes, rows } = this;
    let greatest = 0;
    for (let row = 0; row < rows; row++) if (codes[row] > greatest) greatest = codes[row];
    const starts = new Uint32Array(greatest + 2);
    for (let row = 0; row < rows; row++) starts[codes[row] + 1]++;
    for (let code = 0; code <= greatest; code++) starts[code + 1] += starts[code];
    const next = starts.slice();
    const order = new Uint32Array(rows);
    for (let row = 0; row < rows; row++) order[next[codes[row]]++] = row;
    return { order, starts };
  }

  private grow(): void {
    const capacity = Math.ceil(this.ids.length * 1.5);
    const ids = new Uint32Array(capacity);
    const offsets = new Uint32Array(capacity);
    const codes = new Uint16Array(capacity);
    ids.set(this.ids);
    offsets.set(this.offsets);
    codes.set(this.codes);
    this.ids = ids;
    this.offsets = offsets;
    this.codes = codes;
  }
}
