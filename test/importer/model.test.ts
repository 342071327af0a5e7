import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { ModelError, RequestError } from '../../src/domain/errors.ts';
import { readPhysicalModel } from '../../src/importer/read-physical-model.ts';
import { openStep } from '../../src/step/step-file.ts';
import { beamWith, COMMON, importText, stepText } from './support/model-text.ts';

const BODY = '#100=IFCEXTRUDEDAREASOLID(#20,$,#13,3000.);';
const plain = beamWith({ body: '#100', more: BODY });
const codes = (data: string, schema = 'IFC4') => importText(data, schema).findings.map((f) => f.code);

describe('schemas', () => {
  it.each(['IFC2X3', 'IFC2X3_TC1', 'IFC4', 'IFC4_ADD2_TC1', 'IFC4X3', 'IFC4X3_ADD2', 'IFC4X3_TC1'])(
    'reads %s',
    (schema) => {
      expect(importText(plain, schema)).toMatchObject({ schema, elementCount: 1, source: 'physical' });
      expect(codes(plain, schema)).not.toContain('schema-guessed');
    },
  );

  it.each(['IFC4X1', 'IFC4X2', 'IFC4X3_RC4'])('reads %s as the nearest, and says so', (schema) => {
    expect(importText(plain, schema).members).toHaveLength(1);
    expect(codes(plain, schema)).toContain('schema-guessed');
  });

  it.each(['IFC2X2_FINAL', 'IFC2X', 'IFC5', 'IFC4X4', 'AP214', ''])('refuses "%s"', (schema) => {
    expect(() => importText(plain, schema)).toThrow(ModelError);
  });

  it('reads a predefined type from the element in IFC4, and from its type in IFC2X3', () => {
    const typed = `${plain}
#400=IFCRELDEFINESBYTYPE('0ddddddddddddddddddddd',$,$,$,(#50),#401);
#401=IFCBEAMTYPE('0eeeeeeeeeeeeeeeeeeeee',$,'IPE',$,$,$,$,$,$,.JOIST.);`;
    expect(importText(typed, 'IFC4').members[0]).toMatchObject({ predefinedType: 'BEAM', type: 'IPE' });
    expect(importText(typed, 'IFC2X3').members[0]?.predefinedType).toBe('JOIST');
    const notDefined = typed.replace('.BEAM.', '.NOTDEFINED.');
    expect(importText(notDefined, 'IFC4').members[0]?.predefinedType).toBe('JOIST');
  });
});

describe('units', () => {
  const withUnit = (units: string) => plain.replace('#2=IFCUNITASSIGNMENT((#3,#4));', units);

  it.each([
    ['mm', '#2=IFCUNITASSIGNMENT((#3,#4));', 3],
    ['m', '#2=IFCUNITASSIGNMENT((#5,#4));\n#5=IFCSIUNIT(*,.LENGTHUNIT.,$,.METRE.);', 3000],
    [
      'in',
      "#2=IFCUNITASSIGNMENT((#5,#4));\n#5=IFCCONVERSIONBASEDUNIT(#6,.LENGTHUNIT.,'INCH',#7);\n#6=IFCDIMENSIONALEXPONENTS(1,0,0,0,0,0,0);\n#7=IFCMEASUREWITHUNIT(IFCLENGTHMEASURE(25.4),#3);",
      76.2,
    ],
    [
      'ft',
      "#2=IFCUNITASSIGNMENT((#5,#4));\n#5=IFCCONVERSIONBASEDUNIT(#6,.LENGTHUNIT.,'FOOT',$);\n#6=IFCDIMENSIONALEXPONENTS(1,0,0,0,0,0,0);",
      914.4,
    ],
  ])('reads lengths in %s', (word, units, length) => {
    const model = importText(withUnit(units));
    expect(model.lengthUnit).toBe(word);
    expect(model.members[0]!.axis[1][2]).toBeCloseTo(length, 9);
    expect(model.findings.map((f) => f.code)).not.toContain('units-missing');
  });

  it('takes metres and says so where no length unit is given', () => {
    const model = importText(withUnit('#2=IFCUNITASSIGNMENT((#4));'));
    expect(model.lengthUnit).toBe('m');
    expect(model.findings.map((f) => f.code)).toContain('units-missing');
  });

  it('reads angles in degrees where the project says so', () => {
    const arc = beamWith({
      axis: '#200',
      more: `#200=IFCTRIMMEDCURVE(#201,(IFCPARAMETERVALUE(0.)),(IFCPARAMETERVALUE(90.)),.T.,.PARAMETER.);
#201=IFCCIRCLE(#11,1000.);
#5=IFCCONVERSIONBASEDUNIT(#6,.PLANEANGLEUNIT.,'DEGREE',#7);
#6=IFCDIMENSIONALEXPONENTS(0,0,0,0,0,0,0);
#7=IFCMEASUREWITHUNIT(IFCPLANEANGLEMEASURE(0.0174532925199433),#4);`,
    }).replace('((#3,#4))', '((#3,#5))');
    const [from, to] = importText(arc).members[0]!.axis;
    expect(from[1]).toBeCloseTo(1, 9);
    expect(to[0]).toBeCloseTo(1, 9);
  });
});

