import { type Finding, finding } from '../../domain/finding.ts';
import type { Truss } from '../../domain/truss.ts';
import { leverShares } from '../model/carriage.ts';
import type { Judgement } from '../stability/assess-stability.ts';
import { listed, type Named, Names } from '../stability/names.ts';
import { directionInWords, movementDirection, sizeAt } from '../stability/words.ts';
import type { SolvedCase, SolvedCombination } from '../types.ts';
import { balanceOf, type GroupBalance } from './group-balance.ts';
import { groupModes, type ModeGroup, movesOf } from './mode-groups.ts';

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
  stability: Judgement,
  cases: readonly SolvedCase[],
  combinations: readonly SolvedCombination[],
  members: readonly Named[] = [],
): JudgedBalance {
  const modes = stability.freeBody ? stability.modes.filter((mode) => mode.kind !== 'whole') : stability.modes;
  const isCarried = cases.length > 0 && [...cases, ...combinations].every(({ refused }) => refused === null);
  if (modes.length === 0) return { cases, combinations, findings: [], isStable: isCarried };
  const groups = groupModes(truss, modes);
  const upsets: Upset[] = groups.map((group) => ({ group, in: [] }));
  const judge = <T extends SolvedCase | SolvedCombination>(one: T): T => {
    if (one.refused !== null || one.axialForce.every((force) => force === null || force === 0)) return one;
    const bars = new Set<number>();
    let isStable = true;
    groups.forEach((group, g) => {
      const balance = balanceOf(truss, group, one.axialForce);
      if (balance.kind === 'stable') return;
      isStable = false;
      upsets[g].in.push({ name: one.name, isCase: 'nature' in one, balance });
      if (balance.kind === 'unstable') for (const { bar } of group.bars) bars.add(bar);
    });
    return isStable ? one : { ...one, unstable: { bars: [...bars].sort((a, b) => a - b) } };
  };
  const judged = { cases: cases.map(judge), combinations: combinations.map(judge) };
  const last = combinations.length > 0 ? judged.combinations : judged.cases;
  const isStable = isCarried && last.every(({ unstable }) => unstable === undefined);
  const findings = tell(truss, new Names(truss, members), upsets, combinations.length > 0);
  return { ...judged, findings, isStable };
}

/** A group of modes with the cases and combinations that do not hold it. */
interface Upset {
  readonly group: ModeGroup;
  readonly in: { readonly name: string; readonly isCase: boolean; readonly balance: GroupBalance }[];
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

function toldOf(truss: Truss, names: Names, { group, in: all }: Upset, isCombined: boolean): Told {
  const combined = all.filter((one) => !one.isCase);
  const said = isCombined && combined.length > 0 ? combined : all;
  const worst = said.find((one) => one.balance.kind === 'unstable') ?? said[0];
  const shares = leverShares(truss);
  const sum = new Float64Array(3 * truss.nodes.length);
  worst.balance.motion.forEach((share, m) => {
    if (share === 0) return;
    const moves = movesOf(truss, shares, group.modes[m]);
    for (let i = 0; i < sum.length; i++) sum[i] = sum[i] + share * moves[i];
  });
  const moved = [...new Set(group.modes.flatMap((mode) => mode.nodes))].sort((a, b) => a - b);
  const shown = moved.reduce((best, i) => (sizeAt(sum, i) > sizeAt(sum, best) * (1 + 1e-9) ? i : best), moved[0]);
  const nodes = moved.filter((i) => sizeAt(sum, i) > MOVES * sizeAt(sum, shown));
  return {
    nodes,
    shown,
    owner: names.owner(nodes),
    way: directionInWords(movementDirection(sum, shown)),
    pushing: worst.balance.pushing,
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
