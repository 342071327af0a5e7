import type { System } from '../model/system.ts';
import type { Restraint } from '../types.ts';
import { modesOfPivots, stretchOf, tidyMode } from './held-modes.ts';
import { localise } from './localise.ts';
import type { StabilityOptions } from './options.ts';
import { findPivots } from './pivots.ts';
import { type RigidMotion, rigidMotions } from './rigid.ts';
import type { Spectrum } from './slicing.ts';
import { baseCandidates, bestBase, holdRigid, withoutRigid } from './still-base.ts';

/** A mode before it is put in words. */
export interface FoundMode {
  /** Three components a node, the largest 1. */
  readonly moves: Float64Array;
  /** Holding this takes the mode away. */
  readonly pivot: Restraint;
  /** Set where a whole part moves as one body. */
  readonly rigid: RigidMotion | null;
  /** Largest stretch of a bar as a share of the movement. */
  readonly stretch: number;
}

export interface FoundModes {
  readonly modes: readonly FoundMode[];
  /** One held direction for each mechanism, of the modes first. With all of them held nothing moves freely. */
  readonly pivots: readonly Restraint[];
}

/** Numbers in memory that the modes may take up at once. */
const MOST_NUMBERS = 3e7;

/** A basis of the mechanisms: motions as one body first, then what moves inside the parts, as local as it can be made. */
export function findModes(base: System, spectrum: Spectrum, options: StabilityOptions): FoundModes {
  const wanted = spectrum.mechanisms;
  if (wanted === 0) return { modes: [], pivots: [] };
  const { problem } = base;
  const all = rigidMotions(base);
  const rigid = all.length <= wanted ? all : [];
  const bodies = [...new Set(rigid.map((m) => m.part))].map((part) => ({
    part,
    motions: rigid.filter((m) => m.part === part),
    candidates: baseCandidates(problem, part),
  }));
  const heldBodies = new Map(
    bodies.map((body) => {
      const middle = body.candidates[body.candidates.length >> 1] ?? [];
      return [body.part, holdRigid(problem, body.motions, middle)] as const;
    }),
  );
  const rigidPivots = () => [...heldBodies.values()].flatMap((held) => held.pivots);
  const inner = findPivots(base, rigidPivots(), wanted - rigid.length, spectrum);
  const most = Math.min(options.mostModes, Math.floor(MOST_NUMBERS / (3 * problem.truss.nodes.length)));
  let pivots = inner;
  let moves = modesOfPivots(base, [...rigidPivots(), ...inner], inner.slice(0, most));
  if (inner.length <= most && inner.length > 0) {
    for (const { part, motions, candidates } of bodies) {
      const own = inner.map((p, i) => (problem.parts.partOf[p.node] === part ? i : -1)).filter((i) => i >= 0);
      if (own.length === 0) continue;
      const modes = own.map((i) => moves[i]);
      const held = holdRigid(problem, motions, bestBase(problem, motions, candidates, modes));
      heldBodies.set(part, held);
      for (const i of own) moves[i] = withoutRigid(held, moves[i]);
    }
    const local = localise(problem.truss, moves);
    if (local.pivots.length === inner.length) {
      pivots = local.pivots;
      moves = modesOfPivots(base, [...rigidPivots(), ...pivots], pivots);
    }
  }
  const found = [
    ...matchRigid(rigid, rigidPivots()).map(({ motion, pivot }) => ({
      moves: tidyMode(motion.moves),
      pivot,
      rigid: motion,
      stretch: stretchOf(base, motion.moves),
    })),
    ...moves.map((m, i) => ({ moves: m, pivot: pivots[i], rigid: null, stretch: stretchOf(base, m) })),
  ];
  return {
    modes: found.filter((mode) => mode.stretch <= options.mostStretch),
    pivots: [...rigidPivots(), ...pivots],
  };
}

/** Gives each motion the pivot of its part that it moves most, of those left. */
function matchRigid(motions: readonly RigidMotion[], pivots: readonly Restraint[]) {
  const left = [...pivots];
  return motions.map((motion) => {
    let best = 0;
    let most = -1;
    left.forEach(({ node, direction }, i) => {
      let along = 0;
      for (let axis = 0; axis < 3; axis++) along += direction[axis] * motion.moves[3 * node + axis];
      if (Math.abs(along) > most + 1e-9) {
        most = Math.abs(along);
        best = i;
      }
    });
    return { motion, pivot: left.splice(best, 1)[0] };
  });
}
