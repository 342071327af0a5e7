import { RequestError } from '../domain/errors.ts';
import type { Member } from '../domain/member.ts';
import type { Truss } from '../domain/truss.ts';
import { distance, type Vec3 } from '../domain/vector.ts';
import { selectNodes } from './selectors/select-nodes.ts';
import type { Brief } from './types.ts';

/** m; settlements nearer than this are the same. */
const SAME = 1e-9;

/**
 * How far the brief's supports move their nodes, nodes ascending.
 * @throws RequestError where two rules move one node differently
 */
export function resolveSettlements(
  truss: Truss,
  members: readonly Member[],
  brief: Pick<Brief, 'supports'>,
): { readonly node: number; readonly movement: Vec3 }[] {
  const moved = new Map<number, { movement: Vec3; line: number }>();
  for (const { at, settle, line } of brief.supports) {
    if (settle === undefined) continue;
    for (const node of selectNodes(truss, members, at)) {
      const before = moved.get(node);
      if (before !== undefined && distance(before.movement, settle) > SAME) {
        const place = truss.nodes[node].place ?? truss.nodes[node].at.map((x) => x.toFixed(2)).join(', ');
        throw new RequestError(
          `the brief, lines ${before.line} and ${line}: two different settlements of the support at ${place}; choose the nodes so that each has one`,
        );
      }
      moved.set(node, { movement: settle, line });
    }
  }
  return [...moved].toSorted(([a], [b]) => a - b).map(([node, { movement }]) => ({ node, movement }));
}
