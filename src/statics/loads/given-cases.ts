import { nodeFinder, SAME_POINT } from '../../brief/point-finder.ts';
import { type Finding, finding } from '../../domain/finding.ts';
import { pushTo } from '../../domain/group.ts';
import type { Member } from '../../domain/member.ts';
import type { Truss, TrussBar } from '../../domain/truss.ts';
import { between, distance, dot, scale, subtract, unit, type Vec3 } from '../../domain/vector.ts';
import type { GivenCase, GivenLoad } from '../../importer/given.ts';
import type { BarStretch, Settlement } from '../types.ts';
import type { BuiltCases } from './build-cases.ts';
import { NodeForces } from './node-forces.ts';
import { addWeight } from './self-weight.ts';
import { shareLineLoad } from './share-line-load.ts';

type PointLoad = Extract<GivenLoad, { kind: 'point' }>;
type LineLoad = Extract<GivenLoad, { kind: 'line' }>;

/**
 * Turns the load cases that the model itself gives into forces at nodes. A force on a bar away from its ends, and a load along
 * it, go to the bar's ends by the lever rule, as a simply supported bar hands them on.
 * @param members those that the truss was made of, in the same order
 */
export function buildGivenCases(truss: Truss, members: readonly Member[], cases: readonly GivenCase[]): BuiltCases {
  const place = new Placing(truss, members);
  const built = cases.map((given) => place.caseOf(given));
  return {
    cases: built.map(({ loadCase }) => loadCase),
    coverage: [],
    asked: [],
    findings: built.flatMap(({ findings }) => findings),
  };
}

class Placing {
  private readonly truss: Truss;
  private readonly nodeAt: (at: Vec3) => number | null;
  private readonly barsOf = new Map<string, TrussBar[]>();
  private readonly indexOf: ReadonlyMap<TrussBar, number>;

  constructor(truss: Truss, members: readonly Member[]) {
    this.truss = truss;
    this.nodeAt = nodeFinder(truss);
    this.indexOf = new Map(truss.bars.map((bar, index) => [bar, index]));
    for (const bar of truss.bars) for (const member of bar.members) pushTo(this.barsOf, members[member].globalId, bar);
  }

  caseOf({ name, nature, loads: given }: GivenCase) {
    const forces = new NodeForces();
    const betweenNodes: Vec3[] = [];
    const lost: { at: Vec3; members: string[] }[] = [];
    const freeStretch: BarStretch[] = [];
    const settlements: Settlement[] = [];
    for (const load of given) {
      if (load.kind === 'selfWeight') addWeight(forces, this.truss, load.factors);
      else if (load.kind === 'line') {
        if (!this.putLine(forces, load)) lost.push({ at: between(load.from, load.to, 0.5), members: [load.globalId] });
      } else if (load.kind === 'temperature') freeStretch.push(...this.warmed(load));
      else if (load.kind === 'settlement') {
        const node = this.nodeAt(load.at);
        if (node === null) lost.push({ at: load.at, members: [] });
        else settlements.push({ node, movement: load.movement });
      } else {
        const where = this.putPoint(forces, load);
        if (where === 'bar') betweenNodes.push(load.at);
        if (where === null) lost.push({ at: load.at, members: [] });
      }
    }
    const loads = forces.toLoads();
    const findings: Finding[] = [];
    if (betweenNodes.length > 0) findings.push(sayBetweenNodes(name, betweenNodes));
    if (lost.length > 0) findings.push(sayLost(name, lost));
    else if (loads.length + freeStretch.length + settlements.length === 0) findings.push(sayEmpty(name));
    const moves = {
      ...(freeStretch.length === 0 ? {} : { freeStretch }),
      ...(settlements.length === 0 ? {} : { settlements }),
    };
    return { loadCase: { name, nature, loads, ...moves }, findings };
  }

  private warmed({ globalId, change }: Extract<GivenLoad, { kind: 'temperature' }>): BarStretch[] {
    return (this.barsOf.get(globalId) ?? []).map((bar) => ({
      bar: this.indexOf.get(bar)!,
      by: bar.expansion * change * bar.length,
    }));
  }

  private putPoint(forces: NodeForces, { at, force }: PointLoad): 'node' | 'bar' | null {
    const node = this.nodeAt(at);
    if (node !== null) {
      forces.add(node, force);
      return 'node';
    }
    const bar = this.truss.bars.find((candidate) => this.distanceTo(candidate, at) <= SAME_POINT);
    if (bar === undefined) return null;
    const t = this.along(bar, at) / bar.length;
    forces.add(bar.from, scale(force, 1 - t));
    forces.add(bar.to, scale(force, t));
    return 'bar';
  }

  /** Whether the whole of the load lies on bars of its member. */
  private putLine(forces: NodeForces, load: LineLoad): boolean {
    const length = distance(load.from, load.to);
    let covered = 0;
    for (const bar of this.barsOf.get(load.globalId) ?? []) {
      const [s0, s1] = [this.along(bar, load.from), this.along(bar, load.to)];
      covered += shareLineLoad(forces, bar, [s0, s1], [load.forceFrom, load.forceTo]);
    }
    return covered > length - SAME_POINT * 2;
  }

  /** How far along a bar a point lies, m; outside of it below 0 or beyond its length. */
  private along(bar: TrussBar, at: Vec3): number {
    const from = this.truss.nodes[bar.from].at;
    const direction = unit(subtract(this.truss.nodes[bar.to].at, from));
    return direction === null ? 0 : dot(subtract(at, from), direction);
  }

  private distanceTo(bar: TrussBar, at: Vec3): number {
    const [from, to] = [this.truss.nodes[bar.from].at, this.truss.nodes[bar.to].at];
    const t = Math.min(Math.max(this.along(bar, at) / bar.length, 0), 1);
    return distance(at, between(from, to, t));
  }
}

function sayBetweenNodes(name: string, points: readonly Vec3[]): Finding {
  const many = points.length > 1;
  return finding(
    'bends-between-nodes',
    `${many ? `${points.length} forces` : 'A force'} of the model's case ${name} ${many ? 'act' : 'acts'} on a bar away from its ends; ` +
      'shared between the ends, and the bending is not seen.',
    'Judge the bending of these bars by hand.',
    { at: points[0] },
  );
}

function sayLost(name: string, lost: readonly { at: Vec3; members: string[] }[]): Finding {
  const many = lost.length > 1;
  return finding(
    'no-load',
    `${many ? `${lost.length} loads` : 'A load'} of the model's case ${name} ${many ? 'lie' : 'lies'} wholly or partly on no bar of the truss, and that part is not taken.`,
    'Look whether the members they act on are in scope and read.',
    { at: lost[0].at, members: [...new Set(lost.flatMap(({ members }) => members))] },
  );
}

function sayEmpty(name: string): Finding {
  return finding(
    'no-load',
    `The model's case ${name} puts no load on the truss.`,
    'Give the case its loads in the model, or all cases in the brief.',
  );
}
