import type { LabelBoard } from './label-board.ts';
import { PALETTE } from './palette.ts';
import type { PlacedView } from './placed-view.ts';
import type { Flat } from './projection.ts';
import { element, text } from './svg.ts';
import { CAP_HEIGHT } from './text.ts';

/** mm */
const RADIUS = 1.9;
const NUMBER = 2.2;
const DOT = 0.8;
const STEPS = [0, 1, 2, 3] as const;

/**
 * Numbered discs on the spots of the findings that are `listed`: dark for an error, light for a warning. What would cover
 * another moves off, on a leader. The other findings are dots.
 */
export function drawMarks(placed: PlacedView, board: LabelBoard, listed: ReadonlySet<number>): string {
  const marks = placed.flat.marks.map(({ number, finding, spot }) => ({
    number,
    isError: finding.severity === 'error',
    at: placed.onPaper(spot),
  }));
  if (marks.length === 0) return '';
  const discs = marks
    .filter(({ number }) => listed.has(number))
    .map((mark) => ({ ...mark, place: freePlace(mark.at, board) }));
  const leaders = discs
    .filter(({ at, place }) => place !== at)
    .map(({ at, place }) => element('line', { x1: at[0], y1: at[1], x2: place[0], y2: place[1] }));
  return element('g', { class: 'marks', stroke: PALETTE.mark, 'stroke-width': 0.25 }, [
    ...marks.filter(({ number }) => !listed.has(number)).map(drawDot),
    ...leaders,
    ...discs.map(({ number, isError, place }) =>
      element('g', { 'data-mark': number }, numberedDisc(number, isError, place)),
    ),
  ]);
}

interface Mark {
  readonly number: number;
  readonly isError: boolean;
  readonly at: Flat;
}

function drawDot({ number, isError, at }: Mark): string {
  const fill = isError ? PALETTE.mark : PALETTE.paper;
  return element('circle', { 'data-mark': number, cx: at[0], cy: at[1], r: DOT, fill });
}

export function numberedDisc(number: number, isError: boolean, [x, y]: Flat): string {
  const [fill, ink] = isError ? [PALETTE.mark, PALETTE.paper] : [PALETTE.paper, PALETTE.mark];
  const size = number > 99 ? NUMBER * 0.75 : NUMBER;
  const look = { 'font-size': size, 'font-weight': 'bold', 'text-anchor': 'middle', fill: ink, stroke: 'none' };
  return [
    element('circle', { cx: x, cy: y, r: RADIUS, fill, stroke: PALETTE.mark, 'stroke-width': 0.3 }),
    text(String(number), { x, y: y + (CAP_HEIGHT * size) / 2, ...look }),
  ].join('');
}

/** On the spot itself if no other mark stands there, else the nearest free place round it. */
function freePlace(at: Flat, board: LabelBoard): Flat {
  const box = (place: Flat) => ({
    x: place[0],
    y: place[1],
    width: 2 * RADIUS + 0.3,
    height: 2 * RADIUS + 0.3,
    angle: 0,
  });
  if (board.take(box(at))) return at;
  for (const step of STEPS) {
    const away = (2.4 + 1.3 * step) * RADIUS;
    for (let k = 0; k < 8; k++) {
      const angle = (-Math.PI / 4) * (k + 1);
      const place: Flat = [at[0] + away * Math.cos(angle), at[1] + away * Math.sin(angle)];
      if (board.take(box(place))) return place;
    }
  }
  return at;
}
