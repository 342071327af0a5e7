import type { Member } from '../../src/domain/member.ts';
import type { Vec3 } from '../../src/domain/vector.ts';
import { cutBack, hollow, member } from './members.ts';

export const CHORD = { section: hollow(0.12) };
export const WEB = { section: hollow(0.08) };
/** m from panel point to panel point, and from chord to chord. */
export const PANEL = 3;
export const HEIGHT = 2;

/** Flat Pratt trusses of four panels, 5 m apart, tied by purlins on the top chord's panel points; webs stop `gap` short. */
export function flatTrusses(frames: number, gap: number): Member[] {
  const members: Member[] = [];
  for (let frame = 0; frame < frames; frame++) {
    const p = (x: number, z: number): Vec3 => [x, 5 * frame, z];
    const mark = (text: string) => `T${frame}-${text}`;
    members.push(member(mark('top'), p(0, HEIGHT), p(4 * PANEL, HEIGHT), CHORD));
    members.push(member(mark('low'), p(0, 0), p(4 * PANEL, 0), CHORD));
    for (let i = 0; i <= 4; i++) {
      members.push(cutBack(mark(`post${i}`), p(PANEL * i, 0), p(PANEL * i, HEIGHT), gap, WEB));
    }
    for (let i = 0; i < 4; i++) {
      members.push(cutBack(mark(`diagonal${i}`), p(PANEL * i, 0), p(PANEL * (i + 1), HEIGHT), gap, WEB));
    }
  }
  const above = HEIGHT + 0.06 + 0.05;
  for (let frame = 0; frame + 1 < frames; frame++) {
    for (let i = 0; i <= 4; i++) {
      const [from, to] = [5 * frame + 0.01, 5 * frame + 4.99];
      members.push(member(`P${frame}-${i}`, [PANEL * i, from, above], [PANEL * i, to, above]));
    }
  }
  return members;
}

/** The member drawn shorter by `by` at the end it finishes with. */
export function shortened(members: readonly Member[], mark: string, by: number): Member[] {
  return members.map((one) => {
    if (one.globalId !== mark) return one;
    const [from, to] = one.axis;
    const length = Math.hypot(to[0] - from[0], to[1] - from[1], to[2] - from[2]);
    const end = to.map((x, k) => x - ((x - from[k]!) / length) * by) as unknown as Vec3;
    return { ...one, axis: [from, end] };
  });
}
