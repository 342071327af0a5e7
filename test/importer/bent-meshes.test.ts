import { describe, expect, it } from 'vitest';
import { add, along, distance, dot, norm, subtract, unit, type Vec3 } from '../../src/domain/vector.ts';
import { expectBow } from './support/expect-bow.ts';
import { circleRing, type Faces, indexed, prismFaces, shellOf } from './support/mesh-faces.ts';
import { importText } from './support/model-text.ts';
import { trussModel } from './support/space-truss.ts';
import { StepWriter } from './support/step-writer.ts';

type Ring = readonly (readonly [number, number])[];

/** A section drawn along a path, mitred at its corners: side faces, and end faces of rings. `x` lies across the first run. */
function sweptFaces(rings: readonly Ring[], path: readonly Vec3[], x: Vec3, y: Vec3): Faces {
  const directions = path.slice(1).map((p, i) => unit(subtract(p, path[i]!))!);
  const mitres = path.map((_, i) => add(directions[i - 1] ?? directions[0]!, directions[i] ?? directions.at(-1)!));
  const start = rings.map((ring) => ring.map(([u, v]) => along(along(path[0]!, x, u), y, v)));
  const stations = [start];
  directions.forEach((d, i) => {
    const [corner, mitre] = [path[i + 1]!, mitres[i + 1]!];
    const carried = (p: Vec3) => along(p, d, dot(subtract(corner, p), mitre) / dot(d, mitre));
    stations.push(stations[i]!.map((ring) => ring.map(carried)));
  });
  const sides = stations.slice(1).flatMap((to, i) =>
    to.flatMap((ring, k) =>
      ring.map((_, j) => {
        const next = (j + 1) % ring.length;
        const from = stations[i]![k]!;
        return [[from[j]!, from[next]!, ring[next]!, ring[j]!]];
      }),
    ),
  );
  return [...sides, start, stations.at(-1)!];
}

/** A flat 60 x 6 folded along the path in the xz plane; `isMerged`: each narrow side is one many-cornered face. */
function foldedFlat(path: readonly Vec3[], isMerged = false): Faces {
  const box: Ring = [
    [-0.003, -0.03],
    [0.003, -0.03],
    [0.003, 0.03],
    [-0.003, 0.03],
  ];
  const d = unit(subtract(path[1]!, path[0]!))!;
  const faces = sweptFaces([box], path, [d[2], 0, -d[0]], [0, 1, 0]);
  if (!isMerged) return faces;
  const narrow = (side: number): Vec3[][] => {
    const quads = faces.filter((face) => face[0]!.every((p) => Math.sign(p[1]) === side)).map((face) => face[0]!);
    const [one, other] = [0, 1].map((k) => quads.flatMap((q, i) => (i === 0 ? [q[k]!, q[3 - k]!] : [q[3 - k]!])));
    return [[...one!, ...other!.reverse()]];
  };
  const isNarrow = (face: Vec3[][]) => face[0]!.every((p) => p[1] > 0) || face[0]!.every((p) => p[1] < 0);
  return [...faces.filter((face) => !isNarrow(face)), narrow(1), narrow(-1)];
}

function importBrep(faces: Faces) {
  const draw = (w: StepWriter) => ({ body: [w.add(`IFCFACETEDBREP(${shellOf(w, faces, 'IFCCLOSEDSHELL')})`)] });
  return importText(trussModel(new StepWriter(), 'IFC2X3', [draw]), 'IFC2X3');
}

/** Fans for plain faces, strips between the two rings of an end with a bore. */
function trianglesOf([outer, inner]: number[][]): number[][] {
  if (inner === undefined) return outer!.slice(2).map((c, i) => [outer![0]!, outer![i + 1]!, c]);
  return outer!.flatMap((a, i) => {
    const next = (i + 1) % outer!.length;
    return [
      [a, outer![next]!, inner[next]!],
      [a, inner[next]!, inner[i]!],
    ];
  });
}

function importTriangles(faces: Faces) {
  const draw = (w: StepWriter) => {
    const { list, rings } = indexed(w, faces);
    const rows = rings.flatMap(trianglesOf).map((t) => `(${t.join(',')})`);
    return { body: [w.add(`IFCTRIANGULATEDFACESET(${list},$,.T.,(${rows.join(',')}),$)`)] };
  };
  return importText(trussModel(new StepWriter(), 'IFC4', [draw]));
}

const ways = [
  ['an IFC2X3 boundary representation', importBrep, true],
  ['an IFC4 triangulated face set', importTriangles, false],
] as const;

type Model = ReturnType<typeof importBrep>;
const codes = (model: Model) =>
  [...new Set(model.findings.map((f) => f.code))].filter((c) => c !== 'no-material').sort();

