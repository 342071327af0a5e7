import { describe, expect, it } from 'vitest';
import { dot, type Vec3 } from '../../../src/domain/vector.ts';
import type { Plate } from '../../../src/importer/evidence/types.ts';
import { evidenceOf, plateWith } from './evidence-of.ts';

/** Profile #20 is 100 x 200 mm. */
const EXTRUSION = '#100=IFCEXTRUDEDAREASOLID(#20,$,#13,10.);';

function onlyPlate(data: string, schema = 'IFC4'): Plate {
  const { plates, unreadPlates } = evidenceOf(data, schema);
  expect(unreadPlates).toEqual([]);
  expect(plates).toHaveLength(1);
  return plates[0]!;
}

/** Sizes from the greatest to the least, mm. */
const sizes = ({ halfSizes }: Plate): number[] => [...halfSizes].map((half) => 2000 * half).sort((a, b) => b - a);

/** Which way its thickness goes. */
const thinAxis = ({ axes, halfSizes }: Plate): Vec3 => axes[halfSizes.indexOf(Math.min(...halfSizes)) as 0 | 1 | 2];

function expectAll(got: readonly number[], wanted: readonly number[], digits = 6): void {
  expect(got).toHaveLength(wanted.length);
  got.forEach((value, i) => {
    expect(value).toBeCloseTo(wanted[i]!, digits);
  });
}

const parallel = (a: Vec3, b: Vec3): void => expect(Math.abs(dot(a, b))).toBeCloseTo(1, 9);

const BREP = (corners: readonly string[]): string => {
  const quads = ['4,3,2,1', '5,6,7,8', '1,2,6,5', '2,3,7,6', '3,4,8,7', '4,1,5,8'].map((quad) => quad.split(','));
  const faces = quads.map(
    (quad, i) => `#${220 + i}=IFCPOLYLOOP((${quad.map((c) => `#${200 + Number(c)}`).join(',')}));
#${230 + i}=IFCFACEOUTERBOUND(#${220 + i},.T.);
#${240 + i}=IFCFACE((#${230 + i}));`,
  );
  return `${corners.map((corner, i) => `#${201 + i}=IFCCARTESIANPOINT((${corner}));`).join('\n')}
${faces.join('\n')}
#250=IFCCLOSEDSHELL((#240,#241,#242,#243,#244,#245));
#100=IFCFACETEDBREP(#250);`;
};

/** 500 x 20 x 10 mm, turned by 30 degrees about z. */
const TURNED = [0, 1, 2, 3, 4, 5, 6, 7].map((i) => {
  const [x, y, z] = [[0, 500, 500, 0][i % 4]!, i % 4 < 2 ? 0 : 20, i < 4 ? 0 : 10];
  const [c, s] = [Math.cos(Math.PI / 6), 0.5];
  return `${x * c - y * s},${x * s + y * c},${z}.`;
});

