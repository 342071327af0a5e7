import { along, subtract, UP, unit } from '../../../src/domain/vector.ts';
import { faceDistance } from './design.ts';
import type { DrawingBoard } from './drawing-board.ts';
import { ACROSS, type FramePlan, nodeKey, partFor, SPAN, zAxisOf } from './frame-plan.ts';
import type { Run } from './truss-shapes.ts';

/** Columns under or beside the truss's bearings, posts under a gable truss, brackets on the columns' outer faces. */
export function drawColumns(board: DrawingBoard, plan: FramePlan): void {
  for (const side of [0, 1] as const) drawColumn(board, plan, side);
  for (const name of plan.gablePosts) drawGablePost(board, plan, name);
}

function drawColumn(board: DrawingBoard, plan: FramePlan, side: 0 | 1): void {
  const { shape, design, columnHeight, index, stub, detail } = plan;
  const name = shape.bearings[side];
  const foot = board.at(nodeKey(index, name));
  const base = `${nodeKey(index, name)}/base`;
  board.joint(base, [foot[0], foot[1], foot[2] - columnHeight], { supported: true });
  const head = shape.bearing === 'beside' ? name.replace('b', 't') : name;
  const joints = [base];
  if (stub > 0) {
    const root = board.joint(`${base}/stub`, [foot[0], foot[1], foot[2] - 0.4 * columnHeight]);
    joints.push(root);
    drawStub(board, plan, root, side === 0 ? -1 : 1);
  }
  if (head !== name) joints.push(nodeKey(index, name));
  const under = shape.runs.filter((run) => run.role !== 'web' && run.nodes.includes(name));
  const chordBelow = Math.max(0, ...under.map((run) => underside(board, plan, run)));
  board.draw({
    key: `C${index}${side === 0 ? 'L' : 'R'}`,
    role: 'column',
    profile: design.column,
    zAxis: SPAN,
    frame: index,
    joints: [...joints, nodeKey(index, head)],
    cuts: [0, head === name ? chordBelow + detail.columnGap : -chordBelow - 2 * detail.columnGap],
  });
}

/** From a chord's axis down to its lower face. */
function underside(board: DrawingBoard, { design, index }: FramePlan, run: Run): number {
  const ends = [run.nodes.at(-1)!, run.nodes[0]].map((node) => board.at(nodeKey(index, node)));
  const direction = unit(subtract(ends[0], ends[1]))!;
  const part = partFor(design, run);
  return faceDistance({ direction, profile: part.profile, zAxis: zAxisOf(run, part, direction) }, [0, 0, -1]);
}

function drawStub(board: DrawingBoard, { design, stub, index, detail }: FramePlan, root: string, side: number): void {
  const tip = board.joint(`${root}/tip`, along(board.at(root), SPAN, side * stub), { free: true });
  board.draw({
    key: `S${index}${side < 0 ? 'L' : 'R'}`,
    role: 'stub',
    profile: design.column,
    zAxis: UP,
    frame: index,
    joints: [root, tip],
    cuts: [design.column.depth / 2 + detail.columnGap, 0],
  });
}

function drawGablePost(board: DrawingBoard, plan: FramePlan, name: string): void {
  const { design, columnHeight, index, detail, shape } = plan;
  const key = nodeKey(index, name);
  const head = board.at(key);
  const base = board.joint(`${key}/base`, [head[0], head[1], head[2] - columnHeight], { supported: true });
  const chord = shape.runs.find((run) => run.role === 'bottom chord')!;
  board.draw({
    key: `GP${index}-${name}`,
    role: 'gable post',
    profile: design.column,
    zAxis: ACROSS,
    frame: index,
    joints: [base, key],
    cuts: [0, underside(board, plan, chord) + detail.columnGap],
  });
}
