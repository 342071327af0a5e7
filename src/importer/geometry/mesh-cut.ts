import { dot, type Vec3 } from '../../domain/vector.ts';
import type { Outline, Point2 } from '../sections/outline.ts';
import type { Mesh } from './mesh.ts';

/** Where a plane meets one face, from one of its edges to another. */
interface Segment {
  readonly edges: readonly [number, number];
  readonly points: readonly [Point2, Point2];
}

interface Crossing {
  readonly edge: number;
  readonly point: Point2;
  /** Place along the line that face and plane share. */
  readonly order: number;
}

/** Loose ends of a cut nearer than this are one: half a millimetre, what badly sewn faces gape. */
const GAPING = 5e-4;

/** Cuts one mesh by planes at right angles to one direction; each corner is measured once for all of them. */
export class MeshCutter {
  private readonly mesh: Mesh;
  private readonly x: Float64Array;
  private readonly y: Float64Array;
  private readonly height: Float64Array;
  private readonly facing: readonly Point2[];
  /** Between which heights each face lies. */
  private readonly low: Float64Array;
  private readonly high: Float64Array;

  /** `normal`, `x` and `y` are unit vectors at right angles to one another. */
  constructor(mesh: Mesh, normal: Vec3, x: Vec3, y: Vec3) {
    const along = (axis: Vec3) => Float64Array.from(mesh.points, (p) => dot(p, axis));
    const height = along(normal);
    this.mesh = mesh;
    this.x = along(x);
    this.y = along(y);
    this.height = height;
    this.facing = mesh.faces.map(({ area }) => [dot(area, x), dot(area, y)]);
    this.low = new Float64Array(mesh.faces.length).fill(Number.POSITIVE_INFINITY);
    this.high = new Float64Array(mesh.faces.length).fill(Number.NEGATIVE_INFINITY);
    mesh.faces.forEach(({ rings }, i) => {
      for (const corner of rings[0]!) {
        this.low[i] = Math.min(this.low[i]!, height[corner]!);
        this.high[i] = Math.max(this.high[i]!, height[corner]!);
      }
    });
  }

  /**
   * The separate pieces of material that the plane at `level` along the normal meets, the largest first; all coordinates
   * about the mesh's base. Lines of the cut that do not close are left out.
   */
  at(level: number): readonly Outline[] {
    return nested(closedRings(this.segments(level)));
  }

  private segments(level: number): Segment[] {
    const segments: Segment[] = [];
    const { faces } = this.mesh;
    const { low, high } = this;
    for (let i = 0; i < faces.length; i++) {
      if (level < low[i]! || level > high[i]!) continue;
      const crossings: Crossing[] = [];
      for (const ring of faces[i]!.rings) this.addCrossings(crossings, ring, level, this.facing[i]!);
      // Along the shared line material begins and ends by turns.
      if (crossings.length > 2) crossings.sort((p, q) => p.order - q.order);
      for (let k = 0; k + 1 < crossings.length; k += 2) {
        const [a, b] = [crossings[k]!, crossings[k + 1]!];
        segments.push({ edges: [a.edge, b.edge], points: [a.point, b.point] });
      }
    }
    return segments;
  }

  private addCrossings(found: Crossing[], ring: readonly number[], level: number, facing: Point2): void {
    const { x, y, height } = this;
    let p = ring.at(-1)!;
    for (const q of ring) {
      const [from, to] = [p, q];
      p = q;
      if (height[from]! >= level === height[to]! >= level) continue;
      // From the lower number to the higher, so that both faces of an edge find the same point.
      const [a, b] = from < to ? [from, to] : [to, from];
      const t = (level - height[a]!) / (height[b]! - height[a]!);
      const u = x[a]! + t * (x[b]! - x[a]!);
      const v = y[a]! + t * (y[b]! - y[a]!);
      found.push({ edge: a * height.length + b, point: [u, v], order: u * facing[1] - v * facing[0] });
    }
  }
}

interface End {
  readonly segment: number;
  readonly side: 0 | 1;
}

