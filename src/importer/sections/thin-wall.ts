import type { Point2 } from './outline.ts';

/** A straight wall of an open section's middle line, from node `from` to node `to`, metres. */
interface Wall {
  readonly from: number;
  readonly to: number;
  readonly thickness: number;
}

/** A middle line being drawn: walls grow from nodes already there. */
export class MiddleLine {
  readonly nodes: Point2[];
  readonly walls: Wall[] = [];
  constructor(start: Point2) {
    this.nodes = [start];
  }

  /** Draws a wall from node `from` to `to` and gives the node it ends at. */
  wall(from: number, to: Point2, thickness: number, endThickness = thickness): number {
    // A tapered wall is drawn in pieces of even thickness; eight leave an error below 1 %.
    const pieces = endThickness === thickness ? 1 : 8;
    const start = this.nodes[from]!;
    let last = from;
    for (let i = 1; i <= pieces; i++) {
      const t = i / pieces;
      this.nodes.push([start[0] + t * (to[0] - start[0]), start[1] + t * (to[1] - start[1])]);
      const middle = (i - 0.5) / pieces;
      const next = this.nodes.length - 1;
      this.walls.push({ from: last, to: next, thickness: thickness + middle * (endThickness - thickness) });
      last = next;
    }
    return last;
  }

  sectorial(): Sectorial {
    return sectorial(this.nodes, this.walls);
  }
}

export interface Sectorial {
  /** About the shear centre, m6. */
  readonly warping: number;
  /** In the plane the line is drawn in, m. */
  readonly shearCentre: Point2;
}

/**
 * Warping constant and shear centre of an open thin-walled section, by sectorial coordinates along the middle line:
 * EN 1993-1-3:2006 Annex C.1, formulas from memory. `walls` is a tree: each starts at a node that an
 * earlier one reached, the first at node 0.
 */
function sectorial(nodes: readonly Point2[], walls: readonly Wall[]): Sectorial {
  const area = walls.map((w) => w.thickness * distance(nodes[w.from]!, nodes[w.to]!));
  const total = sum(area);
  const mean = (f: (n: number) => number) => sum(walls.map((w, i) => ((f(w.from) + f(w.to)) / 2) * area[i]!)) / total;
  const cy = mean((n) => nodes[n]![0]);
  const cz = mean((n) => nodes[n]![1]);
  const y = nodes.map((p) => p[0] - cy);
  const z = nodes.map((p) => p[1] - cz);

  const raw = new Array<number>(nodes.length).fill(0);
  for (const w of walls) raw[w.to] = raw[w.from]! + y[w.from]! * z[w.to]! - y[w.to]! * z[w.from]!;
  const rawMean = mean((n) => raw[n]!);
  const omega = raw.map((value) => value - rawMean);

  const product = (a: readonly number[], b: readonly number[]) =>
    sum(
      walls.map(({ from: i, to: j }, k) => {
        const ends = 2 * a[i]! * b[i]! + 2 * a[j]! * b[j]! + a[i]! * b[j]! + a[j]! * b[i]!;
        return (area[k]! * ends) / 6;
      }),
    );
  const iy = product(z, z);
  const iz = product(y, y);
  const iyz = product(y, z);
  const iyw = product(y, omega);
  const izw = product(z, omega);
  const iww = product(omega, omega);
  const determinant = iy * iz - iyz * iyz;
  // A straight strip has its shear centre in its middle and does not warp.
  if (!(determinant > 1e-12 * iy * iz)) return { warping: 0, shearCentre: [cy, cz] };
  const ySheared = (izw * iz - iyw * iyz) / determinant;
  const zSheared = (-iyw * iy + izw * iyz) / determinant;
  return {
    warping: Math.max(0, iww + zSheared * iyw - ySheared * izw),
    shearCentre: [cy + ySheared, cz + zSheared],
  };
}

const distance = (a: Point2, b: Point2): number => Math.hypot(b[0] - a[0], b[1] - a[1]);
const sum = (values: readonly number[]): number => values.reduce((total, value) => total + value, 0);
