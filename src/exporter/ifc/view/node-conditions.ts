import { EigenvalueDecomposition, Matrix } from 'ml-matrix';
import { along, cross, dot, norm, scale, type Vec3 } from '../../../domain/vector.ts';

/** What holds a node: rigid directions (unit) and springs to the ground (N/m along unit directions). */
export interface Held {
  readonly rigid: readonly Vec3[];
  readonly springs: readonly { readonly direction: Vec3; readonly stiffness: number }[];
}

/** How a node is held along each axis of a right-handed frame: rigidly, by a spring (N/m), or not (0). */
export interface NodeCondition {
  /** Null: along the axes of the world. */
  readonly frame: readonly [Vec3, Vec3, Vec3] | null;
  readonly along: readonly ['rigid' | number, 'rigid' | number, 'rigid' | number];
}

const WORLD: readonly [Vec3, Vec3, Vec3] = [
  [1, 0, 0],
  [0, 1, 0],
  [0, 0, 1],
];

/** Directions that lean less than this off another are the same; also the share below which a coupling is rounding. */
const SAME = 1e-9;

/**
 * The same hold told along three axes at right angles: whatever leans is replaced by a basis of the directions held rigidly
 * and by the principal springs across them, which hold exactly alike.
 */
export function nodeCondition({ rigid, springs }: Held): NodeCondition {
  const held: Vec3[] = [];
  for (const direction of rigid) {
    const left = held.reduce<Vec3>((rest, axis) => along(rest, axis, -dot(rest, axis)), direction);
    if (norm(left) > SAME) held.push(scale(left, 1 / norm(left)));
  }
  const stiffness = (u: Vec3, v: Vec3): number =>
    springs.reduce((sum, spring) => sum + spring.stiffness * dot(spring.direction, u) * dot(spring.direction, v), 0);
  const most = Math.max(0, ...springs.map((spring) => spring.stiffness));
  const share = (axis: Vec3): number => held.reduce((sum, direction) => sum + dot(direction, axis) ** 2, 0);
  const kind = (axis: Vec3): 'rigid' | number =>
    share(axis) > 1 - SAME ? 'rigid' : rounded(stiffness(axis, axis), most);

  const fitsWorld =
    WORLD.every((axis) => share(axis) < SAME || share(axis) > 1 - SAME) &&
    WORLD.every((u, i) =>
      WORLD.every((v, j) => i >= j || share(u) > SAME || share(v) > SAME || Math.abs(stiffness(u, v)) <= SAME * most),
    );
  const frame = fitsWorld ? WORLD : principalFrame(held, stiffness);
  return { frame: fitsWorld ? null : frame, along: [kind(frame[0]), kind(frame[1]), kind(frame[2])] };
}

const rounded = (stiffness: number, most: number): number => (Math.abs(stiffness) <= SAME * most ? 0 : stiffness);

function principalFrame(held: readonly Vec3[], stiffness: (u: Vec3, v: Vec3) => number): [Vec3, Vec3, Vec3] {
  const free = complementOf(held);
  const matrix = new Matrix(free.map((u) => free.map((v) => stiffness(u, v))));
  const axes: Vec3[] = [...held];
  if (free.length > 0) {
    const { eigenvectorMatrix } = new EigenvalueDecomposition(matrix, { assumeSymmetric: true });
    for (let k = 0; k < free.length; k++) {
      const column = eigenvectorMatrix.getColumn(k);
      axes.push(free.reduce<Vec3>((sum, axis, i) => along(sum, axis, column[i]), [0, 0, 0]));
    }
  }
  const [x, y] = axes as [Vec3, Vec3];
  return [x, y, cross(x, y)];
}

/** Unit directions that fill up `held` to three at right angles, as near to the world's axes as may be. */
function complementOf(held: readonly Vec3[]): Vec3[] {
  const found: Vec3[] = [];
  const left = (axis: Vec3): Vec3 =>
    [...held, ...found].reduce<Vec3>((rest, other) => along(rest, other, -dot(rest, other)), axis);
  while (held.length + found.length < 3) {
    const [best] = WORLD.map(left).sort((a, b) => norm(b) - norm(a)) as [Vec3];
    found.push(scale(best, 1 / norm(best)));
  }
  return found;
}
