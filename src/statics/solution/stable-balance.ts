import { type Finding, finding } from '../../domain/finding.ts';
import type { Truss } from '../../domain/truss.ts';
import { leverShares } from '../model/carriage.ts';
import { carryMovements } from '../model/movement.ts';
import type { Judgement } from '../stability/assess-stability.ts';
import type { ModeSpace } from '../stability/mode-space.ts';
import { listed, type Named, Names } from '../stability/names.ts';
import { directionInWords, movementDirection, sizeAt } from '../stability/words.ts';
import type { SolvedCase, SolvedCombination } from '../types.ts';
import { balanceOf, type GroupBalance } from './group-balance.ts';
import { groupMotions } from './mode-groups.ts';
import { pushingBars } from './pushing-bars.ts';
import { WholeBalance } from './whole-balance.ts';

export interface JudgedBalance {
  readonly cases: readonly SolvedCase[];
  readonly combinations: readonly SolvedCombination[];
  readonly findings: readonly Finding[];
  /** Every case is carried and, where there are combinations, these in stable balance; else the cases. */
  readonly isStable: boolean;
}

/**
 * Judges the balance of every case and combination that is carried although the truss has mechanisms: whether its bar forces bring the
 * modes back (METHODS 3, "Carried is not yet stable"). What is in no stable balance gets `unstable` with the bars concerned.
 */
export function judgeBalance(
  truss: Truss,
  { space }: Pick<Judgement, 'space'>,
  cases: readonly SolvedCase[],
  combinations: readonly SolvedCombination[],
  members: readonly Named[] = [],
): JudgedBalance {
  const isCarried = cases.length > 0 && [...cases, ...combinations].every(({ refused }) => refused === null);
  const isAsked = [...cases, ...combinations].some(isLoaded);
  if (space.dimension === 0 || !isAsked) return { cases, combinations, findings: [], isStable: isCarried };
  const judges = judgesOf(truss, space);
  const upsets: Upset[] = judges.map(() => ({ in: [] }));
  const judge = <T extends SolvedCase | SolvedCombination>(one: T): T => {
    if (!isLoaded(one)) return one;
    const bars = new Set<number>();
    let moves: Float64Array | null = null;
    judges.forEach((balanceUnder, g) => {
      const balance = balanceUnder(one.axialForce);
      if (balance.moves === null) return;
      moves ??= balance.moves;
      upsets[g].in.push({ name: one.name, isCase: 'nature' in one, balance, forces: one.axialForce });
      if (balance.kind === 'unstable') for (const bar of balance.bars) bars.add(bar);
    });
    return moves === null ? one : { ...one, unstable: { bars: [...bars].sort((a, b) => a - b), moves } };
  };
  const judged = { cases: cases.map(judge), combinations: combinations.map(judge) };
  const last = combinations.length > 0 ? judged.combinations : judged.cases;
  const isStable = isCarried && last.every(({ unstable }) => unstable === undefined);
  const findings = tell(truss, new Names(truss, members), upsets, combinations.length > 0);
  return { ...judged, findings, isStable };
}

const isLoaded = ({ refused, axialForce }: SolvedCase | SolvedCombination): boolean =>
  refused === null && axialForce.some((force) => force !== null && force !== 0);

/** A balance with the bars that what gives way would move. */
type Judged = GroupBalance & { readonly bars: readonly number[] };

/** One judge for each group of motions that forces couple; one for all where the motions are too many to be written out. */
function judgesOf(truss: Truss, space: ModeSpace): ((forces: readonly (number | null)[]) => Judged)[] {
  const motions = space.motions();
  const groups = motions === null ? null : groupMotions(truss, motions);
  const shares = leverShares(truss);
  const filled = ({ kind, moves }: GroupBalance): GroupBalance => ({
    kind,
    moves: moves === null ? null : carryMovements(truss, shares, moves),
  });
  if (groups !== null)
    return groups.map((group) => (forces) => ({ ...filled(balanceOf(truss, group, forces)), bars: group.bars }));
  const whole = new WholeBalance(space);
  return [
    (forces) => {
      const balance = whole.judge(forces);
      const { moves } = balance;
      const bars = truss.bars.flatMap(({ from, to }, b) =>
        moves !== null && (sizeAt(moves, from) > 0 || sizeAt(moves, to) > 0) ? [b] : [],
      );
      return { ...balance, bars };
    },
  ];
}

