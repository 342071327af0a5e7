import { findEmptyMemberSelectors, findEmptyNodeSelectors } from '../../brief/selector-empty.ts';
import { selectMembers } from '../../brief/selectors/select-members.ts';
import { selectNodes } from '../../brief/selectors/select-nodes.ts';
import type { Brief, CaseRule, LoadRule } from '../../brief/types.ts';
import { GRAVITY } from '../../domain/constants.ts';
import { type Finding, finding } from '../../domain/finding.ts';
import type { Member } from '../../domain/member.ts';
import type { Truss } from '../../domain/truss.ts';
import { ORIGIN, scale, type Vec3 } from '../../domain/vector.ts';
import { count } from '../../domain/verdict.ts';
import { millimetres } from '../../domain/words.ts';
import type { BarStretch, LoadCase } from '../types.ts';
import { type AreaCoverage, type AreaRule, addAreaLoad } from './area-load.ts';
import type { AskedLoad } from './asked.ts';
import { addLineLoad } from './line-load.ts';
import { NodeForces } from './node-forces.ts';
import { addPointLoad } from './point-load.ts';
import { addSelfWeight, weighedMass } from './self-weight.ts';
import { stretchByMisfit, stretchByWarmth } from './strains.ts';

/** The area that one area load of the brief has covered, and its resultant. */
export interface Coverage extends AreaCoverage {
  readonly case: string;
  readonly line: number;
}

export interface BuiltCases {
  /** One a case of the brief, in its order, empty ones included. */
  readonly cases: readonly LoadCase[];
  readonly coverage: readonly Coverage[];
  /** What each load of the brief asks for and what was applied of it. */
  readonly asked: readonly AskedLoad[];
  readonly findings: readonly Finding[];
}

/**
 * Turns the cases of the brief into forces at nodes, one entry a loaded node.
 * @param members those that the truss was made of, in the same order
 */
export function buildCases(truss: Truss, members: readonly Member[], brief: Pick<Brief, 'cases'>): BuiltCases {
  const built = brief.cases.map((rule) => buildCase(truss, members, rule));
  return {
    cases: built.map(({ loadCase }) => loadCase),
    coverage: built.flatMap(({ coverage }) => coverage),
    asked: built.flatMap(({ asked }) => asked),
    findings: built.flatMap(({ findings }) => findings),
  };
}

function buildCase(truss: Truss, members: readonly Member[], rule: CaseRule) {
  const forces = new NodeForces();
  const coverage: Coverage[] = [];
  const findings: Finding[] = [];
  const asked: AskedLoad[] = [];
  const freeStretch: BarStretch[] = [];
  const notPut: string[] = [];
  for (const load of rule.loads) {
    findings.push(...findEmptySelectors(truss, members, load));
    const own = new NodeForces();
    const put = putLoad(own, truss, members, rule, load);
    forces.addAll(own);
    asked.push({ case: rule.name, line: load.line, what: put.what, asked: put.asked, applied: own.sum() });
    if (put.coverage) coverage.push(put.coverage);
    freeStretch.push(...(put.freeStretch ?? []));
    findings.push(...(put.findings ?? []));
    if (put.fault) notPut.push(`line ${load.line} of the brief: ${put.fault}`);
  }
  const loads = forces.toLoads();
  // Where a load could not be put on the truss, that has been said.
  const isSaid = findings.some(({ code }) => code === 'no-load');
  if (loads.length === 0 && freeStretch.length === 0 && !isSaid) findings.push(sayEmpty(rule));
  const { name, nature, category, alternative } = rule;
  const more = {
    ...(category && { category }),
    ...(alternative && { alternative }),
    ...(freeStretch.length > 0 && { freeStretch }),
    ...(notPut.length > 0 && { incomplete: notPut.join('; ') }),
  };
  return { loadCase: { name, nature, ...more, loads }, coverage, asked, findings };
}

/** What became of one load. */
interface Put {
  readonly what: string;
  readonly asked: Vec3 | null;
  readonly coverage?: Coverage | null;
  readonly freeStretch?: readonly BarStretch[];
  readonly findings?: readonly Finding[];
  readonly fault?: string | null;
}

function putLoad(forces: NodeForces, truss: Truss, members: readonly Member[], rule: CaseRule, load: LoadRule): Put {
  switch (load.kind) {
    case 'selfWeight': {
      addSelfWeight(forces, truss, load.factor);
      const asked: Vec3 = [0, 0, -load.factor * GRAVITY * weighedMass(truss)];
      return { what: load.factor === 1 ? 'self weight' : `self weight x ${load.factor}`, asked };
    }
    case 'point': {
      const nodes = selectNodes(truss, members, load.at);
      addPointLoad(forces, nodes, load.force);
      return { what: `point load, ${count(nodes.length, 'node')}`, asked: scale(load.force, nodes.length) };
    }
    case 'area':
      return coverArea(forces, truss, members, rule, load);
    case 'line': {
      const chosen = selectMembers(members, load.on);
      const { bars, metres } = addLineLoad(forces, truss, chosen, load.force, load.per);
      const put = { what: `line load, ${metres.toFixed(1)} m`, asked: scale(load.force, metres) };
      return chosen.length > 0 && bars === 0 ? { ...put, ...noBar(rule, load) } : put;
    }
    default: {
      const chosen = selectMembers(members, load.on);
      const isWarmth = load.kind === 'temperature';
      const freeStretch = isWarmth
        ? stretchByWarmth(truss, chosen, load.change)
        : stretchByMisfit(truss, chosen, load.by);
      const size = isWarmth ? `${load.change} K` : millimetres(load.by);
      const put = { what: `${isWarmth ? 'temperature' : 'misfit'}, ${size}`, asked: ORIGIN, freeStretch };
      return chosen.length > 0 && freeStretch.length === 0 ? { ...put, ...noBar(rule, load) } : put;
    }
  }
}

