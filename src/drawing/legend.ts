import { barStyle } from './bar-style.ts';
import { numberedDisc } from './draw-marks.ts';
import { PALETTE } from './palette.ts';
import type { Scene } from './scene.ts';
import { element, text } from './svg.ts';
import { roundNumbers } from './units.ts';

const SIZE = 2.6;
const ROW = 4.6;
const SAMPLE = 15;

/** What weights, hues, dashes and signs mean; `x` and `y` are its upper left corner, mm. */
export function drawLegend(scene: Scene, x: number, y: number, thinness: number): string {
  const rows = scene.isLoaded ? forceRows(scene, x, y, thinness) : plainRows(x, y);
  return element('g', { class: 'legend', 'font-size': SIZE, fill: PALETTE.ink }, [
    ...rows,
    ...signs(scene, x, y + 3 * ROW + 1.4),
  ]);
}

function forceRows(scene: Scene, x: number, y: number, thinness: number): string[] {
  const kilonewtons = roundNumbers(scene.greatestForce / 1000, 4).filter((_, k) => k < 3);
  const heads = kilonewtons.map((value, k) =>
    text(`${value < 1 ? value.toPrecision(1) : value} kN`, {
      x: x + 25 + k * (SAMPLE + 3) + SAMPLE / 2,
      y,
      'text-anchor': 'middle',
      fill: PALETTE.quiet,
    }),
  );
  const rows = ([-1, 1] as const).flatMap((sign, r) => {
    const at = y + ROW * (r + 1) - 1.2;
    const samples = kilonewtons.map((value, k) => {
      const { colour, weight, dash } = barStyle(sign * value * 1000, scene.greatestForce, true, thinness);
      const left = x + 25 + k * (SAMPLE + 3);
      return element('line', {
        x1: left,
        y1: at - 0.9,
        x2: left + SAMPLE,
        y2: at - 0.9,
        stroke: colour,
        'stroke-width': weight,
        'stroke-dasharray': dash?.map((length) => length.toFixed(2)).join(' '),
      });
    });
    return [text(sign < 0 ? '\u2212 compression' : '+ tension', { x, y: at }), ...samples];
  });
  return [...heads, ...rows];
}

function plainRows(x: number, y: number): string[] {
  const line = element('line', {
    x1: x,
    y1: y - 0.9,
    x2: x + SAMPLE,
    y2: y - 0.9,
    stroke: PALETTE.neutral,
    'stroke-width': 0.3,
  });
  return [line, text('bar; there are no forces to draw', { x: x + SAMPLE + 3, y })];
}

function signs(scene: Scene, x: number, y: number): string[] {
  const parts: string[] = [];
  let left = x;
  const add = (width: number, draw: (at: number) => string[]) => {
    parts.push(...draw(left));
    left += width;
  };
  if (scene.supports.length > 0) {
    add(22, (at) => [
      element('path', { d: `M${at + 1.4} ${y - 2.2}L${at + 2.7} ${y}L${at + 0.1} ${y}Z`, fill: PALETTE.ink }),
      text('support', { x: at + 4, y }),
    ]);
  }
  if (scene.marks.some(({ finding }) => finding.severity === 'error')) {
    add(17, (at) => [markSample(true, at + 1.6, y - 1), text('error', { x: at + 4.6, y })]);
  }
  if (scene.marks.some(({ finding }) => finding.severity === 'warning')) {
    add(20, (at) => [markSample(false, at + 1.6, y - 1), text('warning', { x: at + 4.6, y })]);
  }
  if (scene.isLoaded && scene.bars.some(({ force }) => force === null)) {
    const { colour, weight, dash } = barStyle(null, scene.greatestForce, true);
    const dashes = dash?.join(' ');
    add(30, (at) => [
      element('line', {
        x1: at,
        y1: y - 0.9,
        x2: at + 8,
        y2: y - 0.9,
        stroke: colour,
        'stroke-width': weight,
        'stroke-dasharray': dashes,
      }),
      text('no force found', { x: at + 10, y }),
    ]);
  }
  return parts;
}

function markSample(isError: boolean, x: number, y: number): string {
  const place = { transform: `translate(${x} ${y}) scale(0.85)` };
  return element('g', place, numberedDisc(1, isError, [0, 0]));
}
