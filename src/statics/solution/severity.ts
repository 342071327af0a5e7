import type { Finding } from '../../domain/finding.ts';
import type { RunSolution } from './solve-run.ts';

/** CONTRACT section 4: a mechanism that the forces of every case bring back is a warning, bending that a case would need an error. */
export function withSeverity(found: Finding, { isStable, cases }: RunSolution): Finding {
  if (found.code === 'moves-freely' && isStable) return { ...found, severity: 'warning' };
  const isNeeded = found.code === 'works-in-bending' && cases.some(({ refused }) => refused !== null);
  return isNeeded ? { ...found, severity: 'error' } : found;
}
