import { describe, expect, it } from 'vitest';
import { distance, dot, subtract, unit, type Vec3 } from '../../src/domain/vector.ts';
import { shapeFromDesignation } from '../../src/importer/sections/designations/shape-from-designation.ts';
import type { Edge } from '../../src/importer/sections/outline.ts';
import { outlineProperties } from '../../src/importer/sections/outline-properties.ts';
import { type Faces, prismFaces, shellOf } from './support/mesh-faces.ts';
import { importText } from './support/model-text.ts';
import { trussModel } from './support/space-truss.ts';
import { StepWriter } from './support/step-writer.ts';

/** Members whose bodies have these faces (metres), all of one type, the first called `name`. */
function importBodies(name: string, ...bodies: readonly Faces[]) {
  const draw = (faces: Faces) => (w: StepWriter) => ({
    body: [w.add(`IFCFACETEDBREP(${shellOf(w, faces, 'IFCCLOSEDSHELL')})`)],
  });
  const w = new StepWriter();
  trussModel(w, 'IFC4', bodies.map(draw));
  const members = w
    .text()
    .split('\n')
    .filter((line) => line.includes('IFCMEMBER('))
    .map((line) => line.split('=')[0]);
  const type = w.add("IFCMEMBERTYPE('0ttttttttttttttttttttt',$,'Lintel',$,$,$,$,$,$,.MEMBER.)");
  w.add(`IFCRELDEFINESBYTYPE('0rrrrrrrrrrrrrrrrrrrrr',$,$,$,(${members.join(',')}),${type})`);
  return importText(w.text().replace("'M0'", `'${name}'`));
}

const box = (x: number, y: number): [number, number][] => [
  [0, -y / 2],
  [x, -y / 2],
  [x, y / 2],
  [0, y / 2],
];

const upright = (ring: readonly (readonly [number, number])[], low: number, high: number): Faces =>
  prismFaces(
    [ring],
    () => low,
    () => high,
  );

/** A flat 60 x 6 along x, its last part slit and bent 45 degrees to either side by `out`; `length` of the unbent part. */
function splitTail(length: number, out: number): Faces {
  const half = (sign: 1 | -1): [number, number][] => [
    [0, -0.003],
    [length, -0.003],
    [length + out, -0.003 + sign * out],
    [length + out, 0.003 + sign * out],
    [length, 0.003],
    [0, 0.003],
  ];
  const without = (faces: Faces, height: number): Faces =>
    faces.filter((rings) => !rings[0]!.every(([, , z]) => z === height));
  const slit = (ring: readonly (readonly [number, number])[]): Vec3[][] => [
    ring.slice(1, 5).map(([x, y]): Vec3 => [x, y, 0]),
  ];
  return [
    ...without(upright(half(1), 0, 0.03), 0),
    ...without(upright(half(-1), -0.03, 0), 0),
    slit(half(1)),
    slit(half(-1)),
  ];
}

/** A plate 80 x 10 along x that steps aside by its thickness half way. */
const joggled: Faces = upright(
  [
    [0, -0.005],
    [0.07, -0.005],
    [0.07, 0.005],
    [0.13, 0.005],
    [0.13, 0.015],
    [0.06, 0.015],
    [0.06, 0.005],
    [0, 0.005],
  ],
  -0.04,
  0.04,
);

const ANGLE: [number, number][] = [
  [0, 0],
  [0.15, 0],
  [0.15, 0.003],
  [0.003, 0.003],
  [0.003, 0.09],
  [0, 0.09],
];

/** The fillets of an outline in four chords each. */
function chords(edge: Edge): [number, number][] {
  if (edge.kind === 'line') return [[edge.from[0], edge.from[1]]];
  return [0, 1, 2, 3].map((i): [number, number] => {
    const t = edge.start + ((edge.end - edge.start) * i) / 4;
    const at = (k: 0 | 1) => edge.centre[k] + edge.u[k] * Math.cos(t) + edge.v[k] * Math.sin(t);
    return [at(0), at(1)];
  });
}

const codesOf = (model: ReturnType<typeof importBodies>) => model.findings.map(({ code }) => code);

