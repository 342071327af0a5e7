import type { Result } from '../../domain/result.ts';
import { distance } from '../../domain/vector.ts';
import { listedByKey } from './member-forces.ts';
import type { SetValues } from './set-definitions.ts';

/** Lengths by GlobalId of every element that was read as members; null for other elements. */
export function elementLengths(result: Result): (globalId: string) => SetValues<'Pinwright_Lengths'> | null {
  const membersOf = listedByKey(result.members, ({ globalId }) => [globalId]);
  const barsOf = listedByKey(result.bars, ({ member, members }) => [...new Set(members ?? [member])]);
  return (globalId) => {
    const members = membersOf.get(globalId)?.map((index) => result.members[index]);
    if (members === undefined) return null;
    const bars = (barsOf.get(globalId) ?? []).map((index) => result.bars[index].length);
    return {
      AxisAsDrawn: sum(members.map(({ axis }) => distance(axis[0], axis[1]))),
      BetweenJoints: bars.length === 0 ? null : sum(bars),
      LongestBar: bars.length === 0 ? null : Math.max(...bars),
      GreatestShift: Math.max(...members.map(({ shift }) => shift)),
    };
  };
}

const sum = (lengths: readonly number[]): number => lengths.reduce((total, length) => total + length, 0);
