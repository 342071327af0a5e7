import type { Finding } from '../../domain/finding.ts';
import type { Truss } from '../../domain/truss.ts';
import type { Vec3 } from '../../domain/vector.ts';
import { type Factor, factorise } from '../engine/factor.ts';
import { type Refined, solveRefined } from '../engine/refine.ts';
import { realStiffness } from '../model/elastic.ts';
import { elongationsOf } from '../model/elongation.ts';
import { imposedMovement } from '../model/imposed-movement.ts';
import { gatherForces, nodeMovements } from '../model/movement.ts';
import { buildSystem, type Problem, type System } from '../model/system.ts';
import { OneWayBars } from '../one-way/one-way-bars.ts';
import { oneWayRows } from '../one-way/one-way-rows.ts';
import { looseBars, notCarried } from '../one-way/words.ts';
import type { Judgement } from '../stability/assess-stability.ts';
import type { LoadCase, NodalForce, OneWay, SolvedCase, Supports } from '../types.ts';
import { type Balance, balanceJoints } from './balance.ts';
import { cleanOfModes } from './clean-of-modes.ts';
import { leaveOutSetAside } from './leave-out-set-aside.ts';
import { loadMovesIt, onRealNodes } from './load-moves-it.ts';
import { groupMotions, type MotionGroup } from './mode-groups.ts';
import { judgeSections, type SectionJudgement } from './sections.ts';
import { settlesBy } from './settles.ts';

export interface SolveOptions {
  /** Largest force a mode's pivot may have to give, as a share of the case's largest force, for the load to count as doing no work on it. */
  readonly workTolerance: number;
  /**
   * A load that does more work than that, and less than `leanTolerance` of the largest force, is carried where the bar forces bring the truss
   * back within `settling` (m): it does not hang quite straight, as drawn. What has no stable balance is left to the judgement of balance.
   */
  readonly leanTolerance: number;
  readonly settling: number;
  readonly oneWay: OneWay;
}

export const SOLVE_DEFAULTS: SolveOptions = {
  workTolerance: 1e-8,
  leanTolerance: 1e-7,
  settling: 0.01,
  oneWay: { tensionOnly: [], compressionOnly: [] },
};

export interface Solution {
  readonly cases: readonly SolvedCase[];
  readonly findings: readonly Finding[];
}

/** One case on the way: what acts, by component and row, and the forces with every bar working both ways. */
interface Work {
  readonly one: LoadCase;
  readonly loads: Float64Array;
  readonly imposed: Float64Array | null;
  readonly freeStretch: Float64Array | null;
  readonly gathered: Float64Array;
}

/** A truss on its supports, factored once; solves as many cases as asked, at different times. */
export class Solver {
  readonly #problem: Problem;
  readonly #stability: Judgement;
  readonly #settings: Omit<SolveOptions, 'oneWay'>;
  readonly #base: System;
  readonly #held: System;
  readonly #factor: Factor;
  readonly #sections: SectionJudgement;
  readonly #oneWay: OneWayBars | null;
  #groups: readonly MotionGroup[] | null | undefined;

