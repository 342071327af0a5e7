import { describe, expect, it } from 'vitest';
import type { Vec3 } from '../../src/domain/vector.ts';
import { beamWith, importText } from './support/model-text.ts';

const COLUMN = '#100=IFCEXTRUDEDAREASOLID(#20,$,#13,3000.);';

const place = (more: string, schema = 'IFC4X3') =>
  importText(beamWith({ body: '#100', placement: '#60', more: `${COLUMN}\n${more}` }), schema);

function expectFoot(model: ReturnType<typeof importText>, foot: Vec3): void {
  expect(model.members).toHaveLength(1);
  for (const i of [0, 1, 2] as const) expect(model.members[0]!.axis[0][i]).toBeCloseTo(foot[i], 9);
}

/** A straight axis along x = 4 m and an arc of 5 m radius about the origin, quarter turn from +x to +y. */
const GRID = `#300=IFCGRID('0ggggggggggggggggggggg',$,'G',$,$,#16,$,(#310),(#320),$,$);
#310=IFCGRIDAXIS('A',#311,.T.);
#311=IFCPOLYLINE((#312,#313));
#312=IFCCARTESIANPOINT((4000.,-1000.));
#313=IFCCARTESIANPOINT((4000.,9000.));
#320=IFCGRIDAXIS('R5',#321,.T.);
#321=IFCTRIMMEDCURVE(#322,(IFCPARAMETERVALUE(0.)),(IFCPARAMETERVALUE(1.5707963267948966)),.T.,.PARAMETER.);
#322=IFCCIRCLE(#323,5000.);
#323=IFCAXIS2PLACEMENT2D(#324,$);
#324=IFCCARTESIANPOINT((0.,0.));`;

describe('placement by a grid with a curved axis', () => {
  it('stands where the line meets the arc as drawn', () => {
    const model = place(
      `${GRID}\n#60=IFCGRIDPLACEMENT($,#61,$);\n#61=IFCVIRTUALGRIDINTERSECTION((#310,#320),(0.,0.));`,
    );
    expectFoot(model, [4, 3, 0]);
  });

  it('moves each axis to its left by its offset, and up by the third', () => {
    // 1 m left of the upward line is x = 3 m; 1 m left of an arc that turns left is a radius of 4 m.
    const model = place(
      `${GRID}\n#60=IFCGRIDPLACEMENT($,#61,$);\n#61=IFCVIRTUALGRIDINTERSECTION((#310,#320),(1000.,1000.,250.));`,
    );
    expectFoot(model, [3, Math.sqrt(7), 0.25]);
  });

  it('turns x along the arc where that is the first axis', () => {
    const model = place(
      `${GRID}\n#60=IFCGRIDPLACEMENT($,#61,$);\n#61=IFCVIRTUALGRIDINTERSECTION((#320,#310),(0.,0.));`,
    );
    expectFoot(model, [4, 3, 0]);
    // The tangent at (4, 3) is (-0.6, 0.8); the profile's y, to its left, is (-0.8, -0.6).
    expect(model.members[0]!.zAxis[0]).toBeCloseTo(-0.8, 9);
    expect(model.members[0]!.zAxis[1]).toBeCloseTo(-0.6, 9);
  });

  it('that does not meet is a finding', () => {
    const model = place(
      `${GRID}\n#60=IFCGRIDPLACEMENT($,#61,$);\n#61=IFCVIRTUALGRIDINTERSECTION((#310,#320),(-2000.,0.));`,
    );
    expect(model.members).toEqual([]);
    expect(model.findings.map((f) => f.code)).toContain('unreadable-element');
  });
});

const CURVE = `#70=IFCPOLYLINE((#71,#72,#73));
#71=IFCCARTESIANPOINT((0.,0.,1000.));
#72=IFCCARTESIANPOINT((3000.,0.,1000.));
#73=IFCCARTESIANPOINT((3000.,4000.,1000.));`;
const linear = (distance: string, offsets = '$,$,$', position = '$') =>
  `${CURVE}\n#60=IFCLINEARPLACEMENT($,#61,${position});\n#61=IFCAXIS2PLACEMENTLINEAR(#62,$,$);
#62=IFCPOINTBYDISTANCEEXPRESSION(${distance},${offsets},#70);`;

describe('placement along a curve', () => {
  it('counts the distance round the corners of a polyline', () => {
    expectFoot(place(linear('IFCLENGTHMEASURE(4500.)')), [3, 1.5, 1]);
  });

  it('moves left, up and ahead by its offsets', () => {
    // Along +y: left is -x.
    expectFoot(place(linear('IFCLENGTHMEASURE(4500.)', '500.,200.,100.')), [2.5, 1.6, 1.2]);
  });

  it('falls back on the position given beside it where the curve is not read', () => {
    const model = place(
      linear('IFCLENGTHMEASURE(0.)', '$,$,$', '#63')
        .replace('#70=IFCPOLYLINE((#71,#72,#73));', '#70=IFCGRADIENTCURVE((),.F.,$,$);')
        .concat('\n#63=IFCAXIS2PLACEMENT3D(#73,$,$);'),
    );
    expectFoot(model, [3, 4, 1]);
  });

  it('is a finding where neither can be read', () => {
    const model = place(
      linear('IFCLENGTHMEASURE(0.)').replace('#70=IFCPOLYLINE((#71,#72,#73));', '#70=IFCGRADIENTCURVE((),.F.,$,$);'),
    );
    expect(model.members).toEqual([]);
    expect(model.findings.map((f) => f.code)).toEqual(['unreadable-element']);
  });
});

describe('a placement chain', () => {
  it('that runs in a circle is a finding and not a hang', () => {
    const model = place('#60=IFCLOCALPLACEMENT(#61,#11);\n#61=IFCLOCALPLACEMENT(#60,#11);');
    expect(model.members).toEqual([]);
    expect(model.findings.map((f) => f.code)).toEqual(['cyclic-placement']);
  });

  it('whose parent is missing keeps the rest, with a finding', () => {
    const model = place(
      '#60=IFCLOCALPLACEMENT(#999,#61);\n#61=IFCAXIS2PLACEMENT3D(#62,$,$);\n#62=IFCCARTESIANPOINT((1000.,0.,0.));',
    );
    expectFoot(model, [1, 0, 0]);
    expect(model.findings.map((f) => f.code)).toContain('dangling-reference');
  });

  it('of twenty thousand links is walked', () => {
    const links = Array.from({ length: 20_000 }, (_, i) => `#${1000 + i}=IFCLOCALPLACEMENT(#${1001 + i},#61);`);
    const model = place(
      `#60=IFCLOCALPLACEMENT(#1000,$);\n#61=IFCAXIS2PLACEMENT3D(#62,$,$);\n#62=IFCCARTESIANPOINT((1.,0.,0.));\n${links.join('\n')}\n#21000=IFCLOCALPLACEMENT($,$);`,
    );
    expectFoot(model, [20, 0, 0]);
  });
});
