import type { Truss } from '../../domain/truss.ts';
import type { Vec3 } from '../../domain/vector.ts';
import { type Graph, graphOf } from '../engine/graph.ts';
import type { Elongations } from './elongation.ts';
import { type Movement, STRIDE, spread } from './movement.ts';

const AXES: readonly Vec3[] = [
  [1, 0, 0],
  [0, 1, 0],
  [0, 0, 1],
];

/**
 * Which nodes a bar or spring can couple in whatever direction it comes to lie: the pattern of K, of K_G and of both after the nodes have moved.
 * Nodes that carry an end stand for it, and nodes that others follow.
 */
export function coupleEnds(truss: Truss, movement: Movement, { bars, springs }: Elongations): Graph {
  const ends: number[] = [];
  const touched: number[] = [];
  const touch = (node: number) => {
    for (const axis of AXES)
      spread(movement, node, axis, 1, (unknown) => {
        const block = Math.floor(unknown / STRIDE);
        if (!touched.includes(block)) touched.push(block);
      });
  };
  const couple = () => {
    for (let i = 0; i < touched.length; i++)
      for (let j = i + 1; j < touched.length; j++) ends.push(touched[i], touched[j]);
    touched.length = 0;
  };
  for (const b of bars) {
    touch(truss.bars[b].from);
    touch(truss.bars[b].to);
    couple();
  }
  for (const { node } of springs) {
    touch(node);
    couple();
  }
  return graphOf(truss.nodes.length, ends);
}
