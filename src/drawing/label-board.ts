/** Keeps labels apart: a place is taken only if nothing stands there yet. */

/** A rectangle on paper (mm), turned by `angle` (rad) about its middle. */
export interface LabelBox {
  readonly x: number;
  readonly y: number;
  readonly width: number;
  readonly height: number;
  readonly angle: number;
}

/** mm; cells of the index, about the size of a label. */
const CELL = 8;

export class LabelBoard {
  private readonly cells = new Map<string, LabelBox[]>();
  private readonly limits: {
    readonly left: number;
    readonly top: number;
    readonly right: number;
    readonly bottom: number;
  };

  constructor(left: number, top: number, right: number, bottom: number) {
    this.limits = { left, top, right, bottom };
  }

  /** Takes the place if it is free and on the board. */
  take(box: LabelBox): boolean {
    if (!this.isFree(box)) return false;
    this.block(box);
    return true;
  }

  isFree(box: LabelBox): boolean {
    const { left, top, right, bottom } = this.limits;
    for (const [x, y] of cornersOf(box)) if (x < left || x > right || y < top || y > bottom) return false;
    return this.keysOf(box).every((key) => (this.cells.get(key) ?? []).every((other) => !overlap(box, other)));
  }

  /** Keeps a place free of labels. */
  block(box: LabelBox): void {
    for (const key of this.keysOf(box)) {
      const cell = this.cells.get(key);
      if (cell === undefined) this.cells.set(key, [box]);
      else cell.push(box);
    }
  }

  private keysOf(box: LabelBox): string[] {
    const corners = cornersOf(box);
    const keys: string[] = [];
    const span = (k: 0 | 1): [number, number] => {
      const values = corners.map((corner) => corner[k]);
      return [Math.floor(Math.min(...values) / CELL), Math.floor(Math.max(...values) / CELL)];
    };
    const [x0, x1] = span(0);
    const [y0, y1] = span(1);
    for (let x = x0; x <= x1; x++) for (let y = y0; y <= y1; y++) keys.push(`${x},${y}`);
    return keys;
  }
}

type Point = readonly [number, number];

export function cornersOf({ x, y, width, height, angle }: LabelBox): readonly Point[] {
  const [c, s] = [Math.cos(angle), Math.sin(angle)];
  return (
    [
      [-1, -1],
      [1, -1],
      [1, 1],
      [-1, 1],
    ] as const
  ).map(([i, j]) => {
    const [u, v] = [(i * width) / 2, (j * height) / 2];
    return [x + c * u - s * v, y + s * u + c * v] as const;
  });
}

/** By separating axes: two rectangles are apart if they are along a side of one of them. */
export function overlap(a: LabelBox, b: LabelBox): boolean {
  const [cornersA, cornersB] = [cornersOf(a), cornersOf(b)];
  for (const angle of [a.angle, a.angle + Math.PI / 2, b.angle, b.angle + Math.PI / 2]) {
    const [c, s] = [Math.cos(angle), Math.sin(angle)];
    const along = (corners: readonly Point[]) => corners.map(([x, y]) => c * x + s * y);
    const [onA, onB] = [along(cornersA), along(cornersB)];
    if (Math.max(...onA) <= Math.min(...onB) || Math.max(...onB) <= Math.min(...onA)) return false;
  }
  return true;
}
