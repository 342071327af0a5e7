import { describe, expect, it } from 'vitest';
import { readAnalysisModel } from '../../../src/importer/analysis/read-analysis-model.ts';
import type { GivenLoad } from '../../../src/importer/given.ts';
import { openStep } from '../../../src/step/step-file.ts';
import { stepText } from '../support/model-text.ts';

/**
 * One member from (0, 0, 0) to (4, 0, 3) m, 5 m long, in m and N, between connections #40 and #41; `more` adds the rest. Its
 * axis attribute is the world's z, so its local z is (-0.6, 0, 0.8).
 */
const member = (schema: string, more: string, placement = '$', kind = 'PIN_JOINED_MEMBER') => {
  const isOld = schema === 'IFC2X3';
  const text = stepText(
    `#1=IFCPROJECT('0aaaaaaaaaaaaaaaaaaaaa',$,'P',$,$,$,$,(#10),#2);
#2=IFCUNITASSIGNMENT((#3,#4,#5,#6,#7));
#3=IFCSIUNIT(*,.LENGTHUNIT.,$,.METRE.);
#4=IFCSIUNIT(*,.PLANEANGLEUNIT.,$,.RADIAN.);
#5=IFCSIUNIT(*,.FORCEUNIT.,$,.NEWTON.);
#6=IFCDERIVEDUNIT((#8,#9),.LINEARFORCEUNIT.,$);
#7=IFCDERIVEDUNIT((#8,#9),.LINEARSTIFFNESSUNIT.,$);
#8=IFCDERIVEDUNITELEMENT(#5,1);
#9=IFCDERIVEDUNITELEMENT(#3,-1);
#10=IFCGEOMETRICREPRESENTATIONCONTEXT($,'Model',3,1.E-5,#11,$);
#11=IFCAXIS2PLACEMENT3D(#12,$,$);
#12=IFCCARTESIANPOINT((0.,0.,0.));
#13=IFCDIRECTION((0.,0.,1.));
#20=IFCCARTESIANPOINT((4.,0.,3.));
#21=IFCVERTEXPOINT(#12);
#22=IFCVERTEXPOINT(#20);
#23=IFCEDGE(#21,#22);
#24=IFCTOPOLOGYREPRESENTATION(#10,'Reference','Edge',(#23));
#25=IFCPRODUCTDEFINITIONSHAPE($,$,(#24));
#30=IFCSTRUCTURALCURVEMEMBER('0M00000000000000000000',$,'bar',$,$,$,#25,.${kind}.${isOld ? '' : ',#13'});
#31=IFCTOPOLOGYREPRESENTATION(#10,'Reference','Vertex',(#21));
#32=IFCPRODUCTDEFINITIONSHAPE($,$,(#31));
#33=IFCTOPOLOGYREPRESENTATION(#10,'Reference','Vertex',(#22));
#34=IFCPRODUCTDEFINITIONSHAPE($,$,(#33));
#50=IFCSTRUCTURALANALYSISMODEL('0A00000000000000000000',$,'A',$,$,.LOADING_3D.,$,(#60),$${isOld ? '' : `,${placement}`});
#60=${isOld ? 'IFCSTRUCTURALLOADGROUP' : 'IFCSTRUCTURALLOADCASE'}('0C00000000000000000000',$,'case',$,$,.LOAD_CASE.,.NOTDEFINED.,.NOTDEFINED.,$,$${isOld ? '' : ',$'});
${more}`,
    schema,
  );
  return readAnalysisModel(openStep(new TextEncoder().encode(text)));
};

const connections = (schema: string, first: string, second = '$') => {
  const own = schema === 'IFC2X3' ? '' : ',$';
  return `#40=IFCSTRUCTURALPOINTCONNECTION('0P00000000000000000000',$,'foot',$,$,$,#32,${first}${own});
#41=IFCSTRUCTURALPOINTCONNECTION('0P10000000000000000000',$,'head',$,$,$,#34,${second}${own});`;
};

/** Puts action #70 on item `on` and into the case. */
const onItem = (on: number, action: string) => `#70=${action};
#71=IFCRELCONNECTSSTRUCTURALACTIVITY('0R00000000000000000000',$,$,$,#${on},#70);
#72=IFCRELASSIGNSTOGROUP('0R10000000000000000000',$,$,$,(#70),$,#60);`;

