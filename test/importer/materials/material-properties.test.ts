import { describe, expect, it } from 'vitest';
import { beamWith, importText } from '../support/model-text.ts';

const BODY = '#99=IFCEXTRUDEDAREASOLID(#98,$,#13,3000.);';
const FLAT = "#98=IFCRECTANGLEPROFILEDEF(.AREA.,'Flat',$,20.,200.);";

/** A beam 20 mm thick of material #300, with what `more` states of it. */
function model(name: string, more: string, schema = 'IFC4', units = '') {
  const material = schema === 'IFC2X3' ? `#300=IFCMATERIAL('${name}');` : `#300=IFCMATERIAL('${name}',$,$);`;
  const data = beamWith({
    body: '#99',
    more: `${BODY}\n${FLAT}\n${material}\n#301=IFCRELASSOCIATESMATERIAL('0ccccccccccccccccccccc',$,$,$,(#50),#300);\n${more}`,
  });
  const stated = data.replace('((#3,#4))', `((#3,#4${units === '' ? '' : `,${units}`}))`);
  return importText(stated, schema);
}

const MEGAPASCAL = '#80=IFCSIUNIT(*,.PRESSUREUNIT.,.MEGA.,.PASCAL.);';

const psets = (values: string) => `${MEGAPASCAL}
#310=IFCMATERIALPROPERTIES('Pset_MaterialMechanical',$,(#311,#312),#300);
#313=IFCMATERIALPROPERTIES('Pset_MaterialCommon',$,(#314),#300);
#315=IFCMATERIALPROPERTIES('Pset_MaterialSteel',$,(#316,#317),#300);
${values}`;

const VALUES = `#311=IFCPROPERTYSINGLEVALUE('YoungModulus',$,IFCMODULUSOFELASTICITYMEASURE(205000.),$);
#312=IFCPROPERTYSINGLEVALUE('ThermalExpansionCoefficient',$,IFCTHERMALEXPANSIONCOEFFICIENTMEASURE(1.17E-5),$);
#314=IFCPROPERTYSINGLEVALUE('MassDensity',$,IFCMASSDENSITYMEASURE(7800.),$);
#316=IFCPROPERTYSINGLEVALUE('YieldStress',$,IFCPRESSUREMEASURE(315.),$);
#317=IFCPROPERTYSINGLEVALUE('UltimateStress',$,IFCPRESSUREMEASURE(440.),$);`;

