import { largest } from '../engine/vectors.ts';
import type { System } from '../model/system.ts';
import type { Mode, Restraint } from '../types.ts';
import type { FoundModes } from './find-modes.ts';
import { follow, movePivots } from './held-modes.ts';
import type { Spectrum } from './slicing.ts';

/** One of the mechanisms, over the real nodes that it moves. */
export interface Motion {
  readonly nodes: readonly number[];
  /** Three components for each of `nodes`, largest 1. */
  readonly moves: Float64Array;
}

/** Numbers that the motions beside the listed modes may take up. */
const MOST_NUMBERS = 2e7;
/** Movements of one solution, to bound memory. */
const TOGETHER = 8;
/** Below this share of the largest movement there is rounding. */
const CUT = 1e-11;

/** All mechanisms of a truss, however many: those that are listed, and the others when somebody asks for them. */
export class ModeSpace {
  readonly base: System;
  /** Of the eigenvalues of `base`, which stand for the scale of what is something and what is nothing. */
  readonly spectrum: Spectrum;
  /** Motions of a free body as a whole are no part of it. */
  readonly dimension: number;
  readonly #found: FoundModes;
  readonly #listed: readonly Mode[];
  #motions: readonly Motion[] | null | undefined;

  constructor(base: System, spectrum: Spectrum, found: FoundModes, modes: readonly Mode[], freeBody: boolean) {
    this.base = base;
    this.spectrum = spectrum;
    this.#found = found;
    this.#listed = freeBody ? modes.filter(({ kind }) => kind !== 'whole') : modes;
    this.dimension = found.pivots.length - modes.length + this.#listed.length;
  }

  /** A basis; null where it would take more memory than is sensible. */
  motions(): readonly Motion[] | null {
    if (this.#motions === undefined) {
      const rest = notListed(this.#found);
      this.#motions = rest === null ? null : [...this.#listed.map(asMotion), ...rest];
    }
    return this.#motions;
  }
}

const asMotion = ({ nodes, movement }: Mode): Motion => ({ nodes, moves: Float64Array.from(movement.flat()) });

/** For each pivot of no listed mode the motion in which it moves and all other pivots are at rest. */
function notListed({ system, components, modes, pivots }: FoundModes): Motion[] | null {
  const listed = new Set(modes.map(({ pivot }) => pivot));
  const rest = pivots.filter((pivot) => !listed.has(pivot));
  if (rest.length === 0 || system === null) return [];
  const componentOf = new Map(components.flatMap(({ nodes }, c) => nodes.map((node) => [node, c] as const)));
  const queues = components.map((): Restraint[] => []);
  for (const pivot of rest) {
    const c = componentOf.get(pivot.node);
    if (c === undefined) return null;
    queues[c].push(pivot);
  }
  const numbers = queues.reduce((sum, own, c) => sum + 3 * own.length * components[c].nodes.length, 0);
  if (numbers > MOST_NUMBERS) return null;
  const out: Motion[] = [];
  const rounds = Math.max(...queues.map((own) => own.length));
  for (let from = 0; from < rounds; from += TOGETHER) {
    const taken = Array.from({ length: Math.min(TOGETHER, rounds - from) }, (_, t) =>
      queues.flatMap((own, c) => (from + t < own.length ? [{ c, pivot: own[from + t], amount: 1 }] : [])),
    );
    const answers = follow(
      system,
      taken.map((moved) => movePivots(system.base, moved)),
    );
    taken.forEach((moved, t) => {
      for (const { c } of moved) out.push(motionOn(components[c].nodes, answers[t]));
    });
  }
  return out;
}

/** What of a movement of all nodes belongs to these. */
function motionOn(nodes: readonly number[], all: Float64Array): Motion {
  let most = 0;
  for (const i of nodes) most = Math.max(most, largest(all.subarray(3 * i, 3 * i + 3)));
  const moving = nodes.filter((i) => largest(all.subarray(3 * i, 3 * i + 3)) > CUT * most);
  const moves = new Float64Array(3 * moving.length);
  moving.forEach((node, i) => {
    for (let axis = 0; axis < 3; axis++) moves[3 * i + axis] = all[3 * node + axis] / most;
  });
  return { nodes: moving, moves };
}
