import type { FindingCode } from '../../../src/domain/finding.ts';
import { add, along, cross, distance, norm, subtract, unit, type Vec3 } from '../../../src/domain/vector.ts';
import type { Chance } from './chance.ts';
import type { DrawnMember } from './drawing-board.ts';
import {
  CLEAR,
  changeEnds,
  distanceToAxis,
  endOf,
  type Fault,
  type FaultyDrawing,
  isClear,
  LOST,
  lengthOf,
  lineOf,
  type Plant,
  replaced,
  tip,
  wholeLine,
} from './fault-tools.ts';
import type { Roof } from './random-roof.ts';

/** Of two webs of one chord joint, one runs through the other and ends in the air before the chord. */
export const unjoinedCrossing: Plant = (roof, drawn, chance) => {
  const codes = ['crossing-apart', 'near-miss', 'loose-end'] as const;
  return offToOneSide(roof, drawn, chance, { kind: 'unjoined crossing', codes, past: true });
};

/** Of two webs of one chord joint, one ends on the other's side, well before the chord. */
export const webOnWeb: Plant = (roof, drawn, chance) => {
  const codes = [
    'bends-between-nodes',
    'near-miss',
    'loose-end',
    'crossing-apart',
    'offset-joint',
    'crowded-joint',
  ] as const;
  return offToOneSide(roof, drawn, chance, { kind: 'web on a web', codes, past: false });
};

function offToOneSide(
  roof: Roof,
  drawn: readonly DrawnMember[],
  chance: Chance,
  { kind, codes, past }: Pick<Fault, 'kind' | 'codes'> & { readonly past: boolean },
): FaultyDrawing | null {
  const picked = endOf(roof, drawn, chance, ['web']);
  if (!picked) return null;
  const { member, members, end, joint } = picked;
  const partner = drawn.find((m) => m.role === 'web' && m.line !== member.line && endsAt(roof, m, joint.key));
  if (!partner || !wholeLine(roof, drawn, partner)) return null;
  const far = distance(partner.from, joint.at) > distance(partner.to, joint.at) ? partner.from : partner.to;
  const outOf = unit(subtract(far, joint.at))!;
  const reach = chance.between(0.55, 0.9);
  if (distance(far, joint.at) < 2 * reach || lengthOf(member) < 2 * reach) return null;
  const meeting = along(joint.at, outOf, reach);
  const towards = unit(subtract(meeting, tip(member, end === 0 ? 1 : 0)))!;
  const sine = norm(cross(towards, outOf));
  if (sine < 0.35) return null;
  const stop = along(meeting, towards, past ? 0.35 + partner.profile.depth : -partner.profile.depth / 2 / sine);
  const shift = subtract(stop, tip(member, end));
  const changed = changeEnds(members, (m) => endShifted(m, end, shift));
  const isOther = (m: DrawnMember) => m.line === member.line || m.line === partner.line;
  if (!isClear(stop, drawn, isOther)) return null;
  if (past && distanceToAxis(stop, partner) < CLEAR) return null;
  return {
    fault: {
      kind,
      codes,
      marks: [...changed.keys(), ...drawn.filter((m) => m.line === partner.line).map((m) => m.mark)],
      places: [meeting, joint.at],
    },
    drawn: replaced(drawn, changed),
  };
}

const endsAt = (roof: Roof, m: DrawnMember, joint: string): boolean => {
  const { stops } = lineOf(roof, m);
  return stops[0].joint === joint || stops.at(-1)!.joint === joint;
};

const endShifted = (m: DrawnMember, end: 0 | 1, by: Vec3): DrawnMember =>
  end === 0 ? { ...m, from: add(m.from, by) } : { ...m, to: add(m.to, by) };

const AFTERWARDS: readonly FindingCode[] = [
  ...LOST,
  'moves-freely',
  'bends-between-nodes',
  'crossing-apart',
  'axis-moved',
  'offset-joint',
];

export const missingMember: Plant = (roof, drawn, chance) => {
  const picked = endOf(roof, drawn, chance, ['web', 'tie', 'roof bracing']);
  if (!picked) return null;
  const marks = picked.members.map((m) => m.mark);
  const places = lineOf(roof, picked.member).stops.map(({ joint }) => roof.joints.get(joint)!.at);
  return {
    fault: { kind: 'missing member', codes: AFTERWARDS, marks, places },
    drawn: drawn.filter((m) => !marks.includes(m.mark)),
  };
};

export const swappedPanelPoint: Plant = (roof, drawn, chance) => {
  const picked = endOf(roof, drawn, chance, ['web']);
  if (!picked) return null;
  const { member, members, end, joint } = picked;
  const chord = [...joint.lines].map((key) => roof.lines.get(key)!).find((line) => line.role.endsWith('chord'));
  const nodes = (chord?.stops ?? [])
    .map(({ joint: key }) => roof.joints.get(key)!)
    .filter((j) => hasWeb(roof, j.lines));
  const index = nodes.findIndex((j) => j.key === joint.key);
  const other = nodes[index + (chance.happens(0.5) ? 1 : -1)];
  if (index < 0 || !other || other.lines.has(member.line)) return null;
  const farKey = lineOf(roof, member).stops.at(end === 0 ? -1 : 0)!.joint;
  const isTaken = [...other.lines].some((key) => roof.lines.get(key)!.stops.some((s) => s.joint === farKey));
  if (isTaken) return null;
  const shift = subtract(other.at, joint.at);
  const changed = changeEnds(members, (m) => endShifted(m, end, shift));
  const fault = {
    kind: 'swapped panel point',
    codes: AFTERWARDS,
    marks: [...changed.keys()],
    places: [joint.at, other.at],
  } as const;
  return { fault, drawn: replaced(drawn, changed) };
};

const hasWeb = (roof: Roof, lines: ReadonlySet<string>): boolean =>
  [...lines].some((key) => roof.lines.get(key)!.role === 'web');
