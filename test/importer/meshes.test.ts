import { describe, expect, it } from 'vitest';
import { distance, dot, subtract, type Vec3 } from '../../src/domain/vector.ts';
import { expectBow } from './support/expect-bow.ts';
import { circleRing, type Faces, prismFaces, shellOf } from './support/mesh-faces.ts';
import { beamWith, importText } from './support/model-text.ts';
import { trussModel } from './support/space-truss.ts';
import { StepWriter } from './support/step-writer.ts';

/** One member whose body is a boundary representation with these faces, metres. */
function importFaces(faces: Faces) {
  const draw = (w: StepWriter) => ({ body: [w.add(`IFCFACETEDBREP(${shellOf(w, faces, 'IFCCLOSEDSHELL')})`)] });
  return importText(trussModel(new StepWriter(), 'IFC4', [draw]));
}

const codes = (faces: Faces) => importFaces(faces).findings.map((f) => f.code);

/** An angle 100 x 60 x 10 mm, its heel in the origin. */
const ANGLE: readonly (readonly [number, number])[] = [
  [0, 0],
  [0.06, 0],
  [0.06, 0.01],
  [0.01, 0.01],
  [0.01, 0.1],
  [0, 0.1],
];

const straight = (outline: typeof ANGLE, length: number, from = 0): Faces =>
  prismFaces(
    [outline],
    () => from,
    () => from + length,
  );

const box = (x: number, y: number): typeof ANGLE => [
  [-x / 2, -y / 2],
  [x / 2, -y / 2],
  [x / 2, y / 2],
  [-x / 2, y / 2],
];

