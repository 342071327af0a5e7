import { describe, expect, it } from 'vitest';
import { readAnalysisModel } from '../../../src/importer/analysis/read-analysis-model.ts';
import { openStep } from '../../../src/step/step-file.ts';
import { COMMON, stepText } from '../support/model-text.ts';

/** COMMON (mm, a flat of 100 x 200) and one curve member whose representation holds `item`. */
function reading(schema: string, item: string, more: string, tail = ',#13') {
  const text = `${COMMON}
#200=IFCCARTESIANPOINT((0.,0.,0.));
#201=IFCCARTESIANPOINT((6000.,0.,0.));
#202=IFCCARTESIANPOINT((3000.,0.,1000.));
#203=IFCVERTEXPOINT(#200);
#204=IFCVERTEXPOINT(#201);
#205=IFCVERTEXPOINT(#202);
#206=IFCEDGE(#203,#204);
#210=IFCPRODUCTDEFINITIONSHAPE($,$,(#211));
#211=IFCTOPOLOGYREPRESENTATION(#10,'Reference','Edge',(${item}));
#220=IFCSTRUCTURALCURVEMEMBER('0M00000000000000000000',$,'bar',$,$,#16,#210,.PIN_JOINED_MEMBER.${schema === 'IFC2X3' ? '' : tail});
${more}`;
  return readAnalysisModel(openStep(new TextEncoder().encode(stepText(text, schema))));
}

const ALONG_X = [
  [0, 0, 0],
  [6, 0, 0],
];

describe.each(['IFC2X3', 'IFC4', 'IFC4X3'])('the line of a curve member in %s', (schema) => {
  it.each([
    ['an edge', '#206', ''],
    ['an oriented edge', '#230', '#230=IFCORIENTEDEDGE(*,*,#206,.F.);'],
    ['an edge on a line', '#230', '#230=IFCEDGECURVE(#203,#204,#231,.T.);\n#231=IFCPOLYLINE((#200,#201));'],
    ['a path of one edge', '#230', '#230=IFCPATH((#231));\n#231=IFCORIENTEDEDGE(*,*,#206,.T.);'],
    ['a polyline in its place', '#230', '#230=IFCPOLYLINE((#200,#201));'],
  ])('is that of %s', (_, item, more) => {
    const model = reading(schema, item, more);
    expect(model.members[0]?.axis).toEqual(ALONG_X);
    expect(model.findings.map(({ code }) => code)).not.toContain('bent-axis');
  });

  it('is straight between the ends of a bent one, which is said', () => {
    const path =
      '#230=IFCPATH((#231,#232));\n#231=IFCORIENTEDEDGE(*,*,#233,.T.);\n#232=IFCORIENTEDEDGE(*,*,#234,.T.);\n#233=IFCEDGE(#203,#205);\n#234=IFCEDGE(#205,#204);';
    const model = reading(schema, '#230', path);
    expect(model.members[0]?.axis).toEqual(ALONG_X);
    expect(model.findings.map(({ code }) => code)).toContain('bent-axis');
  });

  it.each([
    ['a vertex without a point', '#230', '#230=IFCEDGE(#203,#231);\n#231=IFCVERTEX();', 'no-axis'],
    ['an edge made of itself', '#230', '#230=IFCORIENTEDEDGE(*,*,#230,.T.);', 'no-axis'],
    ['no edge', '#203', '', 'no-axis'],
    ['no length', '#230', '#230=IFCEDGE(#203,#203);', 'zero-length'],
  ])('that has %s is a finding', (_, item, more, code) => {
    const model = reading(schema, item, more);
    expect(model.members).toEqual([]);
    expect(model.findings).toContainEqual(expect.objectContaining({ code, members: ['0M00000000000000000000'] }));
  });
});

