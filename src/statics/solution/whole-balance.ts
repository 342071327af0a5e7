import { assemble } from '../engine/assemble.ts';
import { type Factor, factorise } from '../engine/factor.ts';
import { solveOne } from '../engine/solve.ts';
import { joinNumbers, joinRows, type SparseRows } from '../engine/system.ts';
import { inner, largest, scatter } from '../engine/vectors.ts';
import { forceDensities, mapTransverse } from '../model/geometric-stiffness.ts';
import { nodeMovements } from '../model/movement.ts';
import type { System } from '../model/system.ts';
import type { ModeSpace } from '../stability/mode-space.ts';
import type { GroupBalance } from './group-balance.ts';

/** Size of the geometric stiffness against the truss's own: so little that it moves nothing but the mechanisms, so much that rounding is less. */
const LITTLE = 1e-8;
const LEAST = 1e-9;
/** Against the lowest stiffness of what is no mechanism. */
const BESIDE = 1e-3;
/** Eigenvalues below this share of the geometric stiffness are nothing: what rounding leaves to be told. */
const NOTHING = 1e-5;
/** How near below the lowest eigenvalue inverse iteration starts. */
const NEAR = 1.2;

/**
 * The balance on a mode space of any size, which is never formed: where K + little K_G of the whole truss (with EA = 1) has as many eigenvalues
 * that are not positive as the forces fail to bring back (Sylvester). Coarser than the stiffness on the modes: a chain of more than some
 * 300 bars in tension counts as indifferent.
 */
export class WholeBalance {
  readonly #base: System;
  readonly #rows: SparseRows;
  readonly #size: number;

  constructor({ base, spectrum }: ModeSpace) {
    this.#base = base;
    this.#rows = joinRows(base.rows, mapTransverse(base.problem.truss, base.movement, base.elongations));
    const share = Math.min(LITTLE, BESIDE * (spectrum.lowest ?? 1));
    this.#size = Math.max(share, LEAST) * spectrum.highest;
  }

  judge(forces: readonly (number | null)[]): GroupBalance {
    const { elongations, movement, stiffness, matrix } = this.#base;
    const axial = Float64Array.from(elongations.bars, (bar) => forces[bar] ?? 0);
    const densities = forceDensities(elongations, axial);
    const most = largest(densities);
    const scaled = densities.map((v) => (most === 0 ? 0 : (v / most) * this.#size));
    const tangent = assemble(matrix.symbolic, this.#rows, joinNumbers(stiffness, scaled));
    const at = (shift: number): Factor => factorise(tangent, { shift });
    const nothing = NOTHING * this.#size;
    if (most > 0 && at(nothing).negative === 0) return { kind: 'stable', moves: null };
    const kind = at(-nothing).negative > 0 ? 'unstable' : 'indifferent';
    let below = nothing;
    let factor = at(-below);
    while (factor.negative > 0) {
      below *= 4;
      factor = at(-below);
    }
    for (let above = below / 4; below / above > NEAR; ) {
      const middle = Math.sqrt(above * below);
      const tried = at(-middle);
      if (tried.negative > 0) above = middle;
      else [below, factor] = [middle, tried];
    }
    return { kind, moves: nodeMovements(movement, weakest(factor)) };
  }
}

function weakest(factor: Factor): Float64Array {
  let x = scatter(factor.symbolic.freedoms.active, 5);
  for (let step = 0; step < 8; step++) {
    x = solveOne(factor, x);
    const size = Math.sqrt(inner(x, x));
    x = x.map((v) => v / size);
  }
  return x;
}
