import { describe, expect, it } from 'vitest';
import { distance, type Vec3 } from '../../src/domain/vector.ts';
import { expectBow } from './support/expect-bow.ts';
import { beamWith, importText } from './support/model-text.ts';

const ALL = ['IFC2X3', 'IFC4', 'IFC4X3'] as const;
const NEWER = ['IFC4', 'IFC4X3'] as const;

function expectOne(model: ReturnType<typeof importText>, from: Vec3, to: Vec3) {
  expect(model.members).toHaveLength(1);
  const [member] = model.members;
  const apart = (a: Vec3, b: Vec3) => Math.max(distance(member!.axis[0], a), distance(member!.axis[1], b));
  expect(Math.min(apart(from, to), apart(to, from))).toBeLessThan(1e-9);
  return member!;
}

const codes = (model: ReturnType<typeof importText>) => model.findings.map(({ code }) => code);

/** The quarter of a circle of 2 m about the origin in the plane of x and z, its angles in the file's own unit. */
const quarter = (to: string) => `#210=IFCCIRCLE(#211,2000.);
#211=IFCAXIS2PLACEMENT3D(#12,#212,#14);
#212=IFCDIRECTION((0.,-1.,0.));
#200=IFCTRIMMEDCURVE(#210,(IFCPARAMETERVALUE(0.)),(IFCPARAMETERVALUE(${to})),.T.,.PARAMETER.);`;

const inDegrees = (data: string) =>
  data.replace('#4=IFCSIUNIT(*,.PLANEANGLEUNIT.,$,.RADIAN.);', DEGREE).replace('#2=IFCUNITASSIGNMENT((#3,#4))', UNITS);
const DEGREE = `#4=IFCSIUNIT(*,.PLANEANGLEUNIT.,$,.RADIAN.);
#5=IFCMEASUREWITHUNIT(IFCPLANEANGLEMEASURE(0.017453292519943295),#4);
#6=IFCCONVERSIONBASEDUNIT(#7,.PLANEANGLEUNIT.,'DEGREE',#5);
#7=IFCDIMENSIONALEXPONENTS(0,0,0,0,0,0,0);`;
const UNITS = '#2=IFCUNITASSIGNMENT((#3,#6))';

describe('a drawn Axis that is an arc', () => {
  it.each(ALL)('of so many radians is its chord, with the arc, in %s', (schema) => {
    const model = importText(beamWith({ axis: '#200', more: quarter('1.5707963267948966') }), schema);
    expectBow(expectOne(model, [2, 0, 0], [0, 0, 2]), [0, 0, 0], 2, Math.PI / 2);
  });

  it.each(ALL)('of so many degrees is its chord, with the arc, in %s', (schema) => {
    const model = importText(inDegrees(beamWith({ axis: '#200', more: quarter('90.') })), schema);
    expectBow(expectOne(model, [2, 0, 0], [0, 0, 2]), [0, 0, 0], 2, Math.PI / 2);
  });
});

describe('a tube swept along an arc', () => {
  /** IFC2X3 must say from where to where on the directrix. */
  const disk = (schema: string) =>
    `#100=IFCSWEPTDISKSOLID(#200,50.,45.,${schema === 'IFC2X3' ? '0.,1.5707963267948966' : '$,$'});`;

  it.each(ALL)('that is a trimmed circle is its chord in %s', (schema) => {
    const more = `${disk(schema)}\n${quarter('1.5707963267948966')}`;
    const model = importText(beamWith({ body: '#100', more }), schema);
    const member = expectOne(model, [2, 0, 0], [0, 0, 2]);
    expect(member.section!.area).toBeCloseTo(Math.PI * (0.05 ** 2 - 0.045 ** 2), 12);
    expectBow(member, [0, 0, 0], 2, Math.PI / 2);
  });

  it.each(NEWER)('of an indexed curve is its chord in %s', (schema) => {
    const half = Math.SQRT1_2 * 2000;
    const curve = `#200=IFCINDEXEDPOLYCURVE(#220,(IFCARCINDEX((1,2,3))),.F.);
#220=IFCCARTESIANPOINTLIST3D(((2000.,0.,0.),(${half},0.,${half}),(0.,0.,2000.)));`;
    const model = importText(beamWith({ body: '#100', more: `${disk(schema)}\n${curve}` }), schema);
    expectBow(expectOne(model, [2, 0, 0], [0, 0, 2]), [0, 0, 0], 2, Math.PI / 2);
  });
});

describe('other bodies that are swept', () => {
  it.each(NEWER)('revolved and tapered: the chord, with the lesser section, in %s', (schema) => {
    const more = `#100=IFCREVOLVEDAREASOLIDTAPERED(#20,$,#101,1.5707963267948966,#21);
#21=IFCRECTANGLEPROFILEDEF(.AREA.,'Less',$,100.,100.);
#101=IFCAXIS1PLACEMENT(#102,#15);
#102=IFCCARTESIANPOINT((2000.,0.,0.));`;
    const model = importText(beamWith({ body: '#100', more }), schema);
    const member = expectOne(model, [0, 0, 0], [2, 0, 2]);
    expect(member.section!.area).toBeCloseTo(0.01, 9);
    expectBow(member, [2, 0, 0], 2, Math.PI / 2);
    expect(codes(model)).toContain('guessed-section');
  });

  it.each(ALL)('by cross sections along a spine, in %s', (schema) => {
    const more = `#100=IFCSECTIONEDSPINE(#101,(#20,#20),(#11,#104));
#101=IFCCOMPOSITECURVE((#102),.F.);
#102=IFCCOMPOSITECURVESEGMENT(.CONTINUOUS.,.T.,#103);
#103=IFCPOLYLINE((#12,#105));
#104=IFCAXIS2PLACEMENT3D(#105,$,$);
#105=IFCCARTESIANPOINT((0.,0.,4000.));`;
    const model = importText(beamWith({ body: '#100', more }), schema);
    const member = expectOne(model, [0, 0, 0], [0, 0, 4]);
    expect(member.section!.area).toBeCloseTo(0.02, 9);
  });

  it.each(ALL)('a cylinder of solid geometry, in %s', (schema) => {
    const more = '#100=IFCRIGHTCIRCULARCYLINDER(#11,3000.,25.);';
    const model = importText(beamWith({ body: '#100', more }), schema);
    const member = expectOne(model, [0, 0, 0], [0, 0, 3]);
    expect(member.section!.area).toBeCloseTo(Math.PI * 0.025 ** 2, 12);
  });

  it('with a reference that the directrix gives, in IFC4X3', () => {
    const more = `#100=IFCDIRECTRIXDERIVEDREFERENCESWEPTAREASOLID(#20,$,#101,$,$,#15);
#101=IFCPOLYLINE((#12,#102));
#102=IFCCARTESIANPOINT((3000.,0.,0.));`;
    const model = importText(beamWith({ body: '#100', more }), 'IFC4X3');
    const member = expectOne(model, [0, 0, 0], [3, 0, 0]);
    expect(member.section!.area).toBeCloseTo(0.02, 9);
  });

  it.each(ALL)('a bounding box alone: a line along its longest edge and no section, in %s', (schema) => {
    const model = importText(beamWith({ body: '#100', more: '#100=IFCBOUNDINGBOX(#12,4000.,100.,200.);' }), schema);
    const member = expectOne(model, [0, 0.05, 0.1], [4, 0.05, 0.1]);
    expect(member.section).toBeNull();
    expect(codes(model)).toContain('no-section');
  });
});
