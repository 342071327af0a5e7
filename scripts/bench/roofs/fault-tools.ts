import type { FindingCode } from '../../../src/domain/finding.ts';
import { along, distance, dot, subtract, unit, type Vec3 } from '../../../src/domain/vector.ts';
import type { Chance } from './chance.ts';
import type { DrawnMember, Role, TrueLine } from './drawing-board.ts';
import type { Roof } from './random-roof.ts';

export const FAULT_KINDS = [
  'short end',
  'overshoot',
  'wrong level',
  'doubled',
  'overlapping',
  'moved part',
  'unjoined crossing',
  'web on a web',
  'missing member',
  'swapped panel point',
] as const;
export type FaultKind = (typeof FAULT_KINDS)[number];

/** Kinds that leave everything joined: they show as mechanisms or as a broken pattern, if at all. */
export const JOINED_FAULTS: readonly FaultKind[] = ['web on a web', 'missing member', 'swapped panel point'];

/** A slip of the modeller, with what would be a right answer to it. */
export interface Fault {
  readonly kind: FaultKind;
  readonly codes: readonly FindingCode[];
  readonly marks: readonly string[];
  readonly places: readonly Vec3[];
}

export interface FaultyDrawing {
  readonly fault: Fault;
  readonly drawn: readonly DrawnMember[];
}

/** Plants one fault of its kind; null where the candidate drawn does not make a clear fault. */
export type Plant = (roof: Roof, drawn: readonly DrawnMember[], chance: Chance) => FaultyDrawing | null;

export const LOST: readonly FindingCode[] = ['near-miss', 'loose-end', 'lone-member', 'separate-part'];
export const FRAMES_IN: readonly Role[] = ['web', 'tie', 'roof bracing', 'bottom bracing', 'eaves beam'];
/** Nothing else may lie this near to an end that is meant to hang in the air. */
export const CLEAR = 0.25;

export const lineOf = (roof: Roof, member: DrawnMember): TrueLine => roof.lines.get(member.line)!;
export const replaced = (drawn: readonly DrawnMember[], changed: ReadonlyMap<string, DrawnMember>): DrawnMember[] =>
  drawn.map((m) => changed.get(m.mark) ?? m);
export const directionOf = (m: DrawnMember): Vec3 => unit(subtract(m.to, m.from))!;
export const lengthOf = (m: DrawnMember): number => distance(m.from, m.to);

export function distanceToAxis(p: Vec3, { from, to }: DrawnMember): number {
  const d = subtract(to, from);
  const t = Math.min(1, Math.max(0, dot(subtract(p, from), d) / dot(d, d)));
  return distance(p, along(from, d, t));
}

export const isClear = (p: Vec3, drawn: readonly DrawnMember[], except: (m: DrawnMember) => boolean): boolean =>
  drawn.every((m) => except(m) || distanceToAxis(p, m) > CLEAR);

/** All members of a one-piece line, two where it is a pair; null where it is spliced. */
export function wholeLine(roof: Roof, drawn: readonly DrawnMember[], member: DrawnMember): DrawnMember[] | null {
  const members = drawn.filter((m) => m.line === member.line);
  const [first] = lineOf(roof, member).pieces;
  return members.every((m) => lineOf(roof, m).pieces.every((p) => p.from === first!.from)) ? members : null;
}

/** A member that ends on another at both ends, and one of these ends. */
export function endOf(roof: Roof, drawn: readonly DrawnMember[], chance: Chance, roles: readonly Role[]) {
  const member = chance.pick(drawn.filter((m) => roles.includes(m.role)));
  const members = member && wholeLine(roof, drawn, member);
  if (!members) return null;
  const end = chance.whole(0, 1) as 0 | 1;
  const key = lineOf(roof, member).stops.at(end === 0 ? 0 : -1)!.joint;
  return { member, members, end, joint: roof.joints.get(key)! };
}

/** Moves one end along the axis: outwards where `by` is positive. */
export function lengthened(m: DrawnMember, end: 0 | 1, by: number): DrawnMember {
  const d = directionOf(m);
  return end === 0 ? { ...m, from: along(m.from, d, -by) } : { ...m, to: along(m.to, d, by) };
}
export const tip = (m: DrawnMember, end: 0 | 1): Vec3 => (end === 0 ? m.from : m.to);

export function changeEnds(
  members: readonly DrawnMember[],
  change: (m: DrawnMember) => DrawnMember,
): ReadonlyMap<string, DrawnMember> {
  return new Map(members.map((m) => [m.mark, change(m)]));
}

export function nearestOn(m: DrawnMember, p: Vec3): Vec3 {
  const d = directionOf(m);
  return along(m.from, d, Math.min(lengthOf(m), Math.max(0, dot(subtract(p, m.from), d))));
}
