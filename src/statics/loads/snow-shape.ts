import type { SnowShape } from '../../brief/load-rule.ts';
import { add, norm, ORIGIN, type Vec3 } from '../../domain/vector.ts';

/** EN 1991-1-3 Table 5.2 (values from memory of the standard): pitches in degrees between which mu1 falls, and its value below. */
const FLAT = { upTo: 30, none: 60, mu: 0.8 };

/** Shape coefficient mu1 of a slope, EN 1991-1-3 5.3.2 and 5.3.3; with guards snow does not slide and it stays 0.8 (5.3.2(2)). */
export function shapeCoefficient(pitchDegrees: number, guards: boolean): number {
  if (guards || pitchDegrees <= FLAT.upTo) return FLAT.mu;
  return (FLAT.mu * Math.max(0, FLAT.none - pitchDegrees)) / (FLAT.none - FLAT.upTo);
}

/** Slopes below this face no side, degrees. */
const LEVEL = 0.5;

/**
 * The factor of the ground's snow on each patch, by its upward normal: mu1, and half of it on the slopes of one side in the drifted arrangements
 * (5.3.3 cases (ii) and (iii)).
 */
export function snowFactors(normals: readonly Vec3[], { arrangement, left, guards }: SnowShape): number[] {
  const [x, y] = left ?? usualLeft(normals);
  return normals.map((normal) => {
    const pitch = (Math.atan2(Math.hypot(normal[0], normal[1]), normal[2]) * 180) / Math.PI;
    const mu = shapeCoefficient(pitch, guards);
    if (arrangement === 'undrifted' || pitch < LEVEL) return mu;
    const facesLeft = x * normal[0] + y * normal[1] > 0;
    return facesLeft === (arrangement === 'half-left') ? mu / 2 : mu;
  });
}

/** -x or -y, whichever the slopes face more. */
function usualLeft(normals: readonly Vec3[]): readonly [number, number] {
  const sum = normals.reduce<Vec3>((total, [x, y]) => add(total, [Math.abs(x), Math.abs(y), 0]), ORIGIN);
  return norm(sum) === 0 || sum[0] >= sum[1] * (1 - 1e-9) ? [-1, 0] : [0, -1];
}
