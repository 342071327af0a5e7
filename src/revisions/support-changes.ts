import type { Result } from '../domain/result.ts';
import { distance, type Vec3 } from '../domain/vector.ts';
import type { Comparison } from './comparison.ts';

type Node = Result['nodes'][number];

/** m within which a node is the same place. */
const SAME_PLACE = 0.05;

/** Supports that are new, gone, or hold other directions than they did. */
export function supportChanges(old: Result, now: Result): Comparison['supports'] {
  const [before, after] = [old, now].map(({ nodes }) => nodes.filter(({ fixed }) => fixed !== ''));
  const pairs = before.map((node) => ({ node, now: nearest(after, node.at) }));
  const known = new Set(pairs.map((pair) => pair.now));
  return [
    ...pairs
      .filter((pair) => pair.now?.fixed !== pair.node.fixed)
      .map(({ node, now: other }) => ({
        at: (other ?? node).at,
        place: (other ?? node).place,
        old: node.fixed,
        new: other?.fixed ?? null,
      })),
    ...after.filter((node) => !known.has(node)).map(({ at, place, fixed }) => ({ at, place, old: null, new: fixed })),
  ];
}

/** N and share below which a difference of loads is rounding. */
const SMALL = 1;
const SMALL_SHARE = 1e-3;

/** Cases whose loads have another sum or fall where there were none. */
export function loadChanges(old: Result, now: Result): Comparison['loads'] {
  const names = [...new Set([...old.cases, ...now.cases].map(({ name }) => name))];
  return names.flatMap((name) => {
    const [before, after] = [old, now].map(({ cases }) => cases.find((one) => one.name === name) ?? null);
    const elsewhere = before === null || after === null ? 0 : forceElsewhere(before.loads, after.loads, old, now);
    const [from, to] = [before?.loadSum ?? null, after?.loadSum ?? null];
    const room = SMALL + SMALL_SHARE * Math.hypot(...(from ?? [0, 0, 0]));
    const isSame = from !== null && to !== null && distance(from, to) <= room && elsewhere <= room;
    return isSame ? [] : [{ case: name, old: from, new: to, elsewhere }];
  });
}

type Loads = Result['cases'][number]['loads'];

/** N, of the loads that stand at nodes where none stood before. */
function forceElsewhere(before: Loads, after: Loads, old: Result, now: Result): number {
  const loaded = nodesOf(before, old);
  const byId = new Map(now.nodes.map((node) => [node.id, node]));
  return after.reduce((sum, { node, force }) => {
    const there = byId.get(node);
    return there === undefined || nearest(loaded, there.at) !== null ? sum : sum + Math.hypot(...force);
  }, 0);
}

function nodesOf(loads: Loads, { nodes }: Result): Node[] {
  const ids = new Set(loads.map(({ node }) => node));
  return nodes.filter(({ id }) => ids.has(id));
}

function nearest(nodes: readonly Node[], at: Vec3): Node | null {
  let [best, least]: [Node | null, number] = [null, SAME_PLACE];
  for (const node of nodes) {
    const gap = distance(node.at, at);
    if (gap <= least) [best, least] = [node, gap];
  }
  return best;
}
