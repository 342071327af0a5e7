import type { Vec3 } from '../../domain/vector.ts';
import type { Problem } from '../model/system.ts';
import { AT_REST, movingNodes } from './localise.ts';
import { type ReducedModes, reduceModes } from './reduce.ts';
import { movementAt, type RigidMotion } from './rigid.ts';

/** Triangles tried as the base that stands still while something moves against it. */
const TRIED = 40;

/** Three directions a node, held so that the part cannot move as one body. */
export function holdRigid(problem: Problem, motions: readonly RigidMotion[], base: readonly number[]): ReducedModes {
  const moves = motions.map((m) => m.moves);
  const atBase = reduceModes(problem.truss, moves, base);
  return atBase.pivots.length === motions.length ? atBase : reduceModes(problem.truss, moves);
}

/** Triangles of bars spread over the part; pairs of joined nodes where there is none. */
export function baseCandidates(problem: Problem, part: number): number[][] {
  const { truss, parts } = problem;
  const joined = new Map<number, number[]>();
  const pairs: number[][] = [];
  truss.bars.forEach((bar, b) => {
    if (!parts.liveBar[b] || parts.partOf[bar.from] !== part) return;
    if (truss.nodes[bar.from].carriedBy !== null || truss.nodes[bar.to].carriedBy !== null) return;
    pairs.push([bar.from, bar.to]);
    joined.set(bar.from, [...(joined.get(bar.from) ?? []), bar.to]);
    joined.set(bar.to, [...(joined.get(bar.to) ?? []), bar.from]);
  });
  const triangles: number[][] = [];
  const step = Math.max(1, Math.floor(pairs.length / TRIED));
  for (let i = 0; i < pairs.length; i += step) {
    const [a, b] = pairs[i] as [number, number];
    const others = joined.get(b)!;
    const third = joined.get(a)!.find((c) => c !== b && others.includes(c) && !inLine(problem, a, b, c));
    if (third !== undefined) triangles.push([a, b, third]);
  }
  return triangles.length > 0 ? triangles : pairs.slice(0, TRIED);
}

/** The base against which the modes move the fewest nodes. */
export function bestBase(
  problem: Problem,
  motions: readonly RigidMotion[],
  candidates: readonly (readonly number[])[],
  modes: readonly Float64Array[],
): readonly number[] {
  let best: readonly number[] = candidates[0] ?? [];
  let least = Number.POSITIVE_INFINITY;
  for (const base of candidates) {
    let moving = 0;
    for (const mode of modes) moving += movingNodes(problem.truss, atRest(motions, base, mode), AT_REST).length;
    if (moving < least) {
      best = base;
      least = moving;
    }
  }
  return best;
}

/** The mode less the rigid motion that it makes at the base. */
function atRest(motions: readonly RigidMotion[], base: readonly number[], mode: Float64Array): Float64Array {
  const out = mode.slice();
  const local = motions.map((m) => base.flatMap((i) => [m.moves[3 * i], m.moves[3 * i + 1], m.moves[3 * i + 2]]));
  const basis: { readonly at: number[]; readonly moves: Float64Array }[] = [];
  local.forEach((vector, r) => {
    let at = [...vector];
    let moves = motions[r].moves.slice();
    for (let pass = 0; pass < 2; pass++)
      for (const b of basis) {
        const k = at.reduce((sum, v, i) => sum + v * b.at[i], 0);
        at = at.map((v, i) => v - k * b.at[i]);
        moves = moves.map((v, i) => v - k * b.moves[i]);
      }
    const size = Math.hypot(...at);
    if (size > 1e-6) basis.push({ at: at.map((v) => v / size), moves: moves.map((v) => v / size) });
  });
  const here = base.flatMap((i) => [mode[3 * i], mode[3 * i + 1], mode[3 * i + 2]]);
  for (const b of basis) {
    const k = here.reduce((sum, v, i) => sum + v * b.at[i], 0);
    if (k !== 0) for (let i = 0; i < out.length; i++) out[i] = out[i] - k * b.moves[i];
  }
  return out;
}

function inLine(problem: Problem, a: number, b: number, c: number): boolean {
  const at = (i: number) => problem.truss.nodes[i].at;
  const twist = { centre: at(a), shift: [0, 0, 0] as Vec3, turn: minus(at(b), at(a)) };
  const area = Math.hypot(...movementAt(twist, at(c)));
  return area < 1e-3 * Math.hypot(...minus(at(b), at(a))) * Math.hypot(...minus(at(c), at(a)));
}

const minus = (p: Vec3, q: Vec3): Vec3 => [p[0] - q[0], p[1] - q[1], p[2] - q[2]];
