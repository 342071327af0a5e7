import { pushTo } from '../../../domain/group.ts';
import type { Result, ResultBar, ResultMember } from '../../../domain/result.ts';
import { anyNormal, dot, norm, subtract, unit, type Vec3 } from '../../../domain/vector.ts';
import type { StepRef } from '../../../step/values.ts';
import { enumeration, integer } from '../../../step/write.ts';
import { label } from '../block.ts';
import type { NewFile } from '../new-file.ts';
import { writeMaterial } from './materials.ts';
import { type BarSection, writeProfile, writeProfileProperties } from './profiles.ts';
import { Once, ROLE, type View } from './view-parts.ts';
import { stiffnessValue, type WrittenNode } from './write-nodes.ts';

export interface WrittenBar {
  readonly member: StepRef;
  readonly globalId: string;
  /** 1/K, of its material. */
  readonly expansion: number;
}

/** A curve member for each bar, pinned at both ends; with its section and material, and tied to the elements it stands for. */
export function* writeBars(
  view: View,
  nodes: readonly WrittenNode[],
  elements: ReadonlyMap<string, StepRef>,
  into: WrittenBar[],
): Generator<string> {
  const { file, result } = view;
  const indexOf = new Map(result.nodes.map(({ id }, k) => [id, k]));
  const memberOf = new Map(result.members.map((member) => [member.globalId, member]));
  const once = new Once();
  const oneWay = oneWayTypes(result);
  const sections = new Sections(view);
  const barsOf = new Map<string, StepRef[]>();
  for (const [k, bar] of result.bars.entries()) {
    const ends = [indexOf.get(bar.from)!, indexOf.get(bar.to)!] as const;
    const ids = [...new Set(bar.members ?? [bar.member])];
    const own = memberAlong(result, bar, memberOf);
    const direction = subtract(result.nodes[ends[1]].at, result.nodes[ends[0]].at);
    // Seen the other way a section that is not symmetrical would be its mirror image.
    const isAgainst = own !== undefined && dot(direction, subtract(own.axis[1], own.axis[0])) < 0;
    const [from, to] = isAgainst ? [ends[1], ends[0]] : ends;
    const zAxis = acrossBar(own?.zAxis ?? [0, 0, 1], direction);
    const globalId = file.globalId(`${ROLE} bar`, view.barKeys[k]!);
    const member = file.add(
      'IFCSTRUCTURALCURVEMEMBER',
      globalId,
      view.frame.owner,
      label(bar.name),
      ids.length > 1 ? `Stands for ${ids.length} members together.` : null,
      null,
      view.frame.origin,
      edgeShape(view, nodes[from]!.vertex, nodes[to]!.vertex),
      enumeration(oneWay.get(bar.id) ?? 'PIN_JOINED_MEMBER'),
      ...(file.isIfc2x3 ? [] : [once.of(`z ${zAxis.join(' ')}`, () => file.add('IFCDIRECTION', [...zAxis]))]),
    );
    connect(view, once, member, globalId, nodes[from]!.connection, 'start');
    connect(view, once, member, globalId, nodes[to]!.connection, 'end');
    if (own !== undefined) sections.note(member, bar, own, zAxis);
    for (const id of ids) if (elements.has(id)) pushTo(barsOf, id, member);
    into.push({ member, globalId, expansion: own?.material?.expansion ?? 0 });
    yield* file.take();
  }
  carriedNodes(view, once, nodes, into);
  sections.write();
  for (const [globalId, bars] of barsOf) tie(view, elements.get(globalId)!, globalId, bars);
  yield* file.take();
}

/** An element of several parts has several members; the bar's is the one that runs its way. */
function memberAlong(
  { members, nodes }: Result,
  bar: ResultBar,
  memberOf: ReadonlyMap<string, ResultMember>,
): ResultMember | undefined {
  const last = memberOf.get(bar.member);
  if (last === undefined || last.part === 0) return last;
  const at = (id: string): Vec3 => nodes.find((node) => node.id === id)!.at;
  const direction = unit(subtract(at(bar.to), at(bar.from))) ?? [1, 0, 0];
  const fitness = ({ axis }: ResultMember): number =>
    Math.abs(dot(unit(subtract(axis[1], axis[0])) ?? [0, 0, 0], direction));
  return members.filter(({ globalId }) => globalId === bar.member).sort((a, b) => fitness(b) - fitness(a))[0];
}

/** The standard wants an axis that is not parallel to the member. */
function acrossBar(zAxis: Vec3, direction: Vec3): Vec3 {
  const along = unit(direction) ?? [1, 0, 0];
  const lean = dot(zAxis, along);
  const across: Vec3 = [zAxis[0] - lean * along[0], zAxis[1] - lean * along[1], zAxis[2] - lean * along[2]];
  return norm(across) > 0.1 ? zAxis : anyNormal(along);
}

function edgeShape({ file, frame }: View, from: StepRef, to: StepRef): StepRef {
  const edge = file.add('IFCEDGE', from, to);
  const shape = file.add('IFCTOPOLOGYREPRESENTATION', frame.context, 'Reference', 'Edge', [edge]);
  return file.add('IFCPRODUCTDEFINITIONSHAPE', null, null, [shape]);
}

type End = 'start' | 'end' | 'between';