/** How far a member's ends are from two points, whichever comes first. */
const away = ({ axis: [a, b] }: Model['members'][number], p: Vec3, q: Vec3): number =>
  Math.min(Math.max(distance(a, p), distance(b, q)), Math.max(distance(a, q), distance(b, p)));

/** Each run of the path is some member's axis. */
function expectRuns(model: Model, path: readonly Vec3[], within: number): void {
  expect(model.members.map((m) => m.part)).toEqual(path.slice(1).map((_, i) => i));
  for (let i = 0; i + 1 < path.length; i++) {
    expect(Math.min(...model.members.map((m) => away(m, path[i]!, path[i + 1]!)))).toBeLessThan(within);
  }
  for (const member of model.members) expect(member.axisFrom).toBe('mesh');
  expect(codes(model)).toEqual(['bent-axis', 'guessed-section']);
}

/** A corner at `tip` between two lines, rounded with `radius` in `facets`. */
function rounded(from: Vec3, tip: Vec3, to: Vec3, radius: number, facets: number): Vec3[] {
  const [d, e] = [unit(subtract(tip, from))!, unit(subtract(to, tip))!];
  const turn = Math.acos(dot(d, e));
  const begin = along(tip, d, -radius * Math.tan(turn / 2));
  const sideways = unit(along(e, d, -dot(e, d)))!;
  return Array.from({ length: facets + 1 }, (_, i) => {
    const t = (turn * i) / facets;
    return along(along(begin, d, radius * Math.sin(t)), sideways, radius * (1 - Math.cos(t)));
  });
}

for (const [way, read, isMerged] of ways) {
  describe(`a bent bar drawn as ${way}`, () => {
    it('folded once at a right angle is two members that meet where their centre lines do', () => {
      const path: Vec3[] = [
        [0, 0, 0.8],
        [0, 0, 0],
        [1, 0, 0],
      ];
      const model = read(foldedFlat(path, isMerged));
      expectRuns(model, path, 1e-6);
      for (const { section, zAxis, axis } of model.members) {
        expect(section!.shape).toBe('rectangle');
        expect(section!.area).toBeCloseTo(0.06 * 0.006, 9);
        expect(section!.inertiaMinor).toBeCloseTo((0.06 * 0.006 ** 3) / 12, 13);
        expect(Math.abs(dot(zAxis, subtract(axis[1], axis[0])))).toBeLessThan(1e-9);
      }
    });

    it('folded twice, to a U and to a Z, is a member a run', () => {
      for (const last of [
        [0.7, 0, 0.6],
        [0.7, 0, -0.5],
        [1.1, 0, -0.4],
      ] as Vec3[]) {
        const path: Vec3[] = [[0, 0, 0.6], [0, 0, 0], [0.7, 0, 0], last];
        expectRuns(read(foldedFlat(path, isMerged)), path, 1e-6);
      }
    });

    it('folded round a radius is runs carried on to where they meet', () => {
      const [from, tip, to]: Vec3[] = [
        [0, 0, 0.7],
        [0, 0, 0],
        [0.9, 0, 0],
      ];
      const path = [from!, ...rounded(from!, tip!, to!, 0.012, 4), to!];
      expectRuns(read(foldedFlat(path, isMerged)), [from!, tip!, to!], 1e-6);
    });

    it('with a short hook beyond its runs loses the hook', () => {
      const path: Vec3[] = [
        [0.15, 0, 0.8],
        [0, 0, 0.8],
        [0, 0, 0],
        [1, 0, 0],
      ];
      expectRuns(read(foldedFlat(path, isMerged)), path.slice(1), 1e-6);
    });

    it('cranked so little that it is long and narrow as a whole is a member a run', () => {
      const path: Vec3[] = [
        [0, 0, 0],
        [1.5, 0, 0],
        [2.9, 0, 0.6],
      ];
      expectRuns(read(foldedFlat(path, isMerged)), path, 1e-6);
    });

    it('of an angle bent to an arc is its chord, with the area and inertias of the angle', () => {
      // 60 x 60 x 6, the centroid of the section on the path.
      const centre = (60 * 6 * 30 + 54 * 6 * 3) / (60 * 6 + 54 * 6) / 1000;
      const angle = (
        [
          [0, 0],
          [0.06, 0],
          [0.06, 0.006],
          [0.006, 0.006],
          [0.006, 0.06],
          [0, 0.06],
        ] as const
      ).map(([x, y]) => [x - centre, y - centre] as const);
      const [radius, sweep, facets] = [1, (150 * Math.PI) / 180, 50];
      const path = Array.from({ length: facets + 1 }, (_, i): Vec3 => {
        const t = (i / facets) * sweep;
        return [radius * Math.cos(t), 0, radius * Math.sin(t)];
      });
      const d = unit(subtract(path[1]!, path[0]!))!;
      const model = read(sweptFaces([angle], path, [d[2], 0, -d[0]], [0, 1, 0]));
      expect(model.members).toHaveLength(1);
      expect(away(model.members[0]!, path[0]!, path.at(-1)!)).toBeLessThan(1e-6);
      expect(distance(...model.members[0]!.axis)).toBeCloseTo(2 * radius * Math.sin(sweep / 2), 6);
      const area = 0.06 * 0.006 + 0.054 * 0.006;
      expect(Math.abs(model.members[0]!.section!.area / area - 1)).toBeLessThan(0.001);
      expectBow(model.members[0]!, [0, 0, 0], radius, sweep, 2e-3);
      expect(codes(model)).toEqual(['guessed-section']);
    });

    it('that is a pipe with two bends in space is three members with the area of a tube', () => {
      const ends: Vec3[] = [
        [0, 0, 0],
        [1, 0, 0],
        [1, 0.9, 0],
        [1, 0.9, 1.2],
      ];
      const path = [
        ends[0]!,
        ...rounded(ends[0]!, ends[1]!, ends[2]!, 0.1, 8),
        ...rounded(ends[1]!, ends[2]!, ends[3]!, 0.1, 8),
        ends[3]!,
      ];
      const model = read(sweptFaces([circleRing(0.03), circleRing(0.026)], path, [0, 1, 0], [0, 0, 1]));
      expectRuns(model, ends, 1e-6);
      for (const { section } of model.members) {
        expect(section!.shape).toBe('CHS');
        expect(section!.area).toBeCloseTo(Math.PI * (0.03 ** 2 - 0.026 ** 2), 9);
      }
    });
  });
}