/** An IFC4 curve action with the load #80. */
const curveAction = (coordinates: string, length: string, shape: string) =>
  onItem(
    30,
    `IFCSTRUCTURALCURVEACTION('0L00000000000000000000',$,$,$,$,$,$,#80,.${coordinates}.,$,${length},.${shape}.)`,
  );

const loadsOf = (schema: string, more: string, placement = '$'): readonly GivenLoad[] =>
  member(schema, more, placement).given!.cases[0]!.loads;

const messages = (schema: string, more: string): string[] =>
  member(schema, more).findings.map(({ message }) => message);

function expectVector(found: readonly number[] | undefined, expected: readonly number[]): void {
  expected.forEach((value, i) => {
    expect(found![i]).toBeCloseTo(value, 9);
  });
}

const lines = (loads: readonly GivenLoad[]) => loads.filter((load) => load.kind === 'line');
const points = (loads: readonly GivenLoad[]) => loads.filter((load) => load.kind === 'point');

function onlyLine(loads: readonly GivenLoad[]): Extract<GivenLoad, { kind: 'line' }> {
  expect(loads).toHaveLength(1);
  const [load] = loads;
  if (load?.kind !== 'line') throw new Error('no line load');
  return load;
}

const FORCE = '#80=IFCSTRUCTURALLOADLINEARFORCE($,$,$,-100.,$,$,$);';

describe('a constant load along a member', () => {
  it.each(['IFC4', 'IFC4X3'])('is one over its whole length, in %s', (schema) => {
    const load = onlyLine(loadsOf(schema, FORCE + curveAction('GLOBAL_COORDS', '.TRUE_LENGTH.', 'CONST')));
    expect(load.globalId).toBe('0M00000000000000000000');
    expectVector(load.from, [0, 0, 0]);
    expectVector(load.to, [4, 0, 3]);
    expectVector(load.forceFrom, [0, 0, -100]);
    expectVector(load.forceTo, [0, 0, -100]);
  });

  it.each([
    [
      'IFC2X3',
      "IFCSTRUCTURALLINEARACTION('0L00000000000000000000',$,$,$,$,$,$,#80,.GLOBAL_COORDS.,.F.,$,.PROJECTED_LENGTH.)",
    ],
    [
      'IFC4',
      "IFCSTRUCTURALLINEARACTION('0L00000000000000000000',$,$,$,$,$,$,#80,.GLOBAL_COORDS.,$,.PROJECTED_LENGTH.,.CONST.)",
    ],
  ])('per projected length acts on what is seen along it, in %s', (schema, action) => {
    // 5 m long, 4 m in plan: 100 N per metre in plan are 80 N per metre of the member.
    expectVector(onlyLine(loadsOf(schema, FORCE + onItem(30, action))).forceFrom, [0, 0, -80]);
  });

  it('in local axes turns with the member', () => {
    const load = onlyLine(loadsOf('IFC4', FORCE + curveAction('LOCAL_COORDS', '$', 'CONST')));
    expectVector(load.forceFrom, [60, 0, -80]);
  });

  it('in global axes turns with the placement that the model shares', () => {
    // x of the model is the world's y.
    const placed = `#90=IFCLOCALPLACEMENT($,#91);
#91=IFCAXIS2PLACEMENT3D(#92,#13,#93);
#92=IFCCARTESIANPOINT((0.,0.,10.));
#93=IFCDIRECTION((0.,1.,0.));
#80=IFCSTRUCTURALLOADLINEARFORCE($,5.,$,$,$,$,$);`;
    const load = onlyLine(loadsOf('IFC4', placed + curveAction('GLOBAL_COORDS', '$', 'CONST'), '#90'));
    expectVector(load.forceFrom, [0, 5, 0]);
    expectVector(load.to, [0, 4, 13]);
  });

  it('may act on a part of the member that the action draws', () => {
    const part = `#81=IFCCARTESIANPOINT((2.,0.,1.5));
#82=IFCVERTEXPOINT(#81);
#83=IFCEDGE(#21,#82);
#84=IFCTOPOLOGYREPRESENTATION(#10,'Reference','Edge',(#83));
#85=IFCPRODUCTDEFINITIONSHAPE($,$,(#84));
${onItem(30, "IFCSTRUCTURALCURVEACTION('0L00000000000000000000',$,$,$,$,$,#85,#80,.GLOBAL_COORDS.,$,$,.CONST.)")}`;
    expectVector(onlyLine(loadsOf('IFC4', FORCE + part)).to, [2, 0, 1.5]);
  });
});

