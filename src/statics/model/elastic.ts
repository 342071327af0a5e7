import type { Truss } from '../../domain/truss.ts';
import { assemble } from '../engine/assemble.ts';
import { type Factor, factorise } from '../engine/factor.ts';
import type { Elongations } from './elongation.ts';
import type { System } from './system.ts';

/** EA/L of every bar, then the springs. Bars without a section get the mean EA of the others: only where no force hangs on it. */
export function realStiffness(truss: Truss): (elongations: Elongations) => Float64Array {
  const known = truss.bars.flatMap((bar) => (bar.stiffnessEA !== null && bar.stiffnessEA > 0 ? [bar.stiffnessEA] : []));
  const mean = known.length > 0 ? known.reduce((sum, ea) => sum + ea, 0) / known.length : 1;
  return ({ bars, springs, lengths }) => {
    const out = new Float64Array(bars.length + springs.length);
    bars.forEach((b, row) => {
      const ea = truss.bars[b].stiffnessEA ?? mean;
      out[row] = lengths[row] > 0 ? ea / lengths[row] : 0;
    });
    springs.forEach((spring, s) => {
      out[bars.length + s] = spring.stiffness;
    });
    return out;
  };
}

/** The judged truss with the real stiffness of its bars, and its factor: made once, when first asked for, and shared by solution and buckling. */
export class Elastic {
  readonly #judged: System;
  readonly #truss: Truss;
  #system: System | null = null;
  #factor: Factor | null = null;

  /** @param judged lends its ordering and its rows, which stiffness has no part in */
  constructor(judged: System, truss: Truss = judged.problem.truss) {
    this.#judged = judged;
    this.#truss = truss;
  }

  /** The same with other sections: they have no part in the judgement. */
  with(truss: Truss): Elastic {
    return truss === this.#truss ? this : new Elastic(this.#judged, truss);
  }

  get system(): System {
    if (this.#system === null) {
      const { problem, elongations, rows, matrix } = this.#judged;
      const stiffness = realStiffness(this.#truss)(elongations);
      const own = { ...problem, truss: this.#truss };
      this.#system = { ...this.#judged, problem: own, stiffness, matrix: assemble(matrix.symbolic, rows, stiffness) };
    }
    return this.#system;
  }

  /** Sound only where nothing moves freely. */
  get factor(): Factor {
    this.#factor ??= factorise(this.system.matrix);
    return this.#factor;
  }
}
