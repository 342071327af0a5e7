import { type Finding, finding } from '../domain/finding.ts';
import type { ResolvedSupports } from './supports.ts';

/** That nothing supports the truss: an error only where loads are to be carried. */
export function supportFinding(
  supports: ResolvedSupports,
  extent: 'survey' | 'analyse',
  memberCount: number,
): Finding[] {
  if (memberCount === 0 || supports.restraints.length + supports.springs.length > 0) return [];
  return [
    finding(
      'no-support',
      'Nothing supports the truss.',
      'Say where it stands under `supports:` in the brief, for example `- {at: {lowest: true}, fix: xyz}`.',
      { severity: extent === 'survey' ? 'note' : 'error' },
    ),
  ];
}