describe('a plate', () => {
  it('is the box of its outline and depth, in the axes of the solid, in world metres', () => {
    const plate = onlyPlate(
      plateWith(
        '#100',
        `#100=IFCEXTRUDEDAREASOLID(#20,#101,#13,10.);
#101=IFCAXIS2PLACEMENT3D(#102,#15,#14);
#102=IFCCARTESIANPOINT((1000.,0.,0.));
#60=IFCLOCALPLACEMENT($,#61);
#61=IFCAXIS2PLACEMENT3D(#62,$,$);
#62=IFCCARTESIANPOINT((0.,0.,5000.));`,
        '#60',
      ),
    );
    expectAll(plate.centre, [1, 0.005, 5]);
    expectAll(sizes(plate), [200, 100, 10]);
    parallel(thinAxis(plate), [0, 1, 0]);
    expect(plate).toMatchObject({ name: 'P1', class: 'IfcPlate', globalId: '0ppppppppppppppppppppp', assembly: null });
  });

  it('follows a profile that is turned in its own plane', () => {
    const plate = onlyPlate(
      plateWith(
        '#100',
        `#100=IFCEXTRUDEDAREASOLID(#101,$,#13,10.);
#101=IFCRECTANGLEPROFILEDEF(.AREA.,$,#102,100.,200.);
#102=IFCAXIS2PLACEMENT2D(#103,#104);
#103=IFCCARTESIANPOINT((50.,0.));
#104=IFCDIRECTION((0.6,0.8));`,
      ),
    );
    expectAll(plate.centre, [0.05, 0, 0.005]);
    expectAll(sizes(plate), [200, 100, 10]);
    parallel(plate.axes[0], [0.6, 0.8, 0]);
  });

  it('of any outline takes the box round the outline', () => {
    const plate = onlyPlate(
      plateWith(
        '#100',
        `#100=IFCEXTRUDEDAREASOLID(#101,$,#13,12.);
#101=IFCARBITRARYCLOSEDPROFILEDEF(.AREA.,$,#102);
#102=IFCPOLYLINE((#103,#104,#105,#103));
#103=IFCCARTESIANPOINT((0.,0.));
#104=IFCCARTESIANPOINT((300.,0.));
#105=IFCCARTESIANPOINT((0.,150.));`,
      ),
    );
    expectAll(sizes(plate), [300, 150, 12]);
    expectAll(plate.centre, [0.15, 0.075, 0.006]);
  });

  it('shown as a stretched and mirrored copy has the size of the copy', () => {
    const plate = onlyPlate(
      plateWith(
        '#110',
        `${EXTRUSION}
#110=IFCMAPPEDITEM(#111,#112);
#111=IFCREPRESENTATIONMAP(#11,#113);
#112=IFCCARTESIANTRANSFORMATIONOPERATOR3DNONUNIFORM(#114,$,#12,1.,$,2.,3.);
#113=IFCSHAPEREPRESENTATION(#10,'Body','SweptSolid',(#100));
#114=IFCDIRECTION((-1.,0.,0.));`,
      ),
    );
    expectAll(sizes(plate), [400, 100, 30]);
    expectAll(plate.centre, [0, 0, 0.015]);
  });

  it('that is clipped is as large as what it is cut from, and one that is grown together as large as both', () => {
    const both = (operator: string) =>
      plateWith(
        '#110',
        `${EXTRUSION}
#101=IFCEXTRUDEDAREASOLID(#20,$,#13,70.);
#110=IFCBOOLEANRESULT(.${operator}.,#100,#101);`,
      );
    expectAll(sizes(onlyPlate(both('DIFFERENCE'))), [200, 100, 10]);
    expectAll(sizes(onlyPlate(both('UNION'))), [200, 100, 70]);
  });

  it('drawn as a boundary representation has the axes of its greatest face', () => {
    const plate = onlyPlate(plateWith('#100', BREP(TURNED)));
    expectAll(sizes(plate), [500, 20, 10], 4);
    parallel(thinAxis(plate), [0, 0, 1]);
    const long = plate.axes[plate.halfSizes.indexOf(Math.max(...plate.halfSizes)) as 0 | 1 | 2];
    parallel(long, [Math.cos(Math.PI / 6), 0.5, 0]);
  });

  it('drawn in triangles does not follow their diagonals', () => {
    const points = TURNED.map((corner) => `(${corner})`).join(',');
    const quads = [
      [4, 3, 2, 1],
      [5, 6, 7, 8],
      [1, 2, 6, 5],
      [2, 3, 7, 6],
      [3, 4, 8, 7],
      [4, 1, 5, 8],
    ] as const;
    const triangles = quads.flatMap(([a, b, c, d]) => [`(${a},${b},${c})`, `(${a},${c},${d})`]).join(',');
    const plate = onlyPlate(
      plateWith(
        '#100',
        `#100=IFCTRIANGULATEDFACESET(#101,$,.T.,(${triangles}),$);
#101=IFCCARTESIANPOINTLIST3D((${points}));`,
      ),
    );
    expectAll(sizes(plate), [500, 20, 10], 4);
  });

  it('of several solids is the box round all', () => {
    const plate = onlyPlate(
      plateWith(
        '#100,#101',
        `${EXTRUSION}
#101=IFCEXTRUDEDAREASOLID(#20,#102,#13,10.);
#102=IFCAXIS2PLACEMENT3D(#103,$,$);
#103=IFCCARTESIANPOINT((0.,300.,0.));`,
      ),
    );
    expectAll(sizes(plate), [500, 100, 10]);
    expectAll(plate.centre, [0, 0.15, 0.005]);
  });

  it('that is a bolt swept along a line is as long as the line and as thick as the disk', () => {
    const plate = onlyPlate(
      plateWith(
        '#100',
        `#100=IFCSWEPTDISKSOLID(#101,8.,$,$,$);
#101=IFCPOLYLINE((#102,#103));
#102=IFCCARTESIANPOINT((0.,0.,0.));
#103=IFCCARTESIANPOINT((36.,48.,0.));`,
        '#16',
        'IFCMECHANICALFASTENER',
      ),
    );
    expect(plate.class).toBe('IfcMechanicalFastener');
    expectAll(sizes(plate), [60, 16, 16]);
    expectAll(plate.centre, [0.018, 0.024, 0]);
  });

  it('that is a turned washer is as wide as its outer edge', () => {
    const plate = onlyPlate(
      plateWith(
        '#100',
        `#100=IFCREVOLVEDAREASOLID(#101,$,#104,6.283185307179586);
#101=IFCRECTANGLEPROFILEDEF(.AREA.,$,#102,10.,4.);
#102=IFCAXIS2PLACEMENT2D(#103,$);
#103=IFCCARTESIANPOINT((20.,0.));
#104=IFCAXIS1PLACEMENT(#12,#15);`,
        '#16',
        'IFCDISCRETEACCESSORY',
      ),
    );
    expectAll(sizes(plate), [50, 50, 4]);
    parallel(thinAxis(plate), [0, 1, 0]);
  });

  it('is read in every class of plates and fasteners, also of the older schema', () => {
    const classes = [
      'IfcPlate',
      'IfcDiscreteAccessory',
      'IfcMechanicalFastener',
      'IfcFastener',
      'IfcBuildingElementPart',
    ];
    for (const written of classes) {
      const plate = onlyPlate(plateWith('#100', EXTRUSION, '#16', written.toUpperCase()), 'IFC2X3');
      expect(plate.class).toBe(written);
    }
    expect(onlyPlate(plateWith('#100', EXTRUSION, '#16', 'IFCPLATESTANDARDCASE')).class).toBe('IfcPlateStandardCase');
  });

  it('knows the assembly it is part of', () => {
    const plate = onlyPlate(`${plateWith('#100', EXTRUSION)}
#60=IFCELEMENTASSEMBLY('0t',$,'Truss',$,$,#16,$,$,$,$);
#70=IFCRELAGGREGATES('r1',$,$,$,#60,(#50));`);
    expect(plate.assembly).toBe('0t');
  });

  it('whose body cannot be read is counted with the reason and gives no box', () => {
    const bodies: readonly [body: string, more: string, reason: string][] = [
      ['#100', '#100=IFCSPHERE(#11,10.);', 'sphere'],
      ['#100', '#100=IFCEXTRUDEDAREASOLID(#101,$,#13,10.);\n#101=IFCRECTANGLEPROFILEDEF(.AREA.,$,$,0.,5.);', '0 mm'],
      ['#100', '#100=IFCMAPPEDITEM(#101,$);\n#101=IFCREPRESENTATIONMAP(#11,#91);', 'refers to itself'],
      ['', '', 'no shape'],
    ];
    for (const [body, more, reason] of bodies) {
      const { plates, unreadPlates } = evidenceOf(plateWith(body, more));
      expect(plates).toEqual([]);
      expect(unreadPlates).toHaveLength(1);
      expect(unreadPlates[0]!.reason.toLowerCase()).toContain(reason);
    }
  });
});
