import { describe, expect, it } from 'vitest';
import type { Vec3 } from '../../src/domain/vector.ts';
import type { ImportOptions } from '../../src/importer/options.ts';
import { expectBow } from './support/expect-bow.ts';
import { beamWith, importText } from './support/model-text.ts';

function only(data: string, schema = 'IFC4', options: Partial<ImportOptions> = {}) {
  const model = importText(data, schema, options);
  expect(model.findings.filter((f) => f.code !== 'no-material' && f.code !== 'axis-moved')).toEqual([]);
  expect(model.members).toHaveLength(1);
  return model.members[0]!;
}

function expectEnds(actual: readonly [Vec3, Vec3], from: Vec3, to: Vec3): void {
  actual.forEach((end, i) => {
    end.forEach((c, j) => {
      expect(c).toBeCloseTo((i === 0 ? from : to)[j]!, 9);
    });
  });
}

const extrusion = (id: number, position: string, direction: string, depth: string, profile = '#20') =>
  `#${id}=IFCEXTRUDEDAREASOLID(${profile},${position},${direction},${depth});`;

describe('the axis of an extruded body', () => {
  it('runs from the swept plane to its depth, in metres', () => {
    const member = only(beamWith({ body: '#100', more: extrusion(100, '#11', '#13', '3000.') }));
    expectEnds(member.axis, [0, 0, 0], [0, 0, 3]);
    expect(member.axisFrom).toBe('extrusion');
    expect(member.zAxis).toEqual([0, 1, 0]);
    expect(member.section?.area).toBeCloseTo(0.02, 12);
    expect(member.section?.depth).toBeCloseTo(0.2, 12);
  });

  it('follows the whole chain of placements', () => {
    // Placed at (1, 2, 3) m with its z along world x, then 500 mm along its own x, which is world y.
    const member = only(
      beamWith({
        body: '#100',
        placement: '#60',
        more: `#60=IFCLOCALPLACEMENT(#61,#62);
#61=IFCLOCALPLACEMENT($,#63);
#62=IFCAXIS2PLACEMENT3D(#64,$,$);
#63=IFCAXIS2PLACEMENT3D(#65,#14,#15);
#64=IFCCARTESIANPOINT((500.,0.,0.));
#65=IFCCARTESIANPOINT((1000.,2000.,3000.));
${extrusion(100, '$', '#13', '4000.')}`,
      }),
    );
    expectEnds(member.axis, [1, 2.5, 3], [5, 2.5, 3]);
    expect(member.zAxis).toEqual([0, 0, 1]);
  });

  it("runs through the section's centroid, not the profile's origin, position included", () => {
    // A tee of flange 100 x 10 over web 10 x 90: its centroid lies 21.3158 mm above the middle of its box.
    const centroid = (0.1 * 0.01 * 0.045 - 0.09 * 0.01 * 0.005) / 0.0019;
    const member = only(
      beamWith({
        body: '#100',
        more: `#21=IFCTSHAPEPROFILEDEF(.AREA.,'T',#22,100.,100.,10.,10.,$,$,$,$,$);
#22=IFCAXIS2PLACEMENT2D(#23,#24);
#23=IFCCARTESIANPOINT((300.,0.));
#24=IFCDIRECTION((0.,1.));
${extrusion(100, '$', '#13', '1000.', '#21')}`,
      }),
    );
    // The position turns the tee's up (y) to the left (-x).
    expectEnds(member.axis, [0.3 - centroid, 0, 0], [0.3 - centroid, 0, 1]);
    expect(member.zAxis[0]).toBeCloseTo(-1, 12);
    expect(member.section?.inertiaYZ).toBe(0);
  });

  it('leans with an oblique direction, and its section is the one across it', () => {
    const member = only(
      beamWith({
        body: '#100',
        more: `#25=IFCDIRECTION((1.,0.,1.));
${extrusion(100, '$', '#25', '2000.')}`,
      }),
    );
    const c = Math.SQRT1_2;
    expectEnds(member.axis, [0, 0, 0], [2 * c, 0, 2 * c]);
    // The 100 mm side is seen at 45 degrees.
    expect(member.section?.area).toBeCloseTo(0.02 * c, 12);
    expect(member.section?.width).toBeCloseTo(0.1 * c, 12);
    expect(member.section?.depth).toBeCloseTo(0.2, 12);
  });

  it('goes through a mapped item that mirrors and stretches', () => {
    // Mirrored in x, twice as deep (y), three times as long (z), 1 m up.
    const member = only(
      beamWith({
        body: '#100',
        more: `#100=IFCMAPPEDITEM(#101,#102);
#101=IFCREPRESENTATIONMAP(#11,#103);
#103=IFCSHAPEREPRESENTATION(#10,'Body','SweptSolid',(#104));
#102=IFCCARTESIANTRANSFORMATIONOPERATOR3DNONUNIFORM(#105,#15,#106,1.,#13,2.,3.);
#105=IFCDIRECTION((-1.,0.,0.));
#106=IFCCARTESIANPOINT((0.,0.,1000.));
#21=IFCLSHAPEPROFILEDEF(.AREA.,'L',$,100.,100.,10.,$,$,$);
${extrusion(104, '$', '#13', '1000.', '#21')}`,
      }),
    );
    const straight = only(
      beamWith({
        body: '#100',
        more: `#21=IFCLSHAPEPROFILEDEF(.AREA.,'L',$,100.,100.,10.,$,$,$);\n${extrusion(100, '$', '#13', '1000.', '#21')}`,
      }),
    );
    const centre = straight.axis[0];
    expectEnds(member.axis, [-centre[0], 2 * centre[1], 1], [-centre[0], 2 * centre[1], 4]);
    expect(member.section!.area).toBeCloseTo(2 * straight.section!.area, 12);
    expect(member.section!.inertiaY).toBeCloseTo(8 * straight.section!.inertiaY, 14);
    expect(member.section!.inertiaYZ).toBeCloseTo(-4 * straight.section!.inertiaYZ, 14);
  });

  it('keeps a tenth of a millimetre at a million metres', () => {
    const member = only(
      beamWith({
        body: '#100',
        placement: '#60',
        more: `#60=IFCLOCALPLACEMENT($,#63);
#63=IFCAXIS2PLACEMENT3D(#65,#14,#15);
#65=IFCCARTESIANPOINT((1234567890.1,5400000000.3,3000.));
${extrusion(100, '$', '#13', '4000.2')}`,
      }),
    );
    expect(member.axis[0][0]).toBeCloseTo(1234567.8901, 7);
    expect(member.axis[0][1]).toBeCloseTo(5400000.0003, 7);
    expect(member.axis[1][0] - member.axis[0][0]).toBeCloseTo(4.0002, 7);
  });

  it("takes in the context's world coordinate system", () => {
    const data = beamWith({ body: '#100', more: extrusion(100, '$', '#13', '1000.') })
      .replace("'Model',3,1.E-5,#11,$", "'Model',3,1.E-5,#70,$")
      .concat('#70=IFCAXIS2PLACEMENT3D(#71,$,$);\n#71=IFCCARTESIANPOINT((7000.,0.,0.));');
    expectEnds(only(data).axis, [7, 0, 0], [7, 0, 1]);
  });

  it('takes the lesser end of a tapered member, and says so', () => {
    const model = importText(
      beamWith({
        body: '#100',
        more: `#21=IFCRECTANGLEPROFILEDEF(.AREA.,'Small',$,100.,100.);
#100=IFCEXTRUDEDAREASOLIDTAPERED(#20,$,#13,1000.,#21);`,
      }),
    );
    expect(model.members[0]?.section?.name).toBe('Small');
    expect(model.findings.map((f) => f.code)).toContain('guessed-section');
  });
});