describe('a short body that is no prism but has a section in its name', () => {
  it.each([
    [0.1, 0.03],
    [0.07, 0.04],
    [0.05, 0.03],
  ])('as a split-tail anchor of %f m is a member along its length, said to be approximate', (length, out) => {
    const model = importBodies('PL6*60', splitTail(length, out));
    const [member] = model.members;
    expect(model.members).toHaveLength(1);
    expect(distance(member!.axis[0], [0, 0, 0])).toBeLessThan(1e-9);
    expect(distance(member!.axis[1], [length + out, 0, 0])).toBeLessThan(1e-9);
    expect(member!.section).toMatchObject({ name: 'Flat 60x6', from: 'name' });
    expect(Math.abs(member!.zAxis[2])).toBeCloseTo(1, 9);
    expect(codesOf(model)).toEqual(['bent-axis']);
    // The tips lie `out` aside, half the thickness of both falls out of it.
    expect(model.findings[0]!.gap).toBeCloseTo(out, 9);
    expect(model.findings[0]!.message).toContain(`by up to ${Math.round(out * 1000)} mm`);
  });

  it('as a joggled plate has its axis between its two halves', () => {
    const model = importBodies('PL10*80', joggled);
    const [member] = model.members;
    expect(member!.axis[0][0]).toBeCloseTo(0, 9);
    expect(member!.axis[1][0]).toBeCloseTo(0.13, 9);
    expect(member!.axis[0][1]).toBeCloseTo(0.005, 9);
    expect(member!.axis[1][1]).toBeCloseTo(0.005, 9);
    expect(member!.section!.area).toBeCloseTo(0.08 * 0.01, 12);
    expect(codesOf(model)).toEqual(['bent-axis']);
  });

  it.each([
    ['nothing in its name', 'Anchor', splitTail(0.1, 0.03)],
    ['a section in its name that no cut shows', 'PL10*80', splitTail(0.1, 0.03)],
    ['a wall for a name', 'PL200*3200', upright(box(6.385, 0.2), -1.6, 1.6)],
    ['the shape of a cube', 'PL60*60', upright(box(0.06, 0.06), -0.03, 0.03)],
    ['a tail that stands out farther than it is wide', 'PL6*60', splitTail(0.1, 0.09)],
  ])('is refused with %s', (_, name, faces) => {
    const model = importBodies(name, faces);
    expect(model.members).toEqual([]);
    expect(codesOf(model)).toEqual(['no-axis']);
  });
});

describe('a stub shorter than it is deep', () => {
  it('of the section in its name runs the way that shows it', () => {
    const { outline } = shapeFromDesignation('HEA 200')!;
    const faces = upright(outline.outer.flatMap(chords), 0, 0.12);
    const model = importBodies('HEA 200', faces);
    const [member] = model.members;
    expect(member!.section).toMatchObject({ name: 'HEA 200', from: 'name' });
    expect(Math.abs(unit(subtract(...member!.axis))![2])).toBeCloseTo(1, 9);
    expect(distance(...member!.axis)).toBeCloseTo(0.12, 9);
    expect(model.findings.map(({ code, severity }) => [code, severity])).toEqual([['guessed-section', 'note']]);
  });

  it('of a section that only others of its type show runs the way that shows it too', () => {
    const model = importBodies('x', upright(ANGLE, 0, 0.005), upright(ANGLE, 1, 3), upright(ANGLE, 4, 6));
    expect(model.members).toHaveLength(3);
    const slice = model.members.find(({ name }) => name === 'x')!;
    const { centroid } = outlineProperties({ outer: ringOf(ANGLE), voids: [] })!;
    expect(distance(slice.axis[0], [...centroid, 0])).toBeLessThan(1e-9);
    expect(distance(slice.axis[1], [...centroid, 0.005])).toBeLessThan(1e-9);
    for (const { section } of model.members) expect(section!.area).toBeCloseTo(0.15 * 0.003 + 0.087 * 0.003, 9);
    const others = model.members.find((other) => other !== slice)!;
    expect(Math.abs(dot(slice.zAxis, others.zAxis))).toBeCloseTo(1, 6);
  });
});

const ringOf = (corners: readonly (readonly [number, number])[]) =>
  corners.map((from, i) => ({ kind: 'line' as const, from, to: corners[(i + 1) % corners.length]! }));
