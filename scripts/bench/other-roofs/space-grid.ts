import type { Vec3 } from '../../../src/domain/vector.ts';
import type { Chance } from '../roofs/chance.ts';
import type { DrawingBoard } from '../roofs/drawing-board.ts';
import { CHS, nearest } from '../roofs/profiles.ts';

/** Two layers of squares, the lower under the middles of the upper; every tube stops at the node's ball. */
export function drawSpaceGrid(board: DrawingBoard, chance: Chance): void {
  const [nx, ny] = [chance.whole(3, 6), chance.whole(3, 6)];
  const side = chance.between(1.5, 3);
  const height = side * chance.between(0.6, 0.9);
  const chord = nearest(CHS, side * 0.035);
  const web = nearest(CHS, side * 0.028);
  const ball = chance.between(0.4, 1.1) * chord.depth;
  const top = (i: number, j: number) => `t${i}.${j}`;
  const low = (i: number, j: number) => `b${i}.${j}`;
  for (let i = 0; i <= nx; i++) {
    for (let j = 0; j <= ny; j++) {
      const isCorner = (i === 0 || i === nx) && (j === 0 || j === ny);
      board.joint(top(i, j), [i * side, j * side, height], { supported: isCorner });
      if (i < nx && j < ny) board.joint(low(i, j), [(i + 0.5) * side, (j + 0.5) * side, 0]);
    }
  }
  const tube = (a: string, b: string, frame: number, role: 'top chord' | 'bottom chord' | 'web') => {
    const profile = role === 'web' ? web : chord;
    const up: Vec3 = role === 'web' ? [1, 0, 0] : [0, 0, 1];
    board.draw({ key: `${a}-${b}`, role, profile, zAxis: up, frame, joints: [a, b], cuts: [ball, ball] });
  };
  for (let j = 0; j <= ny; j++) {
    for (let i = 0; i <= nx; i++) {
      if (i < nx) tube(top(i, j), top(i + 1, j), j, 'top chord');
      if (j < ny) tube(top(i, j), top(i, j + 1), j, 'top chord');
      if (i >= nx || j >= ny) continue;
      if (i + 1 < nx) tube(low(i, j), low(i + 1, j), j, 'bottom chord');
      if (j + 1 < ny) tube(low(i, j), low(i, j + 1), j, 'bottom chord');
      for (const [p, q] of [
        [i, j],
        [i + 1, j],
        [i, j + 1],
        [i + 1, j + 1],
      ] as const) {
        tube(low(i, j), top(p, q), j, 'web');
      }
    }
  }
}
