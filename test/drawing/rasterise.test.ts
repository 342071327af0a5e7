import { inflateSync } from 'node:zlib';
import { describe, expect, it } from 'vitest';
import { rasterise } from '../../src/drawing/rasterise.ts';
import { drawSheet } from '../../src/drawing/sheet.ts';
import { someResult } from '../exporter/support.ts';

const svg = (inside: string) =>
  `<svg xmlns="http://www.w3.org/2000/svg" viewBox="0 0 100 50"><rect width="100" height="50" fill="#fff"/>${inside}</svg>`;

describe('a picture of a drawing', () => {
  it('is a PNG of the width asked for', () => {
    const png = Buffer.from(rasterise(drawSheet(someResult(['a', 'b'])), { width: 420 }));
    expect(png.subarray(0, 8).toString('hex')).toBe('89504e470d0a1a0a');
    expect([png.readUInt32BE(16), png.readUInt32BE(20)]).toEqual([420, 297]);
  });

  it('has its text in it without any font of the machine', () => {
    expect(
      pixelsOf(rasterise(svg('<text x="5" y="30" font-size="20">Roof Ωж</text>'), { width: 100 })).size,
    ).toBeGreaterThan(1);
    expect(pixelsOf(rasterise(svg(''), { width: 100 })).size).toBe(1);
  });

  it('is the same bytes every time', () => {
    const drawn = drawSheet(someResult(['a', 'b']));
    expect(Buffer.compare(rasterise(drawn), rasterise(drawn))).toBe(0);
  });
});

/** The different bytes of the picture's rows, unfiltered as far as it matters: one for a picture of one colour. */
function pixelsOf(png: Uint8Array): Set<number> {
  const bytes = Buffer.from(png);
  const data: Buffer[] = [];
  for (let at = 8; at < bytes.length; ) {
    const length = bytes.readUInt32BE(at);
    if (bytes.toString('latin1', at + 4, at + 8) === 'IDAT') data.push(bytes.subarray(at + 8, at + 8 + length));
    at += 12 + length;
  }
  const raw = inflateSync(Buffer.concat(data));
  const row = 1 + 4 * bytes.readUInt32BE(16);
  const seen = new Set<number>();
  // Past the first pixel a row of one colour holds zeros under the filters that look left or up, and its colour under none.
  for (let y = 0; y * row < raw.length; y++) {
    const filter = raw[y * row]!;
    for (const byte of raw.subarray(y * row + 5, (y + 1) * row)) seen.add(filter === 0 ? byte - 255 : byte);
  }
  return seen;
}
