import { add, cross, meanOf, norm, ORIGIN, subtract, type Vec3 } from '../../domain/vector.ts';
import type { Solved } from './joints.ts';
import type { State } from './state.ts';

/** All loads against all reactions. */
export interface WholeCheck {
  readonly name: string;
  /** N. */
  readonly loads: Vec3;
  readonly reactions: Vec3;
  readonly sum: Vec3;
  /** Nm, about `about`: the middle of the truss. */
  readonly loadMoment: Vec3;
  readonly reactionMoment: Vec3;
  readonly moment: Vec3;
  readonly about: Vec3;
  /** What is left of forces over the sum of all loads' sizes, and of moments over the sum of theirs: the larger. */
  readonly outOfBalance: number;
}

/** The balance of the whole: forces, and moments about the middle of the truss. */
export function checkWhole(result: Solved, { name, loads, reactions }: State): WholeCheck {
  const at = new Map(result.nodes.map((node): [string, Vec3] => [node.id, node.at]));
  const about = result.nodes.length === 0 ? ORIGIN : meanOf(result.nodes.map((node) => node.at));
  const [load, reaction] = [resultantOf(loads), resultantOf(reactions)];
  const sum = add(load.force, reaction.force);
  const moment = add(load.moment, reaction.moment);
  const share = (left: number, size: number) => (size > 0 ? left / size : 0);
  return {
    name,
    loads: load.force,
    reactions: reaction.force,
    sum,
    loadMoment: load.moment,
    reactionMoment: reaction.moment,
    moment,
    about,
    outOfBalance: Math.max(
      share(norm(sum), Math.max(load.size, reaction.size)),
      share(norm(moment), Math.max(load.momentSize, reaction.momentSize)),
    ),
  };

  function resultantOf(forces: ReadonlyMap<string, Vec3>) {
    let [force, turning, size, momentSize] = [ORIGIN, ORIGIN, 0, 0];
    for (const [node, one] of forces) {
      const lever = subtract(at.get(node) ?? about, about);
      force = add(force, one);
      turning = add(turning, cross(lever, one));
      size += norm(one);
      momentSize += norm(lever) * norm(one);
    }
    return { force, moment: turning, size, momentSize };
  }
}
