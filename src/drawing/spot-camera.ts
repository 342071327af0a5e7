import type { ResultMember } from '../domain/result.ts';
import { cross, distance, dot, norm, subtract, unit, type Vec3 } from '../domain/vector.ts';
import { type Camera, cameraAt } from './camera.ts';
import type { Spot } from './spot.ts';

export interface CameraOptions {
  /** Degrees, upright; viewers of the older topic format take 45 to 60. */
  readonly fieldOfView: number;
  readonly aspect: number;
}

export const CAMERA_DEFAULTS: CameraOptions = { fieldOfView: 50, aspect: 4 / 3 };

/** Degrees above the horizon, and round the compass. */
const HEIGHTS = [18, 30, 42];
const TURNS = Array.from({ length: 24 }, (_, k) => 15 * k);

/** m of free space round what is framed, as a part of its radius. */
const AIR = 1.12;

/** Members that stand before the spot cost this much each; how near to the line of sight, in radii, they must come. */
const HIDES = 0.06;
const MOST_HIDING = 6;
const NEAR_SIGHT = 0.35;

/** What is farther from the spot than this many radii is neither looked through nor drawn whole. */
const AROUND = 8;

/**
 * A camera that sees the members of a spot from the side rather than end on, with as little in front of them as may be;
 * slightly from above, since roofs are looked at so.
 */
export function spotCamera(spot: Spot, members: readonly ResultMember[], options: Partial<CameraOptions> = {}): Camera {
  const { fieldOfView, aspect } = { ...CAMERA_DEFAULTS, ...options };
  const half = (fieldOfView * Math.PI) / 360;
  const reach = (AIR * spot.radius) / Math.sin(half);
  const named = new Set(spot.members);
  const concerned = directionsOf(members.filter(({ globalId }) => named.has(globalId)));
  const others = members
    .filter(({ globalId, axis }) => !named.has(globalId) && distanceToAxis(spot.centre, axis) < AROUND * spot.radius)
    .slice(0, MOST_TESTED);
  let best: { readonly direction: Vec3; readonly score: number } | null = null;
  for (const height of HEIGHTS) {
    for (const turn of TURNS) {
      const direction = downward(height, turn);
      const score =
        viewScore(direction, concerned, spot) - HIDES * Math.min(MOST_HIDING, hidden(direction, spot, others, reach));
      if (best === null || score > best.score + 1e-9) best = { direction, score };
    }
  }
  return cameraAt(spot.centre, best?.direction ?? downward(26, 45), reach, fieldOfView, aspect);
}

const MOST_TESTED = 400;

function downward(height: number, turn: number): Vec3 {
  const [h, t] = [(height * Math.PI) / 180, (turn * Math.PI) / 180];
  return [Math.cos(h) * Math.cos(t), Math.cos(h) * Math.sin(t), -Math.sin(h)];
}

function directionsOf(members: readonly ResultMember[]): Vec3[] {
  return members.slice(0, 12).flatMap(({ axis }) => {
    const direction = unit(subtract(axis[1], axis[0]));
    return direction === null ? [] : [direction];
  });
}

/** How much of the members' lengths, of the gap and of the movement is seen, the least of them counting most. */
function viewScore(direction: Vec3, concerned: readonly Vec3[], { gap, movement }: Spot): number {
  const lines = [...concerned];
  const missed = gap === null ? null : unit(subtract(gap.to, gap.from));
  const moved = movement === null ? null : unit(movement);
  if (missed !== null) lines.push(missed, missed);
  if (moved !== null) lines.push(moved);
  if (lines.length === 0) return preference(direction);
  const shown = lines.map((line) => Math.sqrt(Math.max(0, 1 - dot(line, direction) ** 2)));
  const mean = shown.reduce((sum, one) => sum + one, 0) / shown.length;
  return mean + Math.min(...shown.slice(0, MOST_COUNTED)) + preference(direction);
}

/** Of many members some are always seen end on: the least counts among the first few. */
const MOST_COUNTED = 4;

/** Where nothing else decides: from the side of least x and y, at a moderate height. */
function preference(direction: Vec3): number {
  return 0.2 * dot(direction, [0.6, 0.6, -0.53]);
}

/** How many members pass between the eye and the spot. */
function hidden(direction: Vec3, { centre, radius }: Spot, others: readonly ResultMember[], reach: number): number {
  let count = 0;
  for (const { axis } of others) {
    const u = subtract(axis[1], axis[0]);
    const between = subtract(axis[0], centre);
    const side = cross(u, direction);
    const length = norm(side);
    if (length < 1e-6 * norm(u)) continue;
    if (Math.abs(dot(between, side)) / length > NEAR_SIGHT * radius) continue;
    // Where along the member, and how far towards the eye, the two lines pass each other.
    const t = dot(cross(direction, between), side) / length ** 2;
    const s = dot(cross(u, between), side) / length ** 2;
    if (t >= 0 && t <= 1 && s < -0.3 * radius && s > -reach) count++;
  }
  return count;
}

function distanceToAxis(point: Vec3, [a, b]: readonly [Vec3, Vec3]): number {
  const u = subtract(b, a);
  const t = Math.min(1, Math.max(0, dot(subtract(point, a), u) / Math.max(dot(u, u), 1e-12)));
  return distance(point, [a[0] + t * u[0], a[1] + t * u[1], a[2] + t * u[2]]);
}