function noBar(rule: CaseRule, load: LoadRule): Pick<Put, 'findings' | 'fault'> {
  const why = 'its members have no bar in the truss';
  return { findings: [sayNotPut(rule, load, why, [])], fault: why };
}

function findEmptySelectors(truss: Truss, members: readonly Member[], load: LoadRule): Finding[] {
  if (load.kind === 'selfWeight') return [];
  if ('on' in load) return findEmptyMemberSelectors(members, load.on);
  return findEmptyNodeSelectors(truss, members, load.kind === 'area' ? load.over : load.at);
}

function coverArea(forces: NodeForces, truss: Truss, members: readonly Member[], rule: CaseRule, load: AreaRule): Put {
  const what = load.called ?? 'area load';
  const nodes = selectNodes(truss, members, load.over);
  if (nodes.length === 0) return { what, asked: null };
  const covered = addAreaLoad(forces, truss, members, nodes, load);
  if ('fault' in covered) {
    const { fault, nodes: shown } = covered;
    return { what, asked: null, fault, findings: [sayNotPut(rule, load, fault, shown)] };
  }
  const findings = covered.formedBy === 'bars' ? [] : [saySharedWithinOutline(rule, load, covered)];
  for (const opening of covered.openings) findings.push(sayOpening(truss, rule, load, opening));
  if (covered.askedPlanArea !== null && differ(covered.askedPlanArea, covered.planArea))
    findings.push(sayBeyond(rule, load, covered.askedPlanArea, covered.planArea));
  return { what, asked: covered.asked, coverage: { case: rule.name, line: load.line, ...covered }, findings };
}

/** Share by which the area of an outline and what the bars cover of it may differ by drawing accuracy. */
const SAME_AREA = 0.01;

const differ = (a: number, b: number): boolean => Math.abs(a - b) > SAME_AREA * Math.max(Math.abs(a), Math.abs(b));

function sayBeyond(rule: CaseRule, load: LoadRule, asked: number, covered: number): Finding {
  return finding(
    'surface-skipped',
    `The outline of line ${load.line} of the brief, case ${rule.name}, has ${asked.toFixed(1)} m2 in plan, and the bars between the nodes cover ` +
      `${covered.toFixed(1)} m2 of it; the load of the rest is not on the truss.`,
    'Choose nodes all over the outline, or give the roof beyond the last nodes by `edge:`.',
    { severity: 'warning' },
  );
}

function sayNotPut(rule: CaseRule, load: LoadRule, why: string, nodes: readonly number[]): Finding {
  const message = `The load of line ${load.line} of the brief, case ${rule.name}, was not put on the truss: ${why}.`;
  return finding('no-load', message, 'Choose other nodes or members for this load, or divide it into several.', {
    nodes,
  });
}

function saySharedWithinOutline(rule: CaseRule, load: LoadRule, covered: AreaCoverage): Finding {
  const area = covered.planArea.toFixed(1);
  return finding(
    'surface-skipped',
    `The bars between the nodes of line ${load.line} of the brief, case ${rule.name}, close too few cells; the load was shared over ` +
      `the convex outline of the nodes instead, ${area} m2 in plan.`,
    'Compare the area with the drawing; if it is wrong, choose nodes that bars join all round.',
    { severity: 'warning' },
  );
}

function sayOpening(
  truss: Truss,
  rule: CaseRule,
  load: LoadRule,
  { corners, planArea }: AreaCoverage['openings'][number],
): Finding {
  const first = truss.nodes[corners[0]];
  return finding(
    'surface-skipped',
    `A field of ${planArea.toFixed(0)} m2 in plan with ${corners.length} corners, far larger than the panels round it, was taken as an ` +
      `opening: the load of line ${load.line} of the brief, case ${rule.name}, is not on it.`,
    'If it is covered, put its load on by another rule, as point or line loads on what carries it.',
    { severity: 'warning', nodes: corners, at: first.at, place: first.place },
  );
}

function sayEmpty(rule: CaseRule): Finding {
  return finding(
    'no-load',
    `Case ${rule.name} (line ${rule.line} of the brief) puts no load on the truss.`,
    'Give the case its loads, or take it out.',
  );
}
