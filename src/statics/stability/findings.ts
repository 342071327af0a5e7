import { type Finding, finding } from '../../domain/finding.ts';
import type { Truss } from '../../domain/truss.ts';
import type { Remedy } from '../types.ts';
import { listed, type Names } from './names.ts';
import type { StabilityOptions } from './options.ts';
import type { Rung, Spectrum } from './slicing.ts';
import { type Movable, type Statement, statements } from './statements.ts';
import { count, directionInWords, nodeInWords } from './words.ts';

/** Remedies that a sentence names one by one. */
const FEW = 3;

/** One finding for each thing that can move, for all places together where it is the same. */
export function movesFreely(truss: Truss, names: Names, movable: Movable, again: JudgedAgain): Finding[] {
  const groups = new Map<string, Statement[]>();
  for (const statement of statements(truss, names, movable))
    groups.set(statement.key, [...(groups.get(statement.key) ?? []), statement]);
  return [...groups.values()].map((group) => {
    const first = group[0];
    const nodes = [...new Set(group.flatMap((one) => one.nodes))].sort((a, b) => a - b);
    const { at, place } = truss.nodes[first.shown];
    return finding('moves-freely', `${capitalised(first.sentence)}${elsewhere(group)}.`, advise(truss, group, again), {
      nodes,
      at,
      place,
    });
  });
}

/** How the judgement came out with the remedies in place: mechanisms left, null where there are no such remedies. */
export interface JudgedAgain {
  readonly held: number | null;
  readonly barred: number | null;
}

function elsewhere(group: readonly Statement[]): string {
  if (group.length === 1) return '';
  const owners = group.map((one) => one.owner);
  const names = [...new Set(owners.filter((owner): owner is string => owner !== null))];
  if (names.length === group.length) return `; the same at ${listed(names.slice(1))} (${group.length} in all)`;
  return `; the same at ${group.length} places in all`;
}

const capitalised = (text: string): string => text.charAt(0).toUpperCase() + text.slice(1);

function advise(truss: Truss, group: readonly Statement[], again: JudgedAgain): string {
  const first = group[0];
  const each = group.length > 1 ? `, and likewise at each of the ${group.length}` : '';
  const ways: string[] = [];
  if (first.hold !== null) ways.push(`Hold ${first.hold}${each}`);
  else if (first.remedy.length > 0) ways.push(`Hold ${remediesInWords(truss, first.remedy)}${each}`);
  if (first.bars.length > 0 && again.barred === 0) ways.push(`put ${remediesInWords(truss, first.bars)}${each}`);
  else ways.push('add bars that hold it');
  ways.push('say under `holds:` in the brief what holds it and is not in the model');
  const stiffens = first.order === 'infinitesimal' ? ' It is stiffened only by prestress.' : '';
  const still =
    again.held !== null && again.held > 0
      ? ' Judged again with all that is held so, it still moves: the spectrum has no clear gap.'
      : '';
  return `${capitalised(ways.join('; or '))}.${stiffens}${still}`;
}

function remediesInWords(truss: Truss, remedies: readonly Remedy[]): string {
  const shown = remedies.slice(0, FEW).map((remedy) => remedyInWords(truss, remedy));
  const more = remedies.length - shown.length;
  return `${shown.join(' and ')}${more > 0 ? ` and ${more} more (the result lists them)` : ''}`;
}

function remedyInWords(truss: Truss, remedy: Remedy): string {
  if ('bar' in remedy) return `a bar from ${nodeInWords(truss, remedy.bar[0])} to ${nodeInWords(truss, remedy.bar[1])}`;
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
