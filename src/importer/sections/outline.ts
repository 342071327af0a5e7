/** Outlines of cross sections: closed rings of straight and elliptical edges in a plane, metres. */

export type Point2 = readonly [x: number, y: number];

export interface LineEdge {
  readonly kind: 'line';
  readonly from: Point2;
  readonly to: Point2;
}

/** The points `centre + u cos t + v sin t` for t from `start` to `end` (radians): a circle's or an ellipse's arc. */
export interface ArcEdge {
  readonly kind: 'arc';
  readonly centre: Point2;
  readonly u: Point2;
  readonly v: Point2;
  readonly start: number;
  readonly end: number;
}

export type Edge = LineEdge | ArcEdge;
export type Ring = readonly Edge[];

export interface Outline {
  readonly outer: Ring;
  readonly voids: readonly Ring[];
  /** Further pieces beside the first, of a composite section. */
  readonly besides?: readonly Outline[];
}

/** An outline and the pieces beside it, one by one. */
export const piecesOf = (outline: Outline): readonly Outline[] => [
  outline,
  ...(outline.besides ?? []).flatMap(piecesOf),
];

/** The plane map `origin + x px + y py`. */
export interface PlaneMap {
  readonly x: Point2;
  readonly y: Point2;
  readonly origin: Point2;
}

export const SAME_PLANE: PlaneMap = { x: [1, 0], y: [0, 1], origin: [0, 0] };

const turned = (m: PlaneMap, p: Point2): Point2 => [m.x[0] * p[0] + m.y[0] * p[1], m.x[1] * p[0] + m.y[1] * p[1]];

export function mapPoint(m: PlaneMap, p: Point2): Point2 {
  const [x, y] = turned(m, p);
  return [x + m.origin[0], y + m.origin[1]];
}

/** The map that does `inner` first and `outer` after it. */
export function composeMaps(outer: PlaneMap, inner: PlaneMap): PlaneMap {
  return { x: turned(outer, inner.x), y: turned(outer, inner.y), origin: mapPoint(outer, inner.origin) };
}

export function mapOutline(m: PlaneMap, outline: Outline): Outline {
  const ring = (edges: Ring): Ring => edges.map((edge) => mapEdge(m, edge));
  const besides = outline.besides?.map((piece) => mapOutline(m, piece));
  return { outer: ring(outline.outer), voids: outline.voids.map(ring), ...(besides === undefined ? {} : { besides }) };
}

function mapEdge(m: PlaneMap, edge: Edge): Edge {
  if (edge.kind === 'line') return { kind: 'line', from: mapPoint(m, edge.from), to: mapPoint(m, edge.to) };
  return { ...edge, centre: mapPoint(m, edge.centre), u: turned(m, edge.u), v: turned(m, edge.v) };
}

export function pointOnArc(arc: ArcEdge, t: number): Point2 {
  const c = Math.cos(t);
  const s = Math.sin(t);
  return [arc.centre[0] + arc.u[0] * c + arc.v[0] * s, arc.centre[1] + arc.u[1] * c + arc.v[1] * s];
}

export const startOf = (edge: Edge): Point2 => (edge.kind === 'line' ? edge.from : pointOnArc(edge, edge.start));
export const endOf = (edge: Edge): Point2 => (edge.kind === 'line' ? edge.to : pointOnArc(edge, edge.end));

/** A full ellipse about `centre` with half axes `a` along x and `b` along y. */
export function ellipseRing(a: number, b: number, centre: Point2 = [0, 0]): Ring {
  return [{ kind: 'arc', centre, u: [a, 0], v: [0, b], start: 0, end: 2 * Math.PI }];
}
