import { EigenvalueDecomposition } from 'ml-matrix';
import { assemble } from '../engine/assemble.ts';
import { type Factor, factorise } from '../engine/factor.ts';
import { highestOfPencil } from '../engine/pencil.ts';
import { applyStiffness, joinNumbers, joinRows, type SparseRows } from '../engine/system.ts';
import { inner, largest } from '../engine/vectors.ts';
import { forceDensities, mapTransverse, projectGeometric } from '../model/geometric-stiffness.ts';
import { carryMovements, nodeMovements } from '../model/movement.ts';
import type { System } from '../model/system.ts';
import type { Mode } from '../types.ts';

/** Forces below this share of the largest are rounding. */
const NO_FORCE = 1e-9;
/** Factors above this are no buckling. */
const FAR = 1e6;
/** Width of the proof that no factor lies lower: there is none below the one given less this share. */
const PROVEN = 1e-4;
const MOST_ROUNDS = 6;
/** Least load factor that is told from none, where the truss has mechanisms that its forces stiffen. */
const LEAST = 1e-6;

/** One way the truss as a whole buckles. */
export interface BucklingMode {
  /** Times the load at which the balance becomes unstable this way. */
  readonly factor: number;
  /** Three components a node, carried ones included, the largest movement 1. */
  readonly moves: Float64Array;
}

/** K and the rows of K_G of one truss, for any bar forces in it. */
export interface Buckling {
  readonly system: System;
  readonly rows: SparseRows;
  readonly transverse: SparseRows;
  /** Factor of K alone; null where mechanisms make K singular. */
  readonly elastic: Factor | null;
  /** The mechanisms that are known, three components a node. */
  readonly mechanisms: readonly Float64Array[];
}

/**
 * @param system with the bars' real stiffness and nothing held but by supports
 * @param factor of its matrix, where it is at hand
 */
export function prepareBuckling(
  system: System,
  modes: readonly Mode[],
  mechanisms: number,
  factor: Factor | null = null,
): Buckling {
  const { movement, elongations, problem } = system;
  const transverse = mapTransverse(problem.truss, movement, elongations);
  return {
    system,
    transverse,
    rows: joinRows(system.rows, transverse),
    elastic: mechanisms === 0 ? (factor ?? factorise(system.matrix)) : null,
    mechanisms: modes.map((mode) => movesOf(system, mode)),
  };
}

/**
 * Lowest load factors at which the bar forces, grown in proportion, make the balance unstable (EN 1993-1-1 5.2.1: alpha_cr of the pin-jointed truss): K x =
 * -factor K_G x, lowest first, at most `count`; none where nothing buckles. On mechanisms K is nothing: where K_G is not positive there, the
 * lowest factor is 0, and nothing else is given. That no lower factor was missed is proved by the inertia of K + factor K_G (Sylvester).
 * @param axialForce N, one a bar of the truss
 */
export function criticalFactors(buckling: Buckling, axialForce: readonly (number | null)[], count = 1): BucklingMode[] {
  const { system, transverse, rows, mechanisms } = buckling;
  const { elongations, problem, movement } = system;
  const axial = Float64Array.from(elongations.bars, (b) => axialForce[b] ?? 0);
  const scale = largest(axial);
  axial.forEach((force, row) => {
    if (Math.abs(force) < NO_FORCE * scale) axial[row] = 0;
  });
  const loose = unstableMechanism(projectGeometric(problem.truss, elongations, axial, mechanisms), mechanisms);
  if (loose !== null) return [{ factor: 0, moves: loose }];
  if (axial.every((force) => force >= 0)) return [];

  const densities = forceDensities(elongations, axial);
  const tangentAt = (factor: number): Factor => {
    const weights = joinNumbers(
      system.stiffness,
      densities.map((v) => factor * v),
    );
    return factorise(assemble(system.matrix.symbolic, rows, weights));
  };
  const softening = (x: Float64Array) => applyStiffness(transverse, densities, x).map((v) => -v);
  let from = 0;
  let base = buckling.elastic;
  for (let factor = 1; base === null; factor /= 10) {
    if (factor < LEAST) return [{ factor: 0, moves: mechanisms[0] }];
    const tangent = tangentAt(factor);
    if (tangent.negative > 0) continue;
    from = factor;
    base = tangent;
  }
  for (let round = 0; ; round++) {
    const shift = from;
    const found = highestOfPencil(base, softening, count).map(({ value, vector }): BucklingMode => {
      // Rayleigh's quotient squares the vector's error.
      const elastic = inner(vector, applyStiffness(system.rows, system.stiffness, vector));
      const factor = elastic / inner(vector, softening(vector));
      return {
        factor: Number.isFinite(factor) && factor > 0 ? factor : shift + 1 / value,
        moves: tidy(nodeMovements(movement, vector)),
      };
    });
    const modes = found.filter(({ factor }) => factor < FAR).sort((a, b) => a.factor - b.factor);
    const lowest = modes.length > 0 ? modes[0].factor * (1 - PROVEN) : FAR;
    if (round === MOST_ROUNDS || tangentAt(lowest).negative === 0) return modes;
    // Something lower was missed: begin again from just below it, where it stands out.
    let high = lowest;
    while (high - from > 0.1 * high) {
      const middle = (from + high) / 2;
      const tangent = tangentAt(middle);
      if (tangent.negative > 0) high = middle;
      else {
        from = middle;
        base = tangent;
      }
    }
  }
}

/** A mechanism, or a mixture of them, that the forces do not stiffen; null where they stiffen all. */
function unstableMechanism(
  stiffening: ReturnType<typeof projectGeometric>,
  mechanisms: readonly Float64Array[],
): Float64Array | null {
  if (mechanisms.length === 0) return null;
  const scale = Math.max(...stiffening.diagonal().map(Math.abs));
  const spectrum = new EigenvalueDecomposition(stiffening, { assumeSymmetric: true });
  const lowest = spectrum.realEigenvalues.indexOf(Math.min(...spectrum.realEigenvalues));
  if (spectrum.realEigenvalues[lowest] > NO_FORCE * scale) return null;
  const moves = new Float64Array(mechanisms[0].length);
  mechanisms.forEach((mechanism, i) => {
    const weight = spectrum.eigenvectorMatrix.get(i, lowest);
    for (let k = 0; k < moves.length; k++) moves[k] = moves[k] + weight * mechanism[k];
  });
  return tidy(moves);
}

function movesOf({ movement, problem }: System, { nodes, movement: vectors }: Mode): Float64Array {
  const own = new Float64Array(3 * problem.truss.nodes.length);
  nodes.forEach((node, i) => {
    own.set(vectors[i], 3 * node);
  });
  return carryMovements(problem.truss, movement.shares, own);
}

function tidy(moves: Float64Array): Float64Array {
  let most = 0;
  for (const v of moves) if (Math.abs(v) > Math.abs(most)) most = v;
  return moves.map((v) => (Math.abs(v) < 1e-9 * Math.abs(most) ? 0 : v / most));
}
