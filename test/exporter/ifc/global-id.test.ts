import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { uuidBytes, uuidVersion5 } from '../../../src/domain/uuid.ts';
import { decodeGlobalId, drawGlobalId, encodeGlobalId } from '../../../src/exporter/ifc/global-id.ts';

describe('a GlobalId', () => {
  it('gives back the 16 bytes it was made of, in 22 characters of which the first is 0 to 3', () => {
    fc.assert(
      fc.property(fc.uint8Array({ minLength: 16, maxLength: 16 }), (bytes) => {
        const text = encodeGlobalId(bytes);
        expect(text).toMatch(/^[0-3][0-9A-Za-z_$]{21}$/);
        expect(decodeGlobalId(text)).toEqual(bytes);
      }),
    );
  });

  it('is the 128 bits as one number, written in base 64', () => {
    expect(encodeGlobalId(new Uint8Array(16))).toBe('0'.repeat(22));
    expect(encodeGlobalId(new Uint8Array(16).fill(255))).toBe(`3${'$'.repeat(21)}`);
    expect(encodeGlobalId(uuidBytes('00000000-0000-0000-0000-000000000041'))).toBe(`${'0'.repeat(20)}11`);
  });

  it.each(['', '4'.padEnd(22, '0'), '0'.repeat(21), '0'.repeat(23), '0'.repeat(21).concat('-')])(
    'is not %j',
    (text) => {
      expect(decodeGlobalId(text)).toBeNull();
    },
  );
});

describe('a drawn GlobalId', () => {
  it('is of version 5 and the same every time, and another for another role, owner, part or draw', () => {
    const id = drawGlobalId('Pinwright_Forces', 'x', 0);
    expect(drawGlobalId('Pinwright_Forces', 'x', 0)).toBe(id);
    const others = [
      drawGlobalId('Pinwright_Run', 'x', 0),
      drawGlobalId('Pinwright_Forces', 'y', 0),
      drawGlobalId('Pinwright_Forces', 'x', 1),
      drawGlobalId('Pinwright_Forces', 'x', 0, 1),
    ];
    expect(new Set([id, ...others]).size).toBe(5);
    const bytes = decodeGlobalId(id)!;
    expect(bytes[6] >> 4).toBe(5);
    expect(bytes[8] >> 6).toBe(2);
  });

  it('follows RFC 9562: its example in A.4, www.example.com among the DNS names', () => {
    const dns = uuidBytes('6ba7b810-9dad-11d1-80b4-00c04fd430c8');
    expect(uuidVersion5(dns, 'www.example.com')).toEqual(uuidBytes('2ed6657d-e927-568b-95e1-2665a8aea6a2'));
  });
});
