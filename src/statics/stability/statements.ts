import type { Truss } from '../../domain/truss.ts';
import type { Vec3 } from '../../domain/vector.ts';
import { UnionFind } from '../model/union-find.ts';
import type { Mode, Remedy } from '../types.ts';
import { AT_REST, groupByNodes } from './localise.ts';
import type { Names } from './names.ts';
import { tidyDirection } from './reduce.ts';
import { count, directionInWords } from './words.ts';

/** What one cause lets move: a mode, or several over the same nodes that are one thing to know. */
export interface Statement {
  readonly sentence: string;
  /** Statements of one key are alike. */
  readonly key: string;
  readonly owner: string | null;
  readonly nodes: readonly number[];
  readonly order: Mode['order'];
  /** The node that the reader is shown. */
  readonly shown: number;
  readonly hold: string | null;
  readonly remedy: readonly Remedy[];
  readonly bars: readonly Remedy[];
}

/** The modes as they were listed, with what there is besides. */
export interface Movable {
  readonly modes: readonly Mode[];
  /** Modes that were not worked out: nodes, and in how many more ways they move. */
  readonly more: readonly { readonly nodes: readonly number[]; readonly ways: number }[];
}

/** Several kinds of modes over the same nodes, up to this many, are said one by one; more are a tangle. */
const KINDS_TOLD = 3;

/** Cosine of the angle within which movements count as along one line. */
const ALONG = 1 - 1e-4;

export function statements(truss: Truss, names: Names, { modes: listed, more }: Movable): Statement[] {
  const modes = listed.map(mainPart);
  const all = [...modes.map((mode) => mode.nodes), ...more.map(({ nodes }) => nodes)];
  const clusters = groupByNodes(all).map((group) => {
    const own = group.filter((i) => i < modes.length).map((i) => modes[i]);
    const beyond = group.filter((i) => i >= modes.length).map((i) => more[i - modes.length]);
    return { modes: own, more: beyond, across: beyond.length > 0 ? null : acrossOf(truss, own) };
  });
  const loose = clusters.filter(({ across }) => across === null);
  const flat = clusters.flatMap(({ modes: own, across }) => (across === null ? [] : [{ modes: own, across }]));
  return [
    ...sheets(truss, flat).map(({ modes: own, across }) => alongLine(truss, names, own, nodesOf(own), across)),
    ...loose.flatMap((cluster) => aboutCluster(truss, names, cluster.modes, cluster.more)),
  ];
}

/** The mode at the nodes that move so that one can see it. */
function mainPart(mode: Mode): Mode {
  const most = Math.max(...mode.movement.map((v) => Math.hypot(...v)));
  const kept = mode.nodes.map((_, i) => i).filter((i) => Math.hypot(...mode.movement[i]) > AT_REST * most);
  return { ...mode, nodes: kept.map((i) => mode.nodes[i]), movement: kept.map((i) => mode.movement[i]) };
}

interface Sheet {
  readonly modes: readonly Mode[];
  readonly across: Vec3;
}

/** The line at right angles to all bars of what moves along it and no other way: out of the plane of a flat truss. Null for others. */
export function acrossOf(truss: Truss, modes: readonly Mode[]): Vec3 | null {
  const line = commonLine(modes);
  return line !== null && isAcross(truss, nodesOf(modes), line) ? line : null;
}

/** Puts together what moves out of one plane and is joined by bars: the nodes of one flat truss. */
function sheets(truss: Truss, flat: readonly Sheet[]): Sheet[] {
  const owner = new Map<number, number>();
  flat.forEach(({ modes }, i) => {
    for (const node of nodesOf(modes)) owner.set(node, i);
  });
  const sets = new UnionFind(flat.length);
  for (const { from, to } of truss.bars) {
    const [a, b] = [owner.get(from), owner.get(to)];
    if (a === undefined || b === undefined) continue;
    const [p, q] = [flat[a].across, flat[b].across];
    if (Math.abs(p[0] * q[0] + p[1] * q[1] + p[2] * q[2]) > ALONG) sets.join(a, b);
  }
  const groups = new Map<number, Sheet>();
  flat.forEach((sheet, i) => {
    const before = groups.get(sets.find(i));
    groups.set(sets.find(i), before ? { ...before, modes: [...before.modes, ...sheet.modes] } : sheet);
  });
  return [...groups.values()];
}

function aboutCluster(truss: Truss, names: Names, modes: readonly Mode[], more: Movable['more']): Statement[] {
  const ways = modes.length + more.reduce((sum, one) => sum + one.ways, 0);
  if (more.length > 0) return [tangle(names, modes, more, ways)];
  if (modes.length === 1) return [single(names, modes[0])];
  const line = commonLine(modes);
  const nodes = nodesOf(modes);
  if (line !== null) return [alongLine(truss, names, modes, nodes, line)];
  if (nodes.length === 1) return [oneNode(names, modes, nodes[0])];
  const kinds = new Map<string, Mode[]>();
  for (const mode of modes) kinds.set(likenessOf(mode), [...(kinds.get(likenessOf(mode)) ?? []), mode]);
  if (kinds.size > KINDS_TOLD) return [tangle(names, modes, more, ways)];
  return modes.map((mode) => single(names, mode));
}

