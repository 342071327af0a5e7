import type { Truss } from '../../domain/truss.ts';
import { assemble } from '../engine/assemble.ts';
import type { Stiffness } from '../engine/spectrum.ts';
import { analyseGraph, type Symbolic } from '../engine/symbolic.ts';
import type { Restraint, Supports } from '../types.ts';
import { coupleEnds } from './coupling.ts';
import { type Elongations, mapElongations, unitStiffness } from './elongation.ts';
import { type Movement, mapMovement } from './movement.ts';
import type { Parts } from './parts.ts';

/** What is asked about: a truss on its supports. */
export interface Problem {
  readonly truss: Truss;
  readonly supports: Supports;
  readonly parts: Parts;
}

/** A problem in numbers, with some more directions held. The matrix's pattern has room for K_G and for nodes that move. */
export interface System extends Stiffness {
  readonly problem: Problem;
  readonly movement: Movement;
  readonly elongations: Elongations;
}

/**
 * `like` lends its ordering: holding more directions leaves the pattern as it was, unless restraints on carried nodes make freedoms
 * follow others.
 */
export function buildSystem(
  problem: Problem,
  pivots: readonly Restraint[],
  stiffnessOf: (elongations: Elongations) => Float64Array = unitStiffness,
  like: System | null = null,
): System {
  const { truss, supports, parts } = problem;
  const movement = mapMovement(truss, parts, [...supports.restraints, ...(supports.holds ?? []), ...pivots]);
  const elongations = mapElongations(truss, parts, supports, movement);
  const { rows } = elongations;
  const stiffness = stiffnessOf(elongations);
  const lent = like !== null && movement.followers.size === 0 ? like.matrix.symbolic : null;
  const symbolic: Symbolic = lent
    ? { ...lent, freedoms: movement.freedoms }
    : analyseGraph(movement.freedoms, coupleEnds(truss, movement, elongations));
  return { problem, movement, elongations, rows, stiffness, matrix: assemble(symbolic, rows, stiffness) };
}