describe('the axis of other bodies', () => {
  it('cuts the ends of a clipped body where half-spaces cross its centroid line', () => {
    // 3 m long; cut square at 2.9 m, and at 45 degrees through x = 0 at 0.2 m.
    const member = only(
      beamWith({
        body: '#100',
        more: `#100=IFCBOOLEANCLIPPINGRESULT(.DIFFERENCE.,#101,#110);
#101=IFCBOOLEANCLIPPINGRESULT(.DIFFERENCE.,#102,#120);
${extrusion(102, '$', '#13', '3000.')}
#110=IFCHALFSPACESOLID(#111,.F.);
#111=IFCPLANE(#112);
#112=IFCAXIS2PLACEMENT3D(#113,$,$);
#113=IFCCARTESIANPOINT((0.,0.,2900.));
#120=IFCHALFSPACESOLID(#121,.T.);
#121=IFCPLANE(#122);
#122=IFCAXIS2PLACEMENT3D(#123,#124,#14);
#123=IFCCARTESIANPOINT((0.,0.,200.));
#124=IFCDIRECTION((0.,1.,1.));`,
      }),
    );
    expectEnds(member.axis, [0, 0, 0.2], [0, 0, 2.9]);
  });

  it('is not shortened by a cut along its length, a hole, or a bounded half-space beside it', () => {
    const member = only(
      beamWith({
        body: '#100',
        more: `#100=IFCBOOLEANRESULT(.DIFFERENCE.,#101,#130);
#101=IFCBOOLEANCLIPPINGRESULT(.DIFFERENCE.,#103,#110);
#103=IFCBOOLEANCLIPPINGRESULT(.DIFFERENCE.,#102,#120);
${extrusion(102, '$', '#13', '3000.')}
#110=IFCHALFSPACESOLID(#111,.F.);
#111=IFCPLANE(#112);
#112=IFCAXIS2PLACEMENT3D(#113,#124,#14);
#113=IFCCARTESIANPOINT((0.,50.,1500.));
#124=IFCDIRECTION((0.,1.,0.05));
#120=IFCPOLYGONALBOUNDEDHALFSPACE(#121,.F.,#11,#125);
#121=IFCPLANE(#122);
#122=IFCAXIS2PLACEMENT3D(#123,$,$);
#123=IFCCARTESIANPOINT((0.,0.,2500.));
#125=IFCPOLYLINE((#126,#127,#128,#126));
#126=IFCCARTESIANPOINT((10.,-500.));
#127=IFCCARTESIANPOINT((500.,-500.));
#128=IFCCARTESIANPOINT((500.,500.));
#130=IFCEXTRUDEDAREASOLID(#131,#132,#14,400.);
#131=IFCCIRCLEPROFILEDEF(.AREA.,$,$,10.);
#132=IFCAXIS2PLACEMENT3D(#133,#14,#15);
#133=IFCCARTESIANPOINT((-200.,0.,1000.));`,
      }),
    );
    expectEnds(member.axis, [0, 0, 0], [0, 0, 3]);
  });

  it('is cut by a bounded half-space that covers the axis', () => {
    const member = only(
      beamWith({
        body: '#100',
        more: `#100=IFCBOOLEANCLIPPINGRESULT(.DIFFERENCE.,#102,#120);
${extrusion(102, '$', '#13', '3000.')}
#120=IFCPOLYGONALBOUNDEDHALFSPACE(#121,.F.,#11,#125);
#121=IFCPLANE(#122);
#122=IFCAXIS2PLACEMENT3D(#123,$,$);
#123=IFCCARTESIANPOINT((0.,0.,2500.));
#125=IFCPOLYLINE((#126,#127,#128,#129,#126));
#126=IFCCARTESIANPOINT((-500.,-500.));
#127=IFCCARTESIANPOINT((500.,-500.));
#128=IFCCARTESIANPOINT((500.,500.));
#129=IFCCARTESIANPOINT((-500.,500.));`,
      }),
    );
    expectEnds(member.axis, [0, 0, 0], [0, 0, 2.5]);
  });

  it('follows the directrix of a swept disk: a tube', () => {
    const member = only(
      beamWith({
        body: '#100',
        more: `#100=IFCSWEPTDISKSOLID(#101,50.,45.,$,$);
#101=IFCPOLYLINE((#102,#103));
#102=IFCCARTESIANPOINT((0.,0.,0.));
#103=IFCCARTESIANPOINT((3000.,0.,4000.));`,
      }),
    );
    expectEnds(member.axis, [0, 0, 0], [3, 0, 4]);
    expect(member.axisFrom).toBe('swept');
    expect(member.section?.shape).toBe('CHS');
    expect(member.section?.name).toBe('CHS 100x5');
    expect(member.section?.area).toBeCloseTo(Math.PI * (0.05 ** 2 - 0.045 ** 2), 12);
  });

  it('takes the chord of a revolved body, with its arc', () => {
    const model = importText(
      beamWith({
        body: '#100',
        more: `#100=IFCREVOLVEDAREASOLID(#20,$,#101,1.5707963267948966);
#101=IFCAXIS1PLACEMENT(#102,#15);
#102=IFCCARTESIANPOINT((2000.,0.,0.));`,
      }),
    );
    expectEnds(model.members[0]!.axis, [0, 0, 0], [2, 0, 2]);
    expect(model.members[0]!.section?.area).toBeCloseTo(0.02, 10);
    expectBow(model.members[0]!, [2, 0, 0], 2, Math.PI / 2);
  });

  it.each([
    ['IFCFACETEDBREP(#101)', 'its mesh has no faces'],
    ['IFCTRIANGULATEDFACESET(#101,$,.T.,$,$)', 'its mesh has no faces'],
    ['IFCSPHERE(#11,100.)', 'of the class IFCSPHERE'],
  ])('says of %s that there is no line of force, and why', (item, words) => {
    const model = importText(beamWith({ body: '#100', more: `#100=${item};\n#101=IFCCLOSEDSHELL(());` }));
    expect(model.members).toEqual([]);
    expect(model.findings).toHaveLength(1);
    expect(model.findings[0]).toMatchObject({ code: 'no-axis', members: ['0bbbbbbbbbbbbbbbbbbbbb'], at: [0, 0, 0] });
    expect(model.findings[0]?.message).toContain(words);
  });

  it('counts a repeated solid once, joins pieces in line, and gives parallel ones as parts', () => {
    const at = (id: number, x: number, z: number) =>
      `#${id}=IFCAXIS2PLACEMENT3D(#${id + 1},$,$);\n#${id + 1}=IFCCARTESIANPOINT((${x}.,0.,${z}.));`;
    const model = importText(
      beamWith({
        body: '#100,#101,#102,#103',
        more: [
          extrusion(100, '$', '#13', '1000.'),
          extrusion(101, '$', '#13', '1000.'),
          extrusion(102, '#110', '#13', '1500.'),
          extrusion(103, '#120', '#13', '2000.'),
          at(110, 0, 1000),
          at(120, 500, 0),
        ].join('\n'),
      }),
    );
    expect(model.members.map((m) => m.part)).toEqual([0, 1]);
    expectEnds(model.members[0]!.axis, [0, 0, 0], [0, 0, 2.5]);
    expectEnds(model.members[1]!.axis, [0.5, 0, 0], [0.5, 0, 2]);
  });
});

