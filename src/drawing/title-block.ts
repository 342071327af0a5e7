import type { Result } from '../domain/result.ts';
import { count, envelopeTitle, verdict } from '../domain/verdict.ts';
import { drawLegend } from './legend.ts';
import { PALETTE } from './palette.ts';
import type { Rectangle } from './placed-view.ts';
import type { Scene } from './scene.ts';
import { element, text } from './svg.ts';
import { fitted, plain, wrappedText } from './text.ts';

const BODY = 2.9;
const SMALL = 2.2;

/** What the sheet shows, whether it stands, how to read it, and the caution. */
export function drawTitleBlock(result: Result, scene: Scene, area: Rectangle, thinness: number): string {
  const left = area.width * 0.44;
  const middle = area.x + left + 6;
  const right = area.x + area.width * 0.72;
  const rule = (x: number) =>
    element('line', {
      x1: x,
      y1: area.y + 3,
      x2: x,
      y2: area.y + area.height,
      stroke: PALETTE.faint,
      'stroke-width': 0.2,
    });
  return element('g', { class: 'title-block' }, [
    element('line', {
      x1: area.x,
      y1: area.y,
      x2: area.x + area.width,
      y2: area.y,
      stroke: PALETTE.ink,
      'stroke-width': 0.35,
    }),
    rule(middle - 3),
    rule(right - 4),
    ...headline(result, scene, area, left),
    drawLegend(scene, middle, area.y + 7, thinness),
    ...paragraph(result.caution, right, area.y + 6, area.x + area.width - right, SMALL + 0.1, 6, PALETTE.quiet),
  ]);
}

function headline(result: Result, scene: Scene, area: Rectangle, width: number): string[] {
  const { model, generator } = result;
  const title = fitted(plain(model.file), 5.4, width - 4, true);
  const what = [
    `${count(result.nodes.length, 'node')}, ${count(result.bars.length, 'bar')}`,
    ...(scene.isLoaded ? [`forces: the larger extreme of each bar, ${envelopeTitle(result)}`] : []),
    `${generator.name} ${generator.version}`,
  ].join('; ');
  return [
    text(title, { x: area.x, y: area.y + 8.2, 'font-size': 5.4, 'font-weight': 'bold', fill: PALETTE.ink }),
    ...paragraph(verdict(result), area.x, area.y + 13.5, width - 4, BODY, 3, PALETTE.ink),
    ...paragraph(what, area.x, area.y + 23.5, width - 4, SMALL + 0.2, 2, PALETTE.quiet),
  ];
}

function paragraph(
  words: string,
  x: number,
  y: number,
  width: number,
  size: number,
  lines: number,
  fill: string,
): string[] {
  return wrappedText(plain(words), size, width, lines).map((line, k) =>
    text(line, { x, y: y + k * size * 1.3, 'font-size': size, fill }),
  );
}
