import type { Member } from '../../../src/domain/member.ts';
import type { Truss } from '../../../src/domain/truss.ts';
import { distance, type Vec3 } from '../../../src/domain/vector.ts';
import type { Role, TrueJoint, TrueLine } from './drawing-board.ts';
import type { Roof } from './random-roof.ts';

/** A node of the truss an engineer would draw. */
export interface TrueNode {
  readonly key: string;
  readonly at: Vec3;
  readonly marks: readonly string[];
  /** The line that carries the node without being split there. */
  readonly carriedBy: string | null;
}

/** A bar by the nodes it joins and the members it is made of. */
export interface TrueBar {
  readonly nodes: readonly [string, string];
  readonly marks: readonly string[];
}

export interface Truth {
  readonly nodes: readonly TrueNode[];
  readonly bars: readonly TrueBar[];
}

/** They close no triangle on what carries them. */
const HANGS_ON: readonly Role[] = ['purlin', 'sag rod', 'stub'];
/** What carries when both could: the member that the others were brought to. */
const CARRIES: readonly Role[] = ['top chord', 'bottom chord', 'column', 'purlin'];

export function truthOf(roof: Roof): Truth {
  const nodes: TrueNode[] = [];
  const carriers = new Map<string, string | null>();
  for (const joint of roof.joints.values()) {
    if (!isNode(roof, joint)) continue;
    const carriedBy = carrierOf(roof, joint);
    carriers.set(joint.key, carriedBy);
    nodes.push({ key: joint.key, at: joint.at, marks: [...joint.meetings.keys()].sort(), carriedBy });
  }
  const bars = [...roof.lines.values()].flatMap((line) => barsOf(line, carriers));
  return { nodes, bars };
}

/** A tail in the air beyond two joints is cut off and its weight kept: no truss of pins carries it. A stub keeps its tip. */
function isNode(roof: Roof, joint: TrueJoint): boolean {
  if (!joint.free) return joint.supported || joint.lines.size > 1;
  return [...joint.lines].some((key) => roof.lines.get(key)!.stops.length === 2);
}

function carrierOf(roof: Roof, joint: TrueJoint): string | null {
  if (joint.supported) return null;
  const lines = [...joint.lines].map((key) => roof.lines.get(key)!);
  for (const role of CARRIES) {
    const carrier = lines.find((line) => line.role === role && runsThrough(line, joint.key));
    if (carrier && lines.every((line) => line === carrier || HANGS_ON.includes(line.role))) return carrier.key;
  }
  return null;
}

function runsThrough(line: TrueLine, joint: string): boolean {
  const index = line.stops.findIndex((stop) => stop.joint === joint);
  return index > 0 && index < line.stops.length - 1;
}

function barsOf(line: TrueLine, carriers: ReadonlyMap<string, string | null>): TrueBar[] {
  const splits = line.stops.filter(({ joint }) => carriers.has(joint) && carriers.get(joint) !== line.key);
  return splits.slice(1).map((end, i) => {
    const start = splits[i];
    const marks = line.pieces.filter((p) => p.from < end.at - 1e-6 && p.to > start.at + 1e-6).map((p) => p.mark);
    return { nodes: [start.joint, end.joint], marks: marks.sort() };
  });
}

/** One way in which a truss is not the truth. */
export interface Difference {
  readonly kind: 'node missing' | 'node too many' | 'carried wrongly' | 'bar missing' | 'bar too many';
  readonly at: Vec3;
  readonly expected: string;
  readonly found: string;
}

/** Differences of sets of members per node, of what is carried, and of bars between equal nodes. */
export function differences(roof: Roof, members: readonly Member[], truss: Truss): Difference[] {
  const truth = truthOf(roof);
  const marksOf = (list: readonly number[]) => list.map((m) => members[m].globalId).sort();
  const found: Difference[] = [];
  const left = new Map<string, number[]>();
  for (const [i, node] of truss.nodes.entries()) {
    const key = marksOf(node.members).join(' ');
    left.set(key, [...(left.get(key) ?? []), i]);
  }
  const nameOf = new Map<number, string>();
  for (const node of truth.nodes) {
    const same = left.get(node.marks.join(' ')) ?? [];
    const nearest = same.reduce<number | null>(
      (best, i) => (best === null || apart(truss, i, node.at) < apart(truss, best, node.at) ? i : best),
      null,
    );
    if (nearest === null || apart(truss, nearest, node.at) > 1) {
      const near = truss.nodes.map((_, i) => i).filter((i) => apart(truss, i, node.at) < 0.5);
      const there = near.map((i) => `{${marksOf(truss.nodes[i].members).join(' ')}}`).join(' ');
      found.push({
        kind: 'node missing',
        at: node.at,
        expected: `${node.key} {${node.marks.join(' ')}}`,
        found: there,
      });
      continue;
    }
    same.splice(same.indexOf(nearest), 1);
    nameOf.set(nearest, node.key);
    const isCarried = truss.nodes[nearest].carriedBy !== null;
    if (isCarried === (node.carriedBy !== null)) continue;
    const words = (carried: boolean) => (carried ? 'carried' : 'split');
    found.push({
      kind: 'carried wrongly',
      at: node.at,
      expected: `${node.key} {${node.marks.join(' ')}} ${words(!isCarried)}`,
      found: words(isCarried),
    });
  }
  for (const i of [...left.values()].flat()) {
    const node = truss.nodes[i];
    found.push({ kind: 'node too many', at: node.at, expected: '', found: `{${marksOf(node.members).join(' ')}}` });
  }
  return [...found, ...barDifferences(truth, truss, nameOf, marksOf)];
}

const apart = (truss: Truss, node: number, at: Vec3): number => distance(truss.nodes[node].at, at);

function barDifferences(
  truth: Truth,
  truss: Truss,
  nameOf: ReadonlyMap<number, string>,
  marksOf: (list: readonly number[]) => string[],
): Difference[] {
  const keyOf = (nodes: readonly string[], marks: readonly string[]) =>
    `${[...nodes].sort().join(' - ')}: ${marks.join(' ')}`;
  const places = new Map(truth.nodes.map((node) => [node.key, node.at]));
  const expected = new Map(truth.bars.map((bar) => [keyOf(bar.nodes, bar.marks), places.get(bar.nodes[0])!]));
  const found: Difference[] = [];
  for (const bar of truss.bars) {
    const name = (i: number) => nameOf.get(i) ?? `?${i}`;
    const key = keyOf([name(bar.from), name(bar.to)], marksOf(bar.members));
    if (expected.delete(key)) continue;
    found.push({ kind: 'bar too many', at: truss.nodes[bar.from].at, expected: '', found: key });
  }
  for (const [key, at] of expected) found.push({ kind: 'bar missing', at, expected: key, found: '' });
  return found;
}
