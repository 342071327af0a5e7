import { barStyle } from './bar-style.ts';
import type { LabelBoard } from './label-board.ts';
import { PALETTE } from './palette.ts';
import type { PlacedView } from './placed-view.ts';
import { type Flat, flat } from './projection.ts';
import type { Scene } from './scene.ts';
import { element, text } from './svg.ts';
import { CAP_HEIGHT, plain, textWidth } from './text.ts';
import { forceLabel } from './units.ts';
import type { FlatBar } from './view.ts';

export interface LabelOptions {
  /** mm */
  readonly size: number;
  /** Beyond this many bars only the largest forces are labelled: a scatter of labels tells nothing. */
  readonly mostBars: number;
  readonly largestOnly: number;
  readonly thinness: number;
}

/** mm between a label and its bar, and of free paper round a label. */
const GAP = 0.35;
const AIR = 0.3;

/** What each bar carries (before there are forces: what it is called), along the bar, where there is room. */
export function drawBarLabels(placed: PlacedView, scene: Scene, board: LabelBoard, options: LabelOptions): string {
  const bars = [...placed.flat.bars].sort(
    (a, b) =>
      Math.abs(b.bar.force ?? 0) - Math.abs(a.bar.force ?? 0) ||
      a.bar.id.localeCompare(b.bar.id, 'en', { numeric: true }),
  );
  if (bars.length > options.mostBars && !scene.isLoaded) return '';
  if (bars.length <= options.mostBars) blockBars(placed, scene, board, options.thinness);
  const told = bars.length > options.mostBars ? bars.slice(0, options.largestOnly) : bars;
  const labels = told.map((bar) => drawBarLabel(bar, placed, scene, board, options)).filter((label) => label !== '');
  if (labels.length === 0) return '';
  const look = { class: 'bar-labels', 'font-size': options.size, 'text-anchor': 'middle', ...HALO };
  return element('g', look, labels);
}

const HALO = { 'paint-order': 'stroke', stroke: PALETTE.paper, 'stroke-width': 0.5, 'stroke-linejoin': 'round' };

function drawBarLabel(
  { bar, from, to }: FlatBar,
  placed: PlacedView,
  scene: Scene,
  board: LabelBoard,
  { size, thinness }: LabelOptions,
): string {
  const [a, b] = leftToRight(placed.onPaper(from), placed.onPaper(to));
  const length = Math.hypot(b[0] - a[0], b[1] - a[1]);
  const angle = Math.atan2(b[1] - a[1], b[0] - a[0]);
  const style = barStyle(bar.force, scene.greatestForce, scene.isLoaded, thinness);
  const clear = style.weight / 2 + GAP + (CAP_HEIGHT * size) / 2;
  for (const words of wordings(bar.name, bar.force)) {
    const width = textWidth(words, size) + 2 * AIR;
    for (const t of ALONG) {
      if (width > 2 * length * Math.min(t, 1 - t)) continue;
      for (const off of [-clear, clear]) {
        const middle: Flat = [
          a[0] + t * (b[0] - a[0]) - Math.sin(angle) * off,
          a[1] + t * (b[1] - a[1]) + Math.cos(angle) * off,
        ];
        const box = { x: middle[0], y: middle[1], width, height: CAP_HEIGHT * size + AIR, angle };
        if (!board.take(box)) continue;
        const fill = bar.force === null ? PALETTE.quiet : style.colour;
        return turnedText(words, middle, angle, { fill, size, bar: bar.id });
      }
    }
  }
  return '';
}

/** Where along a bar its label may stand: the middle, else beside what crosses there. */
const ALONG = [0.5, 0.4, 0.6, 0.3, 0.7];

/** No label on a bar, its own or another. */
function blockBars(placed: PlacedView, scene: Scene, board: LabelBoard, thinness: number): void {
  for (const { bar, from, to } of placed.flat.bars) {
    const [a, b] = [placed.onPaper(from), placed.onPaper(to)];
    const { weight } = barStyle(bar.force, scene.greatestForce, scene.isLoaded, thinness);
    const width = Math.hypot(b[0] - a[0], b[1] - a[1]);
    board.block({
      x: (a[0] + b[0]) / 2,
      y: (a[1] + b[1]) / 2,
      width,
      height: weight,
      angle: Math.atan2(b[1] - a[1], b[0] - a[0]),
    });
  }
}

/** With the name where it fits, else the number alone. A bar that carries nothing is not worth a word. */
function wordings(name: string, force: number | null): string[] {
  const called = plain(name);
  if (force === null) return called === '' || called.length > 16 ? [] : [called];
  if (Math.abs(force) < 50) return [];
  return [forceLabel(force)];
}

function turnedText(
  words: string,
  [x, y]: Flat,
  angle: number,
  { fill, size, bar }: { readonly fill: string; readonly size: number; readonly bar: string },
): string {
  const degrees = (angle * 180) / Math.PI;
  const transform = `translate(${x.toFixed(2)} ${y.toFixed(2)})${Math.abs(degrees) < 0.05 ? '' : ` rotate(${degrees.toFixed(1)})`}`;
  return text(words, { transform, y: (CAP_HEIGHT * size) / 2, fill, 'data-labels': bar });
}

/** Labels are read from the left, upright ones from below. */
function leftToRight(a: Flat, b: Flat): [Flat, Flat] {
  const isUpright = Math.abs(a[0] - b[0]) < 1e-6;
  return (isUpright ? a[1] > b[1] : a[0] < b[0]) ? [a, b] : [b, a];
}

/** Names of the nodes beside them, where there is room for more than half; else only those of the supports. */
export function drawNodeLabels(placed: PlacedView, scene: Scene, board: LabelBoard, size: number): string {
  const drawn = new Map<string, Flat>();
  const ends = new Set(placed.flat.bars.flatMap(({ from, to }) => [String(from), String(to)]));
  const { projection } = placed.flat.view;
  for (const { id, at } of scene.nodes) {
    const spot = flat(projection, at);
    if (ends.has(String(spot)) && placed.flat.view.holds(at)) drawn.set(id, placed.onPaper(spot));
  }
  if (drawn.size > MOST_NODES) return '';
  const labels: string[] = [];
  for (const [id, at] of drawn) {
    const width = textWidth(id, size) + 2 * AIR;
    const height = CAP_HEIGHT * size + 2 * AIR;
    for (const [i, j] of CORNERS) {
      const [x, y] = [at[0] + i * (width / 2 + NODE), at[1] + j * (height / 2 + NODE)];
      const box = { x, y, width, height, angle: 0 };
      if (!board.take(box)) continue;
      labels.push(text(id, { x: box.x, y: box.y + (CAP_HEIGHT * size) / 2, 'data-node': id }));
      break;
    }
  }
  if (labels.length < drawn.size / 2) return '';
  const look = { class: 'node-labels', 'font-size': size, 'text-anchor': 'middle', fill: PALETTE.quiet, ...HALO };
  return element('g', look, labels);
}

const MOST_NODES = 80;
/** mm from a node to its name. */
const NODE = 0.5;
const CORNERS = [
  [1, -1],
  [-1, -1],
  [1, 1],
  [-1, 1],
  [0, -1.6],
  [0, 1.6],
] as const;
