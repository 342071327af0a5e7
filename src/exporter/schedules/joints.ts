import type { Result, ResultBar, ResultMember } from '../../domain/result.ts';
import { along, distance, scale, subtract, type Vec3 } from '../../domain/vector.ts';
import type { SolvedRun } from './runs.ts';

/** One bar at a joint, seen from the joint. */
export interface JointBar {
  readonly bar: ResultBar;
  readonly member: ResultMember | null;
  /** Of the bar in the order of bars. */
  readonly index: number;
  /** Unit vector from the joint along the bar. */
  readonly direction: Vec3;
  /** rad, above the horizontal plane; negative below it. */
  readonly slope: number;
}

/** What acts on a joint together in one case or combination. */
export interface JointState {
  readonly from: string;
  /** Ids of the bars whose greatest tension or compression this is. */
  readonly governs: readonly string[];
  /** N, tension positive, one per bar of the joint; null where it could not be found. */
  readonly forces: readonly (number | null)[];
  /** N, global axes; null where nothing supports the joint. */
  readonly reaction: Vec3 | null;
  /**
   * N, global axes: the loads on the joint, with the shares of those on nodes that its bars carry. It is what closes the
   * sum of the rest; null where a force is missing.
   */
  readonly loads: Vec3 | null;
}

/** What the connection of a joint has to be designed for. */
export interface Joint {
  readonly node: Result['nodes'][number];
  readonly bars: readonly JointBar[];
  readonly states: readonly JointState[];
}

/**
 * Per joint the bars that meet there and, for each case or combination in which one of them has its greatest tension
 * or compression, all their end forces acting together. In the order of nodes; one at a time, since a large roof has
 * many. Nodes carried by a bar have no connection between bars and are left out.
 */
export function* joints(result: Result): Generator<Joint> {
  const solved: readonly SolvedRun[] = result.combinations.length > 0 ? result.combinations : result.cases;
  const runs = new Map(solved.map((run) => [run.name, run]));
  const envelope = new Map(result.envelope.map((entry) => [entry.bar, entry]));
  const reactions = new Map(
    solved.map(({ name, reactions: given }) => [name, new Map(given.map(({ node, force }) => [node, force]))]),
  );
  const barsAt = barsByNode(result);
  for (const node of result.nodes) {
    const bars = barsAt.get(node.id) ?? [];
    if (bars.length === 0 || node.carriedBy !== null) continue;
    const governed = new Map<string, string[]>();
    for (const { bar } of bars) {
      const { tension = null, compression = null } = envelope.get(bar.id) ?? {};
      for (const extreme of [tension, compression]) {
        if (extreme === null) continue;
        governed.set(extreme.from, [...(governed.get(extreme.from) ?? []), bar.id]);
      }
    }
    const states = [...governed].map(([from, governs]) => {
      const forces = bars.map(({ index }) => runs.get(from)?.axialForce[index] ?? null);
      const reaction = reactions.get(from)?.get(node.id) ?? null;
      return { from, governs, forces, reaction, loads: remainder(bars, forces, reaction) };
    });
    yield { node, bars, states };
  }
}

function remainder(bars: readonly JointBar[], forces: JointState['forces'], reaction: Vec3 | null): Vec3 | null {
  let sum: Vec3 = reaction ?? [0, 0, 0];
  for (const [k, { direction }] of bars.entries()) {
    const force = forces[k];
    if (force === null) return null;
    // A bar in tension pulls the joint towards itself.
    sum = along(sum, direction, force);
  }
  return scale(sum, -1);
}

function barsByNode(result: Result): Map<string, JointBar[]> {
  const at = new Map(result.nodes.map((node) => [node.id, node.at]));
  const memberOf = new Map(result.members.map((member) => [member.globalId, member]));
  const barsAt = new Map<string, JointBar[]>();
  for (const [index, bar] of result.bars.entries()) {
    for (const [here, there] of [
      [bar.from, bar.to],
      [bar.to, bar.from],
    ] as const) {
      const [begin, end] = [at.get(here), at.get(there)];
      if (begin === undefined || end === undefined) continue;
      const direction = scale(subtract(end, begin), 1 / distance(begin, end));
      const list = barsAt.get(here) ?? [];
      barsAt.set(here, list);
      const slope = Math.asin(Math.max(-1, Math.min(1, direction[2])));
      list.push({ bar, member: memberOf.get(bar.member) ?? null, index, direction, slope });
    }
  }
  return barsAt;
}
