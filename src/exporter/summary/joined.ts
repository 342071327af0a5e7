import type { Result } from '../../domain/result.ts';
import { count } from '../../domain/verdict.ts';
import { millimetres } from '../../domain/words.ts';

/** By which rule axes were carried to meet, and why the joints are joints: one sentence a line. */
export function joinedBy(result: Result): string[] {
  return [limits(result.joining), reasons(result.nodes), seats(result.eccentricities ?? [])].filter(
    (words) => words !== null,
  );
}

type Limits = NonNullable<Result['joining']>;

function limits(joining: Limits | undefined): string | null {
  if (joining === undefined) return null;
  const named = [['reach', joining.reach] as const, ['offset', joining.offset] as const];
  const bySections = named.flatMap(([name, { bySections: range }]) => (range === null ? [] : `${name} ${span(range)}`));
  const byBrief = named.flatMap(([name, { set }]) =>
    set.map(({ value, members }) => `${name} ${millimetres(value)} for ${count(members, 'member')}`),
  );
  const words = [
    ...(bySections.length === 0 ? [] : [`${bySections.join(', ')}, by the sections that meet`]),
    ...(byBrief.length === 0 ? [] : [`${byBrief.join(', ')}, by the brief`]),
  ];
  return words.length === 0 ? null : words.join('; ');
}

/** "120 mm", "90 to 156 mm". */
function span([least, greatest]: readonly [number, number]): string {
  const [from, to] = [millimetres(least), millimetres(greatest)];
  return from === to ? to : `${from.replace(' mm', '')} to ${to}`;
}

/** Joints that stand by evidence alone are told apart: without the plate or the relationship they would fall asunder. */
function reasons(nodes: Result['nodes']): string | null {
  const joints = nodes.flatMap(({ joinedBy: by }) => (by === undefined ? [] : [by]));
  if (joints.length === 0) return null;
  const near = joints.filter((by) => by.includes('nearness'));
  const confirmed = near.filter((by) => by.some(isEvidence)).length;
  const kinds = new Map<string, number>();
  for (const by of joints) {
    if (by.includes('nearness')) continue;
    const kind = [...new Set(by.filter(isEvidence).map(kindOf))].join(' and ');
    kinds.set(kind, (kinds.get(kind) ?? 0) + 1);
  }
  const also = confirmed === 0 ? '' : ` (for ${confirmed} a plate, a relationship or an assembly says so too)`;
  const only = [...kinds]
    .sort(([p, m], [q, n]) => n - m || (p < q ? -1 : 1))
    .map(([kind, number]) => `${number} only by ${kind}`);
  return [`${count(near.length, 'joint')} by nearness${also}`, ...only].join(', ');
}

const isEvidence = (reason: string): boolean => reason !== 'nearness' && reason !== 'seat';

/** "plate GP-12" is a plate; relationships bear the standard's own names. */
const kindOf = (reason: string): string =>
  reason.startsWith('IfcRel')
    ? 'a relationship in the file'
    : `${/^[aeiou]/.test(reason) ? 'an' : 'a'} ${reason.split(' ')[0]}`;

function seats(eccentricities: NonNullable<Result['eccentricities']>): string | null {
  const heights = eccentricities.filter(({ of }) => of === 'seat').map(({ e }) => e);
  if (heights.length === 0) return null;
  const range = heights.reduce(([least, most], e) => [Math.min(least, e), Math.max(most, e)], [heights[0], heights[0]]);
  return `${count(heights.length, 'seat')}, axes ${span([range[0], range[1]])} apart`;
}
