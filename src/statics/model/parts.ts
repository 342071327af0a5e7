import type { Truss } from '../../domain/truss.ts';
import type { Supports } from '../types.ts';
import { UnionFind } from './union-find.ts';

/** What is judged and solved, and what is set aside because nothing supports it. */
export interface Parts {
  /** Part of each node, numbered from 0 in the order of their first node; -1 for a node nothing joins or holds. */
  readonly partOf: Int32Array;
  readonly count: number;
  readonly freeBody: boolean;
  readonly liveNode: Uint8Array;
  readonly liveBar: Uint8Array;
  /** Bars of unsupported parts. */
  readonly setAside: readonly number[];
}

/** Parts hang together through bars and carriages. With any support at all, those without one are set aside. */
export function findParts(truss: Truss, supports: Supports): Parts {
  const { nodes, bars } = truss;
  const sets = new UnionFind(nodes.length);
  const touched = new Uint8Array(nodes.length);
  for (const bar of bars) {
    sets.join(bar.from, bar.to);
    touched[bar.from] = 1;
    touched[bar.to] = 1;
  }
  nodes.forEach((node, i) => {
    if (node.carriedBy === null) return;
    sets.join(i, bars[node.carriedBy.bar].from);
    touched[i] = 1;
  });
  const held = [...supports.restraints, ...supports.springs].map((support) => support.node);
  for (const node of held) touched[node] = 1;

  const partOf = new Int32Array(nodes.length).fill(-1);
  const number = new Map<number, number>();
  for (let i = 0; i < nodes.length; i++) {
    if (!touched[i]) continue;
    const top = sets.find(i);
    if (!number.has(top)) number.set(top, number.size);
    partOf[i] = number.get(top)!;
  }
  const freeBody = held.length === 0;
  const supported = new Uint8Array(number.size).fill(freeBody ? 1 : 0);
  for (const node of held) supported[partOf[node]] = 1;
  const liveNode = Uint8Array.from(partOf, (part) => (part >= 0 ? supported[part] : 0));
  const liveBar = Uint8Array.from(bars, (bar) => liveNode[bar.from]);
  const setAside = bars.map((_, b) => b).filter((b) => !liveBar[b]);
  return { partOf, count: number.size, freeBody, liveNode, liveBar, setAside };
}
