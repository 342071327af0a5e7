import type { Result, ResultFinding, ResultMember } from '../domain/result.ts';
import { along, distance, dot, subtract, type Vec3 } from '../domain/vector.ts';
import { outlineSize, sectionOutline } from './section-outline.ts';

/** A place that a picture shows, and what it shows of it. */
export interface Spot {
  /** The point in question; null where the members themselves are. */
  readonly at: Vec3 | null;
  /** GlobalIds of the members concerned; the first is the one that the finding is about. */
  readonly members: readonly string[];
  /** What the picture is framed on. */
  readonly centre: Vec3;
  readonly radius: number;
  /** From where something ends to where it should have met, and how far that is; null where nothing is missed. */
  readonly gap: { readonly from: Vec3; readonly to: Vec3; readonly length: number } | null;
  /** The way a node can move; null where none does. */
  readonly movement: Vec3 | null;
}

/** Findings about how members meet are shown close up, all others with the whole of what they concern. */
const CLOSE_UP: ReadonlySet<string> = new Set([
  'near-miss',
  'loose-end',
  'crossing-apart',
  'offset-joint',
  'crowded-joint',
  'bends-between-nodes',
]);

/** m; nothing is shown closer than this. */
const LEAST_RADIUS = 0.5;

/** What to show of a finding; of the whole model where it names neither members nor a point. */
export function spotOf(result: Result, finding: ResultFinding): Spot {
  const concerned = concernedMembers(result, finding.members);
  const gap = gapOf(finding, concerned);
  const movement = movementOf(result, finding);
  const shown = { at: finding.at, members: finding.members, gap, movement };
  if (finding.at !== null && CLOSE_UP.has(finding.code)) {
    const depth = Math.max(0.1, ...concerned.map((member) => outlineSize(sectionOutline(member))));
    const longest = Math.max(LEAST_RADIUS, ...concerned.map(({ axis }) => distance(...axis)));
    const radius = Math.max(
      LEAST_RADIUS,
      Math.min(Math.max(3 * (gap?.length ?? 0), 6 * depth), Math.max(0.9, 0.6 * longest)),
    );
    return { ...shown, centre: gap === null ? finding.at : along(gap.from, subtract(gap.to, gap.from), 0.5), radius };
  }
  const ends = concerned.flatMap(({ axis }) => axis);
  const all = finding.at === null ? ends : [...ends, finding.at];
  return { ...shown, ...sphereAround(all.length > 0 ? all : result.members.flatMap(({ axis }) => axis)) };
}

/** The members of an element stand in the order of the finding. */
export function concernedMembers(result: Result, globalIds: readonly string[]): ResultMember[] {
  const order = new Map(globalIds.map((globalId, k) => [globalId, k]));
  return result.members
    .filter(({ globalId }) => order.has(globalId))
    .sort((a, b) => order.get(a.globalId)! - order.get(b.globalId)!);
}

/** The middle of the box around the points, and how far the farthest is from it. */
function sphereAround(points: readonly Vec3[]): { centre: Vec3; radius: number } {
  if (points.length === 0) return { centre: [0, 0, 0], radius: 1 };
  const extreme = (k: 0 | 1 | 2, pick: (a: number, b: number) => number) =>
    points.reduce((best, point) => pick(best, point[k]), points[0]![k]);
  const middle = (k: 0 | 1 | 2) => (extreme(k, Math.min) + extreme(k, Math.max)) / 2;
  const centre: Vec3 = [middle(0), middle(1), middle(2)];
  const radius = points.reduce((most, point) => Math.max(most, distance(point, centre)), 0);
  return { centre, radius: Math.max(LEAST_RADIUS, radius) };
}

/** From the stray end to the nearest point of the axis it should meet. */
function gapOf({ code, at, gap }: ResultFinding, concerned: readonly ResultMember[]): Spot['gap'] {
  if (code !== 'near-miss' || at === null || gap === null) return null;
  const stray = concerned[0]?.globalId;
  const targets = concerned.filter(({ globalId }) => globalId !== stray).map(({ axis }) => nearestOn(axis, at));
  const to = targets.sort((a, b) => distance(a, at) - distance(b, at))[0];
  return to === undefined ? null : { from: at, to, length: gap };
}

export function nearestOn([a, b]: readonly [Vec3, Vec3], point: Vec3): Vec3 {
  const direction = subtract(b, a);
  const length2 = dot(direction, direction);
  const t = length2 > 0 ? dot(subtract(point, a), direction) / length2 : 0;
  return along(a, direction, Math.min(1, Math.max(0, t)));
}

function movementOf({ stability }: Result, { code, nodes }: ResultFinding): Vec3 | null {
  if (code !== 'moves-freely' && code !== 'load-moves-it') return null;
  const [node] = nodes;
  if (node === undefined) return null;
  for (const mode of stability.modes) {
    const k = mode.nodes.indexOf(node);
    const movement = mode.movement[k];
    if (movement !== undefined) return movement;
  }
  return null;
}
