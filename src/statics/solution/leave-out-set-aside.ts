import { type Finding, finding } from '../../domain/finding.ts';
import type { Problem } from '../model/system.ts';
import type { LoadCase } from '../types.ts';

/** Loads on parts that nothing supports go with them, and how much that is is said. */
export function leaveOutSetAside({ truss, parts }: Problem, asked: readonly LoadCase[]) {
  const findings: Finding[] = [];
  const cases = asked.map((one): LoadCase => {
    const loads = one.loads.filter(({ node }) => parts.liveNode[node]);
    const lost = one.loads.filter(({ node }) => !parts.liveNode[node]);
    if (lost.length > 0) {
      const size = lost.reduce((sum, { force }) => sum + Math.hypot(...force), 0);
      findings.push(
        finding(
          'no-load',
          `Of load case ${one.name}, ${(size / 1000).toPrecision(3)} kN lie on parts that nothing supports and are not carried.`,
          'Join the parts to the rest or support them, or leave them out of the scope.',
          {
            nodes: lost.map(({ node }) => node),
            at: truss.nodes[lost[0].node].at,
            place: truss.nodes[lost[0].node].place,
          },
        ),
      );
    }
    return { ...one, loads };
  });
  return { cases, findings };
}
