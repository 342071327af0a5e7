/** What can be looked up by instance ids. */
export interface ReadonlyIdMap {
  readonly size: number;
  get(id: number): number | undefined;
  has(id: number): boolean;
  /** In the order they were set. */
  keys(): Iterable<number>;
}

const FIRST_SLOTS = 16;

/**
 * From ids to ids. As long as ids come in ascending order, as exporters list them, they are found by their place (8 bytes an
 * entry); from the first that does not on, by a hash table (16 bytes more).
 */
export class IdMap implements ReadonlyIdMap {
  size = 0;
  /** Entries in the order they were set. */
  private ids = new Uint32Array(FIRST_SLOTS / 2);
  private values = new Uint32Array(FIRST_SLOTS / 2);
  /** Entry + 1 by hash of its id; 0 where there is none. Never more than half full. Null while the ids ascend. */
  private slots: Uint32Array | null = null;
  /** Of the entry found last: the next one asked for is mostly the one after it. */
  private lately = 0;

  get(id: number): number | undefined {
    const entry = this.entryOf(id);
    return entry < 0 ? undefined : this.values[entry];
  }

  has(id: number): boolean {
    return this.entryOf(id) >= 0;
  }

  keys(): Iterable<number> {
    return this.ids.subarray(0, this.size);
  }

  /** Ids and values are below 2^32. The first value of an id stands. */
  setFirst(id: number, value: number): void {
    const isNext = this.slots === null && (this.size === 0 || id > this.ids[this.size - 1]!);
    if (!isNext && this.has(id)) return;
    if (this.size === this.ids.length) this.grow();
    if (!isNext) this.slots ??= this.hashed();
    this.ids[this.size] = id;
    this.values[this.size] = value;
    this.size++;
    if (this.slots !== null) this.slots[slotOf(this.slots, this.ids, id)] = this.size;
  }

  private entryOf(id: number): number {
    const { slots, ids, lately } = this;
    if (slots !== null) return slots[slotOf(slots, ids, id)]! - 1;
    if (lately + 1 < this.size && ids[lately + 1] === id) return ++this.lately;
    let low = 0;
    let high = this.size;
    while (low < high) {
      const middle = (low + high) >>> 1;
      if (ids[middle]! < id) low = middle + 1;
      else high = middle;
    }
    if (low === this.size || ids[low] !== id) return -1;
    this.lately = low;
    return low;
  }

  private hashed(): Uint32Array {
    const slots = new Uint32Array(2 * this.ids.length);
    for (let entry = 0; entry < this.size; entry++) slots[slotOf(slots, this.ids, this.ids[entry]!)] = entry + 1;
    return slots;
  }

  private grow(): void {
    const capacity = 2 * this.ids.length;
    this.ids = enlarged(this.ids, capacity);
    this.values = enlarged(this.values, capacity);
    if (this.slots !== null) this.slots = this.hashed();
  }
}

/** The slot of the id, or the free slot where it belongs. */
function slotOf(slots: Uint32Array, ids: Uint32Array, id: number): number {
  const mask = slots.length - 1;
  const hash = Math.imul(id, 0x9e3779b1);
  for (let slot = (hash ^ (hash >>> 15)) & mask; ; slot = (slot + 1) & mask) {
    const entry = slots[slot]!;
    if (entry === 0 || ids[entry - 1] === id) return slot;
  }
}

function enlarged(array: Uint32Array, capacity: number): Uint32Array<ArrayBuffer> {
  const larger = new Uint32Array(capacity);
  larger.set(array);
  return larger;
}
