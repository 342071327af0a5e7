import { cross, subtract, type Vec3 } from '../../domain/vector.ts';
import { largest } from '../engine/vectors.ts';
import { carryMovements } from '../model/movement.ts';
import type { Problem, System } from '../model/system.ts';

/** Small motion of a rigid body: translation of `centre` and turn about it, per `radius` of lever. */
export interface Twist {
  readonly centre: Vec3;
  readonly shift: Vec3;
  /** Turn vector: movement at `at` is shift + turn x (at - centre). */
  readonly turn: Vec3;
}

export interface RigidMotion {
  readonly part: number;
  readonly twist: Twist;
  /** Three components a node. */
  readonly moves: Float64Array;
}

/** Motions of each part as one body that its supports do not prevent. */
export function rigidMotions(system: System): RigidMotion[] {
  const { problem } = system;
  const { parts, truss } = problem;
  const nodesOf: number[][] = Array.from({ length: parts.count }, () => []);
  parts.partOf.forEach((part, node) => {
    if (part >= 0 && parts.liveNode[node] && truss.nodes[node].carriedBy === null) nodesOf[part].push(node);
  });
  const supportsOf: { node: number; direction: Vec3 }[][] = nodesOf.map(() => []);
  const { restraints, springs, holds = [] } = problem.supports;
  for (const support of [...restraints, ...springs, ...holds])
    if (parts.partOf[support.node] >= 0) supportsOf[parts.partOf[support.node]].push(support);
  return nodesOf.flatMap((nodes, part) =>
    nodes.length === 0 ? [] : partMotions(problem, system.movement.shares, part, nodes, supportsOf[part]),
  );
}

function partMotions(
  problem: Problem,
  shares: System['movement']['shares'],
  part: number,
  nodes: readonly number[],
  supports: readonly { node: number; direction: Vec3 }[],
): RigidMotion[] {
  const { truss } = problem;
  const centre = middle(nodes.map((i) => truss.nodes[i].at));
  const radius = Math.max(...nodes.map((i) => Math.hypot(...subtract(truss.nodes[i].at, centre))), 1e-6);
  const move = (twist: Twist): Float64Array => {
    const own = new Float64Array(3 * truss.nodes.length);
    for (const i of nodes) own.set(movementAt(twist, truss.nodes[i].at), 3 * i);
    return carryMovements(truss, shares, own);
  };
  const elementary = AXES.flatMap((axis): Twist[] => [{ centre, shift: axis, turn: [0, 0, 0] }]).concat(
    AXES.map((axis): Twist => ({ centre, shift: [0, 0, 0], turn: scaled(axis, 1 / radius) })),
  );
  // A part with many supports needs few of them to be looked at closely; six independent ones end it.
  const conditions = supports.map(({ node, direction }) =>
    elementary.map((twist) => {
      let sum = 0;
      for (const [real, share] of shares[node]) {
        const m = movementAt(twist, truss.nodes[real].at);
        sum += share * (m[0] * direction[0] + m[1] * direction[1] + m[2] * direction[2]);
      }
      return sum;
    }),
  );
  const motions: RigidMotion[] = [];
  const seen: Float64Array[] = [];
  for (const weights of nullSpace(conditions, 6)) {
    const twist = combine(centre, elementary, weights);
    const moves = move(twist);
    if (largest(moves) < 1e-7 || dependsOn(seen, moves)) continue;
    seen.push(moves);
    motions.push({ part, twist, moves });
  }
  return motions;
}

export function movementAt({ centre, shift, turn }: Twist, at: Vec3): Vec3 {
  const arm = cross(turn, subtract(at, centre));
  return [shift[0] + arm[0], shift[1] + arm[1], shift[2] + arm[2]];
}

/** Vectors that all of the rows send to zero, by elimination with full pivoting; free entries are 1 in turn. */
export function nullSpace(rows: readonly (readonly number[])[], width: number, tolerance = 1e-8): number[][] {
  const left = rows.map((row) => [...row]);
  const pivots: { row: number[]; column: number }[] = [];
  while (left.length > 0 && pivots.length < width) {
    let best = tolerance;
    let r = -1;
    let column = -1;
    left.forEach((row, i) => {
      row.forEach((v, c) => {
        if (Math.abs(v) > best * (1 + 1e-9)) {
          best = Math.abs(v);
          r = i;
          column = c;
        }
      });
    });
    if (r < 0) break;
    const pivot = left.splice(r, 1)[0].map((v, _, all) => v / all[column]);
    for (const row of [...left, ...pivots.map((p) => p.row)]) {
      const k = row[column];
      pivot.forEach((v, c) => {
        row[c] = row[c] - k * v;
      });
    }
    pivots.push({ row: pivot, column });
  }
  const bound = new Set(pivots.map((p) => p.column));
  return Array.from({ length: width }, (_, c) => c)
    .filter((c) => !bound.has(c))
    .map((free) => {
      const vector = new Array<number>(width).fill(0);
      vector[free] = 1;
      for (const { row, column } of pivots) vector[column] = Math.abs(row[free]) < 1e-12 ? 0 : -row[free];
      return vector;
    });
}

const AXES: readonly Vec3[] = [
  [1, 0, 0],
  [0, 1, 0],
  [0, 0, 1],
];

const scaled = (v: Vec3, k: number): Vec3 => [v[0] * k, v[1] * k, v[2] * k];

function combine(centre: Vec3, elementary: readonly Twist[], weights: readonly number[]): Twist {
  const sum = (pick: (twist: Twist) => Vec3): Vec3 => {
    const out = [0, 0, 0];
    elementary.forEach((twist, i) => {
      pick(twist).forEach((v, axis) => {
        out[axis] = out[axis] + weights[i] * v;
      });
    });
    return out as unknown as Vec3;
  };
  return { centre, shift: sum((t) => t.shift), turn: sum((t) => t.turn) };
}

function middle(points: readonly Vec3[]): Vec3 {
  const sum = [0, 0, 0];
  for (const p of points) for (let axis = 0; axis < 3; axis++) sum[axis] = sum[axis] + p[axis] / points.length;
  return sum as unknown as Vec3;
}

/** True where a line of nodes makes a turn about itself, or two turns the same. */
function dependsOn(others: readonly Float64Array[], moves: Float64Array): boolean {
  const basis: Float64Array[] = [];
  const remainder = (vector: Float64Array): Float64Array => {
    const out = vector.slice();
    for (let pass = 0; pass < 2; pass++)
      for (const b of basis) {
        let k = 0;
        for (let i = 0; i < out.length; i++) k += b[i] * out[i];
        for (let i = 0; i < out.length; i++) out[i] = out[i] - k * b[i];
      }
    return out;
  };
  const size = (vector: Float64Array) => Math.sqrt(vector.reduce((sum, v) => sum + v * v, 0));
  for (const other of others) {
    const rest = remainder(other);
    const length = size(rest);
    if (length > 0) basis.push(rest.map((v) => v / length));
  }
  return size(remainder(moves)) < 1e-7 * size(moves);
}
