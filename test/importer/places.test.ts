import { describe, expect, it } from 'vitest';
import { between } from '../../src/domain/vector.ts';
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
    const { members, placeOf } = importText(plain + grid('0.,0.,0.'));
    expect(placeOf(between(...members[0]!.axis, 0.5))).toBe('A/1, +1.50');
  });
});

describe('places without a grid', () => {
  it('says the storey and the way from the lowest x and y of the members', () => {
    const model = importText(`${plain}
#700=IFCBUILDINGSTOREY('0lllllllllllllllllllll',$,'Roof',$,$,#701,$,$,.ELEMENT.,6000.);
#701=IFCLOCALPLACEMENT($,#702);
#702=IFCAXIS2PLACEMENT3D(#703,$,$);
#703=IFCCARTESIANPOINT((0.,0.,6000.));
#710=IFCBUILDINGSTOREY('0mmmmmmmmmmmmmmmmmmmmm',$,'Ground',$,$,#711,$,$,.ELEMENT.,0.);
#711=IFCLOCALPLACEMENT($,#11);`);
    expect(model.placeOf([1, 2, 3])).toBe('Ground, x 1.0 m, y 2.0 m from the lowest, +3.00');
    expect(model.placeOf([1, 2, 5.9])).toBe('Roof, x 1.0 m, y 2.0 m from the lowest, +5.90');
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

/** A grid of straight axes: tags with the two ends in mm, families U, V, W. */
function gridOf(
  id: number,
  families: readonly (readonly (readonly [tag: string, from: readonly number[], to: readonly number[]])[])[],
  placement: { origin: readonly number[]; x?: readonly number[] },
): string {
  const axes: string[] = [];
  const lines = families.map((family, f) =>
    family.map(([tag, from, to], i) => {
      const at = id + 20 + 40 * f + 4 * i;
      const list = (p: readonly number[]) => p.map((c) => c.toFixed(6)).join(',');
      axes.push(`#${at}=IFCGRIDAXIS('${tag}',#${at + 1},.T.);
#${at + 1}=IFCPOLYLINE((#${at + 2},#${at + 3}));
#${at + 2}=IFCCARTESIANPOINT((${list(from)}));
#${at + 3}=IFCCARTESIANPOINT((${list(to)}));`);
      return `#${at}`;
    }),
  );
  const family = (f: number) => (lines[f] === undefined ? '$' : `(${lines[f].join(',')})`);
  const x = placement.x ?? [1, 0, 0];
  return `
#${id}=IFCGRID('${String(id).padStart(22, '0')}',$,'G${id}',$,$,#${id + 1},$,${family(0)},${family(1)},${family(2)});
#${id + 1}=IFCLOCALPLACEMENT($,#${id + 2});
#${id + 2}=IFCAXIS2PLACEMENT3D(#${id + 3},#13,#${id + 4});
#${id + 3}=IFCCARTESIANPOINT((${placement.origin.map((c) => c.toFixed(3)).join(',')}));
#${id + 4}=IFCDIRECTION((${x.map((c) => c.toFixed(9)).join(',')}));
${axes.join('\n')}`;
}

/** Two axes each way, 6 m apart, with these tags. */
const square = (u: readonly [string, string], v: readonly [string, string]) => [
  [
    [u[0], [0, 0], [0, 6000]],
    [u[1], [6000, 0], [6000, 6000]],
  ] as const,
  [
    [v[0], [0, 0], [6000, 0]],
    [v[1], [0, 6000], [6000, 6000]],
  ] as const,
];

describe('places by several grids', () => {
  const ground = gridOf(2000, square(['1', '2'], ['A', 'B']), { origin: [0, 0, 0] });

  it('go by the one on the level below', () => {
    const roof = gridOf(3000, square(['R1', 'R2'], ['RA', 'RB']), { origin: [0, 0, 6000] });
    const { placeOf } = importText(plain + ground + roof);
    expect(placeOf([6, 6, 3])).toBe('B/2, +3.00');
    expect(placeOf([6, 6, 5.9])).toBe('R2/RB, +5.90');
    expect(placeOf([6, 6, 8])).toBe('R2/RB, +8.00');
    expect(placeOf([6, 6, -1])).toBe('B/2, -1.00');
  });

  it('go by the one they lie in before the one on the nearer level', () => {
    const annex = gridOf(3000, square(['X1', 'X2'], ['XA', 'XB']), { origin: [20000, 0, 3000] });
    const { placeOf } = importText(plain + ground + annex);
    expect(placeOf([6, 0, 4])).toBe('A/2, +4.00');
    expect(placeOf([26, 0, 4])).toBe('X2/XA, +4.00');
  });

  it('are named once where one grid is drawn on every storey', () => {
    const again = gridOf(3000, square(['1', '2'], ['A', 'B']), { origin: [0, 0, 4000] });
    expect(importText(plain + ground + again).placeOf([0, 6, 5])).toBe('B/1, +5.00');
  });
});

describe('places by a grid that is not square to the world', () => {
  it('go with its turn', () => {
    const [c, s] = [Math.cos(0.4), Math.sin(0.4)];
    const turned = gridOf(2000, square(['1', '2'], ['A', 'B']), { origin: [1000, 2000, 0], x: [c, s, 0] });
    const { placeOf } = importText(plain + turned);
    // Crossing of 2 and B: 6 m along its x and 6 m along its y.
    expect(placeOf([1 + 6 * c - 6 * s, 2 + 6 * s + 6 * c, 0])).toBe('B/2, +0.00');
    expect(placeOf([1 + 3 * c, 2 + 3 * s, 0])).toBe('A/1-2, +0.00');
  });

  it('name the nearer two of three families', () => {
    const [c, s] = [Math.cos(Math.PI / 3), Math.sin(Math.PI / 3)];
    const way = (turn: readonly [number, number], away: number): readonly [readonly number[], readonly number[]] => {
      const [x, y] = [-turn[1] * away, turn[0] * away];
      return [
        [x - turn[0] * 9000, y - turn[1] * 9000],
        [x + turn[0] * 9000, y + turn[1] * 9000],
      ];
    };
    const family = (letter: string, turn: readonly [number, number]) =>
      [0, 3000].map((away, i) => [`${letter}${i + 1}`, ...way(turn, away)] as const);
    const triangular = gridOf(2000, [family('U', [1, 0]), family('V', [c, s]), family('W', [c, -s])], {
      origin: [0, 0, 0],
    });
    const { placeOf } = importText(plain + triangular);
    // On U2 and V1, far from both W axes.
    expect(placeOf([3 / Math.tan(Math.PI / 3), 3, 0])).toBe('U2/V1, +0.00');
  });
});

describe('a curved axis of a grid', () => {
  it('names no place, which is said once', () => {
    const arc = grid('0.,0.,0.').replace('#632=IFCPOLYLINE((#652,#653));', '#632=IFCCIRCLE(#11,6000.);');
    const model = importText(plain + arc);
    expect(model.placeOf([6, 0, 1])).toBe('A/1-3, +1.00');
    expect(model.findings.filter(({ code }) => code === 'out-of-scope').map(({ message }) => message)).toEqual([
      '1 axis of grid G is curved or cannot be read, and no place is named by it.',
    ]);
  });
});

describe('place, storey, assembly and mark', () => {
  it('stand on every member, and the place on every finding that has a point', () => {
    const { members, findings, placeOf } = importText(`${plain}${grid('0.,0.,0.')}
#700=IFCBUILDINGSTOREY('0lllllllllllllllllllll',$,'Roof',$,$,#16,$,$,.ELEMENT.,0.);
#701=IFCELEMENTASSEMBLY('0nnnnnnnnnnnnnnnnnnnnn',$,'Truss 3',$,$,#16,$,'A3',.SITE.,.TRUSS.);
#702=IFCRELAGGREGATES('0ooooooooooooooooooooo',$,$,$,#701,(#50));
#703=IFCRELCONTAINEDINSPATIALSTRUCTURE('0ppppppppppppppppppppp',$,$,$,(#701),#700);`);
    expect(members[0]).toMatchObject({ storey: 'Roof', assembly: 'Truss 3', tag: 'T1' });
    expect(placeOf(between(...members[0]!.axis, 0.5))).toBe('A/1, +1.50');
    const noMaterial = findings.find(({ code }) => code === 'no-material');
    expect(noMaterial).toMatchObject({ members: ['0bbbbbbbbbbbbbbbbbbbbb'], place: 'A/1, +1.50' });
  });
});