/** Turning about the member's own axis is held at its start only, so that it can carry no torsion and does not spin. */
function connect({ file, frame }: View, once: Once, member: StepRef, of: string, connection: StepRef, end: End): void {
  const condition = once.of(`condition ${end === 'start'}`, () => {
    const held = (along: 'rigid' | number) => stiffnessValue(file, along, 'IFCROTATIONALSTIFFNESSMEASURE');
    const moves = Array.from({ length: 3 }, () => stiffnessValue(file, 'rigid', 'IFCLINEARSTIFFNESSMEASURE'));
    const turns = [end === 'start' ? held('rigid') : held(0), held(0), held(0)];
    return file.add('IFCBOUNDARYNODECONDITION', 'pinned end', ...moves, ...turns);
  });
  const id = file.globalId(`${ROLE} ${end}`, of);
  const rest = [member, connection, condition, null, null, null];
  file.add('IFCRELCONNECTSSTRUCTURALMEMBER', id, frame.owner, null, null, ...rest);
}

/** A node that a bar carries between its ends is connected to it there. */
function carriedNodes(view: View, once: Once, nodes: readonly WrittenNode[], bars: readonly WrittenBar[]): void {
  const indexOf = new Map(view.result.bars.map(({ id }, k) => [id, k]));
  for (const [k, { carriedBy }] of view.result.nodes.entries()) {
    const carrier = carriedBy === null ? undefined : indexOf.get(carriedBy.bar);
    if (carrier === undefined) continue;
    const { member, globalId } = bars[carrier]!;
    connect(view, once, member, `${globalId} ${view.nodeKeys[k]}`, nodes[k]!.connection, 'between');
  }
}

function oneWayTypes({ oneWay }: Result): Map<string, string> {
  return new Map([
    ...(oneWay?.tensionOnly ?? []).map((bar) => [bar, 'TENSION_MEMBER'] as const),
    ...(oneWay?.compressionOnly ?? []).map((bar) => [bar, 'COMPRESSION_MEMBER'] as const),
  ]);
}

function tie({ file, frame }: View, element: StepRef, globalId: string, bars: readonly StepRef[]): void {
  if (!file.isIfc2x3) {
    const id = file.globalId(`${ROLE} tie`, globalId);
    file.add('IFCRELASSIGNSTOPRODUCT', id, frame.owner, null, null, bars, null, element);
    return;
  }
  for (const [k, bar] of bars.entries()) {
    const id = file.globalId(`${ROLE} tie`, globalId, k);
    file.add('IFCRELCONNECTSSTRUCTURALELEMENT', id, frame.owner, null, null, element, bar);
  }
}

interface Kind {
  readonly section: BarSection | null;
  readonly material: ResultMember['material'];
  readonly zAxis: Vec3;
  readonly bars: StepRef[];
}

/** Bars of one section and material share what says so. */
class Sections {
  private readonly view: View;
  private readonly kinds = new Map<string, Kind>();

  constructor(view: View) {
    this.view = view;
  }

  note(bar: StepRef, told: ResultBar, { section, material }: ResultMember, zAxis: Vec3): void {
    const own = sectionOfBar(told, section, material);
    const key = JSON.stringify([own, material, this.view.file.isIfc2x3 ? zAxis : null]);
    const kind = this.kinds.get(key) ?? { section: own, material, zAxis, bars: [] };
    this.kinds.set(key, kind);
    kind.bars.push(bar);
  }

  write(): void {
    const { file } = this.view;
    const once = new Once();
    for (const [key, { section, material, zAxis, bars }] of this.kinds) {
      const made = material && once.of(JSON.stringify(material), () => writeMaterial(file, material));
      if (file.isIfc2x3) {
        if (made !== null) this.associate('IFCRELASSOCIATESMATERIAL', `material ${key}`, bars, made);
        if (section === null) continue;
        const numbers = once.of(JSON.stringify(section), () => writeProfileProperties(file, section));
        const upright = once.of(`z ${zAxis.join(' ')}`, () => file.add('IFCDIRECTION', [...zAxis]));
        this.associate('IFCRELASSOCIATESPROFILEPROPERTIES', `profile ${key}`, bars, numbers, null, upright);
        continue;
      }
      const used = section === null ? made : this.usage(file, section, made, once);
      if (used !== null) this.associate('IFCRELASSOCIATESMATERIAL', `material ${key}`, bars, used);
    }
  }

  private usage(file: NewFile, section: BarSection, made: StepRef | null, once: Once): StepRef {
    const profile = once.of(JSON.stringify(section), () => writeProfile(file, section));
    const part = file.add('IFCMATERIALPROFILE', null, null, made, profile, null, null);
    const set = file.add('IFCMATERIALPROFILESET', label(section.name), null, [part], null);
    // The bar runs through the centroid: cardinal point 10 (IfcCardinalPointReference).
    return file.add('IFCMATERIALPROFILESETUSAGE', set, integer(10), null);
  }

  private associate(type: string, of: string, bars: readonly StepRef[], ...what: readonly (StepRef | null)[]): void {
    const { file, frame } = this.view;
    file.add(type, file.globalId(`${ROLE} associates`, of), frame.owner, null, null, bars, ...what);
  }
}

/** Of a bar that several members make, the area that gives its EA. */
function sectionOfBar(
  { axialStiffness, members }: ResultBar,
  section: ResultMember['section'],
  material: ResultMember['material'],
): BarSection | null {
  if (section === null || axialStiffness === null) return null;
  if (members === undefined || axialStiffness === undefined || material === null) return section;
  const area = axialStiffness / material.elasticModulus;
  return Math.abs(area - section.area) <= 1e-9 * area ? section : { name: `${section.name} and others in one`, area };
}
