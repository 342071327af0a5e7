import { createHash } from 'node:crypto';

/** The name space of all ids that Pinwright makes: a UUID drawn once at random. */
export const NAMESPACE = uuidBytes('5d7f0c1e-8a4b-4e63-9c52-b0e6f4a1d937');

/** The UUID of version 5 (RFC 9562, 5.5) of a name in a name space. */
export function uuidVersion5(namespace: Uint8Array, name: string): Uint8Array {
  const hash = createHash('sha1').update(namespace).update(name, 'utf8').digest();
  const bytes = new Uint8Array(hash.subarray(0, 16));
  bytes[6] = (bytes[6] & 0x0f) | 0x50;
  bytes[8] = (bytes[8] & 0x3f) | 0x80;
  return bytes;
}

export function uuidBytes(uuid: string): Uint8Array {
  return new Uint8Array(Buffer.from(uuid.replaceAll('-', ''), 'hex'));
}

/** The usual writing, in small letters. */
export function uuidText(bytes: Uint8Array): string {
  return Buffer.from(bytes)
    .toString('hex')
    .replace(/^(.{8})(.{4})(.{4})(.{4})(.{12})$/, '$1-$2-$3-$4-$5');
}
