import { pushTo } from '../domain/group.ts';
import type { Result, ResultMember } from '../domain/result.ts';
import { distance, type Vec3 } from '../domain/vector.ts';

/** m beyond which a node is no joint of a drawn end: a splice leaves no node, and the next one is a panel away. */
const LARGEST_JOINT = 0.6;

/** For each member the work points that its two ends are joined to; the drawn end where it is joined to none. */
export function workPoints(result: Result): (member: ResultMember) => readonly [Vec3, Vec3] {
  const at = new Map(result.nodes.map((node) => [node.id, node.at]));
  const nodesOf = new Map<string, Vec3[]>();
  for (const bar of result.bars) {
    for (const globalId of bar.members ?? [bar.member]) {
      for (const id of [bar.from, bar.to]) {
        const point = at.get(id);
        if (point) pushTo(nodesOf, globalId, point);
      }
    }
  }
  return ({ globalId, axis }) => {
    const points = nodesOf.get(globalId) ?? [];
    const joint = (end: Vec3): Vec3 => {
      let [best, least] = [end, LARGEST_JOINT];
      for (const point of points) {
        const gap = distance(point, end);
        if (gap < least) [best, least] = [point, gap];
      }
      return best;
    };
    return [joint(axis[0]), joint(axis[1])];
  };
}
