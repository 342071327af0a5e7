import type { Member } from '../domain/member.ts';
import { rounded } from './member-axis.ts';

/** Coordinates of both ends. */
const KEYS = 6;

/** Members by the rounded coordinates of their ends, then by GlobalId and part: an order that the file's own does not change. */
export function inGeometricOrder(members: readonly Member[]): Member[] {
  const axes = members.map(({ axis }) => axis.flat());
  const isNamedAfter = (i: number, j: number): boolean => {
    const [a, b] = [members[i]!, members[j]!];
    return a.globalId === b.globalId ? a.part > b.part : a.globalId > b.globalId;
  };
  const order = geometricOrder(members.length, (member, k) => axes[member]![k]!, isNamedAfter);
  return Array.from(order, (i) => members[i]!);
}

/**
 * 0 to `count` - 1 in that order.
 * @param coordinate of both ends, `k` from 0 to 5
 * @param isNamedAfter decides between those whose ends are the same
 */
export function geometricOrder(
  count: number,
  coordinate: (member: number, k: number) => number,
  isNamedAfter: (a: number, b: number) => boolean,
): Uint32Array {
  // Rounded once a member, not once a comparison.
  const keys = new Float64Array(KEYS * count);
  for (let i = 0; i < count; i++) for (let k = 0; k < KEYS; k++) keys[KEYS * i + k] = rounded(coordinate(i, k));
  return mergeSorted(count, (a, b) => {
    for (let k = 0; k < KEYS; k++) {
      const difference = keys[KEYS * a + k]! - keys[KEYS * b + k]!;
      if (difference !== 0) return difference > 0;
    }
    return isNamedAfter(a, b);
  });
}

/** 0 to `count` - 1 in order: a merge sort, since the engine's own takes most of its time to call the comparison. */
function mergeSorted(count: number, isAfter: (a: number, b: number) => boolean): Uint32Array {
  let from = Uint32Array.from({ length: count }, (_, i) => i);
  let to = new Uint32Array(count);
  for (let width = 1; width < count; width *= 2) {
    for (let low = 0; low < count; low += 2 * width) {
      const middle = Math.min(low + width, count);
      const high = Math.min(middle + width, count);
      let a = low;
      let b = middle;
      for (let i = low; i < high; i++) {
        const takesLater = b < high && (a === middle || isAfter(from[a]!, from[b]!));
        to[i] = takesLater ? from[b++]! : from[a++]!;
      }
    }
    [from, to] = [to, from];
  }
  return from;
}
