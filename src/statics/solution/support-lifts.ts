import { type Finding, finding } from '../../domain/finding.ts';
import type { Truss } from '../../domain/truss.ts';
import type { SolvedCombination } from '../types.ts';

/** N; a pull below this, or below this share of the greatest reaction, is rounding. */
const NO_PULL = 1;
const SHARE = 1e-9;

/**
 * Supports that have to pull the truss down in some combination for equilibrium, or, where a code has none (ASCE 7), for strength: one
 * finding, the worst support first.
 */
export function supportLifts(truss: Truss, combinations: readonly SolvedCombination[]): Finding[] {
  const carried = combinations.filter(({ refused }) => refused === null);
  const equilibrium = carried.filter(({ limit }) => limit === 'equilibrium');
  const decisive = equilibrium.length > 0 ? equilibrium : carried.filter(({ limit }) => limit === 'strength');
  const pulls = new Map<number, { force: number; from: string }>();
  let largest = 0;
  for (const { name, reactions } of decisive)
    for (const { node, force } of reactions) {
      largest = Math.max(largest, Math.abs(force[2]));
      const pull = -force[2];
      if (pull > (pulls.get(node)?.force ?? NO_PULL)) pulls.set(node, { force: pull, from: name });
    }
  const lifting = [...pulls]
    .filter(([, { force }]) => force > SHARE * largest)
    .toSorted(([a, p], [b, q]) => q.force - p.force || a - b);
  if (lifting.length === 0) return [];
  const [node, { force, from }] = lifting[0];
  const { at, place } = truss.nodes[node];
  const where = place ?? `(${at.map((x) => x.toFixed(2)).join(', ')})`;
  const pull = `${(force / 1000).toPrecision(3)} kN in ${from}`;
  return [
    finding(
      'support-lifts',
      lifting.length === 1
        ? `The support at ${where} is lifted: it has to pull down with ${pull}.`
        : `${lifting.length} supports are lifted; the one at ${where} most: it has to pull down with ${pull}.`,
      'Anchor these supports for the uplift, or add weight; a support that cannot pull needs another model of it.',
      { nodes: lifting.map(([one]) => one), at, place },
    ),
  ];
}
