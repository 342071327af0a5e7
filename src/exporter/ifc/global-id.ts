import { NAMESPACE, uuidVersion5 } from '../../domain/uuid.ts';

/** The base 64 of IFC GlobalIds (ISO 16739, IfcGloballyUniqueId). */
const ALPHABET = '0123456789ABCDEFGHIJKLMNOPQRSTUVWXYZabcdefghijklmnopqrstuvwxyz_$';

/** 16 bytes in IFC's 22 characters; the first stands for two bits only and so is 0, 1, 2 or 3. */
export function encodeGlobalId(bytes: Uint8Array): string {
  let text = ALPHABET[bytes[0] >> 6] + ALPHABET[bytes[0] & 63];
  for (let k = 1; k < 16; k += 3) {
    const three = (bytes[k] << 16) | (bytes[k + 1] << 8) | bytes[k + 2];
    for (let shift = 18; shift >= 0; shift -= 6) text += ALPHABET[(three >> shift) & 63];
  }
  return text;
}

/** The 16 bytes of a GlobalId; null where it is none. */
export function decodeGlobalId(text: string): Uint8Array | null {
  const digits = [...text].map((character) => ALPHABET.indexOf(character));
  if (digits.length !== 22 || digits.includes(-1) || digits[0] > 3) return null;
  const bytes = new Uint8Array(16);
  bytes[0] = (digits[0] << 6) | digits[1];
  for (let k = 1, d = 2; k < 16; k += 3, d += 4) {
    const three = (digits[d] << 18) | (digits[d + 1] << 12) | (digits[d + 2] << 6) | digits[d + 3];
    bytes[k] = three >> 16;
    bytes[k + 1] = (three >> 8) & 255;
    bytes[k + 2] = three & 255;
  }
  return bytes;
}

/**
 * The GlobalId of something that Pinwright writes, the same in every run: `role` says what it is, `of` whose it is
 * (a GlobalId or a name), `draw` counts the draws after one that was already in use.
 */
export function drawGlobalId(role: string, of: string, part: number, draw = 0): string {
  const name = draw === 0 ? [role, of, part] : [role, of, part, draw];
  return encodeGlobalId(uuidVersion5(NAMESPACE, name.join('\n')));
}
