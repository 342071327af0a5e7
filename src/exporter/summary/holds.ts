import type { Result } from '../../domain/result.ts';
import { count } from '../../domain/verdict.ts';
import { harmless, wrapped } from './layout.ts';
import type { SummaryOptions } from './options.ts';

type Hold = NonNullable<Result['holds']>[number];

/** What the brief says holds the truss and is not in the model, by what it is, with the force it has to take. */
export function holds({ holds: all = [] }: Result, { width }: SummaryOptions): string[] {
  if (all.length === 0) return [];
  const groups = new Map<string, Hold[]>();
  for (const hold of all) groups.set(hold.because, [...(groups.get(hold.because) ?? []), hold]);
  const lines = ['Holds (from the brief, not in the model)'];
  for (const [because, own] of groups) lines.push(...wrapped(aboutOne(because, own), width, '  ', '    '));
  return lines;
}

function aboutOne(because: string, own: readonly Hold[]): string {
  const nodes = new Set(own.map(({ node }) => node)).size;
  const most = largest(own, ({ force }) => Math.abs(force?.force ?? 0));
  const usual = largest(own, (hold) => hold.usual ?? 0);
  const words = [`${harmless(because)} holds ${count(nodes, 'node')}`];
  if (most.force !== null)
    words.push(
      `takes at most ${kilonewtons(most.force.force)} kN (${most.node}, ${harmless(most.force.from)}), counted without imperfections`,
    );
  if (usual.usual !== null && usual.compression !== null)
    words.push(
      `is usually made for 1/100 of the compression it keeps straight, ${kilonewtons(usual.usual)} kN at ${usual.node} (EN 1993-1-1 5.3.3(4), from memory)`,
    );
  const over = own.filter(({ force, usual: share }) => Math.abs(force?.force ?? 0) > Math.max(share ?? 0, 1));
  if (over.length > 0 && most.force !== null)
    words.push(`takes more than that at ${count(over.length, 'node')}: there it is a support, and must be one`);
  return `${words.join('; ')}.`;
}

function largest(own: readonly Hold[], size: (hold: Hold) => number): Hold {
  return own.reduce((best, hold) => (size(hold) > size(best) ? hold : best));
}

const kilonewtons = (force: number): string => (Math.abs(force) / 1000).toFixed(1);
