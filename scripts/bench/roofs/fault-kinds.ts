import { add, along, distance, scale, subtract, UP, type Vec3 } from '../../../src/domain/vector.ts';
import type { Chance } from './chance.ts';
import { believableGap } from './design.ts';
import type { DrawnMember, Role } from './drawing-board.ts';
import {
  changeEnds,
  directionOf,
  distanceToAxis,
  endOf,
  type FaultKind,
  FRAMES_IN,
  isClear,
  LOST,
  lengthened,
  lengthOf,
  lineOf,
  nearestOn,
  type Plant,
  replaced,
  tip,
  wholeLine,
} from './fault-tools.ts';

import { missingMember, swappedPanelPoint, unjoinedCrossing, webOnWeb } from './web-faults.ts';

const shortEnd: Plant = (roof, drawn, chance) => {
  const picked = endOf(roof, drawn, chance, FRAMES_IN);
  if (!picked) return null;
  const { member, members, end, joint } = picked;
  const by = believableGap(member.profile) + chance.between(0.25, 0.6);
  if (lengthOf(member) < 2 * by + 0.5) return null;
  const changed = changeEnds(members, (m) => lengthened(m, end, -by));
  const tips = [...changed.values()].map((m) => tip(m, end));
  if (!tips.every((p) => isClear(p, drawn, (m) => m.line === member.line))) return null;
  const fault = { kind: 'short end', codes: LOST, marks: [...changed.keys()], places: [joint.at, tips[0]] } as const;
  return { fault, drawn: replaced(drawn, changed) };
};

const overshoot: Plant = (roof, drawn, chance) => {
  const picked = endOf(roof, drawn, chance, FRAMES_IN);
  if (!picked) return null;
  const { member, members, end, joint } = picked;
  const past = believableGap(member.profile) + chance.between(0.45, 1);
  const changed = changeEnds(members, (m) => lengthened(m, end, distance(tip(m, end), joint.at) + past));
  const tips = [...changed.values()].map((m) => tip(m, end));
  if (!tips.every((p) => isClear(p, drawn, (m) => m.line === member.line))) return null;
  const codes = ['loose-end', 'near-miss', 'crossing-apart'] as const;
  const fault = { kind: 'overshoot', codes, marks: [...changed.keys()], places: [joint.at, tips[0]] } as const;
  return { fault, drawn: replaced(drawn, changed) };
};

const wrongLevel: Plant = (roof, drawn, chance) => {
  const member = chance.pick(
    drawn.filter((m) => (m.role !== 'web' && FRAMES_IN.includes(m.role)) || m.role === 'purlin'),
  );
  const members = member && wholeLine(roof, drawn, member);
  if (!members) return null;
  const by = scale(UP, (chance.happens(0.5) ? 1 : -1) * (chance.between(0.4, 0.7) + member.profile.depth));
  const changed = changeEnds(members, (m) => ({ ...m, from: add(m.from, by), to: add(m.to, by) }));
  const places = lineOf(roof, member).stops.map(({ joint }) => roof.joints.get(joint)!.at);
  const isAlone = [...changed.values()].every((moved) =>
    places.every((p) => isClear(nearestOn(moved, add(p, by)), drawn, (m) => m.line === member.line)),
  );
  if (!isAlone) return null;
  const codes = [...LOST, 'crossing-apart'] as const;
  return { fault: { kind: 'wrong level', codes, marks: [...changed.keys()], places }, drawn: replaced(drawn, changed) };
};

const doubled: Plant = (_roof, drawn, chance) => {
  const member = chance.pick(drawn.filter((m) => m.role !== 'sag rod'));
  const shift: Vec3 = chance.happens(0.5)
    ? [0, 0, 0]
    : [chance.between(-5, 5) / 1000, chance.between(-5, 5) / 1000, chance.between(-5, 5) / 1000];
  const copy = { ...member, mark: `${member.mark}-copy`, from: add(member.from, shift), to: add(member.to, shift) };
  const fault = {
    kind: 'doubled',
    codes: ['twin-members', 'overlap'],
    marks: [member.mark, copy.mark],
    places: [along(member.from, subtract(member.to, member.from), 0.5)],
  } as const;
  return { fault, drawn: [...drawn, copy] };
};