describe('what bends but is no bent bar', () => {
  const refused = (faces: Faces) => {
    for (const [, read] of ways) {
      const model = read(faces);
      expect(model.members).toHaveLength(0);
      expect(codes(model).every((code) => code === 'no-axis' || code === 'many-in-one')).toBe(true);
      expect(codes(model)).toHaveLength(1);
    }
  };

  it('a folded plate, wider than a fifth of its developed length, is refused', () => {
    refused(
      foldedFlat([
        [0, 0, 0.14],
        [0, 0, 0],
        [0.15, 0, 0],
      ]),
    );
  });

  it('a ring is refused', () => {
    const corner = (radius: number, y: number, i: number): Vec3 => {
      const t = (i * Math.PI) / 18;
      return [radius * Math.cos(t), y, radius * Math.sin(t)];
    };
    const section = [
      [0.98, -0.02],
      [1.02, -0.02],
      [1.02, 0.02],
      [0.98, 0.02],
    ] as const;
    const faces = Array.from({ length: 36 }, (_, i) =>
      section.map(([r, y], k) => {
        const [s, z] = section[(k + 1) % 4]!;
        return [[corner(r, y, i), corner(s, z, i), corner(s, z, (i + 1) % 36), corner(r, y, (i + 1) % 36)]];
      }),
    ).flat();
    refused(faces);
  });

  it('three legs from one point are refused', () => {
    // A Y of flats 60 x 10 mm, cut from one plate: an outline drawn out by its thickness.
    const leg = (t: number): [number, number][] => {
      const [c, s] = [Math.cos(t), Math.sin(t)];
      const at = (u: number, v: number): [number, number] => [u * c - v * s, u * s + v * c];
      return [at(0.03 / Math.tan(Math.PI / 3), -0.03), at(0.8, -0.03), at(0.8, 0.03)];
    };
    const outline = [0, 1, 2].flatMap((i) => leg((i * 2 * Math.PI) / 3));
    const faces = prismFaces(
      [outline],
      () => 0,
      () => 0.01,
    );
    const model = importBrep(faces);
    expect(model.members).toHaveLength(0);
    expect(codes(model)).toHaveLength(1);
  });

  it('a flat whose width changes at its bend is refused', () => {
    const flat = foldedFlat([
      [0, 0, 0.8],
      [0, 0, 0],
      [1, 0, 0],
    ]);
    refused(flat.map((rings) => rings.map((ring) => ring.map(([x, y, z]): Vec3 => [x, y * (1 + x), z]))));
  });
});

describe('a bent bar far from the origin and turned', () => {
  it('is the same bar', () => {
    const [c, s] = [Math.cos(0.7), Math.sin(0.7)];
    const turned = ([x, y, z]: Vec3): Vec3 => {
      const [a, b] = [y * c - z * s, y * s + z * c];
      return [2e5 + x * c - a * s, 4e5 + x * s + a * c, 30 + b];
    };
    const path: Vec3[] = [
      [0, 0, 0.8],
      [0, 0, 0],
      [1, 0, 0],
      [1.3, 0, 0.6],
    ];
    const model = importBrep(foldedFlat(path, true).map((rings) => rings.map((ring) => ring.map(turned))));
    expectRuns(model, path.map(turned), 1e-6);
    expect(norm(subtract(...model.members[0]!.axis))).toBeGreaterThan(0.6);
  });
});