describe('materials', () => {
  // Thin enough for the first step of every standard.
  const thin = plain.replace(',100.,200.)', ',10.,200.)');
  const made = (name: string, category = '$') =>
    importText(
      `${thin}\n#300=IFCRELASSOCIATESMATERIAL('0ccccccccccccccccccccc',$,$,$,(#50),#301);\n#301=IFCMATERIAL('${name}',$,${category});`,
    );

  // EN 10025-2 to -4, EN 10210-1 and the ASTM standards' least values, from memory.
  it.each([
    ['S235JR', 235, 360, 210],
    ['STEEL/S275J0', 275, 410, 210],
    ['S 355 J2+N', 355, 470, 210],
    ['St\\X2\\00E5\\X0\\l - S355', 355, 470, 210],
    ['S355J2H', 355, 470, 210],
    ['S420M', 420, 520, 210],
    ['S460NH', 460, 540, 210],
    ['A992', 345, 450, 200],
    ['ASTM A36', 250, 400, 200],
    ['A572 Gr. 60', 415, 520, 200],
    ['Steel A572-50', 345, 450, 200],
    ['A500 Grade B', 290, 400, 200],
    ['A53', 240, 415, 200],
  ])('reads %s', (name, fy, fu, e) => {
    const { material } = made(name).members[0]!;
    expect(material.yieldStrength).toBe(fy * 1e6);
    expect(material.ultimateStrength).toBe(fu * 1e6);
    expect(material.elasticModulus).toBe(e * 1e9);
    expect(material.from).toBe('name');
  });

  it.each([
    ['Steel', 7850],
    ['Stahl', 7850],
    ['Holz', 450],
    ['C24', 450],
    ['GL28h', 450],
    ['GL24h', 450],
    ['D30', 450],
    ['Stahlbeton 65690', 2500],
    ['Concrete, Cast-in-Place gray', 2500],
    ['C30/37', 2500],
    ['Aluminium 6061', 2700],
    ['EN AW-6060', 2700],
    ['EN-AW 6082 T6', 2700],
    ['STEEL/NEOPRENE', 1200],
  ])('knows the kind of %s', (name, density) => {
    const model = made(name);
    expect(model.members[0]?.material).toMatchObject({ density, name, yieldStrength: null, from: 'name' });
    expect(model.findings).toEqual([]);
  });

  it('uses the category where the name says nothing, and a yield strength that the name states', () => {
    expect(made('M-17', "'Steel'").findings).toEqual([]);
    expect(made('Metal - Steel - 345 MPa').members[0]?.material.yieldStrength).toBe(345e6);
  });

  it('takes the default steel in one finding for all members with the same lack', () => {
    const more = `#60=IFCBEAM('0fffffffffffffffffffff',$,'B2',$,$,#16,#51,'T2',$);`;
    const model = importText(`${plain}\n${more}`);
    expect(model.findings).toHaveLength(1);
    expect(model.findings[0]).toMatchObject({ code: 'no-material', severity: 'warning' });
    expect(model.findings[0]?.members).toHaveLength(2);
    expect(model.members[0]?.material).toMatchObject({ elasticModulus: 210e9, density: 7850, from: 'default' });
  });

  it("takes the brief's grade instead, and refuses one it does not know", () => {
    const model = importText(thin, 'IFC4', { defaultMaterial: 'S355' });
    expect(model.members[0]?.material).toMatchObject({ name: 'S355', yieldStrength: 355e6, from: 'brief' });
    expect(model.findings).toEqual([]);
    expect(() => importText(plain, 'IFC4', { defaultMaterial: 'cheese' })).toThrow(RequestError);
  });

  it('finds the material of the type, through layers and lists', () => {
    const data = `${plain}
#400=IFCRELDEFINESBYTYPE('0ddddddddddddddddddddd',$,$,$,(#50),#401);
#401=IFCBEAMTYPE('0eeeeeeeeeeeeeeeeeeeee',$,'IPE',$,$,$,$,$,$,.JOIST.);
#300=IFCRELASSOCIATESMATERIAL('0ccccccccccccccccccccc',$,$,$,(#401),#301);
#301=IFCMATERIALLIST((#302,#303));
#302=IFCMATERIAL('Paint',$,$);
#303=IFCMATERIAL('S235',$,$);`;
    expect(importText(data).members[0]?.material.name).toBe('S235');
  });
});

