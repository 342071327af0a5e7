import { ModelError } from '../domain/errors.ts';
import { latin1, UPPER_IN_KEYWORD, upper } from './bytes.ts';

/** A code is two bytes an instance; the largest schema has some two thousand keywords. */
const MOST_KEYWORDS = 0xffff;
const SLOTS = 1 << 17;
/** Between the keywords of an instance of several types: `LENGTH_UNIT+SI_UNIT`. No keyword holds it. */
const TYPE_JOIN = '+';

/** Numbers the keywords of a file from 1, without making a string for each instance. */
export class Keywords {
  /** By code; 0 is no keyword. */
  readonly names: string[] = [''];
  /** The offset after the keyword last asked for. */
  end = 0;
  private readonly slots = new Uint16Array(SLOTS);
  private readonly hashes: number[] = [0];
  private readonly joined = new Map<string, number>();

  /** The code of the keyword that begins at `at`, in upper case. */
  codeAt(bytes: Uint8Array, at: number): number {
    let hash = 0;
    let p = at;
    for (let byte = UPPER_IN_KEYWORD[bytes[p]]; byte > 0; byte = UPPER_IN_KEYWORD[bytes[++p]]) {
      hash = Math.imul(hash ^ byte, 0x01000193);
    }
    this.end = p;
    for (let slot = (hash ^ (hash >>> 15)) & (SLOTS - 1); ; slot = (slot + 1) & (SLOTS - 1)) {
      const code = this.slots[slot];
      if (code === 0) return this.put(slot, hash, latin1(bytes, at, p).toUpperCase());
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

  private put(slot: number, hash: number, name: string): number {
    const code = this.nextCode();
    this.names.push(name);
    this.hashes.push(hash);
    this.slots[slot] = code;
    return code;
  }

  private isNamed(code: number, bytes: Uint8Array, from: number, to: number): boolean {
    const name = this.names[code];
    if (name.length !== to - from) return false;
    for (let i = 0; i < name.length; i++) if (name.charCodeAt(i) !== upper(bytes[from + i])) return false;
    return true;
  }
}
