import type { Truss } from '../../domain/truss.ts';
import type { Vec3 } from '../../domain/vector.ts';
import { countFreedoms } from '../engine/system.ts';
import { Elastic } from '../model/elastic.ts';
import { findParts } from '../model/parts.ts';
import { buildSystem, type Problem, type System } from '../model/system.ts';
import type { Mode, Restraint, Stability, Supports } from '../types.ts';
import { type FoundMode, type FoundModes, findModes } from './find-modes.ts';
import { movesFreely, nearlyMoves } from './findings.ts';
import { leftWithBars, leftWithHeld } from './judged-again.ts';
import { kindOf } from './kind.ts';
import { movingNodes } from './localise.ts';
import { ModeSpace } from './mode-space.ts';
import { modeInWords } from './mode-words.ts';
import { Names } from './names.ts';
import { STABILITY_DEFAULTS, type StabilityOptions } from './options.ts';
import { stiffenedBySelfStress } from './order.ts';
import { countParts, type PartCounts } from './part-counts.ts';
import { barsAgainst, type NewBar } from './remedy-bars.ts';
import { criticalBars } from './self-stress.ts';
import { type Spectrum, sliceSpectrum } from './slicing.ts';
import { worksInBending } from './works-in-bending.ts';

/** The judgement with what the solution needs of it. */
export interface Judgement extends Stability {
  /** One direction for each mechanism; with all of them held nothing moves freely. More than `modes` where some of those are left out. */
  readonly pivots: readonly Restraint[];
  /** The same truss with the real stiffness of its bars. */
  readonly elastic: Elastic;
  /** All mechanisms, those left out of `modes` too. */
  readonly space: ModeSpace;
  /** Counts of each part that is judged. */
  readonly parts: readonly PartCounts[];
}

/**
 * Judges whether the truss stands on its supports: mechanisms by the inertia of K - shift I with EA = 1 in every bar (Sylvester's law),
 * their modes, states of self-stress by the rank (Maxwell 1864, Calladine 1978). Section sizes play no part in it.
 */
export function assessStability(truss: Truss, supports: Supports, options: Partial<StabilityOptions> = {}): Judgement {
  const settings = { ...STABILITY_DEFAULTS, ...options };
  const parts = findParts(truss, supports);
  const problem: Problem = { truss, supports, parts };
  const base = buildSystem(problem, []);
  const spectrum = sliceSpectrum(base, settings);
  const found = findModes(base, spectrum, settings);
  const counts = countParts(base, found.pivots, spectrum.mechanisms);
  const names = new Names(truss, settings.members);
  const braces = braceAll(problem, found);
  const modes = describe(base, names, found, braces, counts);

  const nodes = truss.nodes.filter((node, i) => parts.liveNode[i] && node.carriedBy === null).length;
  const { bars, springs } = base.elongations;
  const rank = countFreedoms(base.movement.freedoms) - spectrum.mechanisms;
  const nearly = nearlyMoves(spectrum, settings);
  const expected = (i: number) => parts.freeBody && found.modes[i].rigid !== null;
  const bending = worksInBending(
    truss,
    names,
    modes.filter((_, i) => !expected(i)),
  );
  return {
    nodes,
    bars: bars.length,
    restraints: base.movement.restraintCount,
    springs: springs.length,
    rank,
    mechanisms: spectrum.mechanisms,
    selfStressStates: bars.length + springs.length - rank,
    freeBody: parts.freeBody,
    gap: spectrum.gap,
    criticalBars:
      spectrum.gap === null
        ? null
        : criticalBars(base, spectrum.factor, found.system, bars.length + springs.length - rank),
    setAside: parts.setAside,
    modes,
    findings: [
      ...movesFreely(
        truss,
        names,
        { modes: modes.filter((_, i) => !expected(i)), more: spectrum.gap === null ? [] : notListed(found) },
        judgeAgain(base, found, braces, spectrum),
      ),
      ...(bending ? [bending] : []),
      ...(nearly ? [nearly] : []),
    ],
    pivots: found.pivots,
    elastic: new Elastic(base),
    space: new ModeSpace(base, spectrum, found, modes, parts.freeBody),
    parts: counts,
  };
}

