import type { Result } from '../domain/result.ts';
import type { Comparison } from './comparison.ts';
import type { Matching } from './match-members.ts';

type ForceChange = Comparison['forces'][number];
type Forces = ForceChange['from'];

const NEVER: Forces = { tension: null, compression: null };

/** For each member found again the extremes of its bars then and now, the greatest change first. */
export function forceChanges(old: Result, now: Result, { pairs }: Matching): ForceChange[] {
  if (old.envelope.length === 0 || now.envelope.length === 0) return [];
  const [before, after] = [extremesByMember(old), extremesByMember(now)];
  const [usedBefore, usedNow] = [utilisations(old), utilisations(now)];
  const told = new Set<string>();
  return pairs
    .flatMap((pair): ForceChange[] => {
      const [one, other] = [old.members[pair.old].globalId, now.members[pair.now].globalId];
      // The parts of one element are one row.
      if (told.has(one)) return [];
      told.add(one);
      const [from, to] = [before.get(one) ?? NEVER, after.get(other) ?? NEVER];
      const change = Math.max(
        Math.abs((to.tension ?? 0) - (from.tension ?? 0)),
        Math.abs((to.compression ?? 0) - (from.compression ?? 0)),
      );
      const [used, uses] = [usedBefore.get(one) ?? null, usedNow.get(other) ?? null];
      return [
        { old: one, new: other, from, to, change, utilisation: used === null && uses === null ? null : [used, uses] },
      ];
    })
    .sort((p, q) => q.change - p.change);
}

function extremesByMember({ bars, envelope }: Result): Map<string, Forces> {
  const extremes = new Map<string, Forces>();
  const byBar = new Map(envelope.map((row) => [row.bar, row]));
  for (const bar of bars) {
    const row = byBar.get(bar.id);
    if (!row) continue;
    for (const globalId of bar.members ?? [bar.member]) {
      const { tension, compression } = extremes.get(globalId) ?? NEVER;
      extremes.set(globalId, {
        tension: greater(tension, row.tension?.force ?? null, Math.max),
        compression: greater(compression, row.compression?.force ?? null, Math.min),
      });
    }
  }
  return extremes;
}

const greater = (a: number | null, b: number | null, pick: (a: number, b: number) => number): number | null =>
  a === null || b === null ? (a ?? b) : pick(a, b);

function utilisations({ checks }: Result): Map<string, number> {
  const worst = new Map<string, number>();
  for (const { member, utilisation } of checks) {
    if (utilisation !== null) worst.set(member, Math.max(worst.get(member) ?? 0, utilisation));
  }
  return worst;
}
