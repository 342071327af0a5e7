import { describe, expect, it } from 'vitest';
import { distance } from '../../src/domain/vector.ts';
import { beamWith, importText } from './support/model-text.ts';

const points = (list: readonly string[]) => list.map((p, i) => `#${201 + i}=IFCCARTESIANPOINT((${p}));`).join('\n');
const polyline = (list: readonly string[]) =>
  `#200=IFCPOLYLINE((${list.map((_, i) => `#${201 + i}`).join(',')}));\n${points(list)}`;

const disk = (list: readonly string[]) =>
  importText(beamWith({ body: '#100', more: `#100=IFCSWEPTDISKSOLID(#200,8.,$,$,$);\n${polyline(list)}` }));

const codes = (model: ReturnType<typeof importText>) =>
  model.findings.map((f) => f.code).filter((code) => code !== 'no-material');

describe('a line with bends', () => {
  it('of long straight runs is a member a run, in parts, and says so', () => {
    const zigzag = ['0.,0.,0.', '300.,0.,400.', '600.,0.,0.', '900.,0.,400.', '1200.,0.,0.'];
    const model = disk(zigzag);
    expect(model.members.map((m) => m.part)).toEqual([0, 1, 2, 3]);
    for (const { axis } of model.members) expect(distance(...axis)).toBeCloseTo(0.5, 9);
    expect(model.findings.find((f) => f.code === 'bent-axis')?.message).toContain('each straight run');
  });

  it('with a fillet between its runs has them meet where their lines do', () => {
    const model = importText(
      beamWith({
        body: '#100',
        more: `#100=IFCSWEPTDISKSOLID(#200,8.,$,$,$);
#200=IFCINDEXEDPOLYCURVE(#201,(IFCLINEINDEX((1,2)),IFCARCINDEX((2,3,4)),IFCLINEINDEX((4,5))),.F.);
#201=IFCCARTESIANPOINTLIST3D(((0.,0.,0.),(1900.,0.,0.),(1970.710678118655,0.,29.289321881345),(2000.,0.,100.),(2000.,0.,1500.)));`,
      }),
    );
    expect(model.members).toHaveLength(2);
    const [level, upright] = model.members;
    expect(distance(level!.axis[1], [2, 0, 0])).toBeLessThan(1e-6);
    expect(distance(upright!.axis[0], [2, 0, 0])).toBeLessThan(1e-6);
  });

  it('with short hooks at its ends is its one long run', () => {
    const model = disk(['0.,0.,100.', '0.,0.,0.', '3000.,0.,0.', '3000.,0.,100.']);
    expect(model.members).toHaveLength(1);
    expect(distance(model.members[0]!.axis[0], [0, 0, 0])).toBeLessThan(1e-9);
    expect(distance(model.members[0]!.axis[1], [3, 0, 0])).toBeLessThan(1e-9);
    expect(codes(model)).toEqual(['bent-axis']);
  });

  it('that is a bow in facets is its chord, with the bow', () => {
    const bow = Array.from({ length: 13 }, (_, i) => {
      const t = (i - 6) * 0.05;
      return `${5000 * Math.sin(t)},0.,${5000 * Math.cos(t) - 5000}`;
    });
    const model = disk(bow.map((p) => p.replace(/(^|,)(-?\d+)(?=,|$)/g, '$1$2.')));
    expect(model.members).toHaveLength(1);
    expect(distance(...model.members[0]!.axis)).toBeCloseTo(10 * Math.sin(0.3), 9);
    // Drawn in facets, its corners are its points.
    expect(model.members[0]!.bow).toHaveLength(13);
    for (const point of model.members[0]!.bow!) expect(distance(point, [0, 0, -5])).toBeCloseTo(5, 9);
    expect(codes(model)).toEqual([]);
  });

  it('that turns by less than a degree is straight', () => {
    const model = disk(['0.,0.,0.', '1000.,0.,0.00001', '2000.,0.,0.']);
    expect(model.members).toHaveLength(1);
    expect(codes(model)).toEqual([]);
  });
});

