import { CAUTION, CAUTION_WITH_SWAY } from '../domain/caution.ts';
import type { Finding } from '../domain/finding.ts';
import type { GridLine } from '../domain/grid-line.ts';
import type { Member } from '../domain/member.ts';
import type { PlaceNamer } from '../domain/place.ts';
import type { Result } from '../domain/result.ts';
import type { Truss } from '../domain/truss.ts';
import { between } from '../domain/vector.ts';
import type { BarBending } from '../statics/bending/between-nodes.ts';
import type { EccentricityMoment } from '../statics/bending/eccentricity-moments.ts';
import type { BucklingJudgement } from '../statics/buckling/judge-buckling.ts';
import type { IdleBars } from '../statics/idle/idle-bars.ts';
import type { AskedLoad } from '../statics/loads/asked.ts';
import type { Judgement } from '../statics/stability/assess-stability.ts';
import type {
  BarEnvelope,
  HoldForce,
  LoadCase,
  OneWay,
  SolvedCase,
  SolvedCombination,
  Supports,
} from '../statics/types.ts';
import type { JoinLimits } from '../topology/limits.ts';
import type { Family } from '../topology/regularity/families.ts';
import { barId, extreme, memberId, nodeId, point } from './assemble/names.ts';
import {
  idleBars,
  oneWayBars,
  resultAsked,
  resultBuckling,
  resultCase,
  resultCombination,
  resultHold,
} from './assemble/solution.ts';
import { resultStability } from './assemble/stability.ts';
import { resultSchedules } from './schedules/result-schedules.ts';

/** Everything a run found, by index; the result says the same by name. */
export interface RunRecord {
  readonly generator: Result['generator'];
  readonly model: Result['model'];
  readonly gridLines: readonly GridLine[];
  readonly members: readonly Member[];
  /** Names where a member's middle is. */
  readonly placeOf: PlaceNamer;
  readonly truss: Truss;
  readonly supports: Supports;
  readonly stability: Judgement;
  readonly families: readonly Family[];
  readonly findings: readonly Finding[];
  readonly cases: readonly SolvedCase[];
  /** What was put on the truss in each case, by name. */
  readonly applied: readonly LoadCase[];
  readonly combinations: readonly SolvedCombination[];
  readonly oneWay: OneWay;
  readonly asked: readonly AskedLoad[];
  readonly combining?: Result['combining'];
  readonly envelope: readonly BarEnvelope[];
  readonly holds: readonly HoldForce[];
  readonly idle: IdleBars;
  /** What was loaded for imperfections; null where nothing was. */
  readonly imperfections: string | null;
  /** Null where the model's own view says which points are shared. */
  readonly limits: JoinLimits | null;
  readonly eccentricities: readonly EccentricityMoment[];
  readonly bending: readonly BarBending[];
  readonly analysis: Result['analysis'];
  readonly buckling: BucklingJudgement;
}

/** The result of CONTRACT section 3. */
export function assembleResult(run: RunRecord): Result {
  const { truss, members } = run;
  const fixed = fixedLetters(run.supports);
  const factorOf = (name: string) => {
    const criticalFactor = run.buckling.factors.get(name);
    return criticalFactor === undefined ? {} : { criticalFactor };
  };
  const result: Result = {
    format: 'pinwright-result',
    version: 1,
    generator: run.generator,
    caution: run.imperfections === null ? CAUTION : CAUTION_WITH_SWAY,
    units: { length: 'm', force: 'N', stress: 'Pa' },
    model: run.model,
    ...(run.gridLines.length === 0 ? {} : { grid: run.gridLines.map(resultGridLine) }),
    members: members.map((member, index) => resultMember(member, index, run)),
    nodes: truss.nodes.map((node, index) => ({
      id: nodeId(index),
      at: point(node.at),
      members: [...new Set(node.members.map((member) => members[member].globalId))],
      fixed: fixed.get(index) ?? '',
      place: node.place,
      carriedBy: node.carriedBy && { bar: barId(node.carriedBy.bar), t: node.carriedBy.t },
      ...(node.joining === undefined ? {} : { joinedBy: [...node.joining.by] }),
    })),
    bars: truss.bars.map((bar, index) => resultBar(bar, index, members)),
    families: run.families.map((family) => ({
      ...family,
      members: family.members.map((member) => members[member].globalId),
    })),
    findings: run.findings.map((finding) => ({
      ...finding,
      members: concerned(finding, truss, members),
      nodes: finding.nodes.map(nodeId),
      at: finding.at && point(finding.at),
    })),
    stability: resultStability(run.stability),
    cases: run.cases.map((one) => ({
      ...resultCase(one, run.applied),
      ...(run.combinations.length === 0 ? factorOf(one.name) : {}),
    })),
    combinations: run.combinations.map((one) => ({ ...resultCombination(one), ...factorOf(one.name) })),
    analysis: run.analysis,
    ...resultBuckling(run.buckling),
    ...(run.asked.length === 0 ? {} : { asked: run.asked.map(resultAsked) }),
    ...oneWayBars(run.oneWay),
    ...(run.combining === undefined ? {} : { combining: run.combining }),
    envelope: run.envelope.map(({ bar, tension, compression }) => ({
      bar: barId(bar),
      tension: extreme(tension),
      compression: extreme(compression),
    })),
    checks: [],
    ...resultSupports(run.supports),
    ...idleBars(run.idle),
    ...(run.imperfections === null ? {} : { imperfections: run.imperfections }),
    ...(run.holds.length === 0 ? {} : { holds: run.holds.map((hold) => resultHold(hold, run.supports)) }),
    ...(run.limits === null ? {} : { joining: resultLimits(run.limits) }),
    eccentricities: run.eccentricities.map(({ node, eccentricity: { of, member, e }, moment, from }) => ({
      node: nodeId(node),
      of,
      member: members[member].globalId,
      e,
      moment,
      from,
    })),
    bending: run.bending.map(({ bar, node, ...rest }) => ({ bar: barId(bar), node: nodeId(node), ...rest })),
  };
  return { ...result, ...resultSchedules(result) };
}

