import type { Member } from '../domain/member.ts';
import { rounded } from './member-axis.ts';

/** Coordinates of both ends. */
const KEYS = 6;

/** Members by the rounded coordinates of their ends, then by GlobalId and part: an order that the file's own does not change. */
export function inGeometricOrder(members: readonly Member[]): Member[] {
  // Rounded once a member, not once a comparison.
  const keys = new Float64Array(KEYS * members.length);
  for (let i = 0; i < members.length; i++) {
    const { axis } = members[i]!;
    for (let k = 0; k < KEYS; k++) keys[KEYS * i + k] = rounded(k < 3 ? axis[0][k]! : axis[1][k - 3]!);
  }
  const isAfter = (a: number, b: number): boolean => {
    for (let k = 0; k < KEYS; k++) {
      const difference = keys[KEYS * a + k]! - keys[KEYS * b + k]!;
      if (difference !== 0) return difference > 0;
    }
    return isNamedAfter(members[a]!, members[b]!);
  };
  const found: Member[] = [];
  for (const i of mergeSorted(members.length, isAfter)) found.push(members[i]!);
  return found;
}

const isNamedAfter = (a: Member, b: Member): boolean =>
  a.globalId === b.globalId ? a.part > b.part : a.globalId > b.globalId;

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
