import { type Finding, finding } from '../../domain/finding.ts';
import type { Truss } from '../../domain/truss.ts';
import type { Mode, Remedy } from '../types.ts';
import { groupByNodes } from './localise.ts';
import type { StabilityOptions } from './options.ts';
import { tidyDirection } from './reduce.ts';
import type { Rung, Spectrum } from './slicing.ts';
import { count, directionInWords, nodeInWords } from './words.ts';

/** More modes than this over common nodes, each moving many, are one thing to know and not many. */
const TANGLED = { modes: 3, nodesEach: 6 };

/** One finding for each mode, for each group of modes that are alike, and for each tangle of modes over the same nodes. */
export function movesFreely(truss: Truss, modes: readonly Mode[]): Finding[] {
  const tangles: Mode[][] = [];
  const single: Mode[] = [];
  const groups = groupByNodes(modes.map((mode) => mode.nodes)).map((group) => group.map((i) => modes[i]));
  for (const group of groups) {
    const each = group.reduce((sum, mode) => sum + mode.nodes.length, 0) / group.length;
    if (group.length > TANGLED.modes && each > TANGLED.nodesEach) tangles.push(group);
    else single.push(...group);
  }
  return [
    ...alike(single).map((group) => aboutAlike(truss, group)),
    ...tangles.map((group) => aboutTangle(truss, group)),
  ];
}

/** The modes over one and the same nodes. */
type Bundle = readonly Mode[];

function alike(modes: readonly Mode[]): Bundle[][] {
  const bundles = groupBy(modes, (mode) => (mode.kind === 'local' ? mode.nodes.join(' ') : mode.words));
  return groupBy(bundles, (bundle) => bundle.map(likenessOf).join('|'));
}

function groupBy<T>(items: readonly T[], keyOf: (item: T) => string): T[][] {
  const groups = new Map<string, T[]>();
  for (const item of items) {
    const key = keyOf(item);
    const group = groups.get(key);
    if (group) group.push(item);
    else groups.set(key, [item]);
  }
  return [...groups.values()];
}

function aboutAlike(truss: Truss, group: readonly Bundle[]): Finding {
  const bundle = group[0];
  const first = bundle[0];
  const ways = bundle.slice(1).map((mode) => directionInWords(tidyDirection(mode.movement[indexOfMost(mode)])));
  const also = ways.length > 0 ? `; and in ${count(ways.length, 'more way')}: ${ways.join(', ')}` : '';
  const others = group.length > 1 ? `; the same at ${group.length} places in all` : '';
  return finding(
    'moves-freely',
    `${capitalised(first.words)}${also}${others}.`,
    advise(
      truss,
      bundle.flatMap((mode) => mode.remedy),
      first.order,
      group.length,
    ),
    whereOf(truss, group.flat()),
  );
}

function aboutTangle(truss: Truss, group: readonly Mode[]): Finding {
  const first = group.reduce((least, mode) => (mode.nodes.length < least.nodes.length ? mode : least));
  const where = whereOf(truss, [first, ...group]);
  const message = `${where.nodes.length} nodes can move in ${group.length} independent ways without straining a bar; one of them: ${first.words}.`;
  return finding('moves-freely', message, advise(truss, first.remedy, first.order, group.length), where);
}

function whereOf(truss: Truss, group: readonly Mode[]) {
  const first = group[0];
  const nodes = [...new Set(group.flatMap((mode) => mode.nodes))].sort((a, b) => a - b);
  const most = truss.nodes[first.nodes[indexOfMost(first)]];
  return { nodes, at: most.at, place: most.place };
}

const capitalised = (text: string): string => text.charAt(0).toUpperCase() + text.slice(1);

/** Alike: of one kind, as many nodes, moving the same ways by the same amounts. */
function likenessOf(mode: Mode): string {
  const moves = mode.movement.map((v) => v.map((c) => Math.abs(c).toFixed(2)).join(' ')).sort();
  return [mode.kind, mode.order, ...moves].join('|');
}

function indexOfMost(mode: Mode): number {
  let best = 0;
  const size = (i: number) => Math.hypot(...mode.movement[i]);
  mode.movement.forEach((_, i) => {
    if (size(i) > size(best) + 1e-9) best = i;
  });
  return best;
}

function advise(truss: Truss, remedies: readonly Remedy[], order: Mode['order'], places: number): string {
  const what = remedies.map((remedy) => remedyInWords(truss, remedy)).join(' and ');
  const each = places > 1 ? `, and likewise for each of the ${places}` : '';
  const stiffens = order === 'infinitesimal' ? ' It is stiffened only by prestress.' : '';
  return `Hold ${what}${each}, or add bars that do; or say in the brief what holds it and is not in the model.${stiffens}`;
}

function remedyInWords(truss: Truss, remedy: Remedy): string {
  if ('bar' in remedy) return `${nodeInWords(truss, remedy.bar[0])} to ${nodeInWords(truss, remedy.bar[1])}`;
  return `the node at ${nodeInWords(truss, remedy.node)} ${directionInWords(remedy.direction).replace('up and down', 'vertically')}`;
}

/** The one finding about eigenvalues that are neither nothing nor stiffness, with their numbers; null where there are none. */
export function nearlyMoves(spectrum: Spectrum, options: StabilityOptions): Finding | null {
  const advice =
    'Check supports and geometry: the truss is close to one that moves, so its forces and displacements hang on small dimensions. More supports, or bars out of the surface, make it clear.';
  if (spectrum.gap === null)
    return finding(
      'nearly-moves',
      `Whether the truss stands cannot be told clearly: ${smoothRun(spectrum.ladder, options)}. Counted as mechanisms: the ${spectrum.mechanisms} below ${power(options.threshold)} of the highest.`,
      advice,
    );
  if (spectrum.nearly === 0) return null;
  return finding(
    'nearly-moves',
    `${count(spectrum.nearly, 'motion meets', 'motions meet')} next to no stiffness: eigenvalues of the stiffness from ${power(spectrum.lowest!)} to ${power(options.nearly)} of the highest, not counted as mechanisms.`,
    advice,
  );
}

/** From where to where the eigenvalues run without a clear gap, and how many lie below each step. */
function smoothRun(ladder: readonly Rung[], options: StabilityOptions): string {
  const top = options.threshold * 100;
  const within = ladder.filter((rung) => rung.ratio <= top * 1.0001);
  const last = within[within.length - 1];
  const before = within.filter((rung) => rung.count === 0);
  const from = before.length > 0 ? power(before[before.length - 1].ratio) : `below ${power(within[0].ratio)}`;
  const steps = within
    .filter((rung, i) => rung.count > 0 && i < within.length - 1 && Math.abs(Math.log10(rung.ratio) % 1) < 1e-6)
    .map((rung) => `${rung.count} below ${power(rung.ratio)}`);
  const detail = steps.length > 0 ? ` (${steps.join(', ')})` : '';
  return `${last.count} eigenvalues of its stiffness (all bars of one EA) run from ${from} to ${power(last.ratio)} of the highest with no gap of ${options.clearGap} between them${detail}`;
}

function power(ratio: number): string {
  return ratio.toExponential(Math.abs(Math.log10(ratio) % 1) < 1e-6 ? 0 : 1);
}
