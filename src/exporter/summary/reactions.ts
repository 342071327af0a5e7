import type { Result } from '../../domain/result.ts';
import { type Bearing, bearings } from '../schedules/bearings.ts';
import { ultimateTitle } from '../schedules/runs.ts';
import { columns, harmless, kilonewtons } from './layout.ts';
import type { SummaryOptions } from './options.ts';

/** The greatest reactions of each support, the most loaded support first. */
export function reactions(result: Result, options: SummaryOptions): string[] {
  const supports = bearings(result);
  if (supports.length === 0) return [];
  const greatest = ({ down, uplift, horizontal }: Bearing): number =>
    Math.max(down?.force ?? 0, uplift?.force ?? 0, horizontal?.force ?? 0);
  const shown = supports.sort((a, b) => greatest(b) - greatest(a)).slice(0, options.reactions);
  const nodeOf = new Map(result.nodes.map((node) => [node.id, node]));
  const inKilonewtons = kilonewtons(shown.map(greatest));
  const table = columns(
    [
      { head: 'node', align: 'left', most: 10 },
      { head: 'place', align: 'left', most: 22 },
      { head: 'x m', align: 'right' },
      { head: 'y m', align: 'right' },
      { head: 'down', align: 'right' },
      { head: 'uplift', align: 'right' },
      { head: 'horizontal', align: 'right' },
    ],
    shown.map(({ node, down, uplift, horizontal }) => [
      node,
      harmless(nodeOf.get(node)?.place ?? ''),
      ...[0, 1].map((k) => nodeOf.get(node)?.at[k]?.toFixed(1) ?? ''),
      ...[down, uplift, horizontal].map((most) => inKilonewtons(most?.force ?? null)),
    ]),
  );
  const more = supports.length - shown.length;
  return [`Reactions, kN (${ultimateTitle(result)})`, ...table, ...(more > 0 ? [`  and ${more} more supports`] : [])];
}
