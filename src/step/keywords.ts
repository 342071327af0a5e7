import { ModelError } from '../domain/errors.ts';
import { IN_KEYWORD, latin1, UPPER_IN_KEYWORD } from './bytes.ts';

/** A code is two bytes an instance; the largest schema has some two thousand keywords. */
const MOST_KEYWORDS = 0xffff;
const SLOTS = 1 << 17;
/** A power of two less one: the last six keywords have a part in it, two bits of a number each after the other. */
const LATELY = 0xfff;
const SPREAD = 0x2f5;
/** Between the keywords of an instance of several types: `LENGTH_UNIT+SI_UNIT`. No keyword holds it. */
const TYPE_JOIN = '+';

/**
 * Of the length and some of the letters, from the end, since keywords begin alike: taking in all of them costs more than the
 * few that fall together.
 */
function hashOf(bytes: Uint8Array, from: number, to: number): number {
  let hash = to - from;
  for (let p = to - 1; p >= from; p -= 3) hash = Math.imul(hash ^ UPPER_IN_KEYWORD[bytes[p]], 0x01000193);
  return hash;
}

/** A string made of bytes is one more copy to the engine; as a key it becomes the one that is compared by its address. */
const internalised = (name: string): string => Object.keys({ [name]: 0 })[0] ?? name;

/** Numbers the keywords of a file from 1, without making a string for each instance. */
export class Keywords {
  /** By code; 0 is no keyword. */
  readonly names: string[] = [''];
  /** The offset after the keyword last asked for. */
  end = 0;
  private readonly slots = new Uint16Array(SLOTS);
  private readonly hashes: number[] = [0];
  /** Where each stands first in the file: bytes are compared with bytes several times faster than with a string. */
  private readonly firstAt: number[] = [0];
  private readonly lengths: number[] = [0];
  private readonly joined = new Map<string, number>();

  /** The keywords that came last, folded into one number, and by that number the code of what followed them the last time. */
  private lately = 0;
  private readonly following = new Uint16Array(LATELY + 1);

  /** The code of the keyword that begins at `at`, in upper case. */
  codeAt(bytes: Uint8Array, at: number): number {
    // Exporters write the instances of one element after another in the same order: to compare with the one that is expected
    // costs a third of looking it up.
    const expected = this.following[this.lately];
    const isExpected = this.isSpelt(expected, bytes, at);
    const code = isExpected ? expected : this.lookUp(bytes, at);
    if (!isExpected) this.following[this.lately] = code;
    this.lately = ((this.lately << 2) ^ Math.imul(code, SPREAD)) & LATELY;
    return code;
  }

  /** Whether the keyword at `at` is written as that of `code` is where it stands first. */
  private isSpelt(code: number, bytes: Uint8Array, at: number): boolean {
    const from = this.firstAt[code];
    const length = this.lengths[code];
    let i = 0;
    while (i < length && bytes[at + i] === bytes[from + i]) i++;
    this.end = at + i;
    return i === length && length > 0 && IN_KEYWORD[bytes[at + i]] !== 1;
  }

  private lookUp(bytes: Uint8Array, at: number): number {
    let p = at;
    while (IN_KEYWORD[bytes[p]] === 1) p++;
    this.end = p;
    const hash = hashOf(bytes, at, p);
    for (let slot = (hash ^ (hash >>> 15)) & (SLOTS - 1); ; slot = (slot + 1) & (SLOTS - 1)) {
      const code = this.slots[slot];
      if (code === 0) return this.put(slot, hash, latin1(bytes, at, p).toUpperCase(), at);
      if (this.hashes[code] === hash && this.isNamed(code, bytes, at, p)) return code;
    }
  }

  /** The code of an instance's several keywords together. */
  codeOfJoined(types: readonly string[]): number {
    const name = types.join(TYPE_JOIN);
    let code = this.joined.get(name);
    if (code === undefined) {
      code = this.nextCode();
      this.names.push(name);
      this.hashes.push(0);
      this.firstAt.push(0);
      this.lengths.push(0);
      this.joined.set(name, code);
    }
    return code;
  }

  isJoined(code: number): boolean {
    return this.joined.size > 0 && this.names[code].includes(TYPE_JOIN);
  }

  private nextCode(): number {
    const code = this.names.length;
    if (code > MOST_KEYWORDS)
      throw new ModelError('The file names more than 65,535 different entity types, which no building model does.');
    return code;
  }

  private put(slot: number, hash: number, name: string, at: number): number {
    const code = this.nextCode();
    this.names.push(internalised(name));
    this.hashes.push(hash);
    this.firstAt.push(at);
    this.lengths.push(name.length);
    this.slots[slot] = code;
    return code;
  }

  private isNamed(code: number, bytes: Uint8Array, from: number, to: number): boolean {
    const name = this.names[code];
    if (name.length !== to - from) return false;
    for (let i = 0; i < name.length; i++) if (name.charCodeAt(i) !== UPPER_IN_KEYWORD[bytes[from + i]]) return false;
    return true;
  }
}
