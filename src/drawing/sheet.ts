import type { Result } from '../domain/result.ts';
import { verdict } from '../domain/verdict.ts';
import { drawPlaced, thinnessOf } from './draw-view.ts';
import { tellingElevations } from './elevations.ts';
import { FindingsPanel } from './findings-panel.ts';
import { PALETTE } from './palette.ts';
import type { PlacedView, Rectangle } from './placed-view.ts';
import { type Scene, sceneOf } from './scene.ts';
import { layOut } from './sheet-layout.ts';
import { element, text, tooltip } from './svg.ts';
import { FONT_FAMILIES } from './text.ts';
import { drawTitleBlock } from './title-block.ts';
import { flatten, type View, WHOLE_ISOMETRIC, WHOLE_PLAN } from './view.ts';

export interface SheetOptions {
  /** mm of paper; A3 across unless said otherwise. */
  readonly width: number;
  readonly height: number;
  /** The views to draw, in order; the sheet's own choice where none is given. */
  readonly views: readonly View[];
  /** mm */
  readonly labelSize: number;
}

export const SHEET_DEFAULTS: SheetOptions = { width: 420, height: 297, views: [], labelSize: 2.1 };

const MARGIN = 10;
const TITLE_BLOCK = 27;
const PANEL = 84;

/**
 * The truss on one sheet of paper as SVG: plan, the telling elevations and an isometric, with forces by weight, hue and dash,
 * supports, grid, findings, scale, legend, verdict and caution. The same result gives the same text.
 *
 * @example
 * writeFileSync('roof.svg', drawSheet(result));
 */
export function drawSheet(result: Result, options: Partial<SheetOptions> = {}): string {
  const chosen = { ...SHEET_DEFAULTS, ...options };
  const scene = sceneOf(result);
  const inner = { x: MARGIN, y: MARGIN, width: chosen.width - 2 * MARGIN, height: chosen.height - 2 * MARGIN };
  const strip = { ...inner, y: inner.y + inner.height - TITLE_BLOCK, height: TITLE_BLOCK };
  const aside = scene.marks.length > 0 ? PANEL : 0;
  const field = { ...inner, width: inner.width - aside, height: inner.height - TITLE_BLOCK };
  const panel = new FindingsPanel(scene, { ...field, x: field.x + field.width, width: aside });
  const views = placedViews(scene, chosen.views, field);
  const thinness = thinnessOf(views);
  return sheetOf(result, chosen, [
    ...views.map((view) => drawPlaced(view, scene, panel.listed, chosen.labelSize, thinness)),
    ...(views.length === 0 ? [emptyWords(field)] : []),
    ...(aside === 0 ? [] : [panel.draw(result)]),
    drawTitleBlock(result, scene, strip, thinness),
  ]);
}

function sheetOf(result: Result, { width, height }: SheetOptions, parts: readonly string[]): string {
  const root = {
    xmlns: 'http://www.w3.org/2000/svg',
    width: `${width}mm`,
    height: `${height}mm`,
    viewBox: `0 0 ${width} ${height}`,
    'font-family': FONT_FAMILIES,
    role: 'img',
  };
  const paper = element('rect', { width, height, fill: PALETTE.paper });
  const about = tooltip(`${result.model.file}: ${verdict(result)}`);
  const caution = element('desc', {}, result.caution);
  return `<?xml version="1.0" encoding="UTF-8"?>\n${element('svg', root, [about, caution, paper, ...parts].join('\n'))}\n`;
}

function placedViews(scene: Scene, wished: readonly View[], field: Rectangle): PlacedView[] {
  const chosen = wished.length > 0 ? wished : [WHOLE_PLAN, ...tellingElevations(scene), WHOLE_ISOMETRIC];
  return layOut(
    chosen.map((view) => flatten(scene, view)).filter((flat) => flat !== null),
    field,
  );
}

function emptyWords({ x, y, width, height }: Rectangle): string {
  return text('No bar was found: there is nothing to draw.', {
    x: x + width / 2,
    y: y + height / 2,
    'font-size': 4,
    'text-anchor': 'middle',
    fill: PALETTE.quiet,
  });
}