const overlapping: Plant = (_roof, drawn, chance) => {
  const member = chance.pick(drawn.filter((m) => lengthOf(m) > 3 && m.role !== 'sag rod'));
  if (!member || drawn.filter((m) => m.line === member.line).length !== 1) return null;
  const half = chance.between(0.2, 0.6);
  const at = chance.between(0.4, 0.6) * lengthOf(member);
  const d = directionOf(member);
  const one = { ...member, to: along(member.from, d, at + half) };
  const other = { ...member, mark: `${member.mark}-rest`, from: along(member.from, d, at - half) };
  const fault = {
    kind: 'overlapping',
    codes: ['overlap', 'twin-members'],
    marks: [one.mark, other.mark],
    places: [along(member.from, d, at)],
  } as const;
  return { fault, drawn: [...replaced(drawn, new Map([[one.mark, one]])), other] };
};

/** A truss, the purlins of a bay with their sag rods, or the bracing of a bay. */
function partOf(drawn: readonly DrawnMember[], chance: Chance): DrawnMember[] {
  const frame = chance.whole(0, Math.max(...drawn.map((m) => m.frame ?? 0)));
  const truss: readonly Role[] = ['top chord', 'bottom chord', 'web'];
  const bracing: readonly Role[] = ['roof bracing', 'bottom bracing', 'tie'];
  const purlins = drawn.filter((m) => m.role === 'purlin');
  switch (chance.whole(0, 2)) {
    case 0:
      return drawn.filter((m) => m.frame === frame && truss.includes(m.role));
    case 1:
      return drawn.filter((m) => bracing.includes(m.role) && m.mark.slice(2).startsWith(`${frame}-`));
    default: {
      if (purlins.length === 0) return [];
      const [from, to] = chance.pick(purlins).mark.split('-')[1];
      const bays = drawn.filter((m) => m.role === 'sag rod' && m.mark.slice(2) >= from! && m.mark.slice(2) < to!);
      return [...purlins.filter((m) => m.mark.endsWith(`-${from}${to}`)), ...bays];
    }
  }
}

/** m, more than the reach of ordinary columns and chords. */
const OUT_OF_REACH = 0.5;

const movedPart: Plant = (roof, drawn, chance) => {
  const group = partOf(drawn, chance);
  if (group.length < 3) return null;
  const by = scale(UP, (chance.happens(0.6) ? 1 : -1) * chance.between(0.5, 0.9));
  const marks = new Set(group.map((m) => m.mark));
  const seams = [...roof.joints.values()].filter((joint) => {
    const inside = [...joint.meetings.keys()].filter((mark) => marks.has(mark)).length;
    return inside > 0 && inside < joint.meetings.size;
  });
  const changed = changeEnds(group, (m) => ({ ...m, from: add(m.from, by), to: add(m.to, by) }));
  const isApart = seams.every((joint) =>
    [...joint.meetings.keys()].every((mark) => {
      const moved = changed.get(mark);
      if (moved) return isClear(nearestOn(moved, add(joint.at, by)), drawn, (m) => marks.has(m.mark));
      const left = drawn.find((m) => m.mark === mark);
      if (!left) return true;
      // Along a column that runs on, a part that slides is still joined to it.
      if (distanceToAxis(add(joint.at, by), left) < OUT_OF_REACH) return false;
      return isClear(nearestOn(left, joint.at), [...changed.values()], () => false);
    }),
  );
  if (!isApart || seams.length === 0) return null;
  const fault = {
    kind: 'moved part',
    codes: [...LOST, 'crossing-apart'],
    marks: [...marks],
    places: seams.map((j) => j.at),
  } as const;
  return { fault, drawn: replaced(drawn, changed) };
};

export const PLANTS: Readonly<Record<FaultKind, Plant>> = {
  'short end': shortEnd,
  overshoot,
  'wrong level': wrongLevel,
  doubled,
  overlapping,
  'moved part': movedPart,
  'unjoined crossing': unjoinedCrossing,
  'web on a web': webOnWeb,
  'missing member': missingMember,
  'swapped panel point': swappedPanelPoint,
};
