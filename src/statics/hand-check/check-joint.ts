import { RequestError } from '../../domain/errors.ts';
import { add, distance, norm, scale, type Vec3 } from '../../domain/vector.ts';
import { directionOf, type Frame, frameOf, type Solved, sumOf } from './joints.ts';
import type { State } from './state.ts';

/** What one bar does to a joint. */
export interface BarAtJoint {
  readonly bar: string;
  readonly name: string;
  /** The node at its other end. */
  readonly to: string;
  /** From the joint along the bar. */
  readonly unit: Vec3;
  /** N, tension positive. */
  readonly axialForce: number;
  /** N, on the joint. */
  readonly force: Vec3;
  /** Less than 1 where the bar ends on a node that another bar carries to this joint. */
  readonly share: number;
}

export interface JointCheck {
  readonly node: string;
  readonly at: Vec3;
  readonly place: string | null;
  /** The bar that carries it: then the sum of what meets here is what bends that bar; null for a joint, where the sum is nothing. */
  readonly carriedBy: string | null;
  readonly bars: readonly BarAtJoint[];
  /** N: loads on it, its share of loads on carried nodes included. */
  readonly load: Vec3;
  readonly reaction: Vec3;
  /** N: what is left; rounding, where the joint is in balance. */
  readonly sum: Vec3;
  /** The sum over the largest force of the state; 0 where there is none. */
  readonly outOfBalance: number;
}

/**
 * The balance of one joint, to be done again by hand: the bars' unit vectors times their forces, the load and the reaction.
 * @throws RequestError where there is no such node
 */
export function checkJoint(
  result: Solved,
  node: string,
  { axialForce, loads, reactions, largest }: State,
  frame: Frame = frameOf(result),
): JointCheck {
  const found = result.nodes.find(({ id }) => id === node);
  if (found === undefined)
    throw new RequestError(`there is no node ${node}; they run from n1 to n${result.nodes.length}`);
  const isCarried = found.carriedBy !== null;
  const shareIn = (end: string): number =>
    isCarried ? Number(end === node) : (frame.shares.get(end)?.find(([joint]) => joint === node)?.[1] ?? 0);
  const bars = result.bars.flatMap((bar, b): BarAtJoint[] => {
    const axial = axialForce[b];
    const shares = [shareIn(bar.from), shareIn(bar.to)];
    const share = shares[0] - shares[1];
    if (axial === null || (shares[0] === 0 && shares[1] === 0)) return [];
    const away = scale(directionOf(frame, bar), share < 0 ? -1 : 1);
    const to = share < 0 ? bar.from : bar.to;
    return [
      {
        bar: bar.id,
        name: bar.name,
        to,
        unit: away,
        axialForce: axial,
        force: scale(away, Math.abs(share) * axial),
        share: Math.abs(share),
      },
    ];
  });
  const gathered = (forces: ReadonlyMap<string, Vec3>) =>
    sumOf([...forces].map(([at, force]) => scale(force, shareIn(at))));
  const [load, reaction] = [gathered(loads), gathered(reactions)];
  const sum = add(add(load, reaction), sumOf(bars.map(({ force }) => force)));
  return {
    node,
    at: found.at,
    place: found.place,
    carriedBy: found.carriedBy?.bar ?? null,
    bars,
    load,
    reaction,
    sum,
    outOfBalance: largest > 0 ? norm(sum) / largest : 0,
  };
}

/** The node nearest to a point; null where there is none. */
export function nearestNode({ nodes }: Solved, point: Vec3): { readonly node: string; readonly away: number } | null {
  let best: { node: string; away: number } | null = null;
  for (const { id, at } of nodes) {
    const away = distance(at, point);
    if (best === null || away < best.away) best = { node: id, away };
  }
  return best;
}

/** The state in which the bars at a joint carry most, by the largest single force; null where nothing was carried. */
export function worstStateAt(result: Solved, node: string, states: readonly State[]): State | null {
  const here = result.bars.flatMap(({ from, to }, b) => (from === node || to === node ? [b] : []));
  const most = ({ axialForce }: State) => Math.max(0, ...here.map((b) => Math.abs(axialForce[b] ?? 0)));
  return states.reduce<State | null>((worst, one) => (worst === null || most(one) > most(worst) ? one : worst), null);
}
