import type { Result } from '../../domain/result.ts';
import type { Vec3 } from '../../domain/vector.ts';
import { bearings, type GoverningReaction } from './bearings.ts';
import { joints } from './joints.ts';

/** The schedules as the result carries them; none where nothing was solved. */
export function resultSchedules(result: Result): Pick<Result, 'bearings' | 'joints'> {
  if (result.cases.length === 0) return {};
  return {
    bearings: bearings(result).map(({ node, down, uplift, horizontal }) => ({
      node,
      down: governing(down),
      uplift: governing(uplift),
      horizontal: governing(horizontal),
    })),
    joints: [...joints(result)].map(({ node, bars, states }) => ({
      node: node.id,
      bars: bars.map(({ bar }) => bar.id),
      states: states.map(({ from, governs, forces, reaction, loads }) => ({
        from,
        governs: [...governs],
        forces: [...forces],
        reaction: reaction && vector(reaction),
        loads: loads && vector(loads),
      })),
    })),
  };
}

const vector = (force: Vec3): [number, number, number] => [force[0], force[1], force[2]];

const governing = (most: GoverningReaction | null) => most && { ...most, reaction: vector(most.reaction) };
