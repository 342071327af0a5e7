import type { Factor } from '../engine/factor.ts';
import { type Refined, solveRefined } from '../engine/refine.ts';
import type { System } from '../model/system.ts';
import { type Complementarity, settle } from './complementarity.ts';

/** A row of the system whose force has one sign only: +1 pulls only, -1 pushes only. */
export interface OneWayRow {
  readonly row: number;
  readonly sign: 1 | -1;
}

export interface Slackened {
  readonly answer: Refined;
  /** Rows without force. */
  readonly slack: readonly number[];
  /** Sets tried. */
  readonly steps: number;
}

/** Rows without which nothing carries the load; empty where the search did not end. */
export interface NotCarried {
  readonly stuck: readonly number[];
}

/** Share of the largest force below which a force of the wrong sign is rounding. */
const NO_FORCE = 1e-11;

/** Share of the largest opening that counts as one. */
const OPENS = 1e-6;

/**
 * Bars that only pull or only push. A slack bar is one with a gap: its forces are those of the full system with the gaps as free stretch, and how
 * forces answer to gaps is a small symmetric matrix whose columns are worked out when a bar first goes slack. The sparse factorisation is never
 * made again, and the forces found do not depend on where the search starts.
 */
export class OneWayBars {
  readonly #system: System;
  readonly #factor: Factor;
  readonly #rows: readonly OneWayRow[];
  readonly #columns = new Map<number, Float64Array>();
  /** By the bars that are slack or without force. */
  readonly #loose = new Map<string, readonly number[] | null>();
  #start: readonly number[] = [];

  constructor(system: System, factor: Factor, rows: readonly OneWayRow[]) {
    this.#system = system;
    this.#factor = factor;
    this.#rows = rows;
  }

  /**
   * @param linear the answer to the load with every bar working both ways
   * @param start indices into the one-way rows that the search takes for slack at first; default: those of the load before
   */
  slacken(
    linear: Refined,
    load: Float64Array,
    freeStretch: Float64Array | null,
    largestForce: number,
    start: readonly number[] = this.#start,
  ): Slackened | NotCarried {
    const rows = this.#rows;
    const found = settle(this.#problem(linear, NO_FORCE * largestForce), start);
    if (found.kind === 'unsettled') return { stuck: [] };
    if (found.kind === 'unbounded')
      return { stuck: rows.filter((_, j) => found.direction[j] > OPENS).map(({ row }) => row) };
    this.#start = found.active;
    let answer = linear;
    if (found.active.length > 0) {
      const stretch = freeStretch?.slice() ?? new Float64Array(linear.axial.length);
      for (const j of found.active) stretch[rows[j].row] = stretch[rows[j].row] - rows[j].sign * found.z[j];
      [answer] = solveRefined(this.#system, this.#factor, [load], [stretch]);
    }
    // Which of several bars without force have a gap is open, where nothing holds what hangs on them; which have no force is not.
    const slack = this.#idle(answer.axial, largestForce).map((j) => rows[j].row);
    for (const row of slack) answer.axial[row] = 0;
    return { answer, slack, steps: found.steps };
  }

  #idle(axial: Float64Array, largestForce: number): number[] {
    return this.#rows.flatMap(({ row, sign }, j) => (sign * axial[row] <= NO_FORCE * largestForce ? [j] : []));
  }

  /**
   * Whether all slack bars and those without force may open further without any force answering: rows that would, null where the truss stands
   * without them.
   */
  loose(axial: Float64Array, largestForce: number): readonly number[] | null {
    const idle = this.#idle(axial, largestForce);
    const key = idle.join(' ');
    const known = this.#loose.get(key);
    if (known !== undefined) return known;
    this.#prepare(idle);
    // The least of z.Mz/2 - q.z has no bottom where some z >= 0 has M z = 0.
    const found = settle(
      {
        size: idle.length,
        q: Float64Array.from(idle, (j) => -this.#stiffness(j)),
        prepare: () => {},
        column: (b) => Float64Array.from(idle, (i) => this.#column(idle[b])[i]),
        measure: Float64Array.from(idle, (j) => this.#stiffness(j)),
        tolerance: NO_FORCE * idle.reduce((most, j) => Math.max(most, this.#stiffness(j)), 0),
      },
      [],
    );
    const loose =
      found.kind === 'unbounded'
        ? idle.filter((_, b) => found.direction[b] > OPENS).map((j) => this.#rows[j].row)
        : null;
    this.#loose.set(key, loose);
    return loose;
  }

  #problem({ axial }: Refined, tolerance: number): Complementarity {
    const rows = this.#rows;
    return {
      size: rows.length,
      q: Float64Array.from(rows, ({ row, sign }) => sign * axial[row]),
      prepare: (columns) => this.#prepare(columns),
      column: (j) => this.#column(j),
      measure: Float64Array.from(rows, (_, j) => this.#stiffness(j)),
      tolerance,
    };
  }

  #stiffness(j: number): number {
    return this.#system.stiffness[this.#rows[j].row];
  }

  #column(j: number): Float64Array {
    const known = this.#columns.get(j);
    if (known !== undefined) return known;
    this.#prepare([j]);
    return this.#columns.get(j)!;
  }

  /** Forces of the one-way bars, each in its own sign, to a gap of 1 m in bar j. */
  #prepare(wanted: readonly number[]): void {
    const missing = wanted.filter((j) => !this.#columns.has(j));
    if (missing.length === 0) return;
    const { rows, movement } = this.#system;
    const none = new Float64Array(movement.freedoms.active.length);
    const stretches = missing.map((j) => {
      const stretch = new Float64Array(rows.count);
      stretch[this.#rows[j].row] = -this.#rows[j].sign;
      return stretch;
    });
    const answers = solveRefined(
      this.#system,
      this.#factor,
      missing.map(() => none),
      stretches,
    );
    missing.forEach((j, k) => {
      this.#columns.set(
        j,
        Float64Array.from(this.#rows, ({ row, sign }) => sign * answers[k].axial[row]),
      );
    });
  }
}
