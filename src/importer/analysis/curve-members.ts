import type { Member } from '../../domain/member.ts';
import { add, between, cross, distance, norm, scale, subtract, unit, type Vec3 } from '../../domain/vector.ts';
import { asEnum, asRef, asString } from '../../step/values.ts';
import { writtenClass } from '../class-names.ts';
import { BENT, refusal } from '../element-remarks.ts';
import { inOrder, isSound, SHORTEST } from '../member-axis.ts';
import { NotRead, noAxis, noSection } from '../not-read.ts';
import type { Sources } from '../read-element.ts';
import type { SeenSection } from '../sections/section-book.ts';
import { across, firstAcross } from '../transform.ts';
import { elementsBehind } from './elements-behind.ts';
import { type Frames, turned } from './frames.ts';
import {
  type ProfileAssociation,
  profileAssociations,
  profileOf,
  sectionOfProperties,
  turnOf,
} from './profile-properties.ts';
import { ONE_WAY, TAPERED } from './remarks.ts';
import { readEdgeLine } from './topology.ts';

const CLASSES = ['IFCSTRUCTURALCURVEMEMBER', 'IFCSTRUCTURALCURVEMEMBERVARYING'];

/** A curve member with what its loads need: its ends in its own sense and its local axes, unit, world. */
export interface CurveMember {
  readonly member: Member;
  readonly start: Vec3;
  readonly end: Vec3;
  readonly axes: readonly [Vec3, Vec3, Vec3];
}

export const curveMemberIds = ({ reading }: Sources): number[] =>
  CLASSES.flatMap((type) => [...reading.file.idsOf(type)]);

/** The curve members by instance; one that cannot be read is a finding. */
export function readCurveMembers(sources: Sources, frames: Frames): Map<number, CurveMember> {
  const { reading } = sources;
  const behind = elementsBehind(reading.file);
  const profiles = profileAssociations(reading.file);
  const members = new Map<number, CurveMember>();
  for (const id of curveMemberIds(sources)) {
    reading.about(globalIdOf(sources, id));
    try {
      members.set(id, readCurveMember(sources, frames, id, behind.get(id) ?? null, profiles.get(id) ?? null));
    } catch (problem) {
      if (!(problem instanceof NotRead)) throw problem;
      reading.note(refusal(problem));
    } finally {
      reading.about(null);
    }
  }
  return members;
}

function readCurveMember(
  sources: Sources,
  frames: Frames,
  id: number,
  element: number | null,
  association: ProfileAssociation | null,
): CurveMember {
  const { reading, relations, materials } = sources;
  const args = reading.args(id);
  const frame = frames.of(id);
  const line = readEdgeLine(reading, asRef(args[6]), frame);
  if (line === null) throw noAxis('it has no edge');
  const { from: start, to: end } = line;
  const x = directionOf(start, end);
  reading.about(globalIdOf(sources, id), between(start, end, 0.5));
  const zAxis = upright(sources, x, args[8] === undefined ? null : turnedAxis(sources, frames, id), association);
  const axes = [x, cross(zAxis, x), zAxis] as const;

  const made = materials.madeOf(relations.materialOf.get(id) ?? null);
  const seen = sectionOf(sources, made.profiles, association, axes);
  const section = seen instanceof NotRead ? null : seen.section;
  const predefinedType = asEnum(args[7]);
  if (seen instanceof NotRead) reading.note(refusal(seen));
  if (line.isBent) reading.note(BENT);
  if (reading.typeOf(id).endsWith('VARYING')) reading.note(TAPERED);
  if (ONE_WAY_TYPES.has(predefinedType ?? '')) reading.note(ONE_WAY);
  if (made.remark !== null) reading.note(made.remark);
  for (const doubt of made.doubts) reading.note(doubt);

  const context = sources.contexts.of(element ?? id);
  const member: Member = {
    globalId: globalIdOf(sources, id),
    part: 0,
    name: asString(args[2]),
    tag: element === null ? null : asString(reading.args(element)[7]),
    class: writtenClass(reading.typeOf(id)),
    predefinedType,
    type: context.type,
    assembly: context.assembly,
    partOf: context.partOf,
    storey: context.storey,
    layer: null,
    axisFrom: 'analysis-view',
    axis: inOrder(start, end),
    // The profile's own position may turn it against the member's axes.
    zAxis: seen instanceof NotRead ? zAxis : seen.zAxis,
    section,
    material: materials.inSection(made.material, section),
    facts: sources.facts.of(id),
  };
  return { member, start, end, axes };
}

const ONE_WAY_TYPES: ReadonlySet<string> = new Set(['CABLE', 'TENSION_MEMBER', 'COMPRESSION_MEMBER']);

const globalIdOf = ({ reading }: Sources, id: number): string => {
  const stated = asString(reading.args(id)[0])?.trim() ?? '';
  return stated === '' ? `#${id}` : stated;
};

function directionOf(start: Vec3, end: Vec3): Vec3 {
  if (!isSound(start) || !isSound(end)) {
    throw new NotRead('unreadable-element', 'its coordinates are no numbers of a building', 'Export it again.');
  }
  const direction = distance(start, end) < SHORTEST ? null : unit(subtract(end, start));
  if (direction !== null) return direction;
  throw new NotRead('zero-length', 'its ends coincide to a millimetre', 'Delete the member, or draw it at its length.');
}

/** IfcStructuralCurveMember.Axis, in the world. */
function turnedAxis({ reading }: Sources, frames: Frames, id: number): Vec3 | null {
  const axis = reading.direction(reading.args(id)[8]);
  return axis === null ? null : turned(frames.of(id), axis);
}

/**
 * The section's z: the stated axis, in IFC2X3 the profile's orientation, as far as it is across the member; else as
 * upright as may be, and along the world's x for a vertical member.
 */
function upright({ reading }: Sources, x: Vec3, axis: Vec3 | null, association: ProfileAssociation | null): Vec3 {
  const orientation = association?.orientation ?? null;
  const stated = axis ?? reading.direction(orientation);
  const isAcross = stated !== null && norm(across(unit(stated) ?? x, x)) > 1e-3;
  const z = firstAcross(x, isAcross ? stated : [0, 0, 1]);
  const turn = turnOf(reading, orientation);
  return turn === null ? z : add(scale(z, Math.cos(turn)), scale(cross(x, z), Math.sin(turn)));
}

/** Of the material's profiles the first that makes a section, else of the profile properties, else of their bare numbers. */
function sectionOf(
  { reading, sections }: Sources,
  profiles: readonly number[],
  association: ProfileAssociation | null,
  [x, y, z]: CurveMember['axes'],
): SeenSection | NotRead {
  const named = association === null ? null : profileOf(reading, association.properties);
  let refused: NotRead | null = null;
  for (const profile of named === null ? profiles : [...profiles, named]) {
    try {
      return sections.seenAlong(profile, x, y, z);
    } catch (problem) {
      if (!(problem instanceof NotRead)) throw problem;
      refused ??= problem;
    }
  }
  const numbers = association === null ? null : sectionOfProperties(reading, association.properties);
  return (numbers && { section: numbers, zAxis: z }) ?? refused ?? noSection('no profile is associated with it');
}