describe('what stands around a member', () => {
  it('finds assembly, storey and layer', () => {
    const model = importText(`${plain}
#500=IFCELEMENTASSEMBLY('0ggggggggggggggggggggg',$,'Truss 1',$,$,$,$,$,$,.TRUSS.);
#501=IFCRELAGGREGATES('0hhhhhhhhhhhhhhhhhhhhh',$,$,$,#500,(#50));
#502=IFCBUILDINGSTOREY('0iiiiiiiiiiiiiiiiiiiii',$,'Roof',$,$,$,$,$,$,$);
#503=IFCRELCONTAINEDINSPATIALSTRUCTURE('0jjjjjjjjjjjjjjjjjjjjj',$,$,$,(#500),#502);
#504=IFCPRESENTATIONLAYERASSIGNMENT('S-BEAM',$,(#91),$);`);
    expect(model.members[0]).toMatchObject({
      assembly: 'Truss 1',
      partOf: 'IfcElementAssembly',
      storey: 'Roof',
      layer: 'S-BEAM',
      tag: 'T1',
      name: 'B1',
    });
  });

  it('calls what is in an assembly within a stair a part of the stair', () => {
    const model = importText(`${plain}
#500=IFCELEMENTASSEMBLY('0ggggggggggggggggggggg',$,'Stringer',$,$,$,$,$,$,$);
#501=IFCRELAGGREGATES('0hhhhhhhhhhhhhhhhhhhhh',$,$,$,#500,(#50));
#502=IFCSTAIR('0iiiiiiiiiiiiiiiiiiiii',$,'Stair',$,$,$,$,$,$);
#503=IFCRELAGGREGATES('0jjjjjjjjjjjjjjjjjjjjj',$,$,$,#502,(#500));`);
    expect(model.members[0]).toMatchObject({ assembly: 'Stringer', partOf: 'IfcStair' });
  });

  it('reads the further classes that are asked for', () => {
    const data = plain.replace('IFCBEAM(', 'IFCPILE(');
    expect(importText(data)).toMatchObject({ elementCount: 0, members: [] });
    expect(importText(data, 'IFC4', { classes: ['IfcPile'] }).members[0]?.class).toBe('IfcPile');
  });
});