function resultLimits({ reach, offset }: JoinLimits): NonNullable<Result['joining']> {
  const limit = ({ set, bySections }: JoinLimits['reach']): NonNullable<Result['joining']>['reach'] => ({
    set: set.map((one) => ({ ...one })),
    bySections: bySections && [bySections[0], bySections[1]],
  });
  return { reach: limit(reach), offset: limit(offset) };
}

/** A finding of statics names nodes; the reader of the model knows members. */
function concerned({ members: named, nodes }: Finding, truss: Truss, members: readonly Member[]): string[] {
  if (named.length > 0) return [...named];
  const met = nodes.flatMap((node) => truss.nodes[node].members.map((member) => members[member].globalId));
  return [...new Set(met)];
}

function resultGridLine({ tag, from, to }: GridLine): NonNullable<Result['grid']>[number] {
  return { tag, from: point(from), to: point(to) };
}

function resultMember(member: Member, index: number, { truss, placeOf }: RunRecord): Result['members'][number] {
  const { shift, turn } = truss.faith[index];
  return {
    id: memberId(index),
    globalId: member.globalId,
    part: member.part,
    name: member.name,
    tag: member.tag,
    class: member.class,
    predefinedType: member.predefinedType,
    type: member.type,
    assembly: member.assembly,
    storey: member.storey,
    place: placeOf(between(...member.axis, 0.5)),
    axisFrom: member.axisFrom,
    axis: [point(member.axis[0]), point(member.axis[1])],
    zAxis: point(member.zAxis),
    shift,
    turn,
    section: member.section && resultSection(member.section),
    material: { ...member.material },
  };
}

function resultSection({ depth, width, thickness, ...section }: NonNullable<Member['section']>) {
  return section;
}

function resultBar(bar: Truss['bars'][number], index: number, members: readonly Member[]): Result['bars'][number] {
  const own = bar.members.map((member) => members[member].globalId);
  return {
    id: barId(index),
    name: bar.name,
    member: own[0],
    ...(own.length > 1 ? { members: own } : {}),
    from: nodeId(bar.from),
    to: nodeId(bar.to),
    length: bar.length,
    axialStiffness: bar.stiffnessEA,
  };
}

/** Letters of the directions along the world axes that are rigidly held. */
function fixedLetters({ restraints }: Supports): Map<number, string> {
  const letters = new Map<number, string>();
  for (const [k, letter] of ['x', 'y', 'z'].entries()) {
    for (const { node, direction } of restraints) {
      if (Math.abs(direction[k]) > 1 - 1e-12) letters.set(node, (letters.get(node) ?? '') + letter);
    }
  }
  return letters;
}

function resultSupports({ restraints, springs }: Supports): Pick<Result, 'supports'> {
  const nodes = [...new Set([...restraints, ...springs].map(({ node }) => node))].sort((a, b) => a - b);
  if (nodes.length === 0) return {};
  const supports = nodes.map((node) => ({
    node: nodeId(node),
    fixed: restraints.filter((one) => one.node === node).map(({ direction }) => point(direction)),
    springs: springs
      .filter((one) => one.node === node)
      .map(({ direction, stiffness }) => ({ direction: point(direction), stiffness })),
  }));
  return { supports };
}
