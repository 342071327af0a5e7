/** What can be looked up by instance ids. */
export interface ReadonlyIdMap {
  readonly size: number;
  get(id: number): number | undefined;
  has(id: number): boolean;
  /** In the order they were set. */
  keys(): Iterable<number>;
}

const FIRST_SLOTS = 16;

/** From ids to ids, in 20 bytes an entry: a Map of numbers takes twice that, and three times as long to fill. */
export class IdMap implements ReadonlyIdMap {
  size = 0;
  /** Entries in the order they were set. */
  private ids = new Uint32Array(FIRST_SLOTS / 2);
  private values = new Uint32Array(FIRST_SLOTS / 2);
  /** Entry + 1 by hash of its id; 0 where there is none. Never more than half full. */
  private slots = new Uint32Array(FIRST_SLOTS);

  get(id: number): number | undefined {
    const entry = this.slots[this.slotOf(id)]!;
    return entry === 0 ? undefined : this.values[entry - 1];
  }

  has(id: number): boolean {
    return this.slots[this.slotOf(id)] !== 0;
  }

  keys(): Iterable<number> {
    return this.ids.subarray(0, this.size);
  }

  /** Ids and values are below 2^32. The first value of an id stands. */
  setFirst(id: number, value: number): void {
    let slot = this.slotOf(id);
    if (this.slots[slot] !== 0) return;
    if (this.size === this.ids.length) {
      this.grow();
      slot = this.slotOf(id);
    }
    this.ids[this.size] = id;
    this.values[this.size] = value;
    this.slots[slot] = ++this.size;
  }

  /** The slot of the id, or the free slot where it belongs. */
  private slotOf(id: number): number {
    const { slots, ids } = this;
    const mask = slots.length - 1;
    const hash = Math.imul(id, 0x9e3779b1);
    for (let slot = (hash ^ (hash >>> 15)) & mask; ; slot = (slot + 1) & mask) {
      const entry = slots[slot]!;
      if (entry === 0 || ids[entry - 1] === id) return slot;
    }
  }

  private grow(): void {
    const capacity = 2 * this.ids.length;
    this.ids = enlarged(this.ids, capacity);
    this.values = enlarged(this.values, capacity);
    this.slots = new Uint32Array(2 * capacity);
    for (let entry = 0; entry < this.size; entry++) this.slots[this.slotOf(this.ids[entry]!)] = entry + 1;
  }
}

function enlarged(array: Uint32Array, capacity: number): Uint32Array<ArrayBuffer> {
  const larger = new Uint32Array(capacity);
  larger.set(array);
  return larger;
}