  /** @param stability the judgement of this truss on these supports */
  constructor(truss: Truss, supports: Supports, stability: Judgement, options: Partial<SolveOptions> = {}) {
    const { oneWay, ...settings } = { ...SOLVE_DEFAULTS, ...options };
    this.#stability = stability;
    this.#settings = settings;
    const { pivots } = stability;
    const elastic = stability.elastic.with(truss);
    this.#base = elastic.system;
    this.#problem = { truss, supports, parts: this.#base.problem.parts };
    this.#held =
      pivots.length === 0 ? this.#base : buildSystem(this.#problem, pivots, realStiffness(truss), this.#base);
    this.#factor = pivots.length === 0 ? elastic.factor : factorise(this.#held.matrix);
    this.#sections = judgeSections(this.#problem, stability);
    const rows = oneWayRows(this.#base, oneWay);
    this.#oneWay = rows.length === 0 ? null : new OneWayBars(this.#held, this.#factor, rows);
  }

  /**
   * Bar forces, displacements and reactions of every case. Where the truss has mechanisms, their pivots are held: a case that leaves the pivots
   * without force does no work on any mode and is carried; another is refused, with `load-moves-it`.
   */
  solve(asked: readonly LoadCase[]): Solution {
    const { cases, findings } = leaveOutSetAside(this.#problem, asked);
    const works = cases.map((one) => this.#prepare(one));
    const answers = solveRefined(
      this.#held,
      this.#factor,
      works.map(({ gathered }) => gathered),
      works.map(({ freeStretch }) => freeStretch),
    );
    return { cases: works.map((work, i) => this.#finish(work, answers[i], findings)), findings };
  }

  #prepare(one: LoadCase): Work {
    const { truss } = this.#problem;
    const loads = componentsOf(truss, one.loads);
    const imposed = one.settlements?.length ? imposedMovement(this.#held.movement, one.settlements) : null;
    return {
      one,
      loads,
      imposed,
      freeStretch: this.#freeStretchOf(one, imposed),
      gathered: gatherForces(this.#held.movement, loads),
    };
  }

  /** A row pulled by its settling ends is one that would be as much shorter without force. */
  #freeStretchOf(one: LoadCase, imposed: Float64Array | null): Float64Array | null {
    const { elongations, problem } = this.#base;
    if (imposed === null && !one.freeStretch?.length) return null;
    const stretch =
      imposed === null
        ? new Float64Array(elongations.rows.count)
        : elongationsOf(problem.truss, elongations, imposed).map((e) => -e);
    const rowOf = new Map(elongations.bars.map((bar, row) => [bar, row]));
    for (const { bar, by } of one.freeStretch ?? []) {
      const row = rowOf.get(bar);
      if (row !== undefined) stretch[row] = stretch[row] + by;
    }
    return stretch;
  }

  #finish({ one, loads, imposed, freeStretch, gathered }: Work, linear: Refined, findings: Finding[]): SolvedCase {
    const { truss } = this.#problem;
    const { pivots } = this.#stability;
    const reason = one.incomplete
      ? `a load could not be put on the truss (${one.incomplete})`
      : this.#sections.refuse(one);
    if (reason !== null) return refusedCase(truss, one, reason);
    let answer = linear;
    let slack: readonly number[] = [];
    if (this.#oneWay !== null) {
      const found = this.#oneWay.slacken(linear, gathered, freeStretch, largestOf(linear.axial, loads));
      if ('stuck' in found) {
        const said = notCarried(truss, one, this.#barsOf(found.stuck));
        findings.push(said.finding);
        return refusedCase(truss, one, said.sentence);
      }
      ({ answer } = found);
      slack = this.#barsOf(found.slack);
    }
    const { q, axial } = answer;
    const balance = balanceJoints(this.#base, this.#held, pivots, axial, loads);
    const axialForce = this.#byBar(axial);
    if (!this.#isLeftAlone(balance, axialForce, loads)) {
      const moved = loadMovesIt(truss, this.#stability, one, loads, balance.pivotForces);
      findings.push(moved.finding);
      return refusedCase(truss, one, moved.sentence);
    }
    const found = nodeMovements(this.#held.movement, q);
    const moved = imposed === null ? found : found.map((v, i) => v + imposed[i]);
    return {
      ...headOf(one),
      refused: null,
      axialForce,
      displacement: this.#byNode(cleanOfModes(this.#base, this.#held, this.#factor, pivots, moved)),
      reactions: balance.reactions,
      residual: balance.largestForce > 0 ? balance.outOfBalance / balance.largestForce : 0,
      ...(this.#oneWay === null ? {} : { slack }),
    };
  }

  /** Whether the load does no work on any mode, or so little that the truss hangs straight after a hair's breadth. */
  #isLeftAlone({ pivotForces, largestForce }: Balance, axialForce: readonly (number | null)[], loads: Float64Array) {
    const { workTolerance, leanTolerance, settling } = this.#settings;
    const work = largestOf(pivotForces) / (largestForce || 1);
    if (work <= workTolerance) return true;
    if (work > leanTolerance) return false;
    const { truss } = this.#problem;
    if (this.#groups === undefined) {
      const motions = this.#stability.space.motions();
      this.#groups = motions === null ? null : groupMotions(truss, motions);
    }
    if (this.#groups === null || this.#groups.some(({ symbolic }) => symbolic !== null)) return false;
    const by = settlesBy(truss, this.#groups, axialForce, onRealNodes(truss, loads), workTolerance * largestForce);
    return by <= settling || by === Number.POSITIVE_INFINITY;
  }

  /** Says of a solved case where its slack bars hang loose: with nothing that answers to their opening further. */
  looseIn(solved: Pick<SolvedCase, 'name' | 'axialForce' | 'refused'>): Finding | null {
    if (this.#oneWay === null || solved.refused !== null) return null;
    const axial = Float64Array.from(this.#base.elongations.bars, (bar) => solved.axialForce[bar] ?? 0);
    const loose = this.#oneWay.loose(axial, largestOf(axial));
    return loose === null ? null : looseBars(this.#problem.truss, solved.name, this.#barsOf(loose));
  }

  #barsOf(rows: readonly number[]): number[] {
    return rows.map((row) => this.#base.elongations.bars[row]).sort((a, b) => a - b);
  }

  #byBar(axial: Float64Array): (number | null)[] {
    const force = new Array<number | null>(this.#problem.truss.bars.length).fill(null);
    this.#base.elongations.bars.forEach((b, row) => {
      force[b] = axial[row] + 0;
    });
    return force;
  }

  #byNode(moves: Float64Array): (Vec3 | null)[] {
    const { truss, parts } = this.#problem;
    return truss.nodes.map((_, node) =>
      parts.liveNode[node] && !this.#sections.withoutDisplacement(node) ? vectorAt(moves, node) : null,
    );
  }
}

function headOf({ name, nature, loads }: LoadCase) {
  const sum: [number, number, number] = [0, 0, 0];
  for (const { force } of loads) for (let axis = 0; axis < 3; axis++) sum[axis] = sum[axis] + force[axis];
  return { name, nature, loads, loadSum: sum as Vec3 };
}

function refusedCase(truss: Truss, one: LoadCase, refused: string): SolvedCase {
  return {
    ...headOf(one),
    refused,
    axialForce: truss.bars.map(() => null),
    displacement: truss.nodes.map(() => null),
    reactions: [],
    residual: null,
  };
}

/** Three components a node. */
function componentsOf(truss: Truss, loads: readonly NodalForce[]): Float64Array {
  const out = new Float64Array(3 * truss.nodes.length);
  for (const { node, force } of loads)
    for (let axis = 0; axis < 3; axis++) out[3 * node + axis] = out[3 * node + axis] + force[axis];
  return out;
}

const largestOf = (...lists: readonly Float64Array[]): number =>
  lists.reduce((most, list) => list.reduce((m, v) => Math.max(m, Math.abs(v)), most), 0);

const vectorAt = (moves: Float64Array, i: number): Vec3 => [
  moves[3 * i] + 0,
  moves[3 * i + 1] + 0,
  moves[3 * i + 2] + 0,
];
