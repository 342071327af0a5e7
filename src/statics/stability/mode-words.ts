import type { Truss } from '../../domain/truss.ts';
import { norm, type Vec3 } from '../../domain/vector.ts';
import type { Mode } from '../types.ts';
import type { FoundMode } from './find-modes.ts';
import { AT_REST, movingNodes } from './localise.ts';
import type { Names } from './names.ts';
import { tidyDirection } from './reduce.ts';
import { count, directionInWords, movementDirection, nodeInWords, plain, sizeAt } from './words.ts';

/** Movements that stretch bars by more than this share are told with it: less is rounding of the model's coordinates. */
const WORTH_SAYING = 1e-6;

/** Nodes that a sentence names one by one. */
const FEW = 3;

export function modeInWords(truss: Truss, names: Names, mode: FoundMode, kind: Mode['kind']): string {
  const nodes = movingNodes(truss, mode.moves, AT_REST);
  const note =
    mode.stretch > WORTH_SAYING ? ` (stretching bars by ${mode.stretch.toExponential(0)} of the movement)` : '';
  if (mode.rigid !== null) return rigidInWords(truss, mode, kind, nodes) + note;
  const directions = nodes.map((i) => movementDirection(mode.moves, i));
  const common = directions.every(
    (d) => Math.abs(d[0] * directions[0][0] + d[1] * directions[0][1] + d[2] * directions[0][2]) > 1 - AT_REST ** 2,
  );
  const most = [...nodes].sort((a, b) => sizeAt(mode.moves, b) - sizeAt(mode.moves, a) || a - b)[0];
  const who = names.subject(nodes);
  const way = directionInWords(movementDirection(mode.moves, most));
  if (nodes.length === 1) return `${who} can move ${way}: no bar holds it in that direction${note}`;
  const least = Math.min(...nodes.map((i) => sizeAt(mode.moves, i)));
  if (common && least > 0.99 * sizeAt(mode.moves, most)) {
    const near = nodes.length > FEW ? `, near ${nodeInWords(truss, most)}` : '';
    return `${who} can move ${way} together${near}: no bar holds them in that direction${note}`;
  }
  const where = `the one at ${nodeInWords(truss, most)} most, ${way}`;
  if (kind === 'part') return `${who} can move as one body against the rest, ${where}${note}`;
  return `${who} can move together without straining a bar, ${where}${note}`;
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
