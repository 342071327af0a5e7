import { describe, expect, it } from 'vitest';
import type { Section } from '../../../src/domain/member.ts';
import { sectionFromDesignation } from '../../../src/importer/sections/designations/section-from-designation.ts';
import { beamWith, importText } from '../support/model-text.ts';

/** The section of a beam extruded from profile #100, which `more` defines (mm). */
function model(more: string, schema = 'IFC4') {
  return importText(beamWith({ body: '#99', more: `#99=IFCEXTRUDEDAREASOLID(#100,$,#13,3000.);\n${more}` }), schema);
}

function sectionOf(more: string, schema = 'IFC4'): Section {
  const { section } = model(more, schema).members[0]!;
  if (section === null) throw new Error('no section');
  return section;
}

const codes = (more: string, schema = 'IFC4') =>
  model(more, schema)
    .findings.map(({ code }) => code)
    .filter((code) => code !== 'no-material');

describe('profiles in three schemas', () => {
  it.each(['IFC2X3', 'IFC4', 'IFC4X3_ADD2'])('an I of unequal flanges of %s', (schema) => {
    // IFC2X3: OverallWidth, OverallDepth, web, flange, fillet, then the top's; IFC4 adds edge radii and slopes.
    const attributes = schema === 'IFC2X3' ? '10.,$,$' : '10.,$,$,$,$,$';
    const section = sectionOf(
      `#100=IFCASYMMETRICISHAPEPROFILEDEF(.AREA.,'A',$,200.,300.,10.,20.,$,100.,${attributes});`,
      schema,
    );
    expect(section.area).toBeCloseTo(0.2 * 0.02 + 0.27 * 0.01 + 0.1 * 0.01, 12);
    expect(section.thickness).toBeCloseTo(0.02, 12);
    expect(section.shape).toBe('I');
  });

  it.each(['IFC2X3', 'IFC4'])('a Z, a lipped channel, a trapezium and an ellipse of %s', (schema) => {
    const z = sectionOf("#100=IFCZSHAPEPROFILEDEF(.AREA.,'Z',$,200.,70.,4.,4.,$,$);", schema);
    expect(z.area).toBeCloseTo(0.2 * 0.004 + 2 * 0.066 * 0.004, 12);
    const c = sectionOf("#100=IFCCSHAPEPROFILEDEF(.AREA.,'C',$,200.,70.,2.,20.,$);", schema);
    expect(c.area).toBeCloseTo(0.002 * (0.2 + 2 * 0.068 + 2 * 0.018), 12);
    const trapezium = sectionOf("#100=IFCTRAPEZIUMPROFILEDEF(.AREA.,'T',$,200.,100.,100.,50.);", schema);
    expect(trapezium.area).toBeCloseTo(0.015, 12);
    const ellipse = sectionOf("#100=IFCELLIPSEPROFILEDEF(.AREA.,'E',$,50.,30.);", schema);
    expect(ellipse.area).toBeCloseTo(Math.PI * 0.05 * 0.03, 12);
  });

  it('puts the pieces of a composite where they stand: two channels toe to toe', () => {
    const section = sectionOf(`#100=IFCCOMPOSITEPROFILEDEF(.AREA.,'2 UPE',(#101,#102),$);
#101=IFCUSHAPEPROFILEDEF(.AREA.,'U',#103,200.,80.,6.,11.,$,$,$);
#102=IFCUSHAPEPROFILEDEF(.AREA.,'U',#104,200.,80.,6.,11.,$,$,$);
#103=IFCAXIS2PLACEMENT2D(#105,$);
#104=IFCAXIS2PLACEMENT2D(#106,#107);
#105=IFCCARTESIANPOINT((-40.,0.));
#106=IFCCARTESIANPOINT((40.,0.));
#107=IFCDIRECTION((-1.,0.));`);
    const one = sectionOf("#100=IFCUSHAPEPROFILEDEF(.AREA.,'U',$,200.,80.,6.,11.,$,$,$);");
    expect(section.area).toBeCloseTo(2 * one.area, 12);
    expect(section.inertiaY).toBeCloseTo(2 * one.inertiaY, 12);
    // A box of the same walls.
    expect(section.inertiaZ).toBeCloseTo((0.2 * 0.16 ** 3 - 0.178 * 0.148 ** 3) / 12, 12);
    expect(section.torsion).toBeCloseTo(2 * one.torsion, 12);
    expect(section.width).toBeCloseTo(0.16, 12);
    expect(section).toMatchObject({ name: '2 UPE', thickness: 0.011 });
  });

  it('gives a centre line its thickness: a channel bent from a strip', () => {
    const line = '(#102,#103,#104,#105)';
    const section = sectionOf(`#100=IFCCENTERLINEPROFILEDEF(.CURVE.,'Strip',#101,4.);
#101=IFCPOLYLINE(${line});
#102=IFCCARTESIANPOINT((60.,-98.));
#103=IFCCARTESIANPOINT((0.,-98.));
#104=IFCCARTESIANPOINT((0.,98.));
#105=IFCCARTESIANPOINT((60.,98.));`);
    const length = 0.06 + 0.196 + 0.06;
    expect(section.area).toBeCloseTo(length * 0.004, 12);
    expect(section.depth).toBeCloseTo(0.2, 12);
    expect(section.torsion).toBeCloseTo((length * 0.004 ** 3) / 3, 15);
    // Timoshenko & Gere, from memory.
    const [b, h, t] = [0.06, 0.196, 0.004];
    const warping = (((t * b ** 3 * h ** 2) / 12) * (3 * b * t + 2 * h * t)) / (6 * b * t + h * t);
    expect(section.warping / warping).toBeCloseTo(1, 9);
  });

  it('gives a centre line with round bends the area of the strip, and a closed one the hole within', () => {
    const arc = sectionOf(`#100=IFCCENTERLINEPROFILEDEF(.CURVE.,'Half pipe',#101,4.);
#101=IFCTRIMMEDCURVE(#102,(IFCPARAMETERVALUE(0.)),(IFCPARAMETERVALUE(3.141592653589793)),.T.,.PARAMETER.);
#102=IFCCIRCLE(#103,50.);
#103=IFCAXIS2PLACEMENT2D(#104,$);
#104=IFCCARTESIANPOINT((0.,0.));`);
    expect(arc.area / (Math.PI * 0.05 * 0.004)).toBeCloseTo(1, 3);
    const box = sectionOf(`#100=IFCCENTERLINEPROFILEDEF(.CURVE.,'Box',#101,5.);
#101=IFCPOLYLINE((#102,#103,#104,#105,#102));
#102=IFCCARTESIANPOINT((0.,0.));
#103=IFCCARTESIANPOINT((95.,0.));
#104=IFCCARTESIANPOINT((95.,95.));
#105=IFCCARTESIANPOINT((0.,95.));`);
    expect(box.area).toBeCloseTo(0.1 ** 2 - 0.09 ** 2, 12);
    // Bredt: 4 Am^2 t / s.
    expect(Math.abs(box.torsion / ((4 * 0.095 ** 4 * 0.005) / 0.38) - 1)).toBeLessThan(0.01);
  });

  it('keeps a mirrored angle an angle, its product of inertia turned about', () => {
    const angle = "#101=IFCLSHAPEPROFILEDEF(.AREA.,'L',$,150.,100.,10.,12.,6.,$);";
    const own = sectionOf(angle.replace('#101', '#100'));
    const mirrored = sectionOf(`#100=IFCMIRROREDPROFILEDEF(.AREA.,'L m',#101,$,$);\n${angle}`);
    expect(mirrored.inertiaYZ).toBeCloseTo(-own.inertiaYZ, 15);
    expect(mirrored).toMatchObject({ shape: 'L', thickness: own.thickness });
  });

  it('says what a crane rail is that it does not read', () => {
    const { findings } = model("#100=IFCCRANERAILFSHAPEPROFILEDEF(.AREA.,'F',$,80.,80.,$,$,$,$,$,$,$);", 'IFC2X3');
    expect(findings.find(({ code }) => code === 'no-section')?.message).toContain('a crane rail, which is not read');
  });
});

