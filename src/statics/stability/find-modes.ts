import type { System } from '../model/system.ts';
import type { Restraint } from '../types.ts';
import { type Component, modesOfComponents, neighboursOf, onlyOn, splitMotion } from './components.ts';
import { follow, type HeldSystem, holdPivots, modesOfPivots, stretchOf, tidyMode } from './held-modes.ts';
import type { StabilityOptions } from './options.ts';
import { findPivots } from './pivots.ts';
import { reduceModes } from './reduce.ts';
import { type RigidMotion, rigidMotions } from './rigid.ts';
import type { Spectrum } from './slicing.ts';
import { sparseBasis } from './sparse-modes.ts';
import { baseCandidates, bestBase, holdRigid } from './still-base.ts';

/** A mode before it is put in words. */
export interface FoundMode {
  /** Three components a node, the largest 1. */
  readonly moves: Float64Array;
  /** Holding this takes the mode away. */
  readonly pivot: Restraint;
  /** Set where a whole part moves as one body. */
  readonly rigid: RigidMotion | null;
  /** Index of the component it belongs to; null for motions of a part as one body. */
  readonly component: number | null;
  /** Largest stretch of a bar as a share of the movement. */
  readonly stretch: number;
}

export interface FoundModes {
  readonly modes: readonly FoundMode[];
  /** One held direction for each mechanism, of the modes first. With all of them held nothing moves freely. */
  readonly pivots: readonly Restraint[];
  readonly components: readonly Component[];
  /** With all pivots held; null where there are none. */
  readonly system: HeldSystem | null;
}

/** Numbers in memory that the modes may take up at once. */
const MOST_NUMBERS = 3e7;

/** Nodes times modes squared of a component up to which its modes are made local: larger ones take seconds and are told as a tangle. */
const MOST_TANGLED = 1.5e7;

/** Modes that are looked at to choose what stands still while parts of a free body move. */
const SAMPLE = 12;

/** A basis of the mechanisms: motions as one body first, then what moves inside the parts, as local as it can be made. */
export function findModes(base: System, spectrum: Spectrum, options: StabilityOptions): FoundModes {
  const wanted = spectrum.mechanisms;
  if (wanted === 0) return { modes: [], pivots: [], components: [], system: null };
  const { truss } = base.problem;
  const all = rigidMotions(base);
  const rigid = all.length <= wanted ? all : [];
  const { rigidPivots, inner } = holdBodies(base, rigid, wanted, spectrum);
  const first = holdPivots(base, [...rigidPivots, ...inner]);
  const components = inner.length === 0 ? [] : splitMotion(first, inner);
  const most = Math.min(options.mostModes, Math.floor(MOST_NUMBERS / (3 * truss.nodes.length)));
  const shares = shareOut(components, Math.max(0, most - rigid.length));
  const raw = modesOfComponents(first, components, inner, shares);
  const next = neighboursOf(base, components);
  const local = components.map((component, c) =>
    shares[c] === component.pivots.length && component.nodes.length * shares[c] ** 2 < MOST_TANGLED
      ? localModes(first, component, raw[c], next)
      : { modes: raw[c].map(tidyMode), pivots: component.pivots.slice(0, shares[c]).map((i) => inner[i]) },
  );
  const rest = components.flatMap(({ pivots }, c) => pivots.slice(shares[c]).map((i) => inner[i]));
  const pivots = [...rigidPivots, ...local.flatMap((l) => l.pivots), ...rest];
  const system = holdPivots(base, pivots);
  const polished = polish(
    system,
    components,
    local.map((l) => l.modes),
  );
  const found: FoundMode[] = [
    ...matchRigid(rigid, rigidPivots).map(({ motion, pivot }) => ({
      moves: tidyMode(motion.moves),
      pivot,
      rigid: motion,
      component: null,
      stretch: stretchOf(base, motion.moves),
    })),
    ...polished.flatMap((modes, component) =>
      modes.map((moves, i) => ({
        moves,
        pivot: local[component].pivots[i],
        rigid: null,
        component,
        stretch: stretchOf(base, moves),
      })),
    ),
  ];
  return { modes: found.filter((mode) => mode.stretch <= options.mostStretch), pivots, components, system };
}

