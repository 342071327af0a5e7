/** A square-on-square double-layer grid of `cells` x `cells` pyramids, 2.5 m wide and 1.8 m deep, pinned along the edge of its upper layer. */
export function doubleLayerGrid(cells) {
  const points = [];
  const upper = (i, j) => i * (cells + 1) + j;
  const lower = (i, j) => (cells + 1) ** 2 + i * cells + j;
  for (let i = 0; i <= cells; i++) for (let j = 0; j <= cells; j++) points.push([2.5 * i, 2.5 * j, 1.8]);
  for (let i = 0; i < cells; i++) for (let j = 0; j < cells; j++) points.push([2.5 * i + 1.25, 2.5 * j + 1.25, 0]);
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
  for (let i = 0; i < cells; i++)
    for (let j = 0; j < cells; j++)
      for (const [di, dj] of [
        [0, 0],
        [0, 1],
        [1, 0],
        [1, 1],
      ])
        bars.push([lower(i, j), upper(i + di, j + dj)]);
  const onEdge = (i) => i === 0 || i === cells;
  const held = [];
  for (let i = 0; i <= cells; i++) for (let j = 0; j <= cells; j++) if (onEdge(i) || onEdge(j)) held.push(upper(i, j));
  return { points, bars, held };
}
