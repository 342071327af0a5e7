import type { Result, ResultMember } from '../../domain/result.ts';
import { count } from '../../domain/verdict.ts';
import { millimetres } from '../../domain/words.ts';
import { joinedBy } from '../summary/joined.ts';
import { html, type Markup } from './html.ts';
import { signed } from './numbers.ts';
import { numbers, table, words } from './table.ts';

/** What was read, and how faithfully it was joined. */
export function joinedSection(result: Result): Markup {
  const { members, nodes, bars } = result;
  const carried = nodes.filter(({ carriedBy }) => carriedBy !== null).length;
  const mean = members.reduce((sum, { shift }) => sum + shift, 0) / Math.max(1, members.length);
  const farthest = [...members].sort((a, b) => b.shift - a.shift)[0];
  const faith =
    farthest === undefined
      ? ''
      : `Joining moved the axes by ${millimetres(mean)} in the mean and at most by ${millimetres(farthest.shift)} (${farthest.name ?? farthest.globalId}).`;
  return html`<p>${count(members.length, 'member')} became ${count(bars.length, 'bar')} between ${count(nodes.length, 'node')}${carried === 0 ? '' : `, ${carried} of them carried between the ends of a bar`}. ${faith}</p>
${joinedBy(result).map((sentence) => html`<p>${capitalised(sentence)}.</p>\n`)}
${table('Members by class, section and material', [...words('class', 'section', 'material'), ...numbers('members', 'm in all'), ...words('section from', 'axis from')], kinds(members))}`;
}

const capitalised = (words: string): string => words.charAt(0).toUpperCase() + words.slice(1);

function kinds(members: readonly ResultMember[]): (string | number)[][] {
  const byKind = new Map<string, ResultMember[]>();
  for (const member of members) {
    const key = [member.class, member.section?.name, member.material?.name, member.section?.from, member.axisFrom].join(
      '\n',
    );
    const own = byKind.get(key);
    if (own) own.push(member);
    else byKind.set(key, [member]);
  }
  return [...byKind.values()]
    .sort((a, b) => b.length - a.length)
    .map((own) => {
      const [{ class: name, section, material, axisFrom }] = own as [ResultMember];
      const length = own.reduce((sum, { axis: [p, q] }) => sum + Math.hypot(q[0] - p[0], q[1] - p[1], q[2] - p[2]), 0);
      return [
        name,
        section?.name ?? 'none',
        material?.name ?? 'none',
        own.length,
        signed(length, 1),
        section?.from ?? '–',
        axisFrom,
      ];
    });
}
