import { readFileSync } from 'node:fs';
import { Resvg } from '@resvg/resvg-js';
import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { parseBrief } from '../../src/brief/parse-brief.ts';
import { cornersOf, LabelBoard, type LabelBox, overlap } from '../../src/drawing/label-board.ts';
import { drawSheet } from '../../src/drawing/sheet.ts';
import { fitted, textWidth, wrappedText } from '../../src/drawing/text.ts';
import { runModel } from '../../src/pipeline.ts';
import { fixture } from '../support/shared.ts';
import { elementsOf, viewsOf } from './read-svg.ts';

const number = (min: number, max: number) => fc.double({ min, max, noNaN: true });
const box: fc.Arbitrary<LabelBox> = fc.record({
  x: number(0, 60),
  y: number(0, 60),
  width: number(1, 25),
  height: number(1, 4),
  angle: number(-1.6, 1.6),
});

describe('labels', () => {
  it('never cover one another, however they are turned', () => {
    fc.assert(
      fc.property(fc.array(box, { maxLength: 40 }), (boxes) => {
        const board = new LabelBoard(-100, -100, 200, 200);
        const taken = boxes.filter((one) => board.take(one));
        for (const [k, a] of taken.entries()) {
          for (const b of taken.slice(k + 1)) expect(sampled(a).some((point) => contains(b, point))).toBe(false);
        }
        const refused = boxes.filter((one) => !taken.includes(one));
        for (const one of refused) expect(taken.some((other) => overlap(one, other))).toBe(true);
      }),
      { numRuns: 60 },
    );
  });

  it('stay on the board', () => {
    const board = new LabelBoard(0, 0, 10, 10);
    expect(board.take({ x: 9, y: 5, width: 4, height: 1, angle: 0 })).toBe(false);
    expect(board.take({ x: 5, y: 5, width: 4, height: 1, angle: 0 })).toBe(true);
  });

  it('lie in a drawn frame neither on one another nor on a bar', async () => {
    const brief = parseBrief(readFileSync(fixture('boat-hall.yaml')), 'boat-hall.yaml');
    const { result } = await runModel(readFileSync(fixture('boat-hall-a.ifc')), { brief });
    const [frame] = viewsOf(drawSheet(result)).filter(({ kind }) => kind === 'elevation');
    const labels = [
      ...frame!.svg.matchAll(
        /<text transform="translate\(([-\d.]+) ([-\d.]+)\)(?: rotate\(([-\d.]+)\))?"[^>]*>([^<]+)</g,
      ),
    ].map(
      ([, x, y, angle, words]): LabelBox => ({
        x: Number(x),
        y: Number(y),
        width: textWidth(words!, 2.1),
        height: 2.1 * 0.72,
        angle: (Number(angle ?? 0) * Math.PI) / 180,
      }),
    );
    expect(labels.length).toBeGreaterThan(15);
    for (const [k, a] of labels.entries()) for (const b of labels.slice(k + 1)) expect(overlap(a, b)).toBe(false);
    for (const { x1, y1, x2, y2 } of elementsOf(frame!.svg, 'data-bar')) {
      const [dx, dy] = [Number(x2) - Number(x1), Number(y2) - Number(y1)];
      const line = { width: Math.hypot(dx, dy), height: 0.01, angle: Math.atan2(dy, dx) };
      const bar = { x: Number(x1) + dx / 2, y: Number(y1) + dy / 2, ...line };
      for (const label of labels) expect(overlap(label, bar)).toBe(false);
    }
  });
});

describe('the width of text', () => {
  it('is what a font of these metrics gives, to two parts in a hundred', () => {
    const words = [
      'The quick brown fox jumps over the lazy dog',
      'SPHINX OF BLACK QUARTZ JUDGE MY VOW',
      '0123456789 (+-*/=<>?@#$%&) {[|]} ~!"',
      'Elevation on axis 4, looking along +y',
    ];
    const font = new URL(
      '../../node_modules/@expo-google-fonts/arimo/400Regular/Arimo_400Regular.ttf',
      import.meta.url,
    );
    for (const line of words) {
      // A bar at either end makes the blanks and the sides of the letters count.
      const widthOf = (text: string) => {
        const escaped = text.replace(/[&<>]/g, (c) => `&#${c.charCodeAt(0)};`);
        const svg = `<svg xmlns="http://www.w3.org/2000/svg" viewBox="0 0 9000 200"><text y="100" font-size="100" xml:space="preserve">${escaped}</text></svg>`;
        const picture = new Resvg(svg, {
          font: { fontFiles: [font.pathname], loadSystemFonts: false, defaultFontFamily: 'Arimo' },
        });
        return picture.getBBox()!.width;
      };
      const measured = widthOf(`|${line}|`) - widthOf('||');
      expect(Math.abs(textWidth(line, 100) / measured - 1)).toBeLessThan(0.02);
    }
  });

  it('bounds what is fitted and wrapped', () => {
    fc.assert(
      fc.property(fc.string({ maxLength: 60 }), number(5, 60), (words, width) => {
        expect(textWidth(fitted(words, 3, width), 3)).toBeLessThanOrEqual(Math.max(width, textWidth('', 3)));
        for (const line of wrappedText(words, 3, width, 3)) expect(textWidth(line, 3)).toBeLessThanOrEqual(width);
        expect(wrappedText(words, 3, width, 3).length).toBeLessThanOrEqual(3);
      }),
    );
  });
});

function sampled(one: LabelBox): (readonly [number, number])[] {
  const [a, b, c, d] = cornersOf({ ...one, width: one.width * 0.999, height: one.height * 0.999 });
  return Array.from({ length: 11 }, (_, i) => i / 10).flatMap((t) =>
    [
      [a!, b!],
      [d!, c!],
    ].map(([p, q]) => [p![0] + t * (q![0] - p![0]), p![1] + t * (q![1] - p![1])] as const),
  );
}

function contains({ x, y, width, height, angle }: LabelBox, point: readonly [number, number]): boolean {
  const [dx, dy] = [point[0] - x, point[1] - y];
  const u = Math.cos(angle) * dx + Math.sin(angle) * dy;
  const v = -Math.sin(angle) * dx + Math.cos(angle) * dy;
  return Math.abs(u) < width / 2 - 1e-6 && Math.abs(v) < height / 2 - 1e-6;
}
