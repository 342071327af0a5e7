import { drawBars } from './draw-bars.ts';
import { drawGrid } from './draw-grid.ts';
import { drawBarLabels, drawNodeLabels } from './draw-labels.ts';
import { drawMarks } from './draw-marks.ts';
import { drawSupports } from './draw-supports.ts';
import { LabelBoard } from './label-board.ts';
import { PALETTE } from './palette.ts';
import type { PlacedView } from './placed-view.ts';
import type { Scene } from './scene.ts';
import { layOut } from './sheet-layout.ts';
import { element, text } from './svg.ts';
import { FONT_FAMILIES, fitted, textWidth } from './text.ts';
import { roundNumbers } from './units.ts';
import { flatten, type View } from './view.ts';

/** Beyond this many bars a tooltip for each would double the file. */
const MOST_TOOLTIPS = 2000;

export interface ViewOptions {
  /** mm of paper. */
  readonly width: number;
  readonly height: number;
  /** mm */
  readonly labelSize: number;
}

export const VIEW_DEFAULTS: ViewOptions = { width: 180, height: 120, labelSize: 2.1 };

/** One view alone, as SVG; null where no bar is in it. */
export function drawView(scene: Scene, view: View, options: Partial<ViewOptions> = {}): string | null {
  const { width, height, labelSize } = { ...VIEW_DEFAULTS, ...options };
  const flat = flatten(scene, view);
  const [placed] = flat === null ? [] : layOut([flat], { x: 0, y: 0, width, height });
  if (placed === undefined) return null;
  const listed = new Set(scene.marks.map(({ number }) => number));
  const root = {
    xmlns: 'http://www.w3.org/2000/svg',
    viewBox: `0 0 ${width} ${height}`,
    'font-family': FONT_FAMILIES,
    role: 'img',
  };
  const paper = element('rect', { width, height, fill: PALETTE.paper });
  return element('svg', root, [paper, drawPlaced(placed, scene, listed, labelSize, thinnessOf([placed]))].join('\n'));
}

/** Lines are thinned where the bars of a view are so short on paper that full weights would run together. */
export function thinnessOf(views: readonly PlacedView[]): number {
  const lengths = views.flatMap(({ flat, scale }) =>
    flat.bars.map(({ from, to }) => Math.hypot(to[0] - from[0], to[1] - from[1]) * scale),
  );
  const middle = lengths.sort((a, b) => a - b)[Math.floor(lengths.length / 2)] ?? 10;
  return Math.min(1, Math.max(0.3, middle / 8));
}

/** A view with all that belongs to it; of the findings' marks those of `listed`. */
export function drawPlaced(
  placed: PlacedView,
  scene: Scene,
  listed: ReadonlySet<number>,
  labelSize: number,
  thinness: number,
): string {
  const { cell } = placed;
  const board = new LabelBoard(cell.x, cell.y, cell.x + cell.width, cell.y + cell.height);
  const { view } = placed.flat;
  const isIsometric = view.kind === 'isometric';
  const name = titleOf(placed, board);
  const grid = drawGrid(placed, board);
  const bars = drawBars(placed, scene, { thinness, hasTooltips: scene.bars.length <= MOST_TOOLTIPS });
  const supports = drawSupports(placed, board, labelSize);
  const marks = drawMarks(placed, board, listed);
  const labelled = { size: labelSize, mostBars: 260, largestOnly: 12, thinness };
  const labels = isIsometric ? '' : drawBarLabels(placed, scene, board, labelled);
  const nodes = isIsometric || view.kind === 'plan' ? '' : drawNodeLabels(placed, scene, board, labelSize * 0.9);
  return element('g', { class: `view ${view.kind}` }, [grid, bars, supports, labels, nodes, marks, name].join('\n'));
}

/** Under the view, in the middle of its cell: what it shows, to what scale, and a ruler. */
function titleOf({ flat, cell, named, scale }: PlacedView, board: LabelBoard): string {
  const x = cell.x + cell.width / 2;
  const y = cell.y + cell.height - 4;
  const ratio = named === null ? 'not to scale' : `1 : ${named}`;
  const ruler = named === null ? 0 : rulerLength(scale);
  const beside = textWidth(ratio, SMALL) + GAP + (ruler === 0 ? 0 : ruler + GAP + RULER_WORDS);
  const words = fitted(flat.view.title, TITLE_SIZE, cell.width - beside - 4, true);
  const width = textWidth(words, TITLE_SIZE, true) + beside;
  const left = x - width / 2;
  const atRatio = left + textWidth(words, TITLE_SIZE, true) + GAP;
  const atRuler = atRatio + textWidth(ratio, SMALL) + GAP;
  board.block({ x, y: y - 1, width, height: 5, angle: 0 });
  return element('g', { class: 'view-title', fill: PALETTE.ink }, [
    text(words, { x: left, y, 'font-size': TITLE_SIZE, 'font-weight': 'bold' }),
    text(ratio, { x: atRatio, y, 'font-size': SMALL, fill: PALETTE.quiet }),
    ...(ruler === 0 ? [] : [drawRuler(atRuler, y - 0.2, scale)]),
  ]);
}

const TITLE_SIZE = 3.4;
const SMALL = 2.6;
const GAP = 3;
/** mm: the longest ruler, and the room for what it says of its length. */
const LONGEST_RULER = 40;
const RULER_WORDS = 9;

const rulerMetres = (scale: number): number => roundNumbers(LONGEST_RULER / scale, 1)[0] ?? 1;
const rulerLength = (scale: number): number => rulerMetres(scale) * scale;

/** A scale bar of a round length, in two halves. */
function drawRuler(x: number, y: number, scale: number): string {
  const half = rulerLength(scale) / 2;
  const look = { y: y - 1.2, width: half, height: 1.2, stroke: PALETTE.ink, 'stroke-width': 0.2 };
  return element('g', { class: 'scale-bar' }, [
    element('rect', { x, ...look, fill: PALETTE.ink }),
    element('rect', { x: x + half, ...look, fill: PALETTE.paper }),
    text(`${rulerMetres(scale)} m`, { x: x + 2 * half + 1.2, y: y + 0.2, 'font-size': SMALL, fill: PALETTE.quiet }),
  ]);
}
