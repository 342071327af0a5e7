// A synthetic IFC4 model of any size for benchmarks: a grid of members, each with placement, axis, body, type and tag,
// about 17 instances and 1.1 kB a member, as exporters write them.

const HEAD = `ISO-10303-21;
HEADER;
FILE_DESCRIPTION(('ViewDefinition [ReferenceView]'),'2;1');
FILE_NAME('synthetic.ifc','2020-01-01T00:00:00',(''),(''),'','','');
FILE_SCHEMA(('IFC4'));
ENDSEC;
DATA;
#1=IFCSIUNIT(*,.LENGTHUNIT.,.MILLI.,.METRE.);
#2=IFCSIUNIT(*,.PLANEANGLEUNIT.,$,.RADIAN.);
#3=IFCUNITASSIGNMENT((#1,#2));
#4=IFCCARTESIANPOINT((0.,0.,0.));
#5=IFCDIRECTION((0.,0.,1.));
#6=IFCDIRECTION((1.,0.,0.));
#7=IFCAXIS2PLACEMENT3D(#4,#5,#6);
#8=IFCGEOMETRICREPRESENTATIONCONTEXT($,'Model',3,1.E-05,#7,$);
#9=IFCPROJECT('0000000000000000000001',$,'Synthetic',$,$,$,$,(#8),#3);
#10=IFCLOCALPLACEMENT($,#7);
#11=IFCBUILDINGSTOREY('0000000000000000000002',$,'Roof',$,$,#10,$,$,.ELEMENT.,0.);
#12=IFCMATERIAL('S355',$,'steel');
#13=IFCMEMBERTYPE('0000000000000000000003',$,'Tube',$,$,$,$,$,$,.MEMBER.);
`;
const FIRST_FREE = 40;
const SIZES = [60.3, 76.1, 88.9, 101.6, 114.3, 139.7, 168.3, 193.7];
const DIGITS = '0123456789ABCDEFGHIJKLMNOPQRSTUVWXYZabcdefghijklmnopqrstuvwxyz_$';

function globalId(number) {
  let text = '';
  for (let n = number + 4096, i = 0; i < 21; i++, n = Math.floor(n / 64)) text = DIGITS[n % 64] + text;
  return `0${text}`;
}

/** Bytes of a model with `count` members. */
export function syntheticModel(count) {
  const chunks = [HEAD];
  SIZES.forEach((size, i) => {
    chunks.push(`#${20 + i}=IFCCIRCLEHOLLOWPROFILEDEF(.AREA.,'CHS ${size}x5',$,${size / 2},5.);\n`);
  });
  const across = Math.ceil(Math.sqrt(count / 3));
  const members = [];
  let lines = '';
  for (let k = 0; k < count; k++) {
    const cell = Math.floor(k / 3);
    const [x, y] = [2000 * (cell % across), 2000 * Math.floor(cell / across)];
    const [dx, dy] = [
      [1, 0],
      [0, 1],
      [Math.SQRT1_2, Math.SQRT1_2],
    ][k % 3];
    const length = k % 3 === 2 ? 2000 * Math.SQRT2 : 2000;
    const id = FIRST_FREE + 20 * k;
    members.push(`#${id + 16}`);
    lines += `#${id}=IFCCARTESIANPOINT((${x}.,${y}.,6000.));
#${id + 1}=IFCDIRECTION((${dx.toFixed(15)},${dy.toFixed(15)},0.));
#${id + 2}=IFCDIRECTION((0.,0.,1.));
#${id + 3}=IFCAXIS2PLACEMENT3D(#${id},#${id + 1},#${id + 2});
#${id + 4}=IFCLOCALPLACEMENT(#10,#${id + 3});
#${id + 5}=IFCCARTESIANPOINT((0.,0.,0.));
#${id + 6}=IFCCARTESIANPOINT((0.,0.,${length.toFixed(9)}));
#${id + 7}=IFCPOLYLINE((#${id + 5},#${id + 6}));
#${id + 8}=IFCSHAPEREPRESENTATION(#8,'Axis','Curve3D',(#${id + 7}));
#${id + 9}=IFCCARTESIANPOINT((0.,0.,0.));
#${id + 10}=IFCDIRECTION((0.,0.,1.));
#${id + 11}=IFCDIRECTION((1.,0.,0.));
#${id + 12}=IFCAXIS2PLACEMENT3D(#${id + 9},#${id + 10},#${id + 11});
#${id + 13}=IFCEXTRUDEDAREASOLID(#${20 + (k % 8)},#${id + 12},#5,${length.toFixed(9)});
#${id + 14}=IFCSHAPEREPRESENTATION(#8,'Body','SweptSolid',(#${id + 13}));
#${id + 15}=IFCPRODUCTDEFINITIONSHAPE($,$,(#${id + 8},#${id + 14}));
#${id + 16}=IFCMEMBER('${globalId(k)}',$,'Member ${k}',$,'Tube',#${id + 4},#${id + 15},'M${k}',.MEMBER.);
`;
    if (lines.length > 1 << 20) {
      chunks.push(lines);
      lines = '';
    }
  }
  const last = FIRST_FREE + 20 * count;
  const all = members.join(',');
  chunks.push(lines);
  chunks.push(`#${last}=IFCRELASSOCIATESMATERIAL('0000000000000000000011',$,$,$,(${all}),#12);
#${last + 1}=IFCRELCONTAINEDINSPATIALSTRUCTURE('0000000000000000000012',$,$,$,(${all}),#11);
#${last + 2}=IFCRELDEFINESBYTYPE('0000000000000000000013',$,$,$,(${all}),#13);
ENDSEC;
END-ISO-10303-21;
`);
  return Buffer.concat(chunks.map((text) => Buffer.from(text, 'latin1')));
}
