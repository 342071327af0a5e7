import { buildRows } from '../../dist/statics/engine/system.js';

/**
 * A square-on-square double-layer grid of `cells` x `cells` pyramids, 2.5 m wide and 1.8 m deep, its upper layer held along the edge; turned about the
 * vertical by `turn` (rad), which leaves no zeros inside the node blocks.
 */
export function doubleLayerGrid(cells, turn) {
  const points = [];
  const upper = (i, j) => i * (cells + 1) + j;
  const lower = (i, j) => (cells + 1) ** 2 + i * cells + j;
  const put = (x, y, z) =>
    points.push([x * Math.cos(turn) - y * Math.sin(turn), x * Math.sin(turn) + y * Math.cos(turn), z]);
  for (let i = 0; i <= cells; i++) for (let j = 0; j <= cells; j++) put(2.5 * i, 2.5 * j, 1.8);
  for (let i = 0; i < cells; i++) for (let j = 0; j < cells; j++) put(2.5 * i + 1.25, 2.5 * j + 1.25, 0);
  const bars = [];
  const join = (size, at) => {
    for (let i = 0; i < size; i++)
      for (let j = 0; j < size; j++) {
        if (i + 1 < size) bars.push([at(i, j), at(i + 1, j)]);
        if (j + 1 < size) bars.push([at(i, j), at(i, j + 1)]);
      }
  };
  join(cells + 1, upper);
  join(cells, lower);
  const corners = [0, 1].flatMap((di) => [0, 1].map((dj) => [di, dj]));
  for (let i = 0; i < cells; i++)
    for (let j = 0; j < cells; j++) for (const [di, dj] of corners) bars.push([lower(i, j), upper(i + di, j + dj)]);
  const isEdge = (i) => i === 0 || i === cells;
  const held = [];
  for (let i = 0; i <= cells; i++) for (let j = 0; j <= cells; j++) if (isEdge(i) || isEdge(j)) held.push(upper(i, j));
  return { points, bars, held };
}

/** The grid as the engine takes it: freedoms, one row a bar, EA/L, and a load down at every free node. */
export function gridSystem(cells, turn = 0) {
  const { points, bars, held } = doubleLayerGrid(cells, turn);
  const active = new Uint8Array(3 * points.length).fill(1);
  for (const node of held) active.fill(0, 3 * node, 3 * node + 3);
  const between = ([a, b]) => points[b].map((v, k) => v - points[a][k]);
  const rows = buildRows(bars.length, (row, put) => {
    const [a, b] = bars[row];
    const d = between(bars[row]);
    const length = Math.hypot(...d);
    for (let k = 0; k < 3; k++) {
      if (d[k] === 0) continue;
      if (active[3 * a + k]) put(3 * a + k, -d[k] / length);
      if (active[3 * b + k]) put(3 * b + k, d[k] / length);
    }
  });
  const stiffness = Float64Array.from(bars, (bar) => 4e8 / Math.hypot(...between(bar)));
  const load = Float64Array.from(active, (flag, u) => (flag && u % 3 === 2 ? -1e4 : 0));
  return { freedoms: { blocks: points.length, stride: 3, active }, rows, stiffness, load };
}