describe('the section of a curve member', () => {
  it('is of the material profile set, turned by the axis attribute', () => {
    const more = `#230=IFCRELASSOCIATESMATERIAL('0R00000000000000000000',$,$,$,(#220),#231);
#231=IFCMATERIALPROFILESETUSAGE(#232,$,$);
#232=IFCMATERIALPROFILESET($,$,(#233),$);
#233=IFCMATERIALPROFILE($,$,#234,#20,$,$);
#234=IFCMATERIAL('S275',$,$);`;
    const upright = reading('IFC4', '#206', more).members[0]!;
    expect(upright.section).toMatchObject({ name: 'Flat', depth: expect.closeTo(0.2, 12), from: 'profile' });
    expect(upright.zAxis).toEqual([0, 0, 1]);
    expect(upright.material.name).toBe('S275');
    // The z axis is what is across the member of the direction given.
    expect(reading('IFC4', '#206', more, ',#240').members[0]?.zAxis).toEqual([0, 0, 1]);
    const flat = reading('IFC4', '#206', `${more}\n#240=IFCDIRECTION((5.,1.,0.));`, ',#240').members[0]!;
    expect(flat.zAxis.map((c) => Math.round(c * 1e9) / 1e9)).toEqual([0, 1, 0]);
  });

  it('is of bare numbers in IFC2X3 where there is no profile, turned by an angle', () => {
    const more = `#230=IFCRELASSOCIATESPROFILEPROPERTIES('0R00000000000000000000',$,$,$,(#220),#231,$,IFCPLANEANGLEMEASURE(1.5707963267948966));
#231=IFCSTRUCTURALPROFILEPROPERTIES('W310',$,$,$,$,$,4000.,60000.,0.,4.E7,8.E6,$,$,$,$,$,$,$,$,$,$,$,$);`;
    const model = reading('IFC2X3', '#206', more);
    const { section, zAxis } = model.members[0]!;
    expect(section).toMatchObject({ name: 'W310', from: 'properties' });
    expect(section?.area).toBeCloseTo(4e-3, 12);
    expect(section?.inertiaY).toBeCloseTo(4e-5, 12);
    expect(section?.torsion).toBeCloseTo(6e-8, 15);
    expect(zAxis.map((c) => Math.round(c * 1e9) / 1e9)).toEqual([0, -1, 0]);
    // Areas without a unit of their own follow the lengths, which is said.
    expect(model.findings.filter(({ code }) => code === 'units-missing').map(({ message }) => message)).toContain(
      'The file does not say its unit of area; such numbers are read in units of 0.000001 m2.',
    );
  });

  it('that is nowhere is a finding', () => {
    expect(reading('IFC4', '#206', '').findings.map(({ code }) => code)).toContain('no-section');
  });
});

describe('a curve member that stands for an element', () => {
  const element = (relation: string) => `#300=IFCMEMBER('0E00000000000000000000',$,'E',$,$,#16,$,'T7');
#301=IFCELEMENTASSEMBLY('0nnnnnnnnnnnnnnnnnnnnn',$,'Truss 3',$,$,#16,$,'A3',.SITE.,.TRUSS.);
#302=IFCRELAGGREGATES('0ooooooooooooooooooooo',$,$,$,#301,(#300));
${relation}`;

  it.each([
    ['IFC2X3', "#303=IFCRELCONNECTSSTRUCTURALELEMENT('0ppppppppppppppppppppp',$,$,$,#300,#220);"],
    ['IFC4', "#303=IFCRELASSIGNSTOPRODUCT('0ppppppppppppppppppppp',$,$,$,(#220),$,#300);"],
    ['IFC4X3', "#303=IFCRELASSIGNSTOPRODUCT('0ppppppppppppppppppppp',$,$,$,(#220),$,#300);"],
  ])('has its assembly and mark, in %s', (schema, relation) => {
    expect(reading(schema, '#206', element(relation)).members[0]).toMatchObject({ assembly: 'Truss 3', tag: 'T7' });
  });
});

describe('a varying member', () => {
  it('is read with its first section, which is said', () => {
    const text = `${COMMON}
#203=IFCVERTEXPOINT(#12);
#204=IFCVERTEXPOINT(#205);
#205=IFCCARTESIANPOINT((6000.,0.,0.));
#206=IFCEDGE(#203,#204);
#210=IFCPRODUCTDEFINITIONSHAPE($,$,(#211));
#211=IFCTOPOLOGYREPRESENTATION(#10,'Reference','Edge',(#206));
#220=IFCSTRUCTURALCURVEMEMBERVARYING('0M00000000000000000000',$,'bar',$,$,#16,#210,.PIN_JOINED_MEMBER.,#13);`;
    const { members, findings } = readAnalysisModel(openStep(new TextEncoder().encode(stepText(text))));
    expect(members[0]).toMatchObject({ class: 'IfcStructuralCurveMemberVarying', axisFrom: 'analysis-view' });
    expect(findings.map(({ message }) => message).join()).toContain('varies along the length');
  });
});