describe('a drawn Axis', () => {
  const body = `${extrusion(100, '#80', '#13', '3000.')}
#80=IFCAXIS2PLACEMENT3D(#81,$,$);
#81=IFCCARTESIANPOINT((0.,-100.,0.));`;

  it.each([
    ['a polyline', '#200=IFCPOLYLINE((#201,#202));\n#202=IFCCARTESIANPOINT((0.,0.,3000.));'],
    [
      'a line trimmed by parameters',
      '#200=IFCTRIMMEDCURVE(#210,(IFCPARAMETERVALUE(0.)),(IFCPARAMETERVALUE(1.5)),.T.,.PARAMETER.);',
    ],
    [
      'a line trimmed by points',
      '#200=IFCTRIMMEDCURVE(#210,(#201),(#202),.T.,.CARTESIAN.);\n#202=IFCCARTESIANPOINT((0.,0.,3000.));',
    ],
    [
      'an indexed curve of lines',
      '#200=IFCINDEXEDPOLYCURVE(#220,(IFCLINEINDEX((1,2)),IFCLINEINDEX((2,3))),.F.);\n#220=IFCCARTESIANPOINTLIST3D(((0.,0.,0.),(0.,0.,1000.),(0.,0.,3000.)));',
    ],
    [
      'a composite of lines, one of them against its sense',
      `#200=IFCCOMPOSITECURVE((#230,#231),.F.);
#230=IFCCOMPOSITECURVESEGMENT(.CONTINUOUS.,.T.,#232);
#231=IFCCOMPOSITECURVESEGMENT(.CONTINUOUS.,.F.,#233);
#232=IFCPOLYLINE((#201,#234));
#233=IFCPOLYLINE((#202,#234));
#234=IFCCARTESIANPOINT((0.,0.,2000.));
#202=IFCCARTESIANPOINT((0.,0.,3000.));`,
    ],
  ])('is read as %s, with the section of the body', (_, curve) => {
    const member = only(
      beamWith({
        axis: '#200',
        body: '#100',
        more: `${body}\n#201=IFCCARTESIANPOINT((0.,0.,0.));
#210=IFCLINE(#201,#211);\n#211=IFCVECTOR(#13,2000.);\n${curve}`,
      }),
    );
    expectEnds(member.axis, [0, 0, 0], [0, 0, 3]);
    expect(member.axisFrom).toBe('axis');
    expect(member.section?.name).toBe('Flat');
    expect(member.zAxis).toEqual([0, 1, 0]);
  });

  it("gives way to the body's centroid line where the brief wants that", () => {
    const member = only(
      beamWith({
        axis: '#200',
        body: '#100',
        more: `${body}\n#200=IFCPOLYLINE((#201,#202));\n#201=IFCCARTESIANPOINT((0.,0.,0.));\n#202=IFCCARTESIANPOINT((0.,0.,3000.));`,
      }),
      'IFC4',
      { axes: 'centroid' },
    );
    expectEnds(member.axis, [0, -0.1, 0], [0, -0.1, 3]);
  });

  it('of two coordinates lies in the plane of the placement', () => {
    const member = only(
      beamWith({
        axis: '#200',
        placement: '#60',
        more: `#60=IFCLOCALPLACEMENT($,#61);\n#61=IFCAXIS2PLACEMENT3D(#62,#13,#15);\n#62=IFCCARTESIANPOINT((0.,0.,5000.));
#200=IFCPOLYLINE((#201,#202));\n#201=IFCCARTESIANPOINT((0.,0.));\n#202=IFCCARTESIANPOINT((6000.,0.));
#300=IFCRELASSOCIATESMATERIAL('0ccccccccccccccccccccc',$,$,$,(#50),#301);
#301=IFCMATERIALPROFILESETUSAGE(#302,5,$);
#302=IFCMATERIALPROFILESET($,$,(#303),$);
#303=IFCMATERIALPROFILE($,$,#304,#20,$,$);
#304=IFCMATERIAL('S355',$,$);`,
      }),
    );
    expectEnds(member.axis, [0, 0, 5], [0, 6, 5]);
    expect(member.zAxis).toEqual([0, 0, 1]);
    // No body: the section is the one of the material profile set.
    expect(member.section?.name).toBe('Flat');
    expect(member.section?.depth).toBeCloseTo(0.2, 12);
    // 100 mm thick: EN 10025-2, from memory.
    expect(member.material).toMatchObject({ name: 'S355', yieldStrength: 315e6, from: 'name' });
  });

  it('that is an arc becomes its chord, with the arc', () => {
    const model = importText(
      beamWith({
        axis: '#200',
        body: '#100',
        more: `${body}\n#200=IFCINDEXEDPOLYCURVE(#220,(IFCARCINDEX((1,2,3))),.F.);
#220=IFCCARTESIANPOINTLIST3D(((0.,0.,0.),(200.,0.,1500.),(0.,0.,3000.)));`,
      }),
    );
    expectEnds(model.members[0]!.axis, [0, 0, 0], [0, 0, 3]);
    // The circle through three points: (c/2)^2 = h (2 r - h).
    const radius = (1.5 ** 2 + 0.2 ** 2) / (2 * 0.2);
    expectBow(model.members[0]!, [0.2 - radius, 0, 1.5], radius, 2 * Math.asin(1.5 / radius));
  });
});