describe('what the file states of a material', () => {
  it('goes before its name: property sets of IFC4', () => {
    const { members, findings } = model('S355', psets(VALUES), 'IFC4', '#80');
    expect(members[0]?.material).toEqual({
      name: 'S355',
      elasticModulus: 205e9,
      density: 7800,
      expansion: 1.17e-5,
      yieldStrength: 315e6,
      ultimateStrength: 440e6,
      from: 'properties',
    });
    expect(findings).toEqual([]);
  });

  it('goes before its name: attributes of IFC2X3', () => {
    const { members, findings } = model(
      'S355',
      `${MEGAPASCAL}
#310=IFCMECHANICALSTEELMATERIALPROPERTIES(#300,$,205000.,79000.,0.3,1.17E-5,315.,440.,$,$,$,$,$);
#311=IFCGENERALMATERIALPROPERTIES(#300,$,$,7800.);`,
      'IFC2X3',
      '#80',
    );
    expect(members[0]?.material).toMatchObject({
      elasticModulus: 205e9,
      density: 7800,
      yieldStrength: 315e6,
      ultimateStrength: 440e6,
    });
    expect(findings).toEqual([]);
  });

  it('is read in the unit that the property carries', () => {
    const ksi = `#81=IFCCONVERSIONBASEDUNIT(#82,.PRESSUREUNIT.,'KSI',#83);
#82=IFCDIMENSIONALEXPONENTS(-1,1,-2,0,0,0,0);
#83=IFCMEASUREWITHUNIT(IFCPRESSUREMEASURE(6894757.293),#84);
#84=IFCSIUNIT(*,.PRESSUREUNIT.,$,.PASCAL.);
#310=IFCMATERIALPROPERTIES('Pset_MaterialSteel',$,(#316),#300);
#316=IFCPROPERTYSINGLEVALUE('YieldStress',$,IFCPRESSUREMEASURE(50.),#81);`;
    expect(model('Steel', ksi).members[0]?.material.yieldStrength).toBeCloseTo(344.738e6, -3);
  });

  it('makes a steel of a name that says nothing', () => {
    const { members, findings } = model('M-17', psets(VALUES), 'IFC4', '#80');
    expect(members[0]?.material).toMatchObject({ name: 'M-17', elasticModulus: 205e9, from: 'properties' });
    expect(findings).toEqual([]);
  });

  it('keeps the strengths of the grade that the name says where it states stiffness alone', () => {
    const stiff = `${MEGAPASCAL}\n#310=IFCMATERIALPROPERTIES('X',$,(#311),#300);
#311=IFCPROPERTYSINGLEVALUE('YoungModulus',$,IFCMODULUSOFELASTICITYMEASURE(205000.),$);`;
    // 20 mm thick: EN 10025-2, from memory.
    expect(model('S355', stiff, 'IFC4', '#80').members[0]?.material).toMatchObject({
      elasticModulus: 205e9,
      yieldStrength: 345e6,
      ultimateStrength: 470e6,
      from: 'name',
    });
  });

  it('is set aside with a finding where it cannot be true', () => {
    // 210 000 N/mm2 in a file that means pascals; a density in t/m3.
    const wrong = `#310=IFCMATERIALPROPERTIES('X',$,(#311,#312),#300);
#311=IFCPROPERTYSINGLEVALUE('YoungModulus',$,IFCMODULUSOFELASTICITYMEASURE(210000.),$);
#312=IFCPROPERTYSINGLEVALUE('MassDensity',$,IFCMASSDENSITYMEASURE(7.85),$);`;
    const { members, findings } = model('S355', wrong);
    expect(members[0]?.material).toMatchObject({ elasticModulus: 210e9, density: 7850, yieldStrength: 345e6 });
    const doubts = findings.filter(({ code }) => code === 'material-implausible');
    expect(doubts).toHaveLength(2);
    expect(doubts.map(({ message }) => message).join()).toContain('a modulus of elasticity of 0.21 MPa');
    expect(doubts.every(({ severity, members: named }) => severity === 'warning' && named.length === 1)).toBe(true);
  });

  it('does not doubt timber for being no steel, nor zeros, which say nothing', () => {
    const timber = `${MEGAPASCAL}\n#310=IFCMATERIALPROPERTIES('X',$,(#311,#312),#300);
#311=IFCPROPERTYSINGLEVALUE('YoungModulus',$,IFCMODULUSOFELASTICITYMEASURE(11600.),$);
#312=IFCPROPERTYSINGLEVALUE('MassDensity',$,IFCMASSDENSITYMEASURE(0.),$);`;
    const { members, findings } = model('Holz', timber, 'IFC4', '#80');
    expect(members[0]?.material).toMatchObject({ elasticModulus: 11.6e9, density: 450 });
    expect(findings).toEqual([]);
  });

  it('does not take an ultimate strength below the yield strength', () => {
    const { members, findings } = model('Steel', psets(VALUES.replace('440.', '240.')), 'IFC4', '#80');
    expect(members[0]?.material).toMatchObject({ yieldStrength: 315e6, ultimateStrength: null });
    expect(findings.map(({ code }) => code)).toEqual(['material-implausible']);
  });
});

describe('strengths by the section', () => {
  it('fall with the thickest part', () => {
    expect(model('S355', '').members[0]?.material).toMatchObject({ yieldStrength: 345e6, from: 'name' });
  });

  it('follow through constituents and profile sets', () => {
    const data = (set: string) => `${set}\n#320=IFCRELASSOCIATESMATERIAL('0ggggggggggggggggggggg',$,$,$,(#50),#321);`;
    const constituents = data(
      "#321=IFCMATERIALCONSTITUENTSET('Set',$,(#322));\n#322=IFCMATERIALCONSTITUENT('Core',$,#323,$,$);\n#323=IFCMATERIAL('S275',$,$);",
    );
    // The element has two materials by two relationships; the first stands.
    expect(model('S355', constituents).members[0]?.material.name).toBe('S355');
  });
});