/** Holds every part that can move as one body where the rest then moves least, and names a pivot for what still moves. */
function holdBodies(base: System, rigid: readonly RigidMotion[], wanted: number, spectrum: Spectrum) {
  const { problem } = base;
  const bodies = [...new Set(rigid.map((m) => m.part))].map((part) => ({
    part,
    motions: rigid.filter((m) => m.part === part),
    candidates: baseCandidates(problem, part),
  }));
  const rough = bodies.map(({ motions, candidates }) =>
    holdRigid(problem, motions, candidates[candidates.length >> 1] ?? []),
  );
  const roughPivots = rough.flatMap((held) => held.pivots);
  const inner = findPivots(base, roughPivots, wanted - rigid.length, spectrum);
  if (inner.length === 0 || bodies.length === 0) return { rigidPivots: roughPivots, inner };
  const system = holdPivots(base, [...roughPivots, ...inner]);
  const rigidPivots = bodies.flatMap(({ part, motions, candidates }, b) => {
    const own = inner.filter((p) => problem.parts.partOf[p.node] === part);
    if (own.length === 0) return rough[b].pivots;
    const step = Math.ceil(own.length / SAMPLE);
    const sample = modesOfPivots(
      system,
      own.filter((_, i) => i % step === 0),
    );
    return holdRigid(problem, motions, bestBase(problem, motions, candidates, sample)).pivots;
  });
  return { rigidPivots, inner: findPivots(base, rigidPivots, wanted - rigid.length, spectrum) };
}

/** How many modes of each component are worked out: the small components in full first. */
function shareOut(components: readonly Component[], most: number): number[] {
  const shares = components.map(() => 0);
  let left = most;
  const order = components.map((_, c) => c).sort((a, b) => components[a].pivots.length - components[b].pivots.length);
  for (const c of order) {
    shares[c] = Math.min(left, components[c].pivots.length);
    left -= shares[c];
  }
  return shares;
}

function localModes(
  { base }: HeldSystem,
  { nodes }: Component,
  raw: readonly Float64Array[],
  next: ReturnType<typeof neighboursOf>,
) {
  const { truss } = base.problem;
  const place = new Map(nodes.map((node, i) => [node, i]));
  const neighbours = nodes.map((node) =>
    (next.get(node) ?? []).flatMap((other) => {
      const at = place.get(other);
      return at === undefined ? [] : [at];
    }),
  );
  const short = raw.map((moves) => {
    const own = Float64Array.from(
      { length: 3 * nodes.length },
      (_, r) => moves[3 * nodes[Math.floor(r / 3)] + (r % 3)],
    );
    return tidyMode(own);
  });
  const full = raw.map(tidyMode);
  const modes = sparseBasis({ modes: short, neighbours }).map((coefficients) => {
    const sum = new Float64Array(full[0].length);
    coefficients.forEach((k, m) => {
      if (k !== 0) for (let i = 0; i < sum.length; i++) sum[i] = sum[i] + k * full[m][i];
    });
    return dropRounding(sum);
  });
  const reduced = reduceModes(truss, modes, nodes);
  return reduced.pivots.length === modes.length ? { modes, pivots: reduced.pivots } : reduced;
}

/** The sum of modes leaves the rounding of each at the nodes that it brings to rest. */
const ROUNDING = 1e-8;

function dropRounding(moves: Float64Array): Float64Array {
  let most = 0;
  for (const v of moves) most = Math.max(most, Math.abs(v));
  return moves.map((v) => (Math.abs(v) < ROUNDING * most ? 0 : v / most));
}

/** Takes the modes down to rounding, one of every component with each solution. */
function polish(
  system: HeldSystem,
  components: readonly Component[],
  modes: readonly Float64Array[][],
): Float64Array[][] {
  const rounds = Math.max(0, ...modes.map((m) => m.length));
  const out: Float64Array[][] = components.map(() => []);
  for (let t = 0; t < rounds; t++) {
    const taking = components.map((_, c) => c).filter((c) => t < modes[c].length);
    const sum = new Float64Array(modes[taking[0]][t].length);
    for (const c of taking) {
      const mode = modes[c][t];
      for (let i = 0; i < sum.length; i++) sum[i] = sum[i] + mode[i];
    }
    const [all] = follow(system, [sum]);
    for (const c of taking) out[c].push(tidyMode(onlyOn(system.base, components[c].nodes, all)));
  }
  return out;
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