/** The cases and combinations that do not hold one group of motions. */
interface Upset {
  readonly in: {
    readonly name: string;
    readonly isCase: boolean;
    readonly balance: GroupBalance;
    readonly forces: readonly (number | null)[];
  }[];
}

interface Told {
  readonly nodes: readonly number[];
  readonly shown: number;
  readonly owner: string | null;
  readonly way: string;
  readonly pushing: readonly number[];
  readonly kind: GroupBalance['kind'];
  readonly names: readonly string[];
  /** It is so in single cases only, none of which acts alone where there are combinations. */
  readonly onlyAlone: boolean;
}

function tell(truss: Truss, names: Names, upsets: readonly Upset[], isCombined: boolean): Finding[] {
  const groups = new Map<string, Told[]>();
  for (const upset of upsets) {
    if (upset.in.length === 0) continue;
    const told = toldOf(truss, names, upset, isCombined);
    const key = [told.kind, told.way, told.owner === null ? told.nodes.length : 'owned', told.names.join()].join('|');
    groups.set(key, [...(groups.get(key) ?? []), told]);
  }
  return [...groups.values()].map((group) => findingOf(truss, names, group));
}

function toldOf(truss: Truss, names: Names, { in: all }: Upset, isCombined: boolean): Told {
  const combined = all.filter((one) => !one.isCase);
  const said = isCombined && combined.length > 0 ? combined : all;
  const worst = said.find((one) => one.balance.kind === 'unstable') ?? said[0];
  const moves = worst.balance.moves!;
  const moved = truss.nodes.flatMap(({ carriedBy }, i) => (carriedBy === null ? [i] : []));
  const shown = moved.reduce((best, i) => (sizeAt(moves, i) > sizeAt(moves, best) * (1 + 1e-9) ? i : best), moved[0]);
  const nodes = moved.filter((i) => sizeAt(moves, i) > MOVES * sizeAt(moves, shown));
  return {
    nodes,
    shown,
    owner: names.owner(nodes),
    way: directionInWords(movementDirection(moves, shown)),
    pushing: pushingBars(truss, worst.forces, moves),
    kind: worst.balance.kind,
    names: [...new Set(said.map((one) => one.name))],
    onlyAlone: isCombined && combined.length === 0,
  };
}

/** Nodes that move less than this share of the most moved one are not counted to a motion. */
const MOVES = 0.02;
const BARS_NAMED = 4;

function findingOf(truss: Truss, names: Names, group: readonly Told[]): Finding {
  const first = group[0];
  const { at, place } = truss.nodes[first.shown];
  const bars = first.pushing.slice(0, BARS_NAMED).map((b) => truss.bars[b].name);
  const more = first.pushing.length - bars.length;
  const pushed = `${bars.join(', ')}${more > 0 ? ` and ${more} more` : ''}`;
  const owners = group.flatMap(({ owner }) => (owner === null ? [] : [owner]));
  const same =
    group.length === 1
      ? ''
      : new Set(owners).size === group.length
        ? `; the same at ${listed(owners.slice(1))} (${group.length} in all)`
        : `; the same at ${group.length} places in all`;
  const subject = names.subject(first.nodes);
  const where = `In ${listed(first.names)}`;
  const alone = first.onlyAlone ? ' (alone; not in any combination)' : '';
  const message =
    first.kind === 'unstable'
      ? `${where}${alone} the balance is unstable: ${subject} would give way ${first.way}, since ${pushed} ${first.pushing.length === 1 ? 'is' : 'are'} compressed and nothing holds ${first.nodes.length === 1 ? 'it' : 'them'} that way${same}.`
      : `${where}${alone} the balance is indifferent: ${subject} can move ${first.way}, and no bar force brings ${first.nodes.length === 1 ? 'it' : 'them'} back${same}.`;
  return finding(
    'unstable-balance',
    message,
    `Hold ${first.nodes.length === 1 ? subject : `these nodes`} ${first.way}, in the model or under \`holds:\` in the brief; the bar forces of a balance that cannot last are not to be used, and its checks are withheld.`,
    {
      nodes: [...new Set(group.flatMap(({ nodes }) => nodes))].sort((a, b) => a - b),
      at,
      place,
      ...(first.onlyAlone ? { severity: 'warning' as const } : {}),
    },
  );
}