describe('a load that varies along a member', () => {
  const configured = (places: string, values: string) => `#80=IFCSTRUCTURALLOADCONFIGURATION($,(${values}),${places});
#81=IFCSTRUCTURALLOADLINEARFORCE($,$,$,-10.,$,$,$);
#82=IFCSTRUCTURALLOADLINEARFORCE($,$,$,-30.,$,$,$);
#83=IFCSTRUCTURALLOADSINGLEFORCE($,$,$,-500.,$,$,$);`;

  it('is linear between its stations', () => {
    const load = onlyLine(
      loadsOf('IFC4', configured('((1.),(3.5))', '#81,#82') + curveAction('GLOBAL_COORDS', '$', 'LINEAR')),
    );
    expectVector(load.from, [0.8, 0, 0.6]);
    expectVector(load.to, [2.8, 0, 2.1]);
    expectVector(load.forceFrom, [0, 0, -10]);
    expectVector(load.forceTo, [0, 0, -30]);
  });

  it('is a chain of such pieces where it is polygonal or has equal steps', () => {
    const polygonal = loadsOf(
      'IFC4',
      configured('((0.),(2.),(5.))', '#81,#82,#81') + curveAction('GLOBAL_COORDS', '$', 'POLYGONAL'),
    );
    const equal = loadsOf('IFC4', configured('$', '#81,#82,#81') + curveAction('GLOBAL_COORDS', '$', 'EQUIDISTANT'));
    expect([polygonal.length, equal.length]).toEqual([2, 2]);
    expectVector(lines(polygonal)[0]?.to, [1.6, 0, 1.2]);
    expectVector(lines(equal)[0]?.to, [2, 0, 1.5]);
  });

  it('is a force at each station where it is discrete', () => {
    const loads = loadsOf(
      'IFC4',
      configured('((2.5),(5.))', '#83,#83') + curveAction('GLOBAL_COORDS', '$', 'DISCRETE'),
    );
    expect(loads.map(({ kind }) => kind)).toEqual(['point', 'point']);
    expectVector(points(loads)[0]?.at, [2, 0, 1.5]);
    expectVector(points(loads)[0]?.force, [0, 0, -500]);
  });

  it.each(['SINUS', 'PARABOLA'])('and is given as %s is not taken, which is said', (shape) => {
    const text = configured('((0.),(5.))', '#81,#82') + curveAction('GLOBAL_COORDS', '$', shape);
    expect(loadsOf('IFC4', text)).toEqual([]);
    expect(messages('IFC4', text).join()).toContain(`in a way that is not read (${shape.toLowerCase()})`);
  });

  it('has its further loads at the points of its shape aspect, or at the far end, in IFC2X3', () => {
    const varying = (aspect: string) => `#81=IFCSTRUCTURALLOADLINEARFORCE($,$,$,-300.,$,$,$);
#82=IFCSHAPEASPECT((#33),$,$,.F.,#25);
${onItem(30, `IFCSTRUCTURALLINEARACTIONVARYING('0L00000000000000000000',$,$,$,$,$,$,#80,.GLOBAL_COORDS.,.F.,$,.TRUE_LENGTH.,${aspect},(#81))`)}`;
    for (const aspect of ['#82', '$']) {
      const load = onlyLine(loadsOf('IFC2X3', FORCE + varying(aspect)));
      expectVector(load.to, [4, 0, 3]);
      expectVector(load.forceFrom, [0, 0, -100]);
      expectVector(load.forceTo, [0, 0, -300]);
    }
  });
});

describe('a force on a point', () => {
  const SINGLE = '#80=IFCSTRUCTURALLOADSINGLEFORCE($,7.,$,-9.,$,$,$);';
  const pointAction = (shape: string, coordinates: string) =>
    `IFCSTRUCTURALPOINTACTION('0L00000000000000000000',$,$,$,$,$,${shape},#80,.${coordinates}.,$)`;

  it.each(['IFC2X3', 'IFC4', 'IFC4X3'])('acts at its connection, in %s', (schema) => {
    const [load] = loadsOf(schema, connections(schema, '$') + SINGLE + onItem(41, pointAction('$', 'GLOBAL_COORDS')));
    expect(load).toEqual({ kind: 'point', at: [4, 0, 3], force: [7, 0, -9] });
  });

  it('in local axes turns with the connection', () => {
    const turned = `#90=IFCAXIS2PLACEMENT3D(#12,#13,#91);
#91=IFCDIRECTION((0.,1.,0.));
#41=IFCSTRUCTURALPOINTCONNECTION('0P10000000000000000000',$,'head',$,$,$,#34,$,#90);`;
    const loads = loadsOf('IFC4', turned + SINGLE + onItem(41, pointAction('$', 'LOCAL_COORDS')));
    expectVector(points(loads)[0]?.force, [0, 7, -9]);
  });

  it('on a member acts where the action draws it, and nowhere where it draws nothing', () => {
    expect(loadsOf('IFC4', SINGLE + onItem(30, pointAction('#34', 'GLOBAL_COORDS')))).toMatchObject([
      { at: [4, 0, 3] },
    ]);
    expect(loadsOf('IFC4', SINGLE + onItem(30, pointAction('$', 'GLOBAL_COORDS')))).toEqual([]);
    expect(messages('IFC4', SINGLE + onItem(30, pointAction('$', 'GLOBAL_COORDS'))).join()).toContain(
      'at a point that is not given',
    );
  });

  it.each([
    ['#80=IFCSTRUCTURALLOADTEMPERATURE($,20.,$,$);', 'they are temperatures'],
    ['#80=IFCSTRUCTURALLOADSINGLEDISPLACEMENT($,0.01,$,$,$,$,$);', 'they are settlements'],
    ['#80=IFCSTRUCTURALLOADSINGLEFORCE($,7.,$,$,$,3.,$);', 'they are moments'],
  ])('that is something else besides is said to be: %s', (load, words) => {
    const found = messages('IFC4', connections('IFC4', '$') + load + onItem(41, pointAction('$', 'GLOBAL_COORDS')));
    expect(found.join()).toContain(words);
  });
});

describe('supports', () => {
  const supportsOf = (schema: string, more: string) => member(schema, more).given!.supports;

  it('are numbers in IFC2X3: -1 is rigid, 0 free, any other a spring', () => {
    const condition = '#90=IFCBOUNDARYNODECONDITION($,-1.,0.,2500.,0.,0.,0.);';
    expect(supportsOf('IFC2X3', condition + connections('IFC2X3', '#90'))).toEqual([
      {
        globalId: '0P00000000000000000000',
        name: 'foot',
        at: [0, 0, 0],
        fix: [[1, 0, 0]],
        springs: [{ direction: [0, 0, 1], stiffness: 2500 }],
      },
    ]);
  });

  it.each(['IFC4', 'IFC4X3'])('are truths or stiffnesses in %s', (schema) => {
    const condition = `#90=IFCBOUNDARYNODECONDITION($,IFCBOOLEAN(.T.),IFCBOOLEAN(.F.),IFCLINEARSTIFFNESSMEASURE(2500.),$,$,$);
#91=IFCBOUNDARYNODECONDITIONWARPING($,$,$,IFCBOOLEAN(.T.),$,$,$,IFCBOOLEAN(.T.));`;
    const supports = supportsOf(schema, condition + connections(schema, '#90', '#91'));
    expect(supports.map(({ at, fix, springs }) => ({ at, fix, springs }))).toEqual([
      { at: [0, 0, 0], fix: [[1, 0, 0]], springs: [{ direction: [0, 0, 1], stiffness: 2500 }] },
      { at: [4, 0, 3], fix: [[0, 0, 1]], springs: [] },
    ]);
  });

  it('hold along their own axes where they have some', () => {
    const turned = `#90=IFCBOUNDARYNODECONDITION($,IFCBOOLEAN(.T.),$,$,$,$,$);
#91=IFCAXIS2PLACEMENT3D(#12,#13,#92);
#92=IFCDIRECTION((1.,1.,0.));
#40=IFCSTRUCTURALPOINTCONNECTION('0P00000000000000000000',$,'foot',$,$,$,#32,#90,#91);`;
    const [direction] = supportsOf('IFC4', turned)[0]!.fix;
    expectVector(direction, [Math.SQRT1_2, Math.SQRT1_2, 0]);
  });

  it('that are held against turning say so, and a wholly free condition supports nothing', () => {
    const clamped = '#90=IFCBOUNDARYNODECONDITION($,-1.,-1.,-1.,-1.,0.,0.);';
    expect(messages('IFC2X3', clamped + connections('IFC2X3', '#90')).join()).toContain('held against turning');
    const free = '#90=IFCBOUNDARYNODECONDITION($,0.,0.,0.,0.,0.,0.);';
    expect(supportsOf('IFC2X3', free + connections('IFC2X3', '#90'))).toEqual([]);
  });
});

describe('ends of members', () => {
  const RIGID = 'RIGID_JOINED_MEMBER';
  const [held, free] = ['IFCBOOLEAN(.T.)', 'IFCBOOLEAN(.F.)'];
  const found = (condition: string, kind?: string): string =>
    member(
      'IFC4',
      `${connections('IFC4', '$')}
#95=IFCBOUNDARYNODECONDITION(${condition});
#96=IFCRELCONNECTSSTRUCTURALMEMBER('0T00000000000000000000',$,$,$,#30,#40,#95,$,$,$);
#97=IFCRELCONNECTSSTRUCTURALMEMBER('0T10000000000000000000',$,$,$,#30,#41,#95,$,$,$);`,
      '$',
      kind,
    )
      .findings.map(({ message }) => message)
      .join('\n');

  it('that slide are said to be taken as pinned', () => {
    expect(found(`$,${free},${held},${held},$,$,$`)).toContain('lets slide');
    expect(found(`$,${held},${held},${held},$,$,$`)).not.toContain('lets slide');
  });

  it('that are rigidly joined are said to be taken as pinned, unless both turn freely', () => {
    expect(found('$,$,$,$,$,$,$', RIGID)).toContain('is rigidly joined');
    expect(found(`$,${held},${held},${held},${free},${free},${free}`, RIGID)).not.toContain('is rigidly joined');
    expect(found('$,$,$,$,$,$,$')).not.toContain('is rigidly joined');
  });

  it('with an eccentricity are said to be taken as drawn', () => {
    const text = `${connections('IFC4', '$')}
#95=IFCCONNECTIONPOINTECCENTRICITY(#12,$,0.1,$,$);
#96=IFCRELCONNECTSWITHECCENTRICITY('0T00000000000000000000',$,$,$,#30,#40,$,$,$,$,#95);`;
    expect(member('IFC4', text).findings.map(({ code }) => code)).toContain('offset-joint');
  });

  it.each(['CABLE', 'TENSION_MEMBER', 'COMPRESSION_MEMBER'])(
    'of a %s are said to be of a bar that acts one way',
    (kind) => {
      expect(found('$,$,$,$,$,$,$', kind)).toContain('only in the model');
    },
  );
});

describe('groups', () => {
  const POINT = `${connections('IFC4', '$')}#80=IFCSTRUCTURALLOADSINGLEFORCE($,10.,$,$,$,$,$);
#70=IFCSTRUCTURALPOINTACTION('0L00000000000000000000',$,$,$,$,$,$,#80,.GLOBAL_COORDS.,$);
#71=IFCRELCONNECTSSTRUCTURALACTIVITY('0R00000000000000000000',$,$,$,#41,#70);`;
  const givenOf = (more: string) => member('IFC4', POINT + more).given!;

  it('of loads in no case are a case of their own, the outermost of a nest', () => {
    const { cases } =
      givenOf(`#61=IFCSTRUCTURALLOADGROUP('0G00000000000000000000',$,'all',$,$,.LOAD_GROUP.,.VARIABLE_Q.,.SNOW_S.,$,$);
#62=IFCSTRUCTURALLOADGROUP('0G10000000000000000000',$,'inner',$,$,.LOAD_GROUP.,.VARIABLE_Q.,.SNOW_S.,3.,$);
#63=IFCRELASSIGNSTOGROUP('0R20000000000000000000',$,$,$,(#62),$,#61);
#64=IFCRELASSIGNSTOGROUP('0R30000000000000000000',$,$,$,(#70),$,#62);`);
    expect(cases.map(({ name, nature }) => [name, nature])).toEqual([
      ['case', 'imposed'],
      ['all', 'snow'],
    ]);
    expect(cases[1]!.loads).toMatchObject([{ force: [30, 0, 0] }]);
  });

  it('that run in a circle end', () => {
    const { cases } =
      givenOf(`#61=IFCSTRUCTURALLOADGROUP('0G00000000000000000000',$,'ring',$,$,.LOAD_GROUP.,.NOTDEFINED.,.NOTDEFINED.,$,$);
#62=IFCRELASSIGNSTOGROUP('0R20000000000000000000',$,$,$,(#61,#70),$,#60);
#63=IFCRELASSIGNSTOGROUP('0R30000000000000000000',$,$,$,(#60,#61),$,#61);`);
    expect(cases[0]!.loads).toHaveLength(1);
  });

  it('may be missing: such loads make a case of their own, which is said', () => {
    const model = member('IFC4', POINT);
    expect(model.given!.cases.map(({ name }) => name)).toEqual(['case', 'Loads without a case']);
    expect(model.findings.map(({ message }) => message).join()).toContain('1 load of the model stands in no load case');
  });

  it.each([
    ['.PERMANENT_G.,.NOTDEFINED.', 'permanent'],
    ['.NOTDEFINED.,.DEAD_LOAD_G.', 'permanent'],
    ['.NOTDEFINED.,.COMPLETION_G1.', 'permanent'],
    ['.VARIABLE_Q.,.LIVE_LOAD_Q.', 'imposed'],
    ['.VARIABLE_Q.,.SNOW_S.', 'snow'],
    ['.VARIABLE_Q.,.WIND_W.', 'wind'],
    ['.VARIABLE_Q.,.TEMPERATURE_T.', 'thermal'],
    ['.EXTRAORDINARY_A.,.SNOW_S.', 'accidental'],
    ['.NOTDEFINED.,.EARTHQUAKE_E.', 'accidental'],
    ['.NOTDEFINED.,.NOTDEFINED.', 'imposed'],
  ])('with %s are %s', (types, nature) => {
    const { cases } = givenOf(
      `#61=IFCSTRUCTURALLOADCASE('0G00000000000000000000',$,'c',$,$,.LOAD_CASE.,${types},$,$,$);\n#62=IFCRELASSIGNSTOGROUP('0R20000000000000000000',$,$,$,(#70),$,#61);`,
    );
    expect(cases.find(({ name }) => name === 'c')!.nature).toBe(nature);
  });

  it.each([
    ["'ULS'", '1.35', 'strength'],
    ["'SLS, quasi-permanent'", '1.35', 'quasi-permanent'],
    ["'SLS frequent'", '1.', 'frequent'],
    ["'serviceability'", '1.', 'characteristic'],
    ["'EQU'", '0.9', 'equilibrium'],
    ['$', '1.35', 'strength'],
    ['$', '1.', 'characteristic'],
  ])('of a combination for the purpose %s with the factor %s are of the limit %s', (purpose, factor, limit) => {
    const { combinations } = givenOf(`#61=IFCRELASSIGNSTOGROUP('0R20000000000000000000',$,$,$,(#70),$,#60);
#62=IFCSTRUCTURALLOADGROUP('0G00000000000000000000',$,'comb',$,$,.LOAD_COMBINATION.,.NOTDEFINED.,.NOTDEFINED.,$,${purpose});
#63=IFCRELASSIGNSTOGROUPBYFACTOR('0R30000000000000000000',$,$,$,(#60),$,#62,${factor});`);
    expect(combinations).toEqual([{ name: 'comb', limit, factors: { case: Number(factor) } }]);
  });
});
