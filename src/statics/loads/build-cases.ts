import { findEmptyMemberSelectors, findEmptyNodeSelectors } from '../../brief/selector-empty.ts';
import { selectMembers } from '../../brief/selectors/select-members.ts';
import { selectNodes } from '../../brief/selectors/select-nodes.ts';
import type { Brief, CaseRule, LoadRule } from '../../brief/types.ts';
import { type Finding, finding } from '../../domain/finding.ts';
import type { Member } from '../../domain/member.ts';
import type { Truss } from '../../domain/truss.ts';
import type { LoadCase } from '../types.ts';
import { type AreaCoverage, type AreaRule, addAreaLoad } from './area-load.ts';
import { addLineLoad } from './line-load.ts';
import { NodeForces } from './node-forces.ts';
import { addPointLoad } from './point-load.ts';
import { addSelfWeight } from './self-weight.ts';

/** The area that one area load of the brief has covered, and its resultant. */
export interface Coverage extends AreaCoverage {
  readonly case: string;
  readonly line: number;
}

export interface BuiltCases {
  /** One a case of the brief, in its order, empty ones included. */
  readonly cases: readonly LoadCase[];
  readonly coverage: readonly Coverage[];
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
    findings: built.flatMap(({ findings }) => findings),
  };
}

function buildCase(truss: Truss, members: readonly Member[], rule: CaseRule) {
  const forces = new NodeForces();
  const coverage: Coverage[] = [];
  const findings: Finding[] = [];
  const notPut: string[] = [];
  for (const load of rule.loads) {
    findings.push(...findEmptySelectors(truss, members, load));
    if (load.kind === 'selfWeight') addSelfWeight(forces, truss, load.factor);
    else if (load.kind === 'point') addPointLoad(forces, selectNodes(truss, members, load.at), load.force);
    else if (load.kind === 'line') {
      const chosen = selectMembers(members, load.on);
      const bars = addLineLoad(forces, truss, chosen, load.force, load.per);
      if (chosen.length > 0 && bars === 0) {
        const why = 'its members have no bar in the truss';
        findings.push(sayNotPut(rule, load, why, []));
        notPut.push(`line ${load.line} of the brief: ${why}`);
      }
    } else {
      const covered = coverArea(forces, truss, members, rule, load);
      if (covered.coverage !== null) coverage.push(covered.coverage);
      findings.push(...covered.findings);
      if (covered.fault !== null) notPut.push(`line ${load.line} of the brief: ${covered.fault}`);
    }
  }
  const loads = forces.toLoads();
  // Where a load could not be put on the truss, that has been said.
  const isSaid = findings.some(({ code }) => code === 'no-load');
  if (loads.length === 0 && !isSaid) findings.push(sayEmpty(rule));
  const incomplete = notPut.length === 0 ? {} : { incomplete: notPut.join('; ') };
  const { name, nature, category, alternative } = rule;
  const combining = { ...(category && { category }), ...(alternative && { alternative }) };
  return { loadCase: { name, nature, ...combining, loads, ...incomplete }, coverage, findings };
}

function findEmptySelectors(truss: Truss, members: readonly Member[], load: LoadRule): Finding[] {
  if (load.kind === 'selfWeight') return [];
  if (load.kind === 'line') return findEmptyMemberSelectors(members, load.on);
  return findEmptyNodeSelectors(truss, members, load.kind === 'area' ? load.over : load.at);
}

function coverArea(
  forces: NodeForces,
  truss: Truss,
  members: readonly Member[],
  rule: CaseRule,
  load: AreaRule,
): { coverage: Coverage | null; fault: string | null; findings: Finding[] } {
  const nodes = selectNodes(truss, members, load.over);
  if (nodes.length === 0) return { coverage: null, fault: null, findings: [] };
  const covered = addAreaLoad(forces, truss, members, nodes, load);
  if ('fault' in covered) {
    const { fault, nodes: shown } = covered;
    return { coverage: null, fault, findings: [sayNotPut(rule, load, fault, shown)] };
  }
  const findings = covered.formedBy === 'bars' ? [] : [saySharedWithinOutline(rule, load, covered)];
  for (const opening of covered.openings) findings.push(sayOpening(truss, rule, load, opening));
  return { coverage: { case: rule.name, line: load.line, ...covered }, fault: null, findings };
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
