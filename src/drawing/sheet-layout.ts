import { BUBBLE_DEPTH } from './draw-grid.ts';
import { SUPPORT_DEPTH } from './draw-supports.ts';
import { type PlacedView, placeView, type Rectangle } from './placed-view.ts';
import { usualScale } from './units.ts';
import { type FlatView, heightOf, widthOf } from './view.ts';

/** mm of free paper round a view, and under it for its title. */
const AIR = 5;
const TITLE = 9;

/** A view of which one dimension is less than this part of the other is a line and tells nothing. */
const LINE = 0.02;

/** How much the size of each kind of view counts when arrangements are compared. */
const WORTH = { plan: 1, elevation: 1.2, isometric: 0.9 } as const;

/** Parts of the sheet that the upper row, and the left cell of a row, may take. */
const SPLITS = [0.3, 0.35, 0.4, 0.45, 0.5, 0.55, 0.6, 0.65, 0.7];

interface Cell {
  readonly flat: FlatView;
  readonly area: Rectangle;
}

/**
 * Views in cells of the sheet, each but the isometric at the largest usual scale that fits its cell; of the ways to divide the
 * sheet the one that draws them largest.
 */
export function layOut(views: readonly FlatView[], area: Rectangle): PlacedView[] {
  const told = tellingViews(views);
  let best: { readonly cells: readonly Cell[]; readonly worth: number } = {
    cells: [],
    worth: Number.NEGATIVE_INFINITY,
  };
  for (const cells of divisions(told, area)) {
    const worth = cells.reduce((sum, { flat, area: cell }) => {
      return sum + WORTH[flat.view.kind] * Math.log(Math.max(scaleIn(flat, cell), 1e-9));
    }, 0);
    // Sums that differ by rounding are equal: the first division stands.
    if (worth > best.worth + 1e-9) best = { cells, worth };
  }
  return best.cells.map(({ flat, area: cell }) => placeIn(flat, cell));
}

/** Without views that are a mere line; a truss in one plane needs no isometric. */
function tellingViews(views: readonly FlatView[]): FlatView[] {
  const telling = views.filter((flat) => flat.view.kind === 'isometric' || !isLine(flat));
  const scaled = telling.filter(({ view }) => view.kind !== 'isometric');
  if (telling.length === 0) return views.slice(0, 1);
  return scaled.length === 1 ? scaled : telling;
}

function isLine({ box }: FlatView): boolean {
  const [width, height] = [widthOf(box), heightOf(box)];
  return Math.min(width, height) <= LINE * Math.max(width, height);
}

/** The views in one row, or in two of which each is divided once. */
function* divisions(views: readonly FlatView[], area: Rectangle): Generator<Cell[]> {
  const [a, b, c, d, ...more] = views;
  if (a === undefined) return;
  if (more.length > 0) {
    yield tiles(views, area);
  } else if (b === undefined) {
    yield [{ flat: a, area }];
  } else if (c === undefined) {
    for (const part of SPLITS) {
      yield inRow([a, b], area, part);
      yield rows(area, part).map((row, k) => ({ flat: [a, b][k]!, area: row }));
    }
  } else {
    const pairs: readonly (readonly [FlatView[], FlatView[]])[] =
      d === undefined
        ? [
            [[a, c], [b]],
            [[a, b], [c]],
            [[a], [b, c]],
          ]
        : [
            [
              [a, d],
              [b, c],
            ],
            [
              [a, b],
              [d, c],
            ],
          ];
    for (const [upper, lower] of pairs) yield* twoRows(upper, lower, area);
  }
}

function* twoRows(upper: readonly FlatView[], lower: readonly FlatView[], area: Rectangle): Generator<Cell[]> {
  for (const part of SPLITS) {
    const [above, below] = rows(area, part);
    for (const left of upper.length > 1 ? SPLITS : [1]) {
      const first = inRow(upper, above, left);
      for (const right of lower.length > 1 ? SPLITS : [1]) yield [...first, ...inRow(lower, below, right)];
    }
  }
}

function rows({ x, y, width, height }: Rectangle, part: number): [Rectangle, Rectangle] {
  return [
    { x, y, width, height: height * part },
    { x, y: y + height * part, width, height: height * (1 - part) },
  ];
}

function inRow([first, second]: readonly FlatView[], { x, y, width, height }: Rectangle, part: number): Cell[] {
  if (first === undefined) return [];
  if (second === undefined) return [{ flat: first, area: { x, y, width, height } }];
  return [
    { flat: first, area: { x, y, width: width * part, height } },
    { flat: second, area: { x: x + width * part, y, width: width * (1 - part), height } },
  ];
}

/** Many views, as a caller may ask for: equal cells. */
function tiles(views: readonly FlatView[], { x, y, width, height }: Rectangle): Cell[] {
  const across = Math.ceil(Math.sqrt(views.length));
  const down = Math.ceil(views.length / across);
  return views.map((flat, k) => ({
    flat,
    area: {
      x: x + ((k % across) * width) / across,
      y: y + (Math.floor(k / across) * height) / down,
      width: width / across,
      height: height / down,
    },
  }));
}

/** What is left of a cell inside bubbles, supports, title and some air. */
function roomIn({ view, grid, supports }: FlatView, { x, y, width, height }: Rectangle): Rectangle {
  const bubbles = grid.length > 0 ? BUBBLE_DEPTH : 0;
  const left = AIR + (view.kind === 'plan' ? bubbles : 0);
  const bottom = AIR + TITLE + bubbles + (view.kind !== 'plan' && supports.length > 0 ? SUPPORT_DEPTH : 0);
  return {
    x: x + left,
    y: y + AIR,
    width: Math.max(1, width - left - AIR),
    height: Math.max(1, height - AIR - bottom),
  };
}

/** mm a metre. */
function scaleIn(flat: FlatView, cell: Rectangle): number {
  const room = roomIn(flat, cell);
  const most = Math.min(
    room.width / Math.max(widthOf(flat.box), 1e-6),
    room.height / Math.max(heightOf(flat.box), 1e-6),
  );
  return flat.view.kind === 'isometric' ? most : 1000 / usualScale(most);
}

function placeIn(flat: FlatView, cell: Rectangle): PlacedView {
  const scale = scaleIn(flat, cell);
  return placeView(
    flat,
    roomIn(flat, cell),
    cell,
    scale,
    flat.view.kind === 'isometric' ? null : Math.round(1000 / scale),
  );
}
