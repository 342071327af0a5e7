import { cross, distance, subtract, unit, type Vec3 } from '../../../src/domain/vector.ts';
import { firstAcross } from '../../../src/importer/transform.ts';
import { stepText } from '../support/model-text.ts';

/**
 * One small tower of bars written twice: as a structural analysis view in the manner of each schema, and as physical members. A
 * prism on a triangle with one diagonal more than it needs, so that forces depend on the sections too.
 */
export const TOWER = {
  /** Metres, in the model's own axes. */
  nodes: [
    [0, 0, 0],
    [4, 0, 0],
    [2, 3, 0],
    [0, 0, 5],
    [4, 0, 5],
    [2, 3, 5],
  ] as readonly Vec3[],
  bars: [
    [0, 3],
    [1, 4],
    [2, 5],
    [3, 4],
    [4, 5],
    [5, 3],
    [0, 4],
    [1, 5],
    [2, 3],
    [1, 3],
    [2, 4],
  ] as readonly (readonly [number, number])[],
  /** Nodes that stand on the ground; the third one slides along y on a spring. */
  supports: [0, 1, 2],
  /** N/m, along y at node 2. */
  spring: 2e6,
  /** N/m downwards along bar 3, N along x at node 5. */
  lineLoad: 3000,
  pointLoad: 12000,
};

/** The model's own axes in the world: 30 degrees about z, then moved. */
const [C, S] = [Math.cos(Math.PI / 6), Math.sin(Math.PI / 6)];
const ORIGIN_OF_MODEL: Vec3 = [10, 20, 5];
export const worldDirection = ([x, y, z]: Vec3): Vec3 => [C * x - S * y, S * x + C * y, z];
export const worldPoint = (p: Vec3): Vec3 => {
  const d = worldDirection(p);
  return [d[0] + ORIGIN_OF_MODEL[0], d[1] + ORIGIN_OF_MODEL[1], d[2] + ORIGIN_OF_MODEL[2]];
};

export type Schema = 'IFC2X3' | 'IFC4' | 'IFC4X3';

/** A unit system: its instances (#2 and what it needs) and what one of its units is in SI. */
interface UnitSystem {
  readonly data: string;
  readonly length: number;
  readonly force: number;
}

const SYSTEMS: Readonly<Record<Schema, UnitSystem>> = {
  IFC2X3: {
    data: `#2=IFCUNITASSIGNMENT((#3,#4,#5));
#3=IFCSIUNIT(*,.LENGTHUNIT.,$,.METRE.);
#4=IFCSIUNIT(*,.PLANEANGLEUNIT.,$,.RADIAN.);
#5=IFCSIUNIT(*,.FORCEUNIT.,$,.NEWTON.);`,
    length: 1,
    force: 1,
  },
  IFC4: {
    data: `#2=IFCUNITASSIGNMENT((#3,#4,#5,#6));
#3=IFCSIUNIT(*,.LENGTHUNIT.,.MILLI.,.METRE.);
#4=IFCSIUNIT(*,.PLANEANGLEUNIT.,$,.RADIAN.);
#5=IFCSIUNIT(*,.FORCEUNIT.,.KILO.,.NEWTON.);
#6=IFCDERIVEDUNIT((#7,#8),.LINEARFORCEUNIT.,$);
#7=IFCDERIVEDUNITELEMENT(#5,1);
#8=IFCDERIVEDUNITELEMENT(#3,-1);`,
    length: 1e-3,
    force: 1e3,
  },
  IFC4X3: {
    data: `#2=IFCUNITASSIGNMENT((#3,#4,#5));
#3=IFCCONVERSIONBASEDUNIT(#900,.LENGTHUNIT.,'INCH',#901);
#900=IFCDIMENSIONALEXPONENTS(1,0,0,0,0,0,0);
#901=IFCMEASUREWITHUNIT(IFCLENGTHMEASURE(0.0254),#902);
#902=IFCSIUNIT(*,.LENGTHUNIT.,$,.METRE.);
#4=IFCSIUNIT(*,.PLANEANGLEUNIT.,$,.RADIAN.);
#5=IFCCONVERSIONBASEDUNIT(#903,.FORCEUNIT.,'KIP',#904);
#903=IFCDIMENSIONALEXPONENTS(1,1,-2,0,0,0,0);
#904=IFCMEASUREWITHUNIT(IFCFORCEMEASURE(4448.2216152605),#905);
#905=IFCSIUNIT(*,.FORCEUNIT.,$,.NEWTON.);`,
    length: 0.0254,
    force: 4448.2216152605,
  },
};