describe('faults in a file', () => {
  const moved = (placement: string, more: string) => beamWith({ body: '#100', placement, more: `${BODY}\n${more}` });

  it('finds a placement that leads back to itself', () => {
    const model = importText(moved('#60', '#60=IFCLOCALPLACEMENT(#61,#11);\n#61=IFCLOCALPLACEMENT(#60,#11);'));
    expect(model.members).toEqual([]);
    expect(model.findings).toMatchObject([{ code: 'cyclic-placement', severity: 'error' }]);
  });

  it('walks a chain of twenty thousand placements', () => {
    const links = Array.from({ length: 20_000 }, (_, i) => `#${1000 + i}=IFCLOCALPLACEMENT(#${1001 + i},#70);`);
    const data = moved(
      '#1000',
      `#70=IFCAXIS2PLACEMENT3D(#71,$,$);\n#71=IFCCARTESIANPOINT((1.,0.,0.));\n${links.join('\n')}\n#21000=IFCLOCALPLACEMENT($,#11);`,
    );
    expect(importText(data).members[0]!.axis[0][0]).toBeCloseTo(20, 9);
  });

  it('names a reference to nothing, and reads what stands all the same', () => {
    const parentless = importText(moved('#60', '#60=IFCLOCALPLACEMENT(#999,#11);'));
    expect(parentless.members).toHaveLength(1);
    expect(parentless.findings.find((f) => f.code === 'dangling-reference')).toMatchObject({
      members: ['0bbbbbbbbbbbbbbbbbbbbb'],
    });
    const bodiless = importText(beamWith({ body: '#999', more: '' }));
    expect(bodiless.findings.map((f) => f.code).sort()).toEqual(['dangling-reference', 'no-axis']);
  });

  it('names a section whose dimensions are none, and keeps the member', () => {
    const model = importText(plain.replace("'Flat',$,100.,200.", "'Flat',$,100.,0."));
    expect(model.members[0]?.section).toBeNull();
    const found = model.findings.find((f) => f.code === 'no-section');
    expect(found?.message).toContain('depth is 0 mm');
    expect(found).toMatchObject({ severity: 'error', members: ['0bbbbbbbbbbbbbbbbbbbbb'] });
  });

  it('names coordinates that are no numbers or absurdly far away', () => {
    const at = (x: string) =>
      `#60=IFCLOCALPLACEMENT($,#61);\n#61=IFCAXIS2PLACEMENT3D(#62,$,$);\n#62=IFCCARTESIANPOINT((${x},0.,0.));`;
    for (const x of ['1.E400', '1.E20', 'NaN']) {
      const model = importText(moved('#60', at(x)));
      expect(model.members).toEqual([]);
      expect(model.findings.some((f) => f.code === 'unreadable-element' && f.members.length === 1)).toBe(true);
    }
  });

  it('names a GlobalId that stands twice, and keeps both members', () => {
    const model = importText(`${plain}\n#60=IFCBEAM('0bbbbbbbbbbbbbbbbbbbbb',$,'B2',$,$,#16,#51,'T2',$);`);
    expect(model.members).toHaveLength(2);
    expect(model.findings.filter((f) => f.code === 'doubled-globalid')).toHaveLength(1);
  });

  it('names a member without length or without any shape', () => {
    expect(codes(plain.replace('3000.', '0.5'))).toEqual(['zero-length']);
    expect(codes(plain.replace('#16,#51,', '#16,$,'))).toEqual(['no-axis']);
  });

  it('ends in order whatever references are crossed', () => {
    const text = beamWith({
      axis: '#200',
      body: '#101',
      more: `${BODY}
#101=IFCBOOLEANCLIPPINGRESULT(.DIFFERENCE.,#100,#110);
#110=IFCPOLYGONALBOUNDEDHALFSPACE(#111,.F.,#11,#125);
#111=IFCPLANE(#11);
#125=IFCPOLYLINE((#12,#12,#12));
#200=IFCTRIMMEDCURVE(#210,(#12),(IFCPARAMETERVALUE(1.5)),.T.,.PARAMETER.);
#210=IFCLINE(#12,#211);
#211=IFCVECTOR(#13,2000.);
#300=IFCRELASSOCIATESMATERIAL('0ccccccccccccccccccccc',$,$,$,(#50),#301);
#301=IFCMATERIALLIST((#302));
#302=IFCMATERIAL('S235',$,$);
#400=IFCRELAGGREGATES('0hhhhhhhhhhhhhhhhhhhhh',$,$,$,#16,(#50));
#500=IFCGRID('0kkkkkkkkkkkkkkkkkkkkk',$,'G',$,$,#16,$,(#501),(#502),$,$);
#501=IFCGRIDAXIS('1',#200,.T.);
#502=IFCGRIDAXIS('A',#125,.T.);`,
    });
    const references = [...text.matchAll(/(?<=[(,])#\d+/g)];
    const ids = [...text.matchAll(/^#(\d+)=/gm)].map((m) => m[1]!);
    fc.assert(
      fc.property(
        fc.nat(references.length - 1),
        fc.nat(ids.length),
        fc.nat(references.length - 1),
        fc.nat(ids.length),
        (a, to, b, towards) => {
          let data = text;
          for (const [which, target] of [
            [Math.max(a, b), to],
            [Math.min(a, b), towards],
          ] as const) {
            const match = references[which]!;
            data = `${data.slice(0, match.index)}#${ids[target] ?? 77777}${data.slice(match.index + match[0].length)}`;
          }
          const model = importText(data);
          expect(model.elementCount).toBe(1);
          expect(model.members.length + model.findings.length).toBeGreaterThan(0);
          for (const member of model.members) expect(member.axis.flat().every(Number.isFinite)).toBe(true);
        },
      ),
      { numRuns: 400 },
    );
  });
});

describe('order', () => {
  it('is that of geometry whatever the order of the file or the drawing direction', () => {
    const beams = [3, 1, 2, 5, 4].map((x, i) => {
      const id = 1000 + 10 * i;
      const back = i % 2 === 1;
      return `#${id}=IFCBEAM('0bbbbbbbbbbbbbbbbbbbb${x}',$,$,$,$,#${id + 1},#${id + 4},$,$);
#${id + 1}=IFCLOCALPLACEMENT($,#${id + 2});
#${id + 2}=IFCAXIS2PLACEMENT3D(#${id + 3},${back ? '#17' : '$'},$);
#${id + 3}=IFCCARTESIANPOINT((${x}000.,0.,${back ? '3000.' : '0.'}));
#${id + 4}=IFCPRODUCTDEFINITIONSHAPE($,$,(#91));`;
    });
    const rest = `${COMMON}\n#17=IFCDIRECTION((0.,0.,-1.));\n#91=IFCSHAPEREPRESENTATION(#10,'Body','SweptSolid',(#100));\n${BODY}`;
    const one = readPhysicalModel(openStep(new TextEncoder().encode(stepText(`${rest}\n${beams.join('\n')}`))));
    const other = readPhysicalModel(
      openStep(new TextEncoder().encode(stepText(`${beams.reverse().join('\n')}\n${rest}`))),
    );
    expect(one.members.map((m) => m.axis[0][0])).toEqual([1, 2, 3, 4, 5]);
    expect(one.members.map((m) => m.axis[0][2] < m.axis[1][2])).toEqual([true, true, true, true, true]);
    expect(JSON.stringify(other.members)).toBe(JSON.stringify(one.members));
    expect(JSON.stringify(other.findings)).toBe(JSON.stringify(one.findings));
  });
});
