import type { Finding } from '../../../src/domain/finding.ts';
import type { Member } from '../../../src/domain/member.ts';
import type { Truss } from '../../../src/domain/truss.ts';
import { distance } from '../../../src/domain/vector.ts';
import { FAULT_KINDS, type Fault, type FaultKind } from './fault-tools.ts';
import { type FaultyRoof, plantFaults } from './faults.ts';
import { membersOf, type Roof, randomRoof } from './random-roof.ts';
import { type Difference, differences, truthOf } from './truth.ts';

/** The stage under test, as `joinMembers` is called. */
export type Join = (
  members: readonly Member[],
  options: object,
  context: { readonly placeOf: () => null; readonly supportedNodes: (truss: Truss) => ReadonlySet<number> },
) => { readonly truss: Truss; readonly findings: readonly Finding[] };

export interface RoofResult {
  readonly members: readonly Member[];
  readonly truss: Truss;
  readonly findings: readonly Finding[];
}

export function joined(roof: Roof, join: Join): RoofResult {
  const members = membersOf(roof);
  const context = { placeOf: () => null, supportedNodes: (truss: Truss) => supportedNodes(roof, truss) };
  return { members, ...join(members, {}, context) };
}

/** The node nearest to each bearing of the roof, within a column's size. */
export function supportedNodes(roof: Roof, truss: Truss): Set<number> {
  const found = new Set<number>();
  for (const at of roof.supports) {
    let best = -1;
    let least = 0.4;
    for (const [i, node] of truss.nodes.entries()) {
      const gap = distance(node.at, at);
      if (gap < least) [best, least] = [i, gap];
    }
    if (best >= 0) found.add(best);
  }
  return found;
}

/** A finding is about a fault when it names one of its members or lies within this of its place, m. */
const NEAR = 1;

const isAbout = (finding: Finding, fault: Fault): boolean =>
  finding.members.some((mark) => fault.marks.includes(mark)) ||
  (finding.at !== null && fault.places.some((place) => distance(place, finding.at!) <= NEAR));

/** A light member that met a faulty one (a sag rod at a purlin drawn too high) may rightly be named in its place. */
function isNextTo(finding: Finding, fault: Fault, roof: Roof): boolean {
  const met = [...roof.joints.values()].filter(({ meetings }) => fault.marks.some((mark) => meetings.has(mark)));
  return finding.members.some((mark) => LIGHT.test(mark) && met.some(({ meetings }) => meetings.has(mark)));
}
/** Marks of sag rods, bracing and ties. */
const LIGHT = /^(SR|RB|BB|BT|EB)/;

/** Found is only what is said because of the fault: not what the same roof was told without it. */
export function isFound(fault: Fault, findings: readonly Finding[], before: ReadonlySet<string>): boolean {
  return findings.some((f) => fault.codes.includes(f.code) && isAbout(f, fault) && !before.has(spelling(f)));
}

const spelling = ({ code, members, at }: Finding): string =>
  [code, [...members].sort().join(' '), at?.map((x) => x.toFixed(2)).join(' ')].join('|');

/** What a sound roof may rightly be told: tails in the air, crossings left apart, carried nodes, pairs. */
export function isRight(finding: Finding, roof: Roof): boolean {
  if (finding.severity === 'note') return true;
  const free = [...roof.joints.values()].filter((joint) => joint.free);
  const names = (mark: string | undefined) => mark !== undefined && finding.members.includes(mark);
  switch (finding.code) {
    case 'loose-end':
      return free.some((joint) => [...joint.meetings.keys()].some(names));
    case 'crossing-apart':
      return roof.crossings.some(([a, b]) => names(a) && names(b));
    case 'bends-between-nodes':
      return truthOf(roof).nodes.some((n) => n.carriedBy !== null && n.marks.some(names));
    default:
      return false;
  }
}

export interface Score {
  readonly roofs: number;
  readonly planted: Readonly<Record<FaultKind, { planted: number; found: number }>>;
  readonly findings: ReadonlyMap<string, { right: number; wrong: number }>;
  readonly missed: readonly { readonly seed: number; readonly fault: Fault }[];
  readonly falseFindings: readonly { readonly seed: number; readonly finding: Finding }[];
  /** Of the roofs without faults. */
  readonly sound: readonly {
    readonly roof: Roof;
    readonly nodes: number;
    readonly bars: number;
    readonly differences: readonly Difference[];
    readonly findings: readonly Finding[];
  }[];
}

/** Joins every seed's roof once as drawn and once with up to ten faults. */
export function score(seeds: readonly number[], join: Join): Score {
  const planted = Object.fromEntries(FAULT_KINDS.map((kind) => [kind, { planted: 0, found: 0 }])) as Score['planted'];
  const counts = new Map<string, { right: number; wrong: number }>();
  const missed: { seed: number; fault: Fault }[] = [];
  const falseFindings: { seed: number; finding: Finding }[] = [];
  const sound = seeds.map((seed) => {
    const roof = randomRoof(seed);
    const { members, truss, findings } = joined(roof, join);
    const truth = truthOf(roof);
    const faulty: FaultyRoof = plantFaults(roof, seed, seed % 11);
    const result = joined(faulty.roof, join);
    const before = new Set(findings.map(spelling));
    for (const fault of faulty.faults) {
      planted[fault.kind].planted++;
      if (isFound(fault, result.findings, before)) planted[fault.kind].found++;
      else missed.push({ seed, fault });
    }
    for (const finding of result.findings) {
      const isGood =
        isRight(finding, roof) ||
        faulty.faults.some((fault) => isAbout(finding, fault) || isNextTo(finding, fault, roof));
      const count = counts.get(finding.code) ?? { right: 0, wrong: 0 };
      counts.set(finding.code, count);
      if (isGood) count.right++;
      else {
        count.wrong++;
        falseFindings.push({ seed, finding });
      }
    }
    const wrong = findings.filter((finding) => !isRight(finding, roof));
    return {
      roof,
      nodes: truth.nodes.length,
      bars: truth.bars.length,
      differences: differences(roof, members, truss),
      findings: wrong,
    };
  });
  return { roofs: seeds.length, planted, findings: counts, missed, falseFindings, sound };
}