const real = (value: number): string => {
  const text = value.toPrecision(15).replace(/e\+?/, 'E');
  return /[.E]/.test(text) ? (text.includes('.') ? text : text.replace('E', '.E')) : `${text}.`;
};
const list = (v: readonly number[]): string => `(${v.map(real).join(',')})`;

/** Project, units, context and a placement (#16) that turns and moves the model's axes. */
function frameOf(schema: Schema): { data: string; system: UnitSystem; lengths: (v: readonly number[]) => string } {
  const system = SYSTEMS[schema];
  const lengths = (v: readonly number[]) => list(v.map((value) => value / system.length));
  const data = `
#1=IFCPROJECT('0aaaaaaaaaaaaaaaaaaaaa',$,'Tower',$,$,$,$,(#10),#2);
${system.data}
#10=IFCGEOMETRICREPRESENTATIONCONTEXT($,'Model',3,1.E-5,#11,$);
#11=IFCAXIS2PLACEMENT3D(#12,$,$);
#12=IFCCARTESIANPOINT((0.,0.,0.));
#13=IFCDIRECTION((0.,0.,1.));
#14=IFCDIRECTION((1.,0.,0.));
#15=IFCDIRECTION(${list([C, S, 0])});
#16=IFCLOCALPLACEMENT($,#17);
#17=IFCAXIS2PLACEMENT3D(#18,#13,#15);
#18=IFCCARTESIANPOINT(${lengths(ORIGIN_OF_MODEL)});
#20=IFCRECTANGLEPROFILEDEF(.AREA.,'Flat 40x80',$,${real(0.04 / system.length)},${real(0.08 / system.length)});
#21=IFCMATERIAL('S355'${schema === 'IFC2X3' ? '' : ',$,$'});`;
  return { data, system, lengths };
}

const globalId = (mark: string): string => mark.padStart(22, '0');
export const barName = (i: number): string => `bar ${i + 1}`;
export const memberId = (i: number): string => globalId(`M${i}`);

