import { scale, type Vec3 } from '../../../src/domain/vector.ts';
import { BORE, corners, DEPTH, O, RADIUS, WALL, WIDTH, X, Z } from './drawn-parts.ts';
import type { StepWriter } from './step-writer.ts';

/** Faces as rings of points, the outer ring first. */
export type Faces = Vec3[][][];

type Ring = readonly (readonly [number, number])[];

/** A prism along z between two heights, each of which may depend on the point: its sides outside and in, and its two ends. */
export function prismFaces(
  outline: readonly Ring[],
  low: (x: number, y: number) => number,
  high: (x: number, y: number) => number,
): Faces {
  const at = ([x, y]: readonly [number, number], height: typeof low): Vec3 => [x, y, height(x, y)];
  const sides = outline.flatMap((ring, k) =>
    ring.map((p, i) => {
      const q = ring[(i + 1) % ring.length]!;
      const quad = [at(p, low), at(q, low), at(q, high), at(p, high)];
      return [k === 0 ? quad : quad.reverse()];
    }),
  );
  const end = (height: typeof low, isTop: boolean): Vec3[][] =>
    outline.map((ring, k) => {
      const points = ring.map((p) => at(p, height));
      return (k === 0) === isTop ? points : points.reverse();
    });
  return [...sides, end(low, false), end(high, true)];
}

const prism = (outline: readonly Ring[], length: number): Faces =>
  prismFaces(
    outline,
    () => 0,
    () => length,
  );

export const tubeFaces = (length: number): Faces =>
  prism([corners(WIDTH, DEPTH), corners(WIDTH - 2 * WALL, DEPTH - 2 * WALL)], length);

const FACETS = 16;

export const circleRing = (radius: number): [number, number][] =>
  Array.from({ length: FACETS }, (_, i) => {
    const t = (2 * Math.PI * i) / FACETS;
    return [radius * Math.cos(t), radius * Math.sin(t)];
  });

export const roundFaces = (length: number): Faces => prism([circleRing(RADIUS), circleRing(BORE)], length);

const faceOf = (w: StepWriter, rings: readonly Vec3[][]): string => {
  const bounds = rings.map((ring, i) => {
    const loop = w.add(`IFCPOLYLOOP((${ring.map((p) => w.point(p)).join(',')}))`);
    return w.add(`${i === 0 ? 'IFCFACEOUTERBOUND' : 'IFCFACEBOUND'}(${loop},.T.)`);
  });
  return w.add(`IFCFACE((${bounds.join(',')}))`);
};

export const shellOf = (w: StepWriter, faces: Faces, keyword: string): string =>
  w.add(`${keyword}((${faces.map((rings) => faceOf(w, rings)).join(',')}))`);

/** Corner list and one-based corner numbers of faces. */
export function indexed(w: StepWriter, faces: Faces): { list: string; rings: number[][][] } {
  const points: Vec3[] = [];
  const indexOf = (p: Vec3): number => {
    const found = points.findIndex((q) => q.every((c, i) => c === p[i]));
    return found >= 0 ? found + 1 : points.push(p);
  };
  const rings = faces.map((face) => face.map((ring) => ring.map(indexOf)));
  return { list: w.add(`IFCCARTESIANPOINTLIST3D((${points.map((p) => w.lengths(p)).join(',')}))`), rings };
}

/** Rings to triangles; an end with a hole by quarters. */
export function triangles(rings: number[][]): number[][] {
  const [outer, inner] = rings as [number[], number[]?];
  if (inner === undefined)
    return [
      [outer[0]!, outer[1]!, outer[2]!],
      [outer[0]!, outer[2]!, outer[3]!],
    ];
  const hole = [inner[3]!, inner[2]!, inner[1]!, inner[0]!];
  return [0, 1, 2, 3].flatMap((i) => {
    const j = (i + 1) % 4;
    return [
      [outer[i]!, outer[j]!, hole[j]!],
      [outer[i]!, hole[j]!, hole[i]!],
    ];
  });
}

/** Two cylinders and two ring-shaped ends; each full circle is an edge from a vertex to itself. */
export function advancedTube(w: StepWriter, length: number): string {
  const vertex = (p: Vec3) => w.add(`IFCVERTEXPOINT(${w.point(p)})`);
  const oriented = (edge: string, sense: boolean) => w.add(`IFCORIENTEDEDGE(*,*,${edge},${sense ? '.T.' : '.F.'})`);
  const circle = (radius: number, z: number): string => {
    const at = vertex([radius, 0, z]);
    const curve = w.add(`IFCCIRCLE(${w.axes([0, 0, z], Z, X)},${w.length(radius)})`);
    return w.add(`IFCEDGECURVE(${at},${at},${curve},.T.)`);
  };
  const seam = (radius: number): string => {
    const curve = w.polyline([
      [radius, 0, 0],
      [radius, 0, length],
    ]);
    return w.add(`IFCEDGECURVE(${vertex([radius, 0, 0])},${vertex([radius, 0, length])},${curve},.T.)`);
  };
  const loop = (...edges: string[]) => w.add(`IFCEDGELOOP((${edges.join(',')}))`);
  const outer = (edges: string) => w.add(`IFCFACEOUTERBOUND(${edges},.T.)`);
  const inner = (edges: string) => w.add(`IFCFACEBOUND(${edges},.T.)`);
  const face = (bounds: string[], surface: string, sense: boolean) =>
    w.add(`IFCADVANCEDFACE((${bounds.join(',')}),${surface},${sense ? '.T.' : '.F.'})`);
  const wall = (radius: number): string => {
    const edges = [
      oriented(circle(radius, 0), true),
      oriented(seam(radius), true),
      oriented(circle(radius, length), false),
      oriented(seam(radius), false),
    ];
    const surface = w.add(`IFCCYLINDRICALSURFACE(${w.axes(O, Z, X)},${w.length(radius)})`);
    return face([outer(loop(...edges))], surface, radius === RADIUS);
  };
  const end = (z: number): string => {
    const isTop = z > 0;
    const bounds = [outer(loop(oriented(circle(RADIUS, z), isTop))), inner(loop(oriented(circle(BORE, z), !isTop)))];
    return face(bounds, w.add(`IFCPLANE(${w.axes([0, 0, z], isTop ? Z : scale(Z, -1), X)})`), true);
  };
  const faces = [wall(RADIUS), wall(BORE), end(0), end(length)];
  return w.add(`IFCADVANCEDBREP(${w.add(`IFCCLOSEDSHELL((${faces.join(',')}))`)})`);
}
