import type { Member } from '../../domain/member.ts';
import type { Truss, TrussNode } from '../../domain/truss.ts';
import { distance } from '../../domain/vector.ts';
import type { MemberSelector, NodeSelector } from '../types.ts';
import { endNodes, joinedNodes } from './member-nodes.ts';
import { selectMembers } from './select-members.ts';
import { topNodes } from './top-nodes.ts';
import { isWithin, LENGTH_PRECISION } from './within-range.ts';

/** m; what counts as lowest or highest (CONTRACT "The brief"). */
const EXTREME_BAND = 0.01;

type NodeTest = (node: TrussNode, index: number) => boolean;

/**
 * Indices, ascending, of the nodes that any of the selectors catches. All keys of one selector must hold; `lowest` and
 * `highest` look at the extreme of the whole truss, not of what the other keys leave.
 */
export function selectNodes(truss: Truss, members: readonly Member[], selectors: readonly NodeSelector[]): number[] {
  const tests = selectors.map((selector) => nodeTest(truss, members, selector));
  return truss.nodes.flatMap((node, i) => (tests.some((test) => test(node, i)) ? [i] : []));
}

function nodeTest(truss: Truss, members: readonly Member[], selector: NodeSelector): NodeTest {
  const tests: NodeTest[] = [];
  const { near, within, level, not } = selector;
  if (near !== undefined && within !== undefined)
    tests.push(({ at }) => distance(at, near) <= within + LENGTH_PRECISION);
  if (level !== undefined) tests.push(({ at }) => isWithin(at[2], level, LENGTH_PRECISION));
  if (selector.lowest !== undefined) {
    const lowest = truss.nodes.reduce((least, { at }) => Math.min(least, at[2]), Number.POSITIVE_INFINITY);
    tests.push(({ at }) => at[2] <= lowest + EXTREME_BAND + LENGTH_PRECISION === selector.lowest);
  }
  if (selector.highest !== undefined) {
    const highest = truss.nodes.reduce((most, { at }) => Math.max(most, at[2]), Number.NEGATIVE_INFINITY);
    tests.push(({ at }) => at[2] >= highest - EXTREME_BAND - LENGTH_PRECISION === selector.highest);
  }
  if (selector.top !== undefined) {
    const isTop = topNodes(truss);
    tests.push((_, i) => (isTop[i] === 1) === selector.top);
  }
  const meets = (reach: typeof endNodes, selectors: readonly MemberSelector[]): NodeTest => {
    const reached = reach(truss, members.length, selectMembers(members, selectors));
    return (_, i) => reached.has(i);
  };
  if (selector.endOf !== undefined) tests.push(meets(endNodes, selector.endOf));
  if (selector.joins !== undefined) tests.push(meets(joinedNodes, selector.joins));
  if (not !== undefined) {
    const holds = nodeTest(truss, members, not);
    tests.push((node, i) => !holds(node, i));
  }
  return (node, i) => tests.every((test) => test(node, i));
}
