import type { WrittenBrief } from './schema.ts';
import { toCodeRule } from './written-combinations.ts';
import type { Path, Problem, WrittenSource } from './written-source.ts';

/** Checks need strength combinations of their own method; and no check can be made by this version. */
export function findCheckProblems(written: WrittenBrief, source: WrittenSource): Problem[] {
  const { checks } = written;
  const rule = typeof checks === 'object' ? checks.rule : (checks ?? 'none');
  if (rule === 'none') return [];
  const path: Path = typeof checks === 'object' ? ['checks', 'rule'] : ['checks'];
  const wanted = rule.startsWith('EN') ? 'EN1990' : 'ASCE7';
  const fits = hasStrengthOf(wanted, written);
  const lack = fits ? '' : `; and it needs strength combinations of its own method: combinations: ${wanted}`;
  return [{ ...source.place(path), message: `${source.excerpt(path)}this is not available yet${lack}` }];
}

/** A list says its own method. */
function hasStrengthOf(wanted: 'EN1990' | 'ASCE7', { combinations }: WrittenBrief): boolean {
  if (Array.isArray(combinations)) return combinations.some(({ limit }) => limit === 'strength');
  const rule = toCodeRule(combinations);
  if (rule === null || !rule.code.startsWith(wanted)) return false;
  return rule.code !== 'EN1990:2002+A1' || rule.sets.includes('strength');
}
