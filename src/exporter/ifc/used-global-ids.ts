const LENGTH = 22;
const FIRST_SLOTS = 1 << 12;

/**
 * The GlobalIds of a model, as far as it takes to avoid them: eight bytes each, whatever the size of the model. Two ids
 * of one fingerprint count as the same, which at worst makes us draw again where there was no need.
 */
export class UsedGlobalIds {
  private slots = new Float64Array(FIRST_SLOTS);
  private size = 0;

  /** Notes the text between two offsets if it has a GlobalId's length. */
  addText(bytes: Uint8Array, begin: number, end: number): void {
    if (end - begin === LENGTH) this.add(fingerprint(bytes, begin));
  }

  has(globalId: string): boolean {
    if (globalId.length !== LENGTH) return false;
    const print = fingerprint(Buffer.from(globalId, 'latin1'), 0);
    return this.slots[this.slotOf(print)] === print;
  }

  private add(print: number): void {
    const slot = this.slotOf(print);
    if (this.slots[slot] === print) return;
    this.slots[slot] = print;
    if (++this.size * 2 > this.slots.length) this.grow();
  }

  /** The slot that holds the fingerprint, or the free one where it belongs. */
  private slotOf(print: number): number {
    const mask = this.slots.length - 1;
    let slot = print % this.slots.length;
    while (this.slots[slot] !== 0 && this.slots[slot] !== print) slot = (slot + 1) & mask;
    return slot;
  }

  private grow(): void {
    const before = this.slots;
    this.slots = new Float64Array(2 * before.length);
    for (const print of before) if (print !== 0) this.slots[this.slotOf(print)] = print;
  }
}

/** A number from 1 to 2^53 made of two 32-bit FNV-1a hashes, of the first and of the second half of the characters. */
function fingerprint(bytes: Uint8Array, begin: number): number {
  let first = 0x811c9dc5;
  let second = 0x811c9dc5;
  const middle = begin + LENGTH / 2;
  for (let k = begin; k < middle; k++) first = Math.imul(first ^ bytes[k], 0x01000193);
  for (let k = middle; k < begin + LENGTH; k++) second = Math.imul(second ^ bytes[k], 0x01000193);
  return (first >>> 11) * 2 ** 32 + (second >>> 0) + 1;
}
