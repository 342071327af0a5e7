import { describe, expect, it } from 'vitest';
import { beamWith, importText } from './support/model-text.ts';

const BODY = '#100=IFCEXTRUDEDAREASOLID(#20,$,#13,3000.);';

/** Axes 1, 2, 3 at x = 0, 6, 12 m and A, B at y = 0, 8 m; the grid is placed at `origin` in mm. */
const grid = (origin: string) => `
#600=IFCGRID('0kkkkkkkkkkkkkkkkkkkkk',$,'G',$,$,#601,$,(#611,#612,#613),(#621,#622),$,$);
#601=IFCLOCALPLACEMENT($,#602);
#602=IFCAXIS2PLACEMENT3D(#603,$,$);
#603=IFCCARTESIANPOINT((${origin}));
#611=IFCGRIDAXIS('1',#631,.T.);
#612=IFCGRIDAXIS('2',#632,.F.);
#613=IFCGRIDAXIS('3',#633,.T.);
#621=IFCGRIDAXIS('A',#641,.T.);
#622=IFCGRIDAXIS('B',#642,.T.);
#631=IFCPOLYLINE((#650,#651));
#632=IFCPOLYLINE((#652,#653));
#633=IFCPOLYLINE((#654,#655));
#641=IFCPOLYLINE((#650,#654));
#642=IFCPOLYLINE((#651,#655));
#650=IFCCARTESIANPOINT((0.,0.));
#651=IFCCARTESIANPOINT((0.,8000.));
#652=IFCCARTESIANPOINT((6000.,0.));
#653=IFCCARTESIANPOINT((6000.,8000.));
#654=IFCCARTESIANPOINT((12000.,0.));
#655=IFCCARTESIANPOINT((12000.,8000.));`;

const plain = beamWith({ body: '#100', more: BODY });

describe('places by the grid', () => {
  const { placeOf } = importText(plain + grid('0.,0.,0.'));

  it.each([
    ['A/1, +6.20', [0, 0, 6.2]],
    ['B/3, -0.50', [12.3, 7.6, -0.5]],
    ['A/1-2, +0.00', [2, 0.2, 0]],
    ['A-B/2-3, +3.00', [8, 4, 3]],
    ['B (2.0 m outside)/2, +0.00', [6, 10, -0.001]],
  ] as const)('says %s', (words, at) => {
    expect(placeOf(at)).toBe(words);
  });

  it('goes with the placement of the grid', () => {
    expect(importText(plain + grid('100000.,50000.,0.')).placeOf([106, 58, 1])).toBe('B/2, +1.00');
  });

  it('names the middle of each member', () => {
    expect(importText(plain + grid('0.,0.,0.')).members[0]?.place).toBe('A/1, +1.50');
  });
});

describe('places without a grid', () => {
  it("says the storey and the way from the model's corner", () => {
    const model = importText(`${plain}
#700=IFCBUILDINGSTOREY('0lllllllllllllllllllll',$,'Roof',$,$,#701,$,$,.ELEMENT.,6000.);
#701=IFCLOCALPLACEMENT($,#702);
#702=IFCAXIS2PLACEMENT3D(#703,$,$);
#703=IFCCARTESIANPOINT((0.,0.,6000.));
#710=IFCBUILDINGSTOREY('0mmmmmmmmmmmmmmmmmmmmm',$,'Ground',$,$,#711,$,$,.ELEMENT.,0.);
#711=IFCLOCALPLACEMENT($,#11);`);
    expect(model.placeOf([1, 2, 3])).toBe('Ground, 1.0 m x and 2.0 m y from the corner, +3.00');
    expect(model.placeOf([1, 2, 5.9])).toBe('Roof, 1.0 m x and 2.0 m y from the corner, +5.90');
  });
});

describe('placement by a grid', () => {
  const placed = (schema: string, intersection: string, direction = '$') => {
    const relative = schema === 'IFC4X3' ? '#601,' : '';
    const data = beamWith({
      body: '#100',
      placement: '#800',
      more: `${BODY}\n#800=IFCGRIDPLACEMENT(${relative}#801,${direction});
#801=IFCVIRTUALGRIDINTERSECTION(${intersection});${grid('1000.,0.,500.')}`,
    });
    return importText(data, schema);
  };

  it.each(['IFC2X3', 'IFC4', 'IFC4X3'])('is at the intersection of two axes with their offsets, in %s', (schema) => {
    // Axis 3 runs up the plan: 200 mm to its left is x = 11.8 m; axis B runs right: 300 mm to its left is y = 8.3 m.
    const [from, to] = placed(schema, '(#613,#622),(200.,300.,100.)').members[0]!.axis;
    for (const [i, c] of [12.8, 8.3, 0.6].entries()) expect(from[i]).toBeCloseTo(c, 9);
    expect(to[2]).toBeCloseTo(3.6, 9);
  });

  it('turns x along the first axis, in its sense', () => {
    // Axis 3 runs along +y, so the profile's y (the section's z) points to -x; axis 2 is used against its drawing.
    expect(placed('IFC4', '(#613,#622),(0.,0.)').members[0]!.zAxis[0]).toBeCloseTo(-1, 9);
    expect(placed('IFC4', '(#612,#622),(0.,0.)').members[0]!.zAxis[0]).toBeCloseTo(1, 9);
    expect(placed('IFC4', '(#613,#622),(0.,0.)', '#14').members[0]!.zAxis[1]).toBeCloseTo(1, 9);
  });

  it('that cannot be found is said so', () => {
    const model = placed('IFC4', '(#611,#613),(0.,0.)');
    expect(model.members).toEqual([]);
    expect(model.findings[0]).toMatchObject({ code: 'unreadable-element' });
    expect(model.findings[0]?.message).toContain('parallel');
  });
});