/** The tower as the analysis view that a writer of this schema would give. */
export function towerView(schema: Schema): string {
  const { data, system, lengths } = frameOf(schema);
  const isOld = schema === 'IFC2X3';
  const force = (value: number) => real(value / system.force);
  const perLength = (value: number) => real((value * system.length) / system.force);
  const shared = isOld ? '' : ',#16';
  const placement = isOld ? '#16' : '$';
  const lines = [data];
  const put = (line: string) => lines.push(line);

  TOWER.nodes.forEach((node, i) => {
    const condition = TOWER.supports.includes(i) ? (i === 2 ? '#31' : '#30') : '$';
    put(`#${100 + i}=IFCCARTESIANPOINT(${lengths(node)});
#${110 + i}=IFCVERTEXPOINT(#${100 + i});
#${120 + i}=IFCTOPOLOGYREPRESENTATION(#10,'Reference','Vertex',(#${110 + i}));
#${130 + i}=IFCPRODUCTDEFINITIONSHAPE($,$,(#${120 + i}));
#${140 + i}=IFCSTRUCTURALPOINTCONNECTION('${globalId(`N${i}`)}',$,'N${i}',$,$,${placement},#${130 + i},${condition}${isOld ? '' : ',$'});`);
  });
  if (isOld) {
    put(`#30=IFCBOUNDARYNODECONDITION('pinned',-1.,-1.,-1.,0.,0.,0.);
#31=IFCBOUNDARYNODECONDITION('spring',0.,${perLength(TOWER.spring)},-1.,0.,0.,0.);`);
  } else {
    put(`#30=IFCBOUNDARYNODECONDITION('pinned',IFCBOOLEAN(.T.),IFCBOOLEAN(.T.),IFCBOOLEAN(.T.),IFCBOOLEAN(.F.),IFCBOOLEAN(.F.),IFCBOOLEAN(.F.));
#31=IFCBOUNDARYNODECONDITION('spring',IFCBOOLEAN(.F.),IFCLINEARSTIFFNESSMEASURE(${perLength(TOWER.spring)}),IFCBOOLEAN(.T.),$,$,$);`);
  }
  TOWER.bars.forEach(([from, to], i) => {
    // Every other bar is drawn against its edge.
    const edge = i % 2 === 0 ? `#${1000 + i}` : `#${1100 + i}`;
    put(`#${1000 + i}=IFCEDGE(${i % 2 === 0 ? `#${110 + from},#${110 + to}` : `#${110 + to},#${110 + from}`});
#${1100 + i}=IFCORIENTEDEDGE(*,*,#${1000 + i},.F.);
#${1200 + i}=IFCTOPOLOGYREPRESENTATION(#10,'Reference','Edge',(${edge}));
#${1300 + i}=IFCPRODUCTDEFINITIONSHAPE($,$,(#${1200 + i}));
#${1400 + i}=IFCSTRUCTURALCURVEMEMBER('${memberId(i)}',$,'${barName(i)}',$,$,${placement},#${1300 + i},.PIN_JOINED_MEMBER.${isOld ? '' : ',#32'});`);
    for (const [k, node] of [from, to].entries()) {
      put(
        `#${1500 + 2 * i + k}=IFCRELCONNECTSSTRUCTURALMEMBER('${globalId(`R${i}${k}`)}',$,$,$,#${1400 + i},#${140 + node},$,$,$,$);`,
      );
    }
  });
  const members = TOWER.bars.map((_, i) => `#${1400 + i}`).join(',');
  // Neither along a bar nor across all of them: what is across each is taken.
  if (!isOld) put('#32=IFCDIRECTION((0.3,0.2,0.9));');
  if (isOld) {
    put(`#40=IFCRELASSOCIATESPROFILEPROPERTIES('${globalId('PP')}',$,$,$,(${members}),#41,$,$);
#41=IFCGENERALPROFILEPROPERTIES('Flat 40x80',#20,$,$,$,$,$);
#42=IFCRELASSOCIATESMATERIAL('${globalId('RM')}',$,$,$,(${members}),#21);`);
  } else {
    put(`#40=IFCMATERIALPROFILESETUSAGE(#41,$,$);
#41=IFCMATERIALPROFILESET($,$,(#43),$);
#43=IFCMATERIALPROFILE($,$,#21,#20,$,$);
#42=IFCRELASSOCIATESMATERIAL('${globalId('RM')}',$,$,$,(${members}),#40);`);
  }
  const connections = TOWER.nodes.map((_, i) => `#${140 + i}`).join(',');
  put(`#50=IFCSTRUCTURALANALYSISMODEL('${globalId('AM')}',$,'Tower',$,$,.LOADING_3D.,$,(#60,#61),$${shared});
#51=IFCRELASSIGNSTOGROUP('${globalId('RA')}',$,$,$,(${members},${connections}),$,#50);`);
  put(isOld ? oldLoads(force, perLength) : newLoads(force, perLength));
  return stepText(lines.join('\n'), schema);
}

const TAIL_OF_LOADS = (activity: string, item: number, i: number) =>
  `#${310 + i}=IFCRELCONNECTSSTRUCTURALACTIVITY('${globalId(`A${i}`)}',$,$,$,#${item},#${activity});`;

function oldLoads(force: (v: number) => string, perLength: (v: number) => string): string {
  return `#300=IFCSTRUCTURALLOADLINEARFORCE($,$,$,${perLength(-TOWER.lineLoad)},$,$,$);
#301=IFCSTRUCTURALLINEARACTION('${globalId('L')}',$,$,$,$,$,$,#300,.GLOBAL_COORDS.,.F.,$,.TRUE_LENGTH.);
${TAIL_OF_LOADS('301', 1403, 0)}
#302=IFCSTRUCTURALLOADSINGLEFORCE($,${force(TOWER.pointLoad)},$,$,$,$,$);
#303=IFCSTRUCTURALPOINTACTION('${globalId('P')}',$,$,$,$,$,$,#302,.GLOBAL_COORDS.,.F.,$);
${TAIL_OF_LOADS('303', 145, 1)}
#60=IFCSTRUCTURALLOADGROUP('${globalId('C1')}',$,'dead',$,$,.LOAD_CASE.,.PERMANENT_G.,.DEAD_LOAD_G.,$,$);
#61=IFCSTRUCTURALLOADGROUP('${globalId('C2')}',$,'wind',$,$,.LOAD_CASE.,.VARIABLE_Q.,.WIND_W.,$,$);
#62=IFCRELASSIGNSTOGROUP('${globalId('R1')}',$,$,$,(#301),$,#60);
#63=IFCRELASSIGNSTOGROUP('${globalId('R2')}',$,$,$,(#303),$,#61);
#64=IFCSTRUCTURALLOADGROUP('${globalId('C3')}',$,'most',$,$,.LOAD_COMBINATION.,.NOTDEFINED.,.NOTDEFINED.,1.,'ULS');
#65=IFCSTRUCTURALLOADGROUP('${globalId('C4')}',$,'dead times 1.35',$,$,.LOAD_COMBINATION_GROUP.,.NOTDEFINED.,.NOTDEFINED.,1.35,$);
#66=IFCSTRUCTURALLOADGROUP('${globalId('C5')}',$,'wind times 1.5',$,$,.LOAD_COMBINATION_GROUP.,.NOTDEFINED.,.NOTDEFINED.,1.5,$);
#67=IFCRELASSIGNSTOGROUP('${globalId('R3')}',$,$,$,(#60),$,#65);
#68=IFCRELASSIGNSTOGROUP('${globalId('R4')}',$,$,$,(#61),$,#66);
#69=IFCRELASSIGNSTOGROUP('${globalId('R5')}',$,$,$,(#65,#66),$,#64);`;
}

/** The wind is half in a load group that counts twice. */
function newLoads(force: (v: number) => string, perLength: (v: number) => string): string {
  return `#300=IFCSTRUCTURALLOADLINEARFORCE($,$,$,${perLength(-TOWER.lineLoad)},$,$,$);
#301=IFCSTRUCTURALLINEARACTION('${globalId('L')}',$,$,$,$,$,$,#300,.GLOBAL_COORDS.,$,.TRUE_LENGTH.,.CONST.);
${TAIL_OF_LOADS('301', 1403, 0)}
#302=IFCSTRUCTURALLOADSINGLEFORCE($,${force(TOWER.pointLoad / 2)},$,$,$,$,$);
#303=IFCSTRUCTURALPOINTACTION('${globalId('P')}',$,$,$,$,$,$,#302,.GLOBAL_COORDS.,$);
${TAIL_OF_LOADS('303', 145, 1)}
#60=IFCSTRUCTURALLOADCASE('${globalId('C1')}',$,'dead',$,$,.LOAD_CASE.,.PERMANENT_G.,.DEAD_LOAD_G.,1.,$,(0.,0.,-1.));
#61=IFCSTRUCTURALLOADCASE('${globalId('C2')}',$,'wind',$,$,.LOAD_CASE.,.VARIABLE_Q.,.WIND_W.,1.,$,$);
#70=IFCSTRUCTURALLOADGROUP('${globalId('G')}',$,'gusts',$,$,.LOAD_GROUP.,.VARIABLE_Q.,.WIND_W.,2.,$);
#62=IFCRELASSIGNSTOGROUP('${globalId('R1')}',$,$,$,(#301),$,#60);
#63=IFCRELASSIGNSTOGROUP('${globalId('R2')}',$,$,$,(#303),$,#70);
#71=IFCRELASSIGNSTOGROUP('${globalId('R6')}',$,$,$,(#70),$,#61);
#64=IFCSTRUCTURALLOADGROUP('${globalId('C3')}',$,'most',$,$,.LOAD_COMBINATION.,.NOTDEFINED.,.NOTDEFINED.,1.,'ULS');
#67=IFCRELASSIGNSTOGROUPBYFACTOR('${globalId('R3')}',$,$,$,(#60),$,#64,1.35);
#68=IFCRELASSIGNSTOGROUPBYFACTOR('${globalId('R4')}',$,$,$,(#61),$,#64,1.5);`;
}

/** The same bars as extruded IfcMember from node to node. */
export function towerPhysical(schema: Schema): string {
  const { data, lengths, system } = frameOf(schema);
  const lines = [data];
  TOWER.bars.forEach(([a, b], i) => {
    const [from, to] = [TOWER.nodes[a]!, TOWER.nodes[b]!];
    const along = unit(subtract(to, from)) as Vec3;
    // As the view has it: the section's z is what is across the bar of one direction; the profile's x is z cross along.
    const z = firstAcross(along, [0.3, 0.2, 0.9]);
    const id = 1000 + 10 * i;
    lines.push(`#${id}=IFCMEMBER('${memberId(i)}',$,'${barName(i)}',$,$,#${id + 1},#${id + 5},$${schema === 'IFC2X3' ? '' : ',.MEMBER.'});
#${id + 1}=IFCLOCALPLACEMENT(#16,#${id + 2});
#${id + 2}=IFCAXIS2PLACEMENT3D(#${id + 3},#${id + 4},#${id + 8});
#${id + 3}=IFCCARTESIANPOINT(${lengths(from)});
#${id + 4}=IFCDIRECTION(${list(along)});
#${id + 5}=IFCPRODUCTDEFINITIONSHAPE($,$,(#${id + 6}));
#${id + 6}=IFCSHAPEREPRESENTATION(#10,'Body','SweptSolid',(#${id + 7}));
#${id + 7}=IFCEXTRUDEDAREASOLID(#20,$,#13,${real(distance(from, to) / system.length)});
#${id + 8}=IFCDIRECTION(${list(cross(z, along))});`);
  });
  const members = TOWER.bars.map((_, i) => `#${1000 + 10 * i}`).join(',');
  lines.push(`#42=IFCRELASSOCIATESMATERIAL('${globalId('RM')}',$,$,$,(${members}),#21);`);
  return stepText(lines.join('\n'), schema);
}

/** What the view says, as a brief for the physical model; the spring is left out, since briefs hold along x, y and z. */
export function towerBrief(schema: Schema): string {
  const at = (i: number) => `{near: [${worldPoint(TOWER.nodes[i]!).join(', ')}], within: 1 mm}`;
  const wind = worldDirection([TOWER.pointLoad, 0, 0]);
  const weight = schema === 'IFC2X3' ? '' : '- {selfWeight: 1}';
  return `pinwright: 1
supports:
  - {at: [${at(0)}, ${at(1)}], fix: xyz}
  - {at: ${at(2)}, fix: z}
cases:
  - name: dead
    nature: permanent
    loads:
      - {line: [0, 0, ${-TOWER.lineLoad}], on: {name: "${barName(3)}"}, per: length}
      ${weight}
  - name: wind
    nature: wind
    loads:
      - {point: [${wind.join(', ')}], at: ${at(5)}}
combinations:
  - {name: most, limit: strength, factors: {dead: 1.35, wind: 1.5}}
`;
}
