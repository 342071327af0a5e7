import type { Vec3 } from '../../domain/vector.ts';

/** m, in plan. */
export interface PlanBox {
  left: number;
  low: number;
  right: number;
  high: number;
}

/** Points sorted into square cells in plan, in flat arrays: built once, asked many times for what lies below a height. */
export class PlanGrid {
  readonly #left: number;
  readonly #low: number;
  readonly #size: number;
  readonly #columns: number;
  readonly #rows: number;
  /** Where the points of each cell begin in the arrays below; one entry more than there are cells. */
  readonly #starts: Int32Array;
  readonly #index: Int32Array;
  readonly #position: Int32Array;
  readonly #x: Float64Array;
  readonly #y: Float64Array;
  readonly #z: Float64Array;

  /** @param size side of a cell, m; about the size of what will be asked for. Widened where it would make too many cells. */
  constructor(points: readonly Vec3[], size: number) {
    const count = points.length;
    const { left, low, right, high } = boxAround(points);
    [this.#left, this.#low] = [left, low];
    const fewEnough = Math.sqrt(((right - left) * (high - low)) / (4 * (count + 1)));
    this.#size = Math.max(size, 1e-3, fewEnough, Math.max(right - left, high - low) / (count + 1));
    this.#columns = Math.floor((right - left) / this.#size) + 1;
    this.#rows = Math.floor((high - low) / this.#size) + 1;
    this.#starts = new Int32Array(this.#columns * this.#rows + 1);
    this.#index = new Int32Array(count);
    this.#position = new Int32Array(count);
    [this.#x, this.#y, this.#z] = [new Float64Array(count), new Float64Array(count), new Float64Array(count)];
    this.#sort(points);
  }

  #sort(points: readonly Vec3[]): void {
    const cells = points.map(([x, y]) => this.#row(y) * this.#columns + this.#column(x));
    for (const cell of cells) this.#starts[cell + 1]++;
    for (let cell = 1; cell < this.#starts.length; cell++) this.#starts[cell] += this.#starts[cell - 1];
    const free = this.#starts.slice();
    points.forEach(([x, y, z], point) => {
      const position = free[cells[point]]++;
      this.#index[position] = point;
      this.#position[point] = position;
      this.#x[position] = x;
      this.#y[position] = y;
      this.#z[position] = z;
    });
  }

  /** Calls `visit` with every point that lies in the box, widened by `margin`, and lower than `ceiling`. */
  visitBelow(box: PlanBox, margin: number, ceiling: number, visit: (index: number) => void): void {
    const [left, right] = [box.left - margin, box.right + margin];
    const [low, high] = [box.low - margin, box.high + margin];
    const [firstColumn, lastColumn, lastRow] = [this.#column(left), this.#column(right), this.#row(high)];
    for (let row = this.#row(low); row <= lastRow; row++) {
      const end = this.#starts[row * this.#columns + lastColumn + 1];
      for (let i = this.#starts[row * this.#columns + firstColumn]; i < end; i++) {
        if (this.#z[i] >= ceiling) continue;
        const [x, y] = [this.#x[i], this.#y[i]];
        if (x >= left && x <= right && y >= low && y <= high) visit(this.#index[i]);
      }
    }
  }

  /** Takes a point out: it is visited no more. */
  remove(index: number): void {
    this.#z[this.#position[index]] = Infinity;
  }

  #column(x: number): number {
    return Math.min(this.#columns - 1, Math.max(0, Math.floor((x - this.#left) / this.#size)));
  }

  #row(y: number): number {
    return Math.min(this.#rows - 1, Math.max(0, Math.floor((y - this.#low) / this.#size)));
  }
}

function boxAround(points: readonly Vec3[]): PlanBox {
  if (points.length === 0) return { left: 0, low: 0, right: 0, high: 0 };
  const box = { left: Infinity, low: Infinity, right: -Infinity, high: -Infinity };
  for (const [x, y] of points) {
    box.left = Math.min(box.left, x);
    box.low = Math.min(box.low, y);
    box.right = Math.max(box.right, x);
    box.high = Math.max(box.high, y);
  }
  return box;
}
