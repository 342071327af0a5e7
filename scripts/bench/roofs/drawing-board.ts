import { add, along, distance, dot, scale, subtract, unit, type Vec3 } from '../../../src/domain/vector.ts';
import type { Profile } from './profiles.ts';

export type Role =
  | 'top chord'
  | 'bottom chord'
  | 'web'
  | 'column'
  | 'gable post'
  | 'purlin'
  | 'sag rod'
  | 'roof bracing'
  | 'bottom bracing'
  | 'tie'
  | 'eaves beam'
  | 'stub';

/** How a member comes to a joint. */
export type Meeting = 'end' | 'through' | 'seated';

/** A member as it stands in the model. */
export interface DrawnMember {
  readonly mark: string;
  readonly role: Role;
  readonly profile: Profile;
  readonly from: Vec3;
  readonly to: Vec3;
  /** From the heel or lower flange upwards. */
  readonly zAxis: Vec3;
  /** Where the flanges of an angle or a channel point; null where that is left to chance. */
  readonly opens: Vec3 | null;
  /** Frame it belongs to; null for what runs from frame to frame. */
  readonly frame: number | null;
  readonly line: string;
}

/** A work point: what an engineer would draw as one node. */
export interface TrueJoint {
  readonly key: string;
  readonly at: Vec3;
  readonly meetings: Map<string, Meeting>;
  readonly lines: Set<string>;
  readonly supported: boolean;
  /** The end of a member that ends in the air on purpose. */
  readonly free: boolean;
}

/** A straight run of members spliced end to end, or of pairs side by side, from work point to work point. */
export interface TrueLine {
  readonly key: string;
  readonly role: Role;
  readonly frame: number | null;
  /** Work interval of each member along the line. */
  readonly pieces: readonly { readonly mark: string; readonly from: number; readonly to: number }[];
  /** Joints in order. */
  readonly stops: readonly { readonly joint: string; readonly at: number }[];
}

/** What is to be drawn along one straight line. */
export interface Stroke {
  readonly key: string;
  readonly role: Role;
  readonly profile: Profile;
  readonly zAxis: Vec3;
  readonly frame: number | null;
  /** Joints in order; the first and last are the ends of the work line. */
  readonly joints: readonly string[];
  /** How far each end stops short of its joint; negative where it runs past. */
  readonly cuts: readonly [number, number];
  /** How far each end lies off its work point, sideways. */
  readonly shifts?: readonly [Vec3, Vec3];
  /** Cuts along the line, from its start, with the gap between the pieces. */
  readonly splices?: readonly number[];
  readonly spliceGap?: number;
  /** Drawn as two members at plus and minus this. */
  readonly pair?: Vec3 | null;
  readonly seated?: boolean;
  readonly opens?: Vec3;
}

const NOWHERE: Vec3 = [0, 0, 0];

/** Collects work points, lines and the members drawn along them. */
export class DrawingBoard {
  readonly joints = new Map<string, TrueJoint>();
  readonly lines = new Map<string, TrueLine>();
  readonly drawn: DrawnMember[] = [];

  joint(key: string, at: Vec3, kind: { readonly supported?: boolean; readonly free?: boolean } = {}): string {
    const old = this.joints.get(key);
    const supported = (kind.supported ?? false) || (old?.supported ?? false);
    const free = (kind.free ?? false) || (old?.free ?? false);
    const fresh = { key, at, meetings: old?.meetings ?? new Map(), lines: old?.lines ?? new Set<string>() };
    this.joints.set(key, { ...fresh, supported, free });
    return key;
  }

  at(key: string): Vec3 {
    return this.joints.get(key)!.at;
  }

  draw(stroke: Stroke): void {
    const start = this.at(stroke.joints[0]);
    const end = this.at(stroke.joints.at(-1)!);
    const direction = unit(subtract(end, start))!;
    const length = distance(start, end);
    const bounds = [0, ...(stroke.splices ?? []), length];
    const pieces: { mark: string; from: number; to: number }[] = [];
    const [shiftStart, shiftEnd] = stroke.shifts ?? [NOWHERE, NOWHERE];
    const halfGap = (stroke.spliceGap ?? 0) / 2;
    for (let i = 0; i + 1 < bounds.length; i++) {
      const [from, to] = [bounds[i], bounds[i + 1]];
      const drawnFrom = i === 0 ? stroke.cuts[0] : from + halfGap;
      const drawnTo = i + 2 === bounds.length ? length - stroke.cuts[1] : to - halfGap;
      const point = (s: number): Vec3 => {
        const shift = add(shiftStart, scale(subtract(shiftEnd, shiftStart), s / length));
        return add(along(start, direction, s), shift);
      };
      for (const [suffix, side] of stroke.pair
        ? ([
            ['a', stroke.pair],
            ['b', scale(stroke.pair, -1)],
          ] as const)
        : ([['', NOWHERE]] as const)) {
        const mark = `${stroke.key}${bounds.length > 2 ? `-${i + 1}` : ''}${suffix}`;
        pieces.push({ mark, from, to });
        this.drawn.push({
          mark,
          role: stroke.role,
          profile: stroke.profile,
          from: add(point(drawnFrom), side),
          to: add(point(drawnTo), side),
          zAxis: stroke.zAxis,
          // The backs of a pair face each other.
          opens: stroke.pair ? unit(side) : (stroke.opens ?? null),
          frame: stroke.frame,
          line: stroke.key,
        });
      }
    }
    const stops = stroke.joints.map((joint) => ({ joint, at: dot(subtract(this.at(joint), start), direction) }));
    this.lines.set(stroke.key, { key: stroke.key, role: stroke.role, frame: stroke.frame, pieces, stops });
    for (const stop of stops) this.#meet(stop, pieces, stroke);
  }

  #meet(stop: { joint: string; at: number }, pieces: TrueLine['pieces'], stroke: Stroke): void {
    const joint = this.joints.get(stop.joint)!;
    joint.lines.add(stroke.key);
    for (const { mark, from, to } of pieces) {
      if (stop.at < from - 1e-6 || stop.at > to + 1e-6) continue;
      const ends = Math.min(stop.at - from, to - stop.at) < 1e-6;
      joint.meetings.set(mark, stroke.seated && !joint.free ? 'seated' : ends ? 'end' : 'through');
    }
  }
}