describe('a drawn Axis and the body', () => {
  const beside = (offset: string, axes: 'given' | 'centroid' = 'given') =>
    importText(
      beamWith({
        axis: '#200',
        body: '#100',
        more: `${polyline(['0.,0.,0.', '0.,0.,3000.'])}
#100=IFCEXTRUDEDAREASOLID(#20,#80,#13,3000.);
#80=IFCAXIS2PLACEMENT3D(#81,$,$);
#81=IFCCARTESIANPOINT((0.,${offset},0.));`,
      }),
      'IFC4',
      { axes },
    );

  it('that lie apart by more than 20 mm are both known, and said once', () => {
    const model = beside('25.');
    expect(model.members[0]!.axis[0]).toEqual([0, 0, 0]);
    expect(model.members[0]!.centroidAxis![0][1]).toBeCloseTo(0.025, 12);
    expect(codes(model)).toEqual(['axis-moved']);
  });

  it('that lie within 20 mm are no finding, nor where the centroid is asked for', () => {
    expect(codes(beside('15.'))).toEqual([]);
    expect(codes(beside('25.', 'centroid'))).toEqual([]);
    expect(beside('25.', 'centroid').members[0]!.axis[0][1]).toBeCloseTo(0.025, 12);
  });
});

describe('one element of several solids', () => {
  const solid = (id: number, at: string, along: string, length: string, profile = '#20') =>
    `#${id}=IFCEXTRUDEDAREASOLID(${profile},#${id + 1},#13,${length});
#${id + 1}=IFCAXIS2PLACEMENT3D(#${id + 2},#${id + 3},#15);
#${id + 2}=IFCCARTESIANPOINT((${at}));
#${id + 3}=IFCDIRECTION((${along}));`;
  const rod = '#21=IFCCIRCLEPROFILEDEF(.AREA.,$,$,8.);';
  const joist = [
    rod,
    solid(100, '0.,0.,0.', '1.,0.,0.', '6000.'),
    solid(110, '0.,0.,500.', '1.,0.,0.', '6000.'),
    solid(120, '0.,0.,0.', '1.,0.,0.5', '1118.', '#21'),
    solid(130, '1000.,0.,500.', '1.,0.,-0.5', '1118.', '#21'),
  ].join('\n');
  const items = '#100,#110,#120,#130';

  it('is taken apart where it is a lattice, its short web bars too, whatever line is drawn along it', () => {
    for (const axis of [undefined, '#200']) {
      const line = axis === undefined ? '' : polyline(['0.,0.,250.', '6000.,0.,250.']);
      const model = importText(
        beamWith({ axis, body: items, more: `${joist}\n${line}` } as Parameters<typeof beamWith>[0]),
      );
      expect(model.members.map((m) => m.part)).toEqual([0, 1, 2, 3]);
      expect(model.members.filter((m) => m.section?.shape === 'circle')).toHaveLength(2);
    }
  });

  it('leaves out cleats and plates, with a note', () => {
    const more = [solid(100, '0.,0.,0.', '1.,0.,0.', '6000.'), solid(110, '3000.,0.,0.', '0.,0.,1.', '300.')].join(
      '\n',
    );
    const model = importText(beamWith({ body: '#100,#110', more }));
    expect(model.members).toHaveLength(1);
    expect(model.findings.find((f) => f.code === 'many-in-one')?.severity).toBe('note');
  });

  it('says which of its shapes give no line', () => {
    const more = `${solid(100, '0.,0.,0.', '1.,0.,0.', '6000.')}\n#110=IFCSPHERE(#11,100.);`;
    const model = importText(beamWith({ body: '#100,#110', more }));
    expect(model.members).toHaveLength(1);
    expect(model.findings.find((f) => f.code === 'many-in-one')?.message).toContain('IFCSPHERE');
  });
});