/** What moves in more ways than there are modes listed for it. */
function notListed({ modes, components }: FoundModes) {
  return components.flatMap(({ nodes, pivots }, c) => {
    const ways = pivots.length - modes.filter((mode) => mode.component === c).length;
    return ways > 0 ? [{ nodes, ways }] : [];
  });
}

/** For each mode the bar that takes it away, where all modes of its component have one. */
function braceAll(problem: Problem, { modes, components }: FoundModes): Map<FoundMode, NewBar> {
  const braces = new Map<FoundMode, NewBar>();
  const moving = new Set(components.flatMap(({ nodes }) => nodes));
  components.forEach((component, c) => {
    const own = modes.filter((mode) => mode.component === c);
    barsAgainst(problem, component, own, moving)?.forEach((bar, i) => {
      braces.set(own[i], bar);
    });
  });
  return braces;
}

/** The proof of the remedies: the count again with them in place. Modes without a bar of their own are held instead. */
function judgeAgain(base: System, found: FoundModes, braces: ReadonlyMap<FoundMode, NewBar>, spectrum: Spectrum) {
  if (found.pivots.length === 0) return { held: null, barred: null };
  const others = found.pivots.filter((pivot) => !found.modes.some((mode) => mode.pivot === pivot && braces.has(mode)));
  return {
    held: leftWithHeld(base, found.pivots, spectrum),
    barred: braces.size === 0 ? null : leftWithBars(base, [...braces.values()], others, spectrum),
  };
}

function describe(
  base: System,
  names: Names,
  { modes: found, pivots }: FoundModes,
  braces: ReadonlyMap<FoundMode, NewBar>,
  counts: readonly PartCounts[],
): Mode[] {
  const { problem } = base;
  const { truss } = problem;
  const partOf = (mode: FoundMode) => problem.parts.partOf[mode.pivot.node];
  const stressed = counts.filter((c) => c.selfStressStates > 0).map((c) => c.part);
  const inside = stressed.map((part) =>
    found.filter((m) => m.rigid === null && partOf(m) === part).map((m) => m.moves),
  );
  // Modes left out might be the ones that no state of self-stress stiffens.
  const complete = found.length === pivots.length;
  const stiffened = complete ? stiffenedBySelfStress(base, pivots, inside) : stressed.map(() => false);
  return found.map((mode): Mode => {
    const kind = mode.rigid === null ? kindOf(problem, mode.moves) : wholeOrPart(problem, mode);
    const nodes = movingNodes(truss, mode.moves);
    const stress = stressed.indexOf(partOf(mode));
    const finite = mode.rigid !== null || stress < 0;
    return {
      kind,
      nodes,
      movement: nodes.map((i) => movementOf(mode.moves, i)),
      order: finite ? 'finite' : stiffened[stress] ? 'infinitesimal' : 'undecided',
      words: modeInWords(truss, names, mode, kind),
      remedy: [{ node: mode.pivot.node, direction: mode.pivot.direction }],
      otherRemedy: braces.has(mode) ? [{ bar: braces.get(mode)! }] : [],
    };
  });
}

/** Where there are several parts, the motion of one as a body is no motion of the whole. */
function wholeOrPart({ truss, parts }: Problem, mode: FoundMode): Mode['kind'] {
  const part = mode.rigid!.part;
  const alone = truss.nodes.every(
    (node, i) => !parts.liveNode[i] || node.carriedBy !== null || parts.partOf[i] === part,
  );
  return alone ? 'whole' : 'part';
}

const movementOf = (moves: Float64Array, i: number): Vec3 => [moves[3 * i], moves[3 * i + 1], moves[3 * i + 2]];
