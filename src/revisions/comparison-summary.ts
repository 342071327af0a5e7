import { CAUTION } from '../domain/caution.ts';
import { pushTo } from '../domain/group.ts';
import { markOf } from '../domain/mark.ts';
import type { Result, ResultFinding, ResultMember } from '../domain/result.ts';
import { count, verdict } from '../domain/verdict.ts';
import { millimetres } from '../domain/words.ts';
import { columns, harmless, kilonewtons, wrapped } from '../exporter/summary/layout.ts';
import { STILL } from './changes.ts';
import type { Comparison } from './comparison.ts';

export interface ComparisonSummaryOptions {
  readonly width: number;
  /** Lines of each list that are told. */
  readonly lines: number;
}

export const COMPARISON_SUMMARY_DEFAULTS: ComparisonSummaryOptions = { width: 80, lines: 12 };

/** A comparison as plain text for a terminal, with the two results that it was made of. */
export function summariseComparison(
  comparison: Comparison,
  old: Result,
  now: Result,
  options: Partial<ComparisonSummaryOptions> = {},
): string {
  const chosen = { ...COMPARISON_SUMMARY_DEFAULTS, ...options };
  const paragraphs = [
    wrapped(
      `Pinwright ${comparison.generator.version}: from ${harmless(comparison.old.file)} to ${harmless(comparison.new.file)}`,
      chosen.width,
    ),
    membersTold(comparison, old, now, chosen),
    groundTold(comparison, chosen),
    findingsTold(comparison, chosen),
    standingTold(old, now, chosen),
    forcesTold(comparison, now, chosen),
    wrapped(CAUTION, chosen.width),
  ];
  return `${paragraphs
    .filter((lines) => lines.length > 0)
    .map((lines) => lines.join('\n'))
    .join('\n\n')}\n`;
}

const INDENT = '         ';

function membersTold(comparison: Comparison, old: Result, now: Result, options: ComparisonSummaryOptions): string[] {
  const { matched, added, removed, changed } = comparison;
  const byGeometry = matched.filter(({ by }) => by === 'geometry').length;
  const how = byGeometry === 0 ? '' : `, ${byGeometry} of them by where they lie, their GlobalIds being new`;
  const found = `${matched.length} of ${count(old.members.length, 'member')} found again${how}`;
  const sum = `${count(added.length, 'member')} added, ${removed.length} removed, ${changed.length} changed`;
  const [before, after] = [labeller(old), labeller(now)];
  return [
    ...wrapped(found, options.width, 'Members  ', INDENT),
    ...wrapped(sum, options.width, INDENT),
    ...listed('removed', removed.map(before), options),
    ...listed('added', added.map(after), options),
    ...listed('changed', changedAlike(changed, now), options),
  ];
}

function listed(head: string, items: readonly string[], { width, lines }: ComparisonSummaryOptions): string[] {
  if (items.length === 0) return [];
  const more = items.length - lines;
  return [
    `  ${head}`,
    ...items.slice(0, lines).flatMap((item) => wrapped(item, width, `${INDENT}- `, `${INDENT}  `)),
    ...(more > 0 ? [`${INDENT}- and ${more} more`] : []),
  ];
}

type Labeller = (globalId: string) => string;

/** "D4 (SHS 90x90x5), C/4, +6.20" */
function labeller(result: Result): Labeller {
  const [mark, members] = [markerOf(result), membersById(result)];
  return (globalId) => {
    const { section = null, place = null } = members.get(globalId) ?? {};
    const label = `${mark(globalId)}${section === null ? '' : ` (${section.name})`}`;
    return harmless(place === null ? label : `${label}, ${place}`);
  };
}

/** "D4" */
function markerOf(result: Result): Labeller {
  const members = membersById(result);
  return (globalId) => {
    const { name = null, tag = null } = members.get(globalId) ?? {};
    return harmless(markOf({ tag: name, name: tag }) ?? globalId);
  };
}

const membersById = ({ members }: Result): ReadonlyMap<string, ResultMember> =>
  new Map(members.map((member) => [member.globalId, member]));

/** Members of which the same is to be said stand together. */
function changedAlike(changed: Comparison['changed'], now: Result): string[] {
  const label = labeller(now);
  const alike = new Map<string, string[]>();
  for (const change of changed) pushTo(alike, changeWords(change), change.new);
  const mark = markerOf(now);
  return [...alike].map(([words, own]) =>
    own.length === 1 ? `${label(own[0])}: ${words}` : `${own.length} times ${words}: ${own.map(mark).join(', ')}`,
  );
}

