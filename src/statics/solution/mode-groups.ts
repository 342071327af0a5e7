import { pushTo } from '../../domain/group.ts';
import type { Truss } from '../../domain/truss.ts';
import { leverShares } from '../model/carriage.ts';
import { carryMovements } from '../model/movement.ts';
import { UnionFind } from '../model/union-find.ts';
import type { Mode } from '../types.ts';

/** How one mode turns a bar: the movement of its end against its start, less what lies along it. */
export interface Turn {
  /** Position of the mode in its group. */
  readonly mode: number;
  readonly across: readonly [number, number, number];
}

export interface TurnedBar {
  readonly bar: number;
  readonly turns: readonly Turn[];
}

/** Modes that turn common bars: the forces of those couple them, and nothing couples them with the others. */
export interface ModeGroup {
  readonly modes: readonly Mode[];
  readonly bars: readonly TurnedBar[];
}

export function groupModes(truss: Truss, modes: readonly Mode[]): ModeGroup[] {
  const barsAt = new Map<number, number[]>();
  truss.bars.forEach(({ from, to }, b) => {
    pushTo(barsAt, from, b);
    pushTo(barsAt, to, b);
  });
  const carriedOn = carriedNodes(truss);
  const shares = leverShares(truss);
  const turnsOf = new Map<number, { readonly mode: number; readonly across: Turn['across'] }[]>();
  const sets = new UnionFind(modes.length);
  modes.forEach((mode, m) => {
    const moves = movesOf(truss, shares, mode);
    const moving = [...new Set(mode.nodes.flatMap((node) => [node, ...(carriedOn.get(node) ?? [])]))];
    for (const bar of new Set(moving.flatMap((node) => barsAt.get(node) ?? []))) {
      const across = acrossOf(truss, bar, moves);
      if (across === null) continue;
      const others = turnsOf.get(bar);
      if (others) sets.join(others[0].mode, m);
      pushTo(turnsOf, bar, { mode: m, across });
    }
  });
  const groups = new Map<number, number[]>();
  modes.forEach((_, m) => {
    pushTo(groups, sets.find(m), m);
  });
  const barsOf = new Map<number, TurnedBar[]>();
  for (const [bar, turns] of [...turnsOf].sort((a, b) => a[0] - b[0])) {
    const top = sets.find(turns[0].mode);
    const place = new Map(groups.get(top)!.map((m, i) => [m, i]));
    pushTo(barsOf, top, { bar, turns: turns.map(({ mode, across }) => ({ mode: place.get(mode)!, across })) });
  }
  return [...groups].map(([top, own]) => ({ modes: own.map((m) => modes[m]), bars: barsOf.get(top) ?? [] }));
}

/** Three components a node, those of carried nodes filled in. */
export function movesOf(truss: Truss, shares: ReturnType<typeof leverShares>, mode: Mode): Float64Array {
  const own = new Float64Array(3 * truss.nodes.length);
  mode.nodes.forEach((node, i) => {
    own.set(mode.movement[i], 3 * node);
  });
  return carryMovements(truss, shares, own);
}

/** The nodes that hang on each real node through bars that carry them, however many one after another. */
function carriedNodes(truss: Truss): Map<number, number[]> {
  const out = new Map<number, number[]>();
  leverShares(truss).forEach((parents, i) => {
    if (truss.nodes[i].carriedBy !== null) for (const [parent] of parents) pushTo(out, parent, i);
  });
  return out;
}

/** Relative movements below this share of a mode's largest are rounding. */
const NOTHING = 1e-9;

function acrossOf(truss: Truss, bar: number, moves: Float64Array): Turn['across'] | null {
  const { from, to, length } = truss.bars[bar];
  if (length === 0) return null;
  const [p, q] = [truss.nodes[from].at, truss.nodes[to].at];
  const relative = [0, 1, 2].map((axis) => moves[3 * to + axis] - moves[3 * from + axis]);
  const direction = [0, 1, 2].map((axis) => (q[axis] - p[axis]) / length);
  const along = relative[0] * direction[0] + relative[1] * direction[1] + relative[2] * direction[2];
  const across = relative.map((v, axis) => v - along * direction[axis]) as [number, number, number];
  return Math.hypot(...across) > NOTHING ? across : null;
}