function single(names: Names, mode: Mode): Statement {
  return {
    sentence: mode.words,
    key: likenessOf(mode),
    owner: names.owner(mode.nodes),
    nodes: mode.nodes,
    order: mode.order,
    shown: mode.nodes[indexOfMost(mode)],
    hold: null,
    remedy: mode.remedy,
    bars: mode.otherRemedy,
  };
}

/** Nodes that all move along one line, most often a truss that nothing holds out of its plane. */
function alongLine(
  truss: Truss,
  names: Names,
  modes: readonly Mode[],
  nodes: readonly number[],
  line: Vec3,
): Statement {
  const owner = names.owner(nodes);
  if (modes.length === 1 && nodes.length > 1) return single(names, modes[0]);
  const flat = isAcross(truss, nodes, line);
  const who = names.subject(nodes);
  const it = nodes.length === 1 ? 'it' : 'them';
  const ways = modes.length === nodes.length ? ', each by itself' : `, in ${modes.length} independent ways`;
  const each = nodes.length === 1 ? '' : ways;
  const plane = owner === null ? `the plane of ${nodes.length === 1 ? 'its' : 'their'} bars` : 'plane';
  const why = flat ? `nothing holds ${it} out of ${plane}` : `no bar holds ${it} in that direction`;
  const way = directionInWords(line);
  return {
    sentence: `${who} can move ${way}${each}: ${why}`,
    key: ['line', owner === null ? nodes.length : 'owned', flat, way, orderOf(modes)].join('|'),
    owner,
    nodes,
    order: orderOf(modes),
    shown: nodes[nodes.length >> 1],
    hold: modes.length === nodes.length ? `${who} ${way}` : null,
    remedy: modes.flatMap((mode) => mode.remedy),
    bars: modes.flatMap((mode) => mode.otherRemedy),
  };
}

function oneNode(names: Names, modes: readonly Mode[], node: number): Statement {
  const ways = modes.map((mode) => directionInWords(tidyDirection(mode.movement[0])));
  return {
    sentence: `${names.subject([node])} can move in ${count(modes.length, 'way')}: ${ways.join(', ')}; no bar holds it there`,
    key: ['node', modes.length, ...ways].join('|'),
    owner: names.owner([node]),
    nodes: [node],
    order: orderOf(modes),
    shown: node,
    hold: null,
    remedy: modes.flatMap((mode) => mode.remedy),
    bars: modes.flatMap((mode) => mode.otherRemedy),
  };
}

function tangle(names: Names, modes: readonly Mode[], more: Movable['more'], ways: number): Statement {
  const nodes = [...new Set([...nodesOf(modes), ...more.flatMap((one) => one.nodes)])].sort((a, b) => a - b);
  const smallest = modes.reduce<Mode | null>(
    (least, mode) => (least === null || mode.nodes.length < least.nodes.length ? mode : least),
    null,
  );
  const example = smallest === null ? '' : `; one of them: ${smallest.words}`;
  return {
    sentence: `${names.subject(nodes)} can move in ${count(ways, 'independent way')} without straining a bar${example}`,
    key: ['tangle', nodes.length, ways].join('|'),
    owner: names.owner(nodes),
    nodes,
    order: orderOf(modes),
    shown: smallest === null ? nodes[0] : smallest.nodes[indexOfMost(smallest)],
    hold: null,
    remedy: modes.flatMap((mode) => mode.remedy),
    bars: modes.flatMap((mode) => mode.otherRemedy),
  };
}

function orderOf(modes: readonly Mode[]): Mode['order'] {
  const first = modes[0]?.order ?? 'undecided';
  return modes.every((mode) => mode.order === first) ? first : 'undecided';
}

const nodesOf = (modes: readonly Mode[]): number[] =>
  [...new Set(modes.flatMap((mode) => mode.nodes))].sort((a, b) => a - b);

/** The line along which every node of every mode moves; null where there is none. */
function commonLine(modes: readonly Mode[]): Vec3 | null {
  const first = tidyDirection(modes[0].movement[indexOfMost(modes[0])]);
  for (const mode of modes)
    for (const v of mode.movement) {
      const along = Math.abs(v[0] * first[0] + v[1] * first[1] + v[2] * first[2]);
      if (along < ALONG * Math.hypot(...v)) return null;
    }
  return first;
}

/** Whether every bar at the nodes lies at right angles to the line, but for the drawing's tolerance. */
function isAcross(truss: Truss, nodes: readonly number[], line: Vec3): boolean {
  const at = new Set(nodes);
  return truss.bars.every(({ from, to, length }) => {
    if (!at.has(from) && !at.has(to)) return true;
    const [p, q] = [truss.nodes[from].at, truss.nodes[to].at];
    const along = line[0] * (q[0] - p[0]) + line[1] * (q[1] - p[1]) + line[2] * (q[2] - p[2]);
    return Math.abs(along) < 0.02 * length;
  });
}

/** Alike: of one kind, as many nodes, moving the same ways by the same amounts. */
function likenessOf(mode: Mode): string {
  const moves = mode.movement.map((v) => v.map((c) => Math.abs(c).toFixed(2)).join(' ')).sort();
  return [mode.kind, mode.order, ...moves].join('|');
}

export function indexOfMost(mode: Mode): number {
  let best = 0;
  const size = (i: number) => Math.hypot(...mode.movement[i]);
  mode.movement.forEach((_, i) => {
    if (size(i) > size(best) + 1e-9) best = i;
  });
  return best;
}