function changeWords({ moved, aside, section, material, rejoined }: Comparison['changed'][number]): string {
  const words = [
    moved > STILL ? `moved by ${millimetres(moved)}` : aside > STILL ? `drawn ${millimetres(aside)} aside` : '',
    section ? `${section[0] ?? 'no section'} becomes ${section[1] ?? 'no section'}` : '',
    material ? `${material[0] ?? 'no material'} becomes ${material[1] ?? 'no material'}` : '',
    rejoined ? 'meets other members than it did' : '',
  ];
  return harmless(words.filter((word) => word !== '').join('; '));
}

function groundTold({ supports, loads }: Comparison, options: ComparisonSummaryOptions): string[] {
  const supportWords = supports.map(({ place, at, old, new: now }) => {
    const where = place ?? at.map((x) => `${x.toFixed(2)} m`).join(', ');
    if (old === null) return `a new one (${now}) at ${where}`;
    return now === null ? `none any more at ${where} (was ${old})` : `${now} in place of ${old} at ${where}`;
  });
  const loadWords = loads.map(({ case: name, old, new: now, elsewhere }) => {
    if (old === null || now === null) return `${name}: ${old === null ? 'a new case' : 'gone'}`;
    const [from, to] = [old, now].map((sum) => `${(Math.hypot(...sum) / 1000).toFixed(1)} kN`);
    const moved = elsewhere > 0 ? `; ${(elsewhere / 1000).toFixed(1)} kN at places that bore none` : '';
    return `${name}: ${from} becomes ${to}${moved}`;
  });
  return [
    ...listed('Supports', supportWords.map(harmless), options).map(outdented),
    ...listed('Loads', loadWords.map(harmless), options).map(outdented),
  ];
}

const outdented = (line: string): string => line.replace(/^ {2}(?=\S)/, '');

function findingsTold({ findings }: Comparison, options: ComparisonSummaryOptions): string[] {
  const sum = `${findings.new.length} new, ${findings.gone.length} gone, ${findings.standing.length} still there`;
  const words = ({ severity, code, message, place }: ResultFinding) =>
    harmless(`${severity} ${code}: ${place === null || message.includes(place) ? '' : `${place}: `}${message}`);
  return [
    `Found    ${sum}`,
    ...listed('new', findings.new.map(words), options),
    ...listed('gone', findings.gone.map(words), options),
  ];
}

function standingTold(old: Result, now: Result, { width }: ComparisonSummaryOptions): string[] {
  const [before, after] = [verdict(old), verdict(now)];
  if (before === after) return wrapped(`As before: ${after}`, width, 'Stands   ', INDENT);
  return [...wrapped(after, width, 'Stands   ', INDENT), ...wrapped(`Before: ${before}`, width, INDENT)];
}

function forcesTold({ forces }: Comparison, now: Result, options: ComparisonSummaryOptions): string[] {
  const changed = forces.filter(({ change }) => change > 0);
  if (changed.length === 0) return forces.length === 0 ? [] : ['Forces   no member carries another force than before'];
  const shown = changed.slice(0, options.lines);
  const inKilonewtons = kilonewtons(shown.flatMap(({ from, to }) => [from, to].flatMap((one) => Object.values(one))));
  const hasUse = shown.some(({ utilisation }) => utilisation !== null);
  const mark = markerOf(now);
  const percent = (use: number | null | undefined) => (use == null ? '-' : `${(100 * use).toFixed(0)} %`);
  const rows = shown.map(({ new: globalId, from, to, change, utilisation }) => [
    mark(globalId),
    inKilonewtons(change),
    inKilonewtons(from.tension),
    inKilonewtons(to.tension),
    inKilonewtons(from.compression),
    inKilonewtons(to.compression),
    ...(hasUse ? [percent(utilisation?.[0]), percent(utilisation?.[1])] : []),
  ]);
  const head = (word: string) => ({ head: word, align: 'right' }) as const;
  const heads = ['change', 'tension', 'now', 'compression', 'now', ...(hasUse ? ['used', 'now'] : [])].map(head);
  const more = changed.length - shown.length;
  return [
    'Greatest changes of force, kN',
    ...columns([{ head: 'member', align: 'left', most: 22 }, ...heads], rows),
    ...(more > 0 ? [`  and ${count(more, 'more member')}`] : []),
  ];
}
