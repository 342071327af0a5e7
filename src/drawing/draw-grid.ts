import { SUPPORT_DEPTH } from './draw-supports.ts';
import type { LabelBoard } from './label-board.ts';
import { PALETTE } from './palette.ts';
import type { PlacedView } from './placed-view.ts';
import type { Flat } from './projection.ts';
import { element, text } from './svg.ts';
import { CAP_HEIGHT, fitted } from './text.ts';

/** mm: of a grid bubble, and how far the axes run on beyond the bars to it. */
const RADIUS = 2.4;
const BEYOND = 3.2;
const SIZE = 2.5;

/** What the bubbles of a view take beside its bars, mm. */
export const BUBBLE_DEPTH = BEYOND + 2 * RADIUS + 0.5;

/** Grid axes with their names in bubbles at their lower or left ends; a bubble that would cover another is left out. */
export function drawGrid(placed: PlacedView, board: LabelBoard): string {
  const parts: string[] = [];
  for (const { tag, from, to } of placed.flat.grid) {
    const [near, far] = bubbleFirst(placed.onPaper(from), placed.onPaper(to));
    const length = Math.hypot(far[0] - near[0], far[1] - near[1]);
    const away = placed.flat.view.kind === 'elevation' ? BEYOND + SUPPORT_DEPTH : BEYOND;
    const unit: Flat = length > 0 ? [(near[0] - far[0]) / length, (near[1] - far[1]) / length] : [0, 1];
    const at = (k: number): Flat => [near[0] + unit[0] * k, near[1] + unit[1] * k];
    const middle = at(away + RADIUS);
    if (!board.take({ x: middle[0], y: middle[1], width: 2 * RADIUS + 0.4, height: 2 * RADIUS + 0.4, angle: 0 }))
      continue;
    const [end, start] = [at(away), at(-length - BEYOND / 2)];
    parts.push(
      element('line', { x1: start[0], y1: start[1], x2: end[0], y2: end[1], 'stroke-dasharray': '4 1 0.6 1' }),
      element('circle', { cx: middle[0], cy: middle[1], r: RADIUS, fill: PALETTE.paper }),
      text(fitted(tag, SIZE, 2 * RADIUS - 0.4), {
        x: middle[0],
        y: middle[1] + (CAP_HEIGHT * SIZE) / 2,
        fill: PALETTE.quiet,
        stroke: 'none',
      }),
    );
  }
  if (parts.length === 0) return '';
  const look = { stroke: PALETTE.faint, 'stroke-width': 0.2, 'font-size': SIZE, 'text-anchor': 'middle', fill: 'none' };
  return element('g', { class: 'grid', ...look }, parts);
}

/** The end that is lower on paper, of a level axis the left one. */
function bubbleFirst(a: Flat, b: Flat): [Flat, Flat] {
  const isLevel = Math.abs(a[1] - b[1]) < Math.abs(a[0] - b[0]);
  return (isLevel ? a[0] < b[0] : a[1] > b[1]) ? [a, b] : [b, a];
}
