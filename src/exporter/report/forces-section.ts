import type { Result, ResultMember } from '../../domain/result.ts';
import { count, envelopeTitle } from '../../domain/verdict.ts';
import { bearings } from '../schedules/bearings.ts';
import { ultimateTitle } from '../schedules/runs.ts';
import { html, type Markup } from './html.ts';
import { kN, metres, signed } from './numbers.ts';
import { numbers, table, words } from './table.ts';

type Entry = Result['envelope'][number];

/** The envelope by family and bar, reactions, and how far the truss moves. */
export function forcesSection(result: Result): Markup {
  if (result.cases.length === 0) return html`<p>No force was asked for or could be found.</p>`;
  return html`<p>Tension is positive. The envelope runs over: ${envelopeTitle(result)}.</p>
${byFamily(result)}
${byBar(result)}
${reactionTable(result)}
${movements(result)}`;
}

function byFamily({ families = [], envelope, bars }: Result): Markup {
  const entryOf = new Map(envelope.map((entry) => [entry.bar, entry]));
  const barsOf = new Map<string, string[]>();
  for (const bar of bars) {
    for (const member of bar.members ?? [bar.member]) barsOf.set(member, [...(barsOf.get(member) ?? []), bar.id]);
  }
  const groups = new Map<string, { role: string; section: string; members: string[] }>();
  for (const { role, section, members } of families) {
    const key = `${role}\n${section ?? ''}`;
    const group = groups.get(key) ?? { role, section: section ?? 'none', members: [] };
    groups.set(key, group);
    group.members.push(...members);
  }
  const rows = [...groups.values()].map(({ role, section, members }) => {
    const ids = [...new Set(members.flatMap((member) => barsOf.get(member) ?? []))];
    const entries = ids.flatMap((id) => entryOf.get(id) ?? []);
    const [pull, push] = [mostTension(entries), mostCompression(entries)];
    return [
      role,
      section,
      members.length,
      ids.length,
      kN(pull?.tension?.force),
      pull?.bar ?? '–',
      kN(push?.compression?.force),
      push?.bar ?? '–',
    ];
  });
  const heads = [
    ...words('role', 'section'),
    ...numbers('members', 'bars', 'tension, kN'),
    ...words('in'),
    ...numbers('compression, kN'),
    ...words('in'),
  ];
  return table('Greatest forces by role and section', heads, rows);
}

const mostTension = (entries: readonly Entry[]): Entry | null =>
  entries.reduce<Entry | null>(
    (best, one) => ((one.tension?.force ?? 0) > (best?.tension?.force ?? 0) ? one : best),
    null,
  );

const mostCompression = (entries: readonly Entry[]): Entry | null =>
  entries.reduce<Entry | null>(
    (best, one) => ((one.compression?.force ?? 0) < (best?.compression?.force ?? 0) ? one : best),
    null,
  );

function byBar({ envelope, bars, members }: Result): Markup {
  const barOf = new Map(bars.map((bar) => [bar.id, bar]));
  const memberOf = new Map<string, ResultMember>(members.map((member) => [member.globalId, member]));
  const size = ({ tension, compression }: Entry) => Math.max(tension?.force ?? 0, -(compression?.force ?? 0));
  const rows = [...envelope]
    .sort((a, b) => size(b) - size(a))
    .map(({ bar: id, tension, compression }) => {
      const bar = barOf.get(id);
      const section = memberOf.get(bar?.member ?? '')?.section?.name ?? '–';
      return [
        id,
        bar?.name ?? '',
        section,
        signed(bar?.length ?? 0, 2),
        kN(tension?.force),
        tension?.from ?? '',
        kN(compression?.force),
        compression?.from ?? '',
      ];
    });
  const heads = [
    ...words('bar', 'name', 'section'),
    ...numbers('m', 'tension, kN'),
    ...words('from'),
    ...numbers('compression, kN'),
    ...words('from'),
  ];
  return table(`Envelope: all ${count(rows.length, 'bar')}, the greatest force first`, heads, rows);
}

function reactionTable(result: Result): Markup {
  const nodeOf = new Map(result.nodes.map((node) => [node.id, node]));
  const rows = bearings(result).flatMap(({ node: id, down, uplift, horizontal }) => {
    const node = nodeOf.get(id);
    if (node === undefined) return [];
    return [
      [id, node.place ?? '', ...metres(node.at), node.fixed, kN(down?.force), kN(uplift?.force), kN(horizontal?.force)],
    ];
  });
  const heads = [
    ...words('node', 'place'),
    ...numbers('x, m', 'y, m', 'z, m'),
    ...words('holds'),
    ...numbers('down, kN', 'uplift, kN', 'horizontal, kN'),
  ];
  return table(`Greatest reactions (${ultimateTitle(result)})`, heads, rows);
}

/** The farthest that a node moves in each service combination, or in each case where there are none. */
function movements({ cases, combinations, nodes }: Result): Markup {
  const service = combinations.filter(({ limit }) => ['characteristic', 'frequent', 'quasi-permanent'].includes(limit));
  const runs = service.length > 0 ? service : cases;
  const rows = runs.flatMap(({ name, displacement }) => {
    let [farthest, most, sag] = [-1, 0, 0];
    displacement.forEach((moved, k) => {
      if (moved === null) return;
      sag = Math.min(sag, moved[2]);
      const size = Math.hypot(...moved);
      if (size > most) [farthest, most] = [k, size];
    });
    const node = nodes[farthest];
    return node === undefined
      ? []
      : [[name, signed(most * 1000, 1), signed(-sag * 1000, 1), node.id, node.place ?? '']];
  });
  const heads = [...words('from'), ...numbers('farthest, mm', 'greatest sag, mm'), ...words('node', 'place')];
  return table('Movements of nodes (service, where the brief combines)', heads, rows);
}
