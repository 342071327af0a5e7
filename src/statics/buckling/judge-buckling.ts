import { type Finding, finding } from '../../domain/finding.ts';
import type { Truss } from '../../domain/truss.ts';
import { lacksSection } from '../solution/sections.ts';
import type { Judgement } from '../stability/assess-stability.ts';
import { directionInWords, movementDirection, nodeInWords, sizeAt } from '../stability/words.ts';
import type { SolvedCase, SolvedCombination } from '../types.ts';
import { type BucklingMode, criticalFactors, prepareBuckling } from './critical-factors.ts';

export interface BucklingOptions {
  /** Critical load factor below which the effects of the moved nodes matter: EN 1993-1-1 5.2.1(3), elastic analysis. */
  readonly secondOrderBelow: number;
  /** Modes given of the governing load. */
  readonly modes: number;
  /** Whether the forces come from second order already: then only a factor below 1 is worth a word. */
  readonly isSecondOrder: boolean;
}

export const BUCKLING_DEFAULTS: BucklingOptions = { secondOrderBelow: 10, modes: 3, isSecondOrder: false };

/** How near each load is to buckling the truss as a whole. */
export interface BucklingJudgement {
  /** Lowest critical load factor by the name of the combination or case; null where the truss does not buckle. What was not judged is not there. */
  readonly factors: ReadonlyMap<string, number | null>;
  /** Lowest modes under the load that is nearest to buckling. */
  readonly governing: { readonly from: string; readonly modes: readonly BucklingMode[] } | null;
  readonly findings: readonly Finding[];
}

/** Nothing is known. */
export const NOT_JUDGED: BucklingJudgement = { factors: new Map(), governing: null, findings: [] };

/**
 * Critical load factors of the pin-jointed truss under every strength and accidental combination, or under the cases where there is no
 * combination. Bars without a section leave it unjudged: their stiffness would be invented.
 */
export function judgeBuckling(
  truss: Truss,
  { modes: mechanisms, mechanisms: count, elastic: judged }: Pick<Judgement, 'modes' | 'mechanisms' | 'elastic'>,
  cases: readonly SolvedCase[],
  combinations: readonly SolvedCombination[],
  options: Partial<BucklingOptions> = {},
): BucklingJudgement {
  const settings = { ...BUCKLING_DEFAULTS, ...options };
  const decisive =
    combinations.length > 0
      ? combinations.filter(({ limit }) => limit === 'strength' || limit === 'accidental')
      : cases;
  const carried = decisive.filter(({ refused }) => refused === null);
  const elastic = judged.with(truss);
  const { system } = elastic;
  if (carried.length === 0 || lacksSection(truss, system.problem.parts) !== null) return NOT_JUDGED;
  const buckling = prepareBuckling(system, mechanisms, count, count === 0 ? elastic.factor : null);
  // With one load alone the modes that are shown are found at once.
  const atOnce = carried.length === 1 ? settings.modes : 1;
  const found = carried.map(({ name, axialForce, unstable }) => ({
    name,
    axialForce,
    // What its forces do not bring back has no factor above zero, whichever mechanism it is.
    found: unstable ? [{ factor: 0, moves: unstable.moves }] : criticalFactors(buckling, axialForce, atOnce),
  }));
  const factors = new Map(found.map((one) => [one.name, one.found.at(0)?.factor ?? null]));
  const below = found
    .flatMap((one) => one.found.slice(0, 1).map((lowest) => ({ ...one, lowest })))
    .sort((a, b) => a.lowest.factor - b.lowest.factor);
  if (below.length === 0) return { factors, governing: null, findings: [] };
  const { name, axialForce, lowest, found: known } = below[0];
  return {
    factors,
    governing: {
      from: name,
      modes:
        lowest.factor === 0 || atOnce === settings.modes
          ? known
          : criticalFactors(buckling, axialForce, settings.modes),
    },
    findings: findingsOf(truss, below, settings),
  };
}

/** One finding, for the load nearest to buckling; a factor of 0 belongs to the mechanisms, which have their own. */
function findingsOf(
  truss: Truss,
  sorted: readonly { readonly name: string; readonly lowest: BucklingMode }[],
  { secondOrderBelow, isSecondOrder }: BucklingOptions,
): Finding[] {
  const bound = isSecondOrder ? 1 : secondOrderBelow;
  const low = sorted.filter(({ lowest }) => lowest.factor > 0 && lowest.factor < bound);
  if (low.length === 0) return [];
  const [{ name, lowest }, ...others] = low;
  const { factor, moves } = lowest;
  let node = 0;
  truss.nodes.forEach((_, i) => {
    if (sizeAt(moves, i) > sizeAt(moves, node) * (1 + 1e-6)) node = i;
  });
  const where = {
    nodes: movingMost(truss, moves),
    at: truss.nodes[node].at,
    place: truss.nodes[node].place,
  };
  const way = `the node at ${nodeInWords(truss, node)} moves most, ${directionInWords(movementDirection(moves, node))}`;
  const more = others.length === 0 ? '' : ` (${others.length} more ${others.length === 1 ? 'load' : 'loads'} likewise)`;
  if (factor < 1)
    return [
      finding(
        'unstable-balance',
        `Under ${name} the truss buckles as a whole at ${factor.toPrecision(3)} of the load${more}: ${way}.`,
        'Brace or stiffen the truss against this movement. Forces and checks under this load do not stand.',
        where,
      ),
    ];
  return [
    finding(
      'second-order-matters',
      `Under ${name} the truss as a whole buckles at ${factor.toPrecision(3)} times the load, less than ${secondOrderBelow} (EN 1993-1-1 5.2.1(3))${more}: ${way}.`,
      'Ask for second order (`analysis: second-order` in the brief), or brace or stiffen the truss against this movement.',
      where,
    ),
  ];
}

/** Nodes that move at least half as much as the one that moves most. */
const movingMost = (truss: Truss, moves: Float64Array): number[] =>
  truss.nodes.flatMap((_, i) => (sizeAt(moves, i) > 0.5 ? [i] : []));