describe('where sections come from', () => {
  const I_OUTLINE = "#100=IFCISHAPEPROFILEDEF(.AREA.,'IPE200',$,100.,200.,5.6,8.5,12.,$,$);";
  const mechanical = (area: number, y: number, z: number, more = '') => `
#200=IFCPROFILEPROPERTIES('Pset_ProfileMechanical',$,(#201,#202,#203,#204),#100);
#201=IFCPROPERTYSINGLEVALUE('CrossSectionArea',$,IFCAREAMEASURE(${area.toFixed(2)}),$);
#202=IFCPROPERTYSINGLEVALUE('MomentOfInertiaY',$,IFCMOMENTOFINERTIAMEASURE(${y.toFixed(1)}),$);
#203=IFCPROPERTYSINGLEVALUE('MomentOfInertiaZ',$,IFCMOMENTOFINERTIAMEASURE(${z.toFixed(1)}),$);
#204=IFCPROPERTYSINGLEVALUE('TorsionalConstantX',$,IFCMOMENTOFINERTIAMEASURE(69800.),$);${more}`;

  it('takes the outline before the numbers, and is content where they agree to 5 %', () => {
    const agreeing = I_OUTLINE + mechanical(2848, 19430000, 1424000);
    expect(sectionOf(agreeing).from).toBe('profile');
    expect(codes(agreeing)).toEqual([]);
    // y and z changed about by the exporter.
    expect(codes(I_OUTLINE + mechanical(2848, 1424000, 19430000))).toEqual([]);
  });

  it('says where outline and numbers contradict each other, once for all members', () => {
    const data = I_OUTLINE + mechanical(3848, 19430000, 1424000);
    const found = model(data).findings.find(({ code }) => code === 'section-disagrees');
    expect(found?.severity).toBe('warning');
    expect(found?.message).toContain("the profile 'IPE200', whose stated area is 135 % of its outline's");
    expect(sectionOf(data).area).toBeCloseTo(2848e-6, 6);
  });

  it('says the same of centimetres taken for millimetres', () => {
    const found = model(I_OUTLINE + mechanical(28.48, 1943, 142.4)).findings;
    expect(found.map(({ code }) => code)).toContain('section-disagrees');
  });

  it.each([
    ['IFC4', "#100=IFCPROFILEDEF(.AREA.,'Special');", mechanical(2848, 19430000, 1424000)],
    [
      'IFC2X3',
      "#100=IFCARBITRARYOPENPROFILEDEF(.CURVE.,'Special',$);",
      "\n#200=IFCSTRUCTURALPROFILEPROPERTIES('Special',#100,$,$,$,9.,2848.,69800.,$,19430000.,1424000.,13000000000.,$,$,$,$,$,$,$,$,$,$,$);",
    ],
  ])('takes the numbers of %s where there is no outline', (schema, profile, numbers) => {
    const section = sectionOf(profile + numbers, schema);
    expect(section).toMatchObject({ name: 'Special', from: 'properties', shape: 'other' });
    expect(section.area).toBeCloseTo(2848e-6, 12);
    expect(section.inertiaMajor).toBeCloseTo(1943e-8, 12);
    expect(section.torsion).toBeCloseTo(6.98e-8, 12);
    expect(codes(profile + numbers, schema)).toEqual([]);
  });

  it('reads numbers in the unit that a property carries', () => {
    const numbers = mechanical(2848, 19430000, 1424000)
      .replace('IFCAREAMEASURE(2848.00),$', 'IFCAREAMEASURE(28.48),#300')
      .concat('\n#300=IFCSIUNIT(*,.AREAUNIT.,.CENTI.,.SQUARE_METRE.);');
    expect(sectionOf(`#100=IFCPROFILEDEF(.AREA.,'Special');${numbers}`).area).toBeCloseTo(2848e-6, 12);
  });

  it('takes the designation that is the name of a profile without outline', () => {
    const profile = "#100=IFCPROFILEDEF(.AREA.,'HE 200 A');";
    expect(sectionOf(profile)).toEqual(sectionFromDesignation('HEA 200'));
    expect(codes(profile)).toEqual([]);
  });

  it('takes the designation of the type or the element where nothing else tells, as a guess', () => {
    const none = '#100=IFCARBITRARYOPENPROFILEDEF(.CURVE.,$,$);\n';
    const typed = `${none}#400=IFCRELDEFINESBYTYPE('0ddddddddddddddddddddd',$,$,$,(#50),#401);
#401=IFCBEAMTYPE('0eeeeeeeeeeeeeeeeeeeee',$,'UPE 160',$,$,$,$,$,$,.JOIST.);`;
    expect(sectionOf(typed)).toMatchObject({ name: 'UPE 160', from: 'name' });
    const { findings } = model(typed);
    expect(findings.map(({ code }) => code)).toContain('guessed-section');
    expect(findings.map(({ code }) => code)).not.toContain('no-section');
    expect(codes(none)).toContain('no-section');
  });

  it('knows an outline by its name where both are alike, and not where they differ', () => {
    const rectangle = (name: string, width: number) => `#100=IFCARBITRARYCLOSEDPROFILEDEF(.AREA.,'${name}',#101);
#101=IFCPOLYLINE((#102,#103,#104,#105,#102));
#102=IFCCARTESIANPOINT((0.,0.));
#103=IFCCARTESIANPOINT((${width}.,0.));
#104=IFCCARTESIANPOINT((${width}.,10.));
#105=IFCCARTESIANPOINT((0.,10.));`;
    expect(sectionOf(rectangle('FL100x10', 100))).toMatchObject({
      shape: 'rectangle',
      from: 'profile',
      thickness: 0.01,
    });
    expect(sectionOf(rectangle('FL100x10', 150)).shape).toBe('other');
    expect(sectionOf(rectangle('Plate', 100)).shape).toBe('other');
  });
});
