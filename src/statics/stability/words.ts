import type { Truss } from '../../domain/truss.ts';
import { norm, type Vec3 } from '../../domain/vector.ts';
import type { Mode } from '../types.ts';
import type { FoundMode } from './find-modes.ts';
import { movingNodes } from './localise.ts';
import { tidyDirection } from './reduce.ts';

/** Movements that stretch bars by more than this share are told with it: less is rounding of the model's coordinates. */
const WORTH_SAYING = 1e-6;

/** Nodes that a sentence names one by one. */
const FEW = 3;

/** A node in words: its place in the building, or its coordinates to the millimetre. */
export function nodeInWords(truss: Truss, node: number): string {
  const { at, place } = truss.nodes[node];
  return place ?? `(${at.map((v) => plain(v, 3)).join(', ')})`;
}

/** "up and down (along z)", "sideways (along y)", "along (0.60, 0.80, 0.00)". */
export function directionInWords(direction: Vec3): string {
  const axis = direction.findIndex((v) => Math.abs(v) > 1 - 1e-6);
  if (axis === 2) return 'up and down (along z)';
  if (axis >= 0) return `sideways (along ${'xy'[axis]})`;
  const vector = `along (${direction.map((v) => plain(v, 2)).join(', ')})`;
  return Math.abs(direction[2]) < 1e-6 ? `sideways (${vector})` : vector;
}

export function modeInWords(truss: Truss, mode: FoundMode, kind: Mode['kind']): string {
  const nodes = movingNodes(truss, mode.moves);
  const note =
    mode.stretch > WORTH_SAYING ? ` (stretching bars by ${mode.stretch.toExponential(0)} of the movement)` : '';
  if (mode.rigid !== null) return rigidInWords(truss, mode, kind, nodes) + note;
  const directions = nodes.map((i) => movementDirection(mode.moves, i));
  const common = directions.every(
    (d) => Math.abs(d[0] * directions[0][0] + d[1] * directions[0][1] + d[2] * directions[0][2]) > 1 - 1e-6,
  );
  const most = [...nodes].sort((a, b) => sizeAt(mode.moves, b) - sizeAt(mode.moves, a) || a - b)[0];
  const who = listNodes(truss, nodes);
  if (kind === 'part') {
    const how = directionInWords(movementDirection(mode.moves, most));
    return `${count(nodes.length, 'node')} can move as one body against the rest, the node at ${nodeInWords(truss, most)} ${how}${note}`;
  }
  if (common) {
    const way = directionInWords(directions[0]);
    if (nodes.length === 1) return `the node at ${who} can move ${way}: no bar holds it in that direction${note}`;
    return `the nodes at ${who} can move ${way} together: no bar holds them in that direction${note}`;
  }
  const way = directionInWords(movementDirection(mode.moves, most));
  const others = nodes.length > FEW ? count(nodes.length, 'node') : `the nodes at ${who}`;
  return `${others} can move together without straining a bar, the one at ${nodeInWords(truss, most)} most, ${way}${note}`;
}

function rigidInWords(truss: Truss, mode: FoundMode, kind: Mode['kind'], nodes: readonly number[]): string {
  const { shift, turn, centre } = mode.rigid!.twist;
  const who =
    kind === 'whole'
      ? 'the whole truss'
      : `a part of ${count(nodes.length, 'node')} about ${nodeInWords(truss, nodes[0])}`;
  if (norm(turn) === 0) return `${who} can move ${directionInWords(tidyDirection(shift))} as one body`;
  const size = turn[0] ** 2 + turn[1] ** 2 + turn[2] ** 2;
  // The axis of the turn passes where turn x (point - centre) undoes the shift.
  const point: Vec3 = [
    centre[0] + (turn[1] * shift[2] - turn[2] * shift[1]) / size,
    centre[1] + (turn[2] * shift[0] - turn[0] * shift[2]) / size,
    centre[2] + (turn[0] * shift[1] - turn[1] * shift[0]) / size,
  ];
  const axis = tidyDirection(turn);
  const line = axis.findIndex((v) => Math.abs(v) > 1 - 1e-6);
  const along = line >= 0 ? 'xyz'[line] : `(${axis.map((v) => plain(v, 2)).join(', ')})`;
  return `${who} can turn about a line along ${along} through (${point.map((v) => plain(v, 3)).join(', ')}) as one body`;
}

function listNodes(truss: Truss, nodes: readonly number[]): string {
  const shown = nodes.slice(0, FEW).map((i) => nodeInWords(truss, i));
  if (nodes.length > FEW) return `${shown.join(', ')} and ${nodes.length - FEW} more`;
  return shown.length === 1 ? shown[0] : `${shown.slice(0, -1).join(', ')} and ${shown[shown.length - 1]}`;
}

export function movementDirection(moves: Float64Array, node: number): Vec3 {
  return tidyDirection([moves[3 * node], moves[3 * node + 1], moves[3 * node + 2]]);
}

export function sizeAt(moves: Float64Array, node: number): number {
  return Math.hypot(moves[3 * node], moves[3 * node + 1], moves[3 * node + 2]);
}

export const count = (n: number, one: string, many = `${one}s`): string => `${n} ${n === 1 ? one : many}`;

function plain(v: number, digits: number): string {
  const text = v.toFixed(digits);
  return Number(text) === 0 ? (0).toFixed(digits) : text;
}
