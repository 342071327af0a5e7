import type { Carriage, Truss } from '../../../src/domain/truss.ts';
import { distance, type Vec3 } from '../../../src/domain/vector.ts';
import type { GroundSpring, LoadCase, NodalForce, Restraint, Supports } from '../../../src/statics/types.ts';

export interface Sketch {
  readonly points: readonly Vec3[];
  readonly bars: readonly (readonly [from: number, to: number])[];
  /** EA of every bar, N. */
  readonly stiffness?: number | readonly (number | null)[];
  readonly carried?: ReadonlyMap<number, Carriage>;
}

export function trussOf({ points, bars, stiffness = 1e8, carried = new Map() }: Sketch): Truss {
  return {
    nodes: points.map((at, i) => ({
      at,
      members: [],
      carriedBy: carried.get(i) ?? null,
      overhangMass: 0,
      place: null,
    })),
    bars: bars.map(([from, to], i) => ({
      name: `bar ${i}`,
      members: [i],
      from,
      to,
      length: distance(points[from], points[to]),
      stiffnessEA: typeof stiffness === 'number' ? stiffness : stiffness[i],
      massPerLength: 10,
      expansion: 1.2e-5,
    })),
    faith: [],
  };
}

const DIRECTION: Readonly<Record<string, Vec3>> = { x: [1, 0, 0], y: [0, 1, 0], z: [0, 0, 1] };

/** `fix({0: 'xyz', 4: 'yz'})`. */
export function fix(letters: Readonly<Record<number, string>>, springs: readonly GroundSpring[] = []): Supports {
  const restraints = Object.entries(letters).flatMap(([node, held]) =>
    [...held].map((letter): Restraint => ({ node: Number(node), direction: DIRECTION[letter] })),
  );
  return { restraints, springs };
}

/** Holds every node along one axis: a flat truss stays flat. */
export function alsoFlat(supports: Supports, count: number, axis: 'x' | 'y' | 'z'): Supports {
  const more = Array.from({ length: count }, (_, node): Restraint => ({ node, direction: DIRECTION[axis] }));
  return { ...supports, restraints: [...supports.restraints, ...more] };
}

export function caseOf(loads: readonly NodalForce[], name = 'dead'): LoadCase {
  return { name, nature: 'permanent', loads };
}

/** A small generator of numbers between 0 and 1 (mulberry32), so that random trusses are the same at every run. */
export function randomFrom(seed: number): () => number {
  let state = seed >>> 0;
  return () => {
    state = (state + 0x6d2b79f5) >>> 0;
    let t = Math.imul(state ^ (state >>> 15), 1 | state);
    t = (t + Math.imul(t ^ (t >>> 7), 61 | t)) ^ t;
    return ((t ^ (t >>> 14)) >>> 0) / 2 ** 32;
  };
}

export interface RandomTruss {
  readonly truss: Truss;
  readonly supports: Supports;
  readonly cases: LoadCase[];
}

/** A random space truss with supports along any direction, springs and carried nodes, `bars` more or fewer than Maxwell asks for. */
export function randomTruss(seed: number, extra: number): RandomTruss {
  const random = randomFrom(seed);
  const count = 5 + Math.floor(random() * 8);
  const points: Vec3[] = Array.from({ length: count }, () => [random() * 10, random() * 10, random() * 6]);
  const restraints: Restraint[] = [];
  const springs: GroundSpring[] = [];
  const direction = (): Vec3 => {
    const v: Vec3 = [random() - 0.5, random() - 0.5, random() - 0.5];
    const size = Math.hypot(...v);
    return [v[0] / size, v[1] / size, v[2] / size];
  };
  for (let node = 0; node < 3; node++) {
    restraints.push({ node, direction: [0, 0, 1] }, { node, direction: [1, 0, 0] });
    if (random() < 0.5) restraints.push({ node, direction: [0, 1, 0] });
    else springs.push({ node, direction: direction(), stiffness: 1e7 * (0.5 + random()) });
  }
  if (random() < 0.5) restraints.push({ node: 3, direction: direction() });
  const freedoms = 3 * count - restraints.length;
  const all: [number, number][] = [];
  for (let a = 0; a < count; a++) for (let b = a + 1; b < count; b++) all.push([a, b]);
  const bars: [number, number][] = [];
  const wanted = Math.min(Math.max(freedoms - springs.length + extra, count), all.length);
  while (bars.length < wanted) bars.push(all.splice(Math.floor(random() * all.length), 1)[0]);
  const carried = new Map<number, Carriage>();
  for (let k = 0; k < 3; k++) {
    const bar = Math.floor(random() * wanted);
    const t = 0.2 + 0.6 * random();
    const [a, b] = [points[bars[bar][0]], points[bars[bar][1]]];
    carried.set(points.length, { bar, t });
    points.push([a[0] + t * (b[0] - a[0]), a[1] + t * (b[1] - a[1]), a[2] + t * (b[2] - a[2])]);
  }
  // A bar between two carried nodes, and a node carried by it.
  const onCarried = bars.length;
  bars.push([count, count + 1]);
  const [a, b] = [points[count], points[count + 1]];
  carried.set(points.length, { bar: onCarried, t: 0.5 });
  points.push([(a[0] + b[0]) / 2, (a[1] + b[1]) / 2, (a[2] + b[2]) / 2]);
  if (random() < 0.4) restraints.push({ node: count + 2, direction: direction() });
  const stiffness = bars.map(() => 1e8 * (0.3 + random()));
  const cases = ['a', 'b', 'c'].map((name) =>
    caseOf(
      points.flatMap((_, node) =>
        random() < 0.5
          ? [{ node, force: [1e4 * (random() - 0.5), 1e4 * (random() - 0.5), -1e4 * random()] as const }]
          : [],
      ),
      name,
    ),
  );
  return { truss: trussOf({ points, bars, stiffness, carried }), supports: { restraints, springs }, cases };
}
