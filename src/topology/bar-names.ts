import { pushTo } from '../domain/group.ts';
import type { Member } from '../domain/member.ts';
import type { Axis } from './axes.ts';
import { membersOfPiece } from './bar-properties.ts';
import type { PieceRun } from './pieces.ts';

/**
 * A bar bears its member's mark: "C17", numbered along the member where it is several bars: "C17.2". Members in a row are
 * joined by "+", the two of a pair by "/".
 */
export function nameBars(
  runs: readonly PieceRun[],
  members: readonly Member[],
  axes: readonly (Axis | null)[],
): string[] {
  const ofMember = new Map<number, number[]>();
  runs.forEach((run, bar) => {
    pushTo(ofMember, run[0].member, bar);
  });
  const mark = (piece: number): string =>
    membersOfPiece(axes, piece)
      .map((member) => members[member].tag || members[member].name || members[member].globalId)
      .join('/');
  const names: string[] = [];
  for (const [member, bars] of ofMember) {
    bars.forEach((bar, i) => {
      const others = [...new Set(runs[bar].map((piece) => piece.member))].slice(1);
      const own = bars.length > 1 ? `${mark(member)}.${i + 1}` : mark(member);
      names[bar] = [own, ...others.map(mark)].join('+');
    });
  }
  return names;
}
