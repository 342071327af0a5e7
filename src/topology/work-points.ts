import { EigenvalueDecomposition, Matrix } from 'ml-matrix';
import { along, dot, meanOf, subtract, type Vec3 } from '../domain/vector.ts';
import { facetAt, pointAt } from './along-axes.ts';
import type { Axis } from './axes.ts';
import type { Joint } from './joints.ts';
import type { Station } from './stations.ts';

/** Below this share of the stiffest direction the axes do not say where along it they meet. */
const UNDETERMINED = 0.03;

/**
 * The point nearest to all axes of a joint in the least-squares sense, kept on the axis of a member that runs through.
 * Where the axes leave a direction open (a splice) the ends as drawn decide.
 */
export function workPoint(joint: Joint, axes: readonly (Axis | null)[]): Vec3 {
  const lines = joint.stations
    .filter((station) => !joint.seated.has(station.member))
    .map((station) => ({ axis: lineAt(axes, station), station }));
  const through = lines.filter(({ station }) => station.role === 'through');
  const drawn = meanOf(
    lines.map(({ axis, station }) => along(axis.start, axis.direction, clampToAxis(station.s, axis))),
  );
  if (through.length === 0)
    return nearestToLines(
      lines.map(({ axis }) => axis),
      drawn,
    );
  if (through.length > 1)
    return nearestToLines(
      through.map(({ axis }) => axis),
      drawn,
    );
  const [{ axis: runner, station }] = through;
  const others = lines.filter(({ axis }) => axis !== runner).map(({ axis }) => axis);
  return nearestOnRunner(axes[station.member] as Axis, others, station.s);
}

/** The line that the station's member follows there. */
const lineAt = (axes: readonly (Axis | null)[], { member, s }: Station): Axis => facetAt(axes[member] as Axis, s);

/** So often the nearest point may move on to another facet of a bent member. */
const MOST_STEPS = 4;

/** The point of a member that is nearest to the other lines, near `s` along it. */
function nearestOnRunner(runner: Axis, others: readonly Axis[], s: number): Vec3 {
  let at = nearestOnLine(facetAt(runner, s), others, s);
  for (let step = 1; step < MOST_STEPS && facetAt(runner, at) !== facetAt(runner, s); step++) {
    s = at;
    at = nearestOnLine(facetAt(runner, s), others, s);
  }
  return pointAt(runner, at);
}

const clampToAxis = (s: number, axis: Axis): number => Math.min(Math.max(s, 0), axis.length);

/** How far along `runner` the sum of squared distances to the other lines is least. */
function nearestOnLine(runner: Axis, others: readonly Axis[], fallback: number): number {
  let stiffness = 0;
  let pull = 0;
  for (const other of others) {
    const uv = dot(runner.direction, other.direction);
    const w = subtract(other.start, runner.start);
    stiffness += 1 - uv * uv;
    pull += dot(w, runner.direction) - uv * dot(w, other.direction);
  }
  return stiffness > UNDETERMINED * Math.max(others.length, 1) ? pull / stiffness : fallback;
}

/** Minimises the sum of squared distances to the lines; moves from `start` only in the directions they determine. */
function nearestToLines(lines: readonly Axis[], start: Vec3): Vec3 {
  const normal = Matrix.zeros(3, 3);
  const pull = [0, 0, 0];
  for (const { start: base, direction: u } of lines) {
    const w = subtract(base, start);
    const wu = dot(w, u);
    for (let i = 0; i < 3; i++) {
      pull[i] += w[i] - wu * u[i];
      for (let j = 0; j < 3; j++) normal.set(i, j, normal.get(i, j) + withoutDust((i === j ? 1 : 0) - u[i] * u[j]));
    }
  }
  const { realEigenvalues: values, eigenvectorMatrix: vectors } = new EigenvalueDecomposition(normal, {
    assumeSymmetric: true,
  });
  const largest = Math.max(...values);
  let point = start;
  values.forEach((value, k) => {
    if (value <= UNDETERMINED * largest) return;
    const direction = [0, 1, 2].map((i) => vectors.get(i, k)) as unknown as Vec3;
    point = along(point, direction, dot(pull as unknown as Vec3, direction) / value);
  });
  return point;
}

/** The eigenvalue routine does not end on entries near the smallest number there is. */
const withoutDust = (x: number): number => (Math.abs(x) < 1e-15 ? 0 : x);
