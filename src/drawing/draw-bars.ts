import { type BarStyle, barStyle } from './bar-style.ts';
import type { PlacedView } from './placed-view.ts';
import type { Flat } from './projection.ts';
import type { Scene } from './scene.ts';
import { element, tooltip } from './svg.ts';
import { forceLabel } from './units.ts';

export interface BarOptions {
  /** Weights are multiplied by this where bars are many and short. */
  readonly thinness: number;
  /** Whether each bar tells its name and force when pointed at: it doubles the size of the file. */
  readonly hasTooltips: boolean;
}

/** mm; a bar that is seen end on is a dot. */
const END_ON = 0.15;

/** Every bar of the view once, the largest forces on top, bars of one look in one group. */
export function drawBars(placed: PlacedView, scene: Scene, options: BarOptions): string {
  const sorted = [...placed.flat.bars].sort((a, b) => Math.abs(a.bar.force ?? 0) - Math.abs(b.bar.force ?? 0));
  const groups: string[] = [];
  let style: BarStyle | null = null;
  let inside: string[] = [];
  const close = () => {
    if (style !== null) groups.push(element('g', groupLook(style), inside));
    inside = [];
  };
  for (const { bar, from, to } of sorted) {
    const next = barStyle(bar.force, scene.greatestForce, scene.isLoaded, options.thinness);
    if (style === null || groupKey(style) !== groupKey(next)) {
      close();
      style = next;
    }
    const told = options.hasTooltips ? tooltip(barWords(bar.name, bar.force)) : '';
    inside.push(drawBar(bar.id, placed.onPaper(from), placed.onPaper(to), next, told));
  }
  close();
  return element('g', { class: 'bars', 'stroke-linecap': 'butt', fill: 'none' }, groups);
}

const groupKey = ({ colour, weight }: BarStyle): string => `${colour} ${weight}`;
const groupLook = ({ colour, weight }: BarStyle) => ({ stroke: colour, 'stroke-width': weight });

function drawBar(id: string, from: Flat, to: Flat, style: BarStyle, told: string): string {
  const length = Math.hypot(to[0] - from[0], to[1] - from[1]);
  if (length < END_ON) {
    const dot = { 'data-bar': id, cx: from[0], cy: from[1], r: Math.max(0.35, style.weight * 0.7) };
    return element('circle', { ...dot, fill: style.colour, stroke: 'none' }, told);
  }
  return element(
    'line',
    { 'data-bar': id, x1: from[0], y1: from[1], x2: to[0], y2: to[1], 'stroke-dasharray': dashes(style, length) },
    told,
  );
}

/** Dashes that come out even: a whole dash at both ends, and a gap even in the shortest bar. */
function dashes({ dash }: BarStyle, length: number): string | undefined {
  if (dash === null) return undefined;
  const [on, off] = dash;
  const gaps = Math.max(1, Math.round((length - on) / (on + off)));
  const stretch = length / ((gaps + 1) * on + gaps * off);
  return `${(on * stretch).toFixed(2)} ${(off * stretch).toFixed(2)}`;
}

export function barWords(name: string, force: number | null): string {
  if (force === null) return name;
  const sign = force < 0 ? 'compression' : force > 0 ? 'tension' : 'no force';
  return `${name}: ${forceLabel(force)} kN (${sign})`;
}