describe('a member drawn as a mesh', () => {
  it('has the centroid line and the second moments of an angle about its own legs', () => {
    const [member] = importFaces(straight(ANGLE, 2)).members;
    const area = 0.06 * 0.01 + 0.09 * 0.01;
    const x = (0.0006 * 0.03 + 0.0009 * 0.005) / area;
    const y = (0.0006 * 0.005 + 0.0009 * 0.055) / area;
    expect(distance(member!.axis[0], [x, y, 0])).toBeLessThan(1e-9);
    expect(distance(member!.axis[1], [x, y, 2])).toBeLessThan(1e-9);
    expect(member!.section).toMatchObject({ from: 'mesh', shape: 'other' });
    expect(member!.section!.area).toBeCloseTo(area, 12);
    const own =
      (0.06 * 0.01 ** 3) / 12 + 0.0006 * (y - 0.005) ** 2 + (0.01 * 0.09 ** 3) / 12 + 0.0009 * (0.055 - y) ** 2;
    expect(member!.section!.inertiaY).toBeCloseTo(own, 14);
    expect(Math.abs(dot(member!.zAxis, [0, 1, 0]))).toBeCloseTo(1, 9);
  });

  it('ends where skew end faces cross its centroid line, not at its farthest corners', () => {
    // 45 degrees at the foot, 30 degrees at the head.
    const faces = prismFaces(
      [box(0.1, 0.2)],
      (_, y) => y,
      (x) => 3 + x * Math.tan(Math.PI / 6),
    );
    const [member] = importFaces(faces).members;
    expect(distance(member!.axis[0], [0, 0, 0])).toBeLessThan(1e-6);
    expect(distance(member!.axis[1], [0, 0, 3])).toBeLessThan(1e-6);
    expect(member!.section!.area).toBeCloseTo(0.02, 9);
  });

  it('keeps its axis and its whole section where an end is coped', () => {
    // A stem of half the depth goes on for 300 mm: two prisms that share corners.
    const faces = [
      ...straight(box(0.1, 0.2), 3),
      ...straight([...box(0.1, 0.2).slice(0, 2), [0.05, 0], [-0.05, 0]], 0.3, 3),
    ];
    const [member] = importFaces(faces).members;
    expect(member!.section!.area).toBeCloseTo(0.02, 9);
    expect(member!.axis[1][2]).toBeCloseTo(3.3, 6);
    expect(Math.hypot(member!.axis[0][0], member!.axis[0][1])).toBeLessThan(1e-6);
    expect(Math.hypot(member!.axis[1][0], member!.axis[1][1])).toBeLessThan(1e-6);
  });

  it('knows round bars and tubes in their facets, so that they have the area of round ones', () => {
    const [bar] = importFaces(straight(circleRing(0.02), 1)).members;
    expect(bar!.section).toMatchObject({ shape: 'circle', from: 'mesh' });
    expect(bar!.section!.area).toBeCloseTo(Math.PI * 0.02 ** 2, 9);
  });

  it('knows rectangles', () => {
    expect(importFaces(straight(box(0.1, 0.2), 1)).members[0]!.section).toMatchObject({
      shape: 'rectangle',
      depth: 0.2,
    });
  });

  it('takes the least section of a body that tapers, and says that it is uneven', () => {
    const taper = prismFaces(
      [box(1, 1)],
      () => 0,
      () => 1,
    ).map((rings) =>
      rings.map((ring) => ring.map(([x, y, z]): Vec3 => [x * (0.2 - 0.1 * z), y * (0.2 - 0.1 * z), 4 * z])),
    );
    const model = importFaces(taper);
    expect(model.members[0]!.section!.area).toBeLessThan(0.2 * 0.2 * 0.4);
    expect(distance(...model.members[0]!.axis)).toBeCloseTo(4, 6);
    expect(model.findings[0]).toMatchObject({ code: 'guessed-section' });
    expect(model.findings[0]!.message).toContain('changes along the length');
  });

  it('that is bent is its chord, with its bow', () => {
    const radius = 10;
    const steps = 24;
    const at = (i: number, [x, y]: readonly [number, number]): Vec3 => {
      const t = ((i - steps / 2) / steps) * 0.6;
      return [x, (radius + y) * Math.cos(t) - radius, (radius + y) * Math.sin(t)];
    };
    const ring = box(0.1, 0.1);
    const sides = Array.from({ length: steps }, (_, i) => i).flatMap((i) =>
      ring.map((p, k) => [[at(i, p), at(i, ring[(k + 1) % 4]!), at(i + 1, ring[(k + 1) % 4]!), at(i + 1, p)]]),
    );
    const faces: Faces = [...sides, [ring.map((p) => at(0, p)).reverse()], [ring.map((p) => at(steps, p))]];
    const model = importFaces(faces);
    const chord = 2 * radius * Math.sin(0.3);
    expect(distance(...model.members[0]!.axis)).toBeGreaterThan(chord - 0.05);
    expect(distance(...model.members[0]!.axis)).toBeLessThan(chord + 0.05);
    expectBow(model.members[0]!, [0, -radius, 0], radius, 0.6, 3e-3);
  });

  it('is refused with the reason where it is a plate or a lump', () => {
    for (const faces of [straight(box(0.4, 0.3), 0.01), straight(box(0.2, 0.2), 0.3)]) {
      const model = importFaces(faces);
      expect(model.members).toEqual([]);
      expect(model.findings[0]).toMatchObject({ code: 'no-axis' });
      expect(model.findings[0]!.message).toContain('plate or a lump');
    }
  });

  it('is read although one face is missing, and refused where nothing closes', () => {
    expect(importFaces(straight(box(0.1, 0.2), 3).slice(0, 5)).members).toHaveLength(1);
    const open = straight(box(0.1, 0.2), 3).slice(0, 2);
    expect(importFaces(open).members).toEqual([]);
    expect(codes(open)).toEqual(['no-axis']);
  });

  it('of several bars grown together is refused as many in one', () => {
    // A ladder: two stiles and rungs that share corners with them, drawn as one shell.
    const stile = (x: number) =>
      prismFaces(
        [box(0.04, 0.04)],
        () => 0,
        () => 3,
      ).map((rings) => rings.map((r) => r.map(([a, b, c]): Vec3 => [a + x, b, c])));
    const tie: Faces = [
      [
        [
          [-0.28, -0.02, 0],
          [0.28, -0.02, 0],
          [0.28, -0.02, 3],
        ],
      ],
    ];
    const faces = [...stile(-0.3), ...stile(0.3), ...tie];
    expect(codes(faces)).toEqual(['many-in-one']);
  });

  it('is the same wherever it stands and however it is turned', () => {
    const turned = ([x, y, z]: Vec3): Vec3 => {
      // Two quarter-irrational turns about x and z, and a place far away.
      const [c, s] = [Math.cos(0.7), Math.sin(0.7)];
      const [a, b]: [number, number] = [y * c - z * s, y * s + z * c];
      return [1e5 + x * c - a * s, 2e5 + x * s + a * c, 30 + b];
    };
    const faces = straight(ANGLE, 2).map((rings) => rings.map((ring) => ring.map(turned)));
    const [here] = importFaces(straight(ANGLE, 2)).members;
    const [there] = importFaces(faces).members;
    const ends = here!.axis.map(turned);
    const away = Math.min(
      distance(there!.axis[0], ends[0]!) + distance(there!.axis[1], ends[1]!),
      distance(there!.axis[0], ends[1]!) + distance(there!.axis[1], ends[0]!),
    );
    expect(away).toBeLessThan(1e-6);
    expect(there!.section!.area).toBeCloseTo(here!.section!.area, 9);
    expect(there!.section!.inertiaMajor).toBeCloseTo(here!.section!.inertiaMajor, 12);
    expect(Math.abs(dot(there!.zAxis, subtract(there!.axis[1], there!.axis[0])))).toBeLessThan(1e-9);
  });
});

describe('a body of a bounding box alone', () => {
  const boxed = (size: string) =>
    importText(
      beamWith({ body: '#100', more: `#100=IFCBOUNDINGBOX(#12,${size});` }).replace("'Body','Swept", "'Box','Swept"),
    );

  it('gives a line along its longest edge where it is slender, and no section', () => {
    const model = boxed('100.,3000.,200.');
    expect(distance(model.members[0]!.axis[0], [0.05, 0, 0.1])).toBeLessThan(1e-9);
    expect(distance(model.members[0]!.axis[1], [0.05, 3, 0.1])).toBeLessThan(1e-9);
    expect(model.members[0]!.section).toBeNull();
    expect(model.findings.map((f) => f.code)).toContain('no-section');
  });

  it('gives none where it is stout', () => {
    expect(boxed('1000.,3000.,200.')).toMatchObject({ members: [{}] });
    expect(boxed('1500.,3000.,200.')).toMatchObject({ members: [] });
  });
});
