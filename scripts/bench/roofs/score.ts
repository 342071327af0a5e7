import type { Finding } from '../../../src/domain/finding.ts';
import type { Member } from '../../../src/domain/member.ts';
import type { Truss } from '../../../src/domain/truss.ts';
import { distance, type Vec3 } from '../../../src/domain/vector.ts';
import type { Supports } from '../../../src/statics/types.ts';
import type { Joined } from '../../../src/topology/join-members.ts';
import { FAULT_KINDS, type Fault, type FaultKind } from './fault-tools.ts';
import { type FaultyRoof, plantFaults } from './faults.ts';
import { membersOf, type Roof, randomRoof } from './random-roof.ts';
import { type Difference, differences, truthOf } from './truth.ts';

/** The stage under test, as `joinMembers` is called. */
export type Join = (
  members: readonly Member[],
  options: object,
  context: { readonly placeOf: () => null; readonly supportedNodes: (truss: Truss) => ReadonlySet<number> },
) => Pick<Joined, 'truss' | 'findings' | 'families'>;

/** The stages that see faults: joining what is not joined, judging what is missing. */
export interface Stages {
  readonly join: Join;
  readonly judge: (truss: Truss, supports: Supports) => { readonly findings: readonly Finding[] };
}

export interface RoofResult {
  readonly members: readonly Member[];
  readonly truss: Truss;
  readonly findings: readonly Finding[];
  readonly families: Joined['families'];
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

/** How often a kind was planted, found by joining, and shown by what else is told: a mechanism there, an odd length. */
export interface Found {
  planted: number;
  found: number;
  byMechanism: number;
  byLength: number;
}

export interface Score {
  readonly roofs: number;
  readonly planted: Readonly<Record<FaultKind, Found>>;
  /** New findings of one roof that name the same member at the same place under another code. */
  readonly toldTwice: readonly { readonly seed: number; readonly findings: readonly [Finding, Finding] }[];
  readonly findings: ReadonlyMap<string, { right: number; wrong: number }>;
  /** The codes that tell each kind, of the faults planted. */
  readonly codes: Readonly<Record<FaultKind, ReadonlySet<string>>>;
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
export function score(seeds: readonly number[], stages: Stages, roofOf: (seed: number) => Roof = randomRoof): Score {
  const { join } = stages;
  const toldTwice: { seed: number; findings: [Finding, Finding] }[] = [];
  const planted = Object.fromEntries(
    FAULT_KINDS.map((kind) => [kind, { planted: 0, found: 0, byMechanism: 0, byLength: 0 }]),
  ) as Score['planted'];
  const codes = Object.fromEntries(FAULT_KINDS.map((kind) => [kind, new Set<string>()])) as Record<
    FaultKind,
    Set<string>
  >;
  const counts = new Map<string, { right: number; wrong: number }>();
  const missed: { seed: number; fault: Fault }[] = [];
  const falseFindings: { seed: number; finding: Finding }[] = [];
  const sound = seeds.map((seed) => {
    const roof = roofOf(seed);
    const sound = joined(roof, join);
    const { members, truss, findings } = sound;
    const truth = truthOf(roof);
    const faulty: FaultyRoof = plantFaults(roof, seed, seed % 11);
    const result = joined(faulty.roof, join);
    const before = new Set(findings.map(spelling));
    const isMobile = mobility(roof, sound, stages);
    const isMobileNow = mobility(faulty.roof, result, stages);
    const odd = oddMarks(sound);
    const oddNow = oddMarks(result);
    const fresh = result.findings.filter((one) => !before.has(spelling(one)));
    toldTwice.push(...doublesOf(fresh).map((pair) => ({ seed, findings: pair })));
    for (const fault of faulty.faults) {
      planted[fault.kind].planted++;
      for (const code of fault.codes) codes[fault.kind].add(code);
      if (isFound(fault, result.findings, before)) planted[fault.kind].found++;
      else missed.push({ seed, fault });
      if (fault.places.some((place) => isMobileNow(place) && !isMobile(place))) planted[fault.kind].byMechanism++;
      if (fault.marks.some((mark) => oddNow.has(mark) && !odd.has(mark))) planted[fault.kind].byLength++;
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
  return { roofs: seeds.length, planted, toldTwice, codes, findings: counts, missed, falseFindings, sound };
}

/** Whether a mechanism moves the node nearest to a place. */
function mobility(roof: Roof, { truss }: RoofResult, { judge }: Stages): (place: Vec3) => boolean {
  const restraints = [...supportedNodes(roof, truss)].flatMap((node) =>
    (
      [
        [1, 0, 0],
        [0, 1, 0],
        [0, 0, 1],
      ] as const
    ).map((direction) => ({ node, direction })),
  );
  const { findings } = judge(truss, { restraints, springs: [] });
  const mobile = new Set(findings.filter(({ code }) => code === 'moves-freely').flatMap(({ nodes }) => nodes));
  return (place) => truss.nodes.some(({ at }, node) => mobile.has(node) && distance(at, place) <= NEAR);
}

const oddMarks = ({ families, members }: RoofResult): Set<string> =>
  new Set(
    families
      .filter(({ oddBeside }) => oddBeside !== null)
      .flatMap((family) => family.members.map((i) => members[i].globalId)),
  );

/** Notes group many places and tell no fault. */
function doublesOf(findings: readonly Finding[]): [Finding, Finding][] {
  const told = findings.filter(({ severity, at }) => severity !== 'note' && at !== null);
  return told.flatMap((one, i) =>
    told
      .slice(i + 1)
      .filter((other) => other.code !== one.code && one.members[0] === other.members[0])
      .filter((other) => distance(one.at as Vec3, other.at as Vec3) < SAME_PLACE)
      .map((other): [Finding, Finding] => [one, other]),
  );
}

/** m: one end of one member. */
const SAME_PLACE = 0.3;
