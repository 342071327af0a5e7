import type { Result } from '../../domain/result.ts';
import { columns, harmless, kilonewtons } from './layout.ts';
import type { SummaryOptions } from './options.ts';

/** N. What a support has to bear: pressed down, lifted up, pushed sideways; 0 where it never is. */
interface Bearing {
  readonly node: string;
  down: number;
  uplift: number;
  horizontal: number;
}

/** The greatest reactions of each support, the most loaded support first. */
export function reactions(result: Result, options: SummaryOptions): string[] {
  const bearings = bearingsOf(result);
  if (bearings.length === 0) return [];
  const greatest = (bearing: Bearing): number => Math.max(bearing.down, bearing.uplift, bearing.horizontal);
  const shown = bearings.sort((a, b) => greatest(b) - greatest(a)).slice(0, options.reactions);
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
      ...[down, uplift, horizontal].map((force) => inKilonewtons(force === 0 ? null : force)),
    ]),
  );
  const more = bearings.length - shown.length;
  return [`Reactions, kN (${scope(result)})`, ...table, ...(more > 0 ? [`  and ${more} more supports`] : [])];
}

const STRENGTH = new Set(['strength', 'accidental', 'equilibrium']);

function scope(result: Result): string {
  return result.combinations.length === 0 ? 'unfactored, case by case' : 'strength, equilibrium, accidental';
}

function bearingsOf(result: Result): Bearing[] {
  const factored = result.combinations.filter(({ limit }) => STRENGTH.has(limit));
  const bearings = new Map<string, Bearing>();
  for (const { reactions: forces } of result.combinations.length === 0 ? result.cases : factored) {
    for (const { node, force } of forces) {
      const bearing = bearings.get(node) ?? { node, down: 0, uplift: 0, horizontal: 0 };
      bearing.down = Math.max(bearing.down, force[2]);
      bearing.uplift = Math.max(bearing.uplift, -force[2]);
      bearing.horizontal = Math.max(bearing.horizontal, Math.hypot(force[0], force[1]));
      bearings.set(node, bearing);
    }
  }
  return [...bearings.values()];
}