function closedRings(segments: readonly Segment[]): Point2[][] {
  const partner = pairedEnds(segments);
  const used = new Array<boolean>(segments.length).fill(false);
  const rings: Point2[][] = [];
  for (let start = 0; start < segments.length; start++) {
    if (used[start]) continue;
    const ring: Point2[] = [];
    let end: End | undefined = { segment: start, side: 0 };
    while (end !== undefined && !used[end.segment]) {
      used[end.segment] = true;
      ring.push(segments[end.segment]!.points[end.side]);
      end = partner.get(end.segment * 2 + (1 - end.side));
    }
    if (end !== undefined && end.segment === start && ring.length >= 3) rings.push(ring);
  }
  return rings;
}

/** Which end of which segment goes on where one ends: by the edge they share, else by the gap between loose ends. */
function pairedEnds(segments: readonly Segment[]): Map<number, End> {
  const partner = new Map<number, End>();
  const waiting = new Map<number, number[]>();
  segments.forEach((segment, i) => {
    segment.edges.forEach((edge, side) => {
      const list = waiting.get(edge);
      if (list === undefined) waiting.set(edge, [i * 2 + side]);
      else list.push(i * 2 + side);
    });
  });
  const loose: number[] = [];
  const pair = (a: number, b: number) => {
    partner.set(a, endOf(b));
    partner.set(b, endOf(a));
  };
  for (const list of waiting.values()) {
    for (let i = 0; i + 1 < list.length; i += 2) pair(list[i]!, list[i + 1]!);
    if (list.length % 2 === 1) loose.push(list.at(-1)!);
  }
  const pointOf = (end: number) => segments[end >> 1]!.points[(end & 1) as 0 | 1];
  const open = new Set(loose);
  for (const end of loose) {
    if (!open.delete(end)) continue;
    let [nearest, least] = [-1, GAPING];
    for (const other of open) {
      const [p, q] = [pointOf(end), pointOf(other)];
      const away = Math.hypot(p[0] - q[0], p[1] - q[1]);
      if (away < least) [nearest, least] = [other, away];
    }
    if (nearest < 0) continue;
    open.delete(nearest);
    pair(end, nearest);
  }
  return partner;
}

const endOf = (end: number): End => ({ segment: end >> 1, side: (end & 1) as 0 | 1 });

/** Rings in an odd number of others are voids of the one right around them. */
function nested(rings: readonly Point2[][]): Outline[] {
  const bySize = [...rings].sort((a, b) => Math.abs(signedArea(b)) - Math.abs(signedArea(a)));
  const regions: { ring: Point2[]; voids: Point2[][] }[] = [];
  bySize.forEach((ring, i) => {
    const depth = bySize.slice(0, i).filter((larger) => contains(larger, ring[0]!)).length;
    const parent = depth % 2 === 1 ? regions.findLast((region) => contains(region.ring, ring[0]!)) : undefined;
    if (parent === undefined) regions.push({ ring, voids: [] });
    else parent.voids.push(ring);
  });
  return regions.map(({ ring, voids }) => ({ outer: edgesOf(ring), voids: voids.map(edgesOf) }));
}

const edgesOf = (ring: readonly Point2[]): Outline['outer'] =>
  ring.map((from, i) => ({ kind: 'line', from, to: ring[(i + 1) % ring.length]! }));

function signedArea(ring: readonly Point2[]): number {
  return ring.reduce((sum, p, i) => {
    const q = ring[(i + 1) % ring.length]!;
    return sum + (p[0] * q[1] - q[0] * p[1]) / 2;
  }, 0);
}

function contains(ring: readonly Point2[], p: Point2): boolean {
  let inside = false;
  ring.forEach((a, i) => {
    const b = ring[(i + 1) % ring.length]!;
    if (a[1] > p[1] !== b[1] > p[1] && p[0] < a[0] + ((p[1] - a[1]) * (b[0] - a[0])) / (b[1] - a[1])) inside = !inside;
  });
  return inside;
}
