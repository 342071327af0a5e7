import type { Vec3 } from '../../domain/vector.ts';
import type { Problem } from '../model/system.ts';
import { UnionFind } from '../model/union-find.ts';
import type { Mode } from '../types.ts';
import { AT_REST, movingNodes } from './localise.ts';
import { movementAt } from './rigid.ts';

/** Bars that must move together for a mode to be the motion of a part rather than of a few nodes. */
const SEVERAL = 2;

/** `whole` where every node moves as one body, `part` where several bars do, `local` else. */
export function kindOf(problem: Problem, moves: Float64Array): Mode['kind'] {
  const moving = movingNodes(problem.truss, moves, AT_REST);
  const live = problem.truss.nodes.filter((node, i) => problem.parts.liveNode[i] && node.carriedBy === null).length;
  if (moving.length === live && isRigid(problem, moving, moves)) return 'whole';
  const { nodes, bars } = largestCluster(problem, moving);
  return bars >= SEVERAL && isRigid(problem, nodes, moves) ? 'part' : 'local';
}

/** The moving nodes that most bars join among themselves. */
function largestCluster(problem: Problem, moving: readonly number[]): { nodes: number[]; bars: number } {
  const { truss, parts } = problem;
  const moves = new Set(moving);
  const sets = new UnionFind(truss.nodes.length);
  const inside = truss.bars.filter((bar, b) => parts.liveBar[b] && moves.has(bar.from) && moves.has(bar.to));
  for (const bar of inside) sets.join(bar.from, bar.to);
  const count = new Map<number, number>();
  for (const bar of inside) count.set(sets.find(bar.from), (count.get(sets.find(bar.from)) ?? 0) + 1);
  let top = -1;
  let most = 0;
  for (const [i, bars] of count)
    if (bars > most) {
      most = bars;
      top = i;
    }
  return { nodes: moving.filter((i) => sets.find(i) === top), bars: most };
}

/** Whether the nodes keep all their distances, to first order, under the movement: fitted by least squares to one rigid motion. */
function isRigid(problem: Problem, nodes: readonly number[], moves: Float64Array): boolean {
  const at = (i: number) => problem.truss.nodes[i].at;
  const centre: Vec3 = at(nodes[0]);
  const elementary = [0, 1, 2, 3, 4, 5].map((k) => ({
    centre,
    shift: axisOr(k),
    turn: axisOr(k - 3),
  }));
  const columns = elementary.map((twist) => nodes.flatMap((i) => [...movementAt(twist, at(i))]));
  let rest = nodes.flatMap((i) => [moves[3 * i], moves[3 * i + 1], moves[3 * i + 2]]);
  const basis: number[][] = [];
  for (const column of columns) {
    const before = Math.hypot(...column);
    let left = column;
    for (let pass = 0; pass < 2; pass++) for (const b of basis) left = without(left, b);
    const size = Math.hypot(...left);
    if (size > 1e-9 * before && size > 0) basis.push(left.map((v) => v / size));
  }
  for (const b of basis) rest = without(rest, b);
  return rest.every((v) => Math.abs(v) < AT_REST);
}

const axisOr = (k: number): Vec3 => [k === 0 ? 1 : 0, k === 1 ? 1 : 0, k === 2 ? 1 : 0];

function without(vector: readonly number[], b: readonly number[]): number[] {
  let k = 0;
  for (let i = 0; i < vector.length; i++) k += vector[i] * b[i];
  return vector.map((v, i) => v - k * b[i]);
}
