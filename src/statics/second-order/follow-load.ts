import type { Factor } from '../engine/factor.ts';
import { solveOne } from '../engine/solve.ts';
import { inner, largest, scatter } from '../engine/vectors.ts';
import type { System } from '../model/system.ts';
import { type Deformed, deform, tangentOf } from './deformed.ts';

export interface FollowOptions {
  /** Smallest step of the load, as a share of it: where none this small finds its balance, there is none. */
  readonly leastStep: number;
  /** Force out of balance, as a share of the largest force, at which a step counts as balanced. */
  readonly balanced: number;
  readonly mostSteps: number;
}

export const FOLLOW_DEFAULTS: FollowOptions = { leastStep: 1e-7, balanced: 1e-10, mostSteps: 400 };

const MOST_CORRECTIONS = 15;
/** A step is too long where its corrections come to more than this share of what was foreseen. */
const FAITHFUL = 0.5;

/** Stable balance under the whole load, or where on the way to it the balance is lost. */
export interface Followed {
  /** Share of the load that is carried in stable balance: 1, or less where it is lost. */
  readonly reached: number;
  readonly state: Deformed;
  /** How the truss goes where the balance is lost (over the unknowns); null where it is not. */
  readonly goes: Float64Array | null;
}

/**
 * Follows the balance from the unloaded truss to the whole load by Newton's method at the moved nodes, in steps that halve where the path bends. A state
 * counts only while K + K_G is positive definite (Sylvester), so that what lies beyond a snap or a fork is never taken for the answer.
 * @param firstOrder movements by first-order theory under the whole load; foresees the first step where mechanisms leave K singular
 */
export function followLoad(
  system: System,
  load: Float64Array,
  firstOrder: Float64Array,
  hasMechanisms: boolean,
  options: Partial<FollowOptions> = {},
): Followed {
  const { leastStep, balanced, mostSteps } = { ...FOLLOW_DEFAULTS, ...options };
  let state = deform(system, new Float64Array(load.length));
  let tangent: Factor | null = hasMechanisms ? null : tangentOf(system, state);
  let reached = 0;
  let step = 1;
  for (let taken = 0; reached < 1 && step >= leastStep && taken < mostSteps; taken++) {
    const aim = Math.min(1, reached + step);
    const wanted = load.map((v) => aim * v);
    const foreseen = tangent === null ? firstOrder.map((v) => aim * v) : solveOne(tangent, rest(wanted, state));
    const next = balance(system, wanted, state, foreseen, balanced);
    if (next === null) {
      step /= 2;
      continue;
    }
    ({ state, tangent } = next);
    reached = aim;
    step *= 2;
  }
  if (reached === 1) return { reached, state, goes: null };
  return { reached, state, goes: tangent === null ? firstOrder : weakest(tangent) };
}

/** Newton's method from a foreseen movement; null where it finds no stable balance near it. */
function balance(
  system: System,
  wanted: Float64Array,
  before: Deformed,
  foreseen: Float64Array,
  balanced: number,
): { readonly state: Deformed; readonly tangent: Factor } | null {
  const size = largest(foreseen);
  let state = deform(system, add(before.q, foreseen));
  for (let k = 0; k < MOST_CORRECTIONS; k++) {
    const tangent = tangentOf(system, state);
    if (tangent.negative > 0) return null;
    const left = rest(wanted, state);
    const out = largest(left);
    if (!Number.isFinite(out)) return null;
    if (out <= balanced * Math.max(largest(wanted), largest(state.axial)) + state.rounding) return { state, tangent };
    const next = add(state.q, solveOne(tangent, left));
    if (largest(next.map((v, u) => v - before.q[u] - foreseen[u])) > FAITHFUL * size) return null;
    state = deform(system, next);
  }
  return null;
}

/** The direction in which the tangent resists least, by inverse iteration. */
function weakest(tangent: Factor): Float64Array {
  let x = scatter(tangent.symbolic.freedoms.active, 3);
  for (let step = 0; step < 8; step++) {
    x = solveOne(tangent, x);
    const size = Math.sqrt(inner(x, x));
    x = x.map((v) => v / size);
  }
  return x;
}

const add = (x: Float64Array, y: Float64Array): Float64Array => x.map((v, u) => v + y[u]);
const rest = (load: Float64Array, { internal }: Deformed): Float64Array => load.map((v, u) => v - internal[u]);
