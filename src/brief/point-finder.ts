import type { Truss } from '../domain/truss.ts';
import { distance, type Vec3 } from '../domain/vector.ts';

/** m; points that the model gives coincide with joints of its members to less than this. */
export const SAME_POINT = 1e-3;

const CELL = 10 * SAME_POINT;

/** Finds the node nearest to a point, at most `SAME_POINT` away; null where none is. */
export function nodeFinder(truss: Truss): (at: Vec3) => number | null {
  const cells = new Map<string, number[]>();
  const cellOf = (at: Vec3): [number, number, number] => [
    Math.round(at[0] / CELL),
    Math.round(at[1] / CELL),
    Math.round(at[2] / CELL),
  ];
  truss.nodes.forEach(({ at }, node) => {
    const key = cellOf(at).join(' ');
    cells.set(key, [...(cells.get(key) ?? []), node]);
  });
  return (at) => {
    let best: number | null = null;
    let least = SAME_POINT;
    const [x, y, z] = cellOf(at);
    for (const i of NEIGHBOURS) {
      for (const node of cells.get(`${x + i[0]} ${y + i[1]} ${z + i[2]}`) ?? []) {
        const away = distance(at, truss.nodes[node]!.at);
        if (away > least) continue;
        least = away;
        best = node;
      }
    }
    return best;
  };
}

const NEIGHBOURS: readonly Vec3[] = [-1, 0, 1].flatMap((x) =>
  [-1, 0, 1].flatMap((y) => [-1, 0, 1].map((z): Vec3 => [x, y, z])),
);
