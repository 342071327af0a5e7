import { barRuns } from '../../../brief/selectors/bar-runs.ts';
import type { Member } from '../../../domain/member.ts';
import type { Truss } from '../../../domain/truss.ts';
import { dot, subtract } from '../../../domain/vector.ts';
import type { PlanEdge } from './plan.ts';

/**
 * What joins the chosen nodes: bars between two of them, and the pieces of one member between two that follow one another on
 * it, over nodes that are not chosen or are only carried. Each pair once.
 */
export function planEdges(truss: Truss, members: readonly Member[], nodes: readonly number[]): PlanEdge[] {
  const chosen = new Set(nodes);
  const edges = new Map<string, PlanEdge>();
  const addRun = (run: readonly number[]) => {
    const kept = run.filter((node) => chosen.has(node));
    for (let i = 1; i < kept.length; i++) {
      const [a, b] = [Math.min(kept[i - 1], kept[i]), Math.max(kept[i - 1], kept[i])];
      if (a !== b) edges.set(`${a},${b}`, [a, b]);
    }
  };
  const runs = barRuns(truss);
  const nodesOfMember = new Map<number, Set<number>>();
  truss.bars.forEach((bar, i) => {
    if (bar.members.length > 1) addRun(runs[i]);
    else {
      const [member] = bar.members as [number];
      const onMember = nodesOfMember.get(member) ?? new Set<number>();
      nodesOfMember.set(member, onMember);
      for (const node of runs[i]) onMember.add(node);
    }
  });
  for (const [member, onMember] of nodesOfMember) {
    const [start, end] = members[member].axis;
    const axis = subtract(end, start);
    const position = (node: number): number => dot(axis, subtract(truss.nodes[node].at, start));
    addRun([...onMember].toSorted((a, b) => position(a) - position(b)));
  }
  return [...edges.values()];
}
