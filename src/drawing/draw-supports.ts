import type { LabelBoard } from './label-board.ts';
import { PALETTE } from './palette.ts';
import type { PlacedView } from './placed-view.ts';
import type { Flat } from './projection.ts';
import { element, pathOf, text } from './svg.ts';
import { CAP_HEIGHT, textWidth } from './text.ts';

/** mm */
const SIZE = 2.2;

/**
 * Supports as triangles under their nodes, in plan as squares: filled where all directions are held, else open with the
 * letters of those that are.
 */
export function drawSupports(placed: PlacedView, board: LabelBoard, size: number): string {
  const signs: string[] = [];
  const spots = new Set<string>();
  for (const { node, fixed, spot } of placed.flat.supports) {
    const at = placed.onPaper(spot);
    // Supports behind one another are one sign.
    const key = `${at.map((value) => value.toFixed(1)).join()} ${fixed}`;
    if (spots.has(key)) continue;
    spots.add(key);
    const isWhole = fixed === 'xyz';
    const look = { fill: isWhole ? PALETTE.ink : PALETTE.paper, stroke: PALETTE.ink, 'stroke-width': 0.25 };
    const sign = placed.flat.view.kind === 'plan' ? square(at) : triangle(at);
    signs.push(element('path', { d: pathOf(sign, true), ...look, 'data-support': node }));
    if (isWhole) continue;
    const width = textWidth(fixed, size) + 0.4;
    const box = { x: at[0] + SIZE / 2 + 0.6 + width / 2, y: at[1] + SIZE * 0.6, width, height: size, angle: 0 };
    if (board.take(box)) {
      signs.push(
        text(fixed, {
          x: box.x,
          y: box.y + (CAP_HEIGHT * size) / 2,
          'font-size': size,
          'text-anchor': 'middle',
          fill: PALETTE.ink,
        }),
      );
    }
  }
  return signs.length === 0 ? '' : element('g', { class: 'supports', 'stroke-linejoin': 'round' }, signs);
}

function triangle([x, y]: Flat): Flat[] {
  return [
    [x, y + 0.2],
    [x + SIZE * 0.58, y + 0.2 + SIZE],
    [x - SIZE * 0.58, y + 0.2 + SIZE],
  ];
}

function square([x, y]: Flat): Flat[] {
  const half = SIZE * 0.38;
  return [
    [x - half, y - half],
    [x + half, y - half],
    [x + half, y + half],
    [x - half, y + half],
  ];
}

/** How far supports reach below their nodes, mm. */
export const SUPPORT_DEPTH = SIZE + 0.4;
