import type { Vec3 } from '../../../domain/vector.ts';
import { turn } from './plan.ts';

type Triangle = [number, number, number];

/**
 * rad: how far the sum of two opposite angles may be from 180 degrees, as on one circle, for four corners to be divided alike
 * by either diagonal. A rectangle of a few metres drawn to some millimetres stays well within.
 */
const COCIRCULAR = 1e-2;

/**
 * A polygon cut into the Delaunay triangles of its corners and of points inside it, in plan. Its sides are kept. Half-edges are
 * numbered from * count + to; every half-edge belongs to the triangle on its left.
 */
export class Triangulation {
  readonly #points: readonly Vec3[];
  readonly #triangles: Triangle[] = [];
  readonly #owner = new Map<number, number>();

  private constructor(points: readonly Vec3[]) {
    this.#points = points;
  }

  /**
   * @param points in plan; height is not looked at
   * @param outline corners of a simple polygon, going round to the left
   * @param inner points inside the polygon
   * @returns null where the outline cannot be divided: it touches itself
   */
  static of(points: readonly Vec3[], outline: readonly number[], inner: readonly number[] = []): Triangulation | null {
    const made = new Triangulation(points);
    if (!made.#clipEars(outline)) return null;
    made.#legalise([...made.#owner.keys()]);
    for (const point of inner) if (!made.#insert(point)) return null;
    return made;
  }

  /** Triangles, and convex polygons where neighbouring triangles lie on one circle, so that no diagonal is preferred. */
  patches(): number[][] {
    const group = this.#triangles.map((_, i) => i);
    const rootOf = (i: number): number => (group[i] === i ? i : rootOf(group[i]));
    const inner = new Set<number>();
    for (const [edge, triangle] of this.#owner) {
      const [from, to] = this.#ends(edge);
      const other = this.#owner.get(this.#edge(to, from));
      if (other === undefined || Math.abs(this.#excess(from, to)) > COCIRCULAR || !this.#isConvexAcross(from, to))
        continue;
      inner.add(edge);
      group[rootOf(triangle)] = rootOf(other);
    }
    const next = new Map<number, Map<number, number>>();
    for (const [edge, triangle] of this.#owner) {
      if (inner.has(edge)) continue;
      const [from, to] = this.#ends(edge);
      const sides = next.get(rootOf(triangle)) ?? new Map<number, number>();
      next.set(rootOf(triangle), sides.set(from, to));
    }
    return [...next.values()].map((sides) => {
      const [start] = sides.keys();
      const corners = [start!];
      for (let node = sides.get(start!)!; node !== start; node = sides.get(node)!) corners.push(node);
      return corners;
    });
  }

  /** Meisters 1975: every simple polygon of four corners or more has two ears. */
  #clipEars(outline: readonly number[]): boolean {
    const left = [...outline];
    while (left.length > 3) {
      const ear = left.findIndex((_, i) => this.#isEar(left, i));
      if (ear < 0) return false;
      this.#add(left.at(ear - 1)!, left[ear], left[(ear + 1) % left.length]);
      left.splice(ear, 1);
    }
    const [a, b, c] = left as Triangle;
    if (left.length !== 3 || turn(this.#points[a], this.#points[b], this.#points[c]) <= 0) return false;
    this.#add(a, b, c);
    return true;
  }

  #isEar(left: readonly number[], i: number): boolean {
    const corners = [left.at(i - 1)!, left[i], left[(i + 1) % left.length]] as Triangle;
    const [a, b, c] = corners.map((corner) => this.#points[corner]) as [Vec3, Vec3, Vec3];
    const slack = 1e-9 * Math.abs(turn(a, b, c));
    if (turn(a, b, c) <= 1e-9) return false;
    return left.every((node) => {
      const point = this.#points[node];
      return (
        corners.includes(node) || turn(a, b, point) < -slack || turn(b, c, point) < -slack || turn(c, a, point) < -slack
      );
    });
  }

  /** Splits the triangle that a point lies in, then mends the edges around (Lawson 1977). */
  #insert(node: number): boolean {
    const point = this.#points[node];
    const found = this.#triangles.findIndex(([a, b, c]) =>
      [
        turn(this.#points[a], this.#points[b], point),
        turn(this.#points[b], this.#points[c], point),
        turn(this.#points[c], this.#points[a], point),
      ].every((side) => side >= -1e-9),
    );
    if (found < 0) return false;
    const [a, b, c] = this.#triangles[found];
    this.#place(found, a, b, node);
    this.#add(b, c, node);
    this.#add(c, a, node);
    this.#legalise([this.#edge(a, b), this.#edge(b, c), this.#edge(c, a)]);
    return true;
  }

  /** Flips every edge across which a corner lies inside the other triangle's circle, until there is none (Lawson 1977). */
  #legalise(edges: number[]): void {
    for (let edge = edges.pop(); edge !== undefined; edge = edges.pop()) {
      const [a, b] = this.#ends(edge);
      const left = this.#owner.get(edge);
      const right = this.#owner.get(this.#edge(b, a));
      if (left === undefined || right === undefined || this.#excess(a, b) <= COCIRCULAR / 2) continue;
      const c = this.#opposite(left, a, b);
      const d = this.#opposite(right, b, a);
      this.#owner.delete(edge);
      this.#owner.delete(this.#edge(b, a));
      this.#place(left, a, d, c);
      this.#place(right, d, b, c);
      edges.push(this.#edge(a, d), this.#edge(d, b), this.#edge(b, c), this.#edge(c, a));
    }
  }

  /** By how much the two angles opposite an inner edge exceed 180 degrees together, rad; positive where it is to be flipped. */
  #excess(a: number, b: number): number {
    const c = this.#opposite(this.#owner.get(this.#edge(a, b))!, a, b);
    const d = this.#opposite(this.#owner.get(this.#edge(b, a))!, b, a);
    return this.#angle(c, a, b) + this.#angle(d, b, a) - Math.PI;
  }

  /** Whether the two triangles at an edge make a convex quadrilateral: a sliver on the outline may not. */
  #isConvexAcross(a: number, b: number): boolean {
    const c = this.#points[this.#opposite(this.#owner.get(this.#edge(a, b))!, a, b)];
    const d = this.#points[this.#opposite(this.#owner.get(this.#edge(b, a))!, b, a)];
    return turn(c, this.#points[a], d) > 0 && turn(d, this.#points[b], c) > 0;
  }

  #angle(at: number, from: number, to: number): number {
    const [p, q, r] = [this.#points[at], this.#points[from], this.#points[to]];
    const cosine = (q[0] - p[0]) * (r[0] - p[0]) + (q[1] - p[1]) * (r[1] - p[1]);
    return Math.atan2(Math.abs(turn(p, q, r)), cosine);
  }

  #opposite(triangle: number, a: number, b: number): number {
    return this.#triangles[triangle].find((corner) => corner !== a && corner !== b)!;
  }

  #add(a: number, b: number, c: number): void {
    this.#place(this.#triangles.length, a, b, c);
  }

  #place(triangle: number, a: number, b: number, c: number): void {
    this.#triangles[triangle] = [a, b, c];
    for (const edge of [this.#edge(a, b), this.#edge(b, c), this.#edge(c, a)]) this.#owner.set(edge, triangle);
  }

  #edge(from: number, to: number): number {
    return from * this.#points.length + to;
  }

  #ends(edge: number): [number, number] {
    return [Math.floor(edge / this.#points.length), edge % this.#points.length];
  }
}
