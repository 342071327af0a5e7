import type { Result } from '../domain/result.ts';
import { count, verdict } from '../domain/verdict.ts';
import { millimetres } from '../domain/words.ts';
import { worstBars } from './summary/bars.ts';
import { loadCases } from './summary/cases.ts';
import { oddMembers } from './summary/families.ts';
import { findings } from './summary/findings.ts';
import { holds } from './summary/holds.ts';
import { joinedBy } from './summary/joined.ts';
import { memberKinds } from './summary/kinds.ts';
import { degrees, harmless, wrapped } from './summary/layout.ts';
import { SUMMARY_DEFAULTS, type SummaryOptions } from './summary/options.ts';
import { reactions } from './summary/reactions.ts';
import { redundancyWords } from './summary/redundancy.ts';
import { replies } from './summary/replies.ts';

/** The result as plain text for a terminal; a survey, which has no cases, is told without loads and forces. */
export function summarise(result: Result, options: Partial<SummaryOptions> = {}): string {
  const chosen = { ...SUMMARY_DEFAULTS, ...options };
  const paragraphs = [
    [title(result), ...edited(chosen)],
    readAndJoined(result, chosen),
    memberKinds(chosen),
    oddMembers(result, chosen),
    findings(result, chosen),
    replies(result, chosen),
    standing(result, chosen),
    loadCases(result, chosen),
    worstBars(result, chosen),
    reactions(result, chosen),
    holds(result, chosen),
    wrapped(result.caution, chosen.width),
  ];
  return `${paragraphs
    .filter((lines) => lines.length > 0)
    .map((lines) => lines.join('\n'))
    .join('\n\n')}\n`;
}

function title({ generator, model }: Result): string {
  const source = model.source === 'analysis' ? ', its structural analysis view' : '';
  return `Pinwright ${generator.version}: ${harmless(model.file)} (${model.schema}, ${model.lengthUnit}${source})`;
}

/** Results of ours whose comments are gone are taken out before anything is read, which changes the file. */
function edited({ extras, width }: SummaryOptions): string[] {
  const { tracesRemoved = 0 } = extras;
  if (tracesRemoved === 0) return [];
  const what = `Another program has rewritten this model; ${count(tracesRemoved, 'instance')} of earlier results in it`;
  return wrapped(
    `${what} ${tracesRemoved === 1 ? 'was' : 'were'} set aside. An annotated copy is an edit of it.`,
    width,
  );
}

function readAndJoined(result: Result, { extras, width }: SummaryOptions): string[] {
  const { members, nodes, bars } = result;
  const { elementCount, mass, topLevels = [] } = extras;
  const of = elementCount === undefined ? '' : ` of ${count(elementCount, 'element')}`;
  const classes = tally(members.map((member) => member.class));
  const read = `${count(members.length, 'member')}${of}${classes === '' ? '' : `: ${classes}`}`;
  const lines = wrapped(read, width, 'Read     ', '         ');
  if (members.length === 0) return lines;

  const shapes = tally(members.map((member) => SHAPE_WORDS.get(member.section?.shape ?? 'none') ?? 'other shapes'));
  lines.push(...wrapped(`sections: ${shapes}`, width, '         '));
  if (mass !== undefined) lines.push(`         ${(mass / 1000).toFixed(mass < 10_000 ? 2 : 1)} t between the nodes`);

  const carried = nodes.filter((node) => node.carriedBy !== null).length;
  const between = carried === 0 ? '' : `; ${count(carried, 'node')} carried between the ends of a bar`;
  lines.push(
    ...wrapped(
      `${count(nodes.length, 'node')}, ${count(bars.length, 'bar')}${between}`,
      width,
      'Joined   ',
      '         ',
    ),
  );
  lines.push(...wrapped(faith(members), width, '         '));
  for (const words of joinedBy(result)) lines.push(...wrapped(harmless(words), width, '         '));
  if (topLevels.length > 0) lines.push(...wrapped(topWords(topLevels), width, '         '));
  return lines;
}

/** How far joining moved the axes off what was drawn. */
function faith(members: Result['members']): string {
  const greatest = (pick: (member: Result['members'][number]) => number) =>
    members.reduce((most, member) => Math.max(most, pick(member)), 0);
  const mean = members.reduce((sum, { shift }) => sum + shift, 0) / members.length;
  const [shift, turn] = [greatest((member) => member.shift), greatest((member) => member.turn)];
  return `axes moved at most ${millimetres(shift)} (${millimetres(mean)} in the mean), turned at most ${degrees(turn)}`;
}

const LEVELS_TOLD = 6;

function topWords(levels: NonNullable<SummaryOptions['extras']['topLevels']>): string {
  const total = levels.reduce((sum, { count: here }) => sum + here, 0);
  const told = levels
    .slice(0, LEVELS_TOLD)
    .map(({ level, count: here }) => `${here} at ${level < 0 ? '' : '+'}${level.toFixed(2)}`);
  const more = levels.length - told.length;
  return `${count(total, 'node')} on top: ${told.join(', ')}${more > 0 ? `, and ${count(more, 'more level')}` : ''}`;
}

const SHAPE_WORDS: ReadonlyMap<string, string> = new Map([
  ['I', 'I'],
  ['U', 'channel'],
  ['C', 'lipped channel'],
  ['L', 'angle'],
  ['T', 'tee'],
  ['Z', 'Z'],
  ['RHS', 'rectangular hollow'],
  ['CHS', 'circular hollow'],
  ['rectangle', 'flat or square bar'],
  ['circle', 'round bar'],
  ['other', 'other shapes'],
  ['none', 'unknown'],
]);

/** "12 IfcBeam, 9 IfcColumn", the most frequent first. */
function tally(words: readonly string[]): string {
  const counts = new Map<string, number>();
  for (const word of words) counts.set(word, (counts.get(word) ?? 0) + 1);
  return [...counts]
    .sort(([a, m], [b, n]) => n - m || (a < b ? -1 : 1))
    .map(([word, times]) => `${times} ${harmless(word)}`)
    .join(', ');
}

function standing(result: Result, { width, modes }: SummaryOptions): string[] {
  const { stability } = result;
  const lines = wrapped(verdict(result), width, 'Stands   ', '         ');
  if (result.bars.length === 0) return lines;
  const { nodes, bars, restraints, springs, rank } = stability;
  const springWords = springs === 0 ? '' : `, ${count(springs, 'spring')}`;
  const gap = stability.gap === null ? '' : `, gap in the spectrum ${stability.gap.toExponential(0)}`;
  const sum = `${count(nodes, 'node')}, ${count(bars, 'bar')}, ${count(restraints, 'restraint')}${springWords}, rank ${rank}${gap}`;
  lines.push(...wrapped(sum, width, '         '));
  for (const words of redundancyWords(result)) lines.push(...wrapped(harmless(words), width, '         '));
  if (result.findings.some(({ code }) => code === 'moves-freely')) return lines;
  const told = stability.freeBody ? stability.modes.filter((mode) => mode.kind !== 'whole') : stability.modes;
  for (const mode of told.slice(0, modes))
    lines.push(...wrapped(harmless(mode.words), width, '         - ', '           '));
  const more = told.length - modes + (stability.modesOmitted ?? 0);
  if (more > 0 && told.length > 0) lines.push(`         - and ${more} more`);
  return lines;
}
