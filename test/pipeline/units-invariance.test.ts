import { describe, expect, it } from 'vitest';
import type { Member } from '../../src/domain/member.ts';
import { subtract, unit, type Vec3 } from '../../src/domain/vector.ts';
import { runModel } from '../../src/pipeline.ts';
import { flatTrusses } from '../support/flat-trusses.ts';

const UNITS = {
  mm: { size: 1e-3, line: '#1=IFCSIUNIT(*,.LENGTHUNIT.,.MILLI.,.METRE.);' },
  m: { size: 1, line: '#1=IFCSIUNIT(*,.LENGTHUNIT.,$,.METRE.);' },
  inch: {
    size: 0.0254,
    line: `#1=IFCCONVERSIONBASEDUNIT(#91,.LENGTHUNIT.,'INCH',#92);
#91=IFCDIMENSIONALEXPONENTS(1,0,0,0,0,0,0);
#92=IFCMEASUREWITHUNIT(IFCLENGTHMEASURE(0.0254),#93);
#93=IFCSIUNIT(*,.LENGTHUNIT.,$,.METRE.);`,
  },
} as const;

const real = (x: number): string => {
  const text = x.toFixed(9);
  return text.replace(/0+$/, '');
};

/** The members as extrusions in a model of this length unit. */
function modelIn({ size, line }: { readonly size: number; readonly line: string }, members: readonly Member[]): string {
  const triple = (v: Vec3, k = 1) => `(${v.map((x) => real(x / k)).join(',')})`;
  const bodies = members.map((one, i) => {
    const [from, to] = one.axis;
    const along = subtract(to, from);
    const direction = unit(along) as Vec3;
    const id = 100 + 20 * i;
    const side = Math.abs(direction[1]) > 0.9 ? '#7' : '#8';
    const { depth = 0.1, width = 0.1 } = one.section ?? {};
    const mark = String(i).padStart(3, '0');
    return `#${id}=IFCCARTESIANPOINT(${triple(from, size)});
#${id + 1}=IFCDIRECTION(${triple(direction)});
#${id + 2}=IFCAXIS2PLACEMENT3D(#${id},#${id + 1},${side});
#${id + 3}=IFCRECTANGLEHOLLOWPROFILEDEF(.AREA.,'RHS',$,${real(width / size)},${real(depth / size)},${real(0.005 / size)},$,$);
#${id + 4}=IFCEXTRUDEDAREASOLID(#${id + 3},#${id + 2},#9,${real(Math.hypot(...along) / size)});
#${id + 5}=IFCSHAPEREPRESENTATION(#5,'Body','SweptSolid',(#${id + 4}));
#${id + 6}=IFCPRODUCTDEFINITIONSHAPE($,$,(#${id + 5}));
#${id + 7}=IFCMEMBER('0000000000000000000${mark}',$,'${one.globalId}',$,$,#6,#${id + 6},'${one.globalId}',.MEMBER.);`;
  });
  return `ISO-10303-21;
HEADER;
FILE_DESCRIPTION((''),'2;1');
FILE_NAME('','2020-01-01T00:00:00',(''),(''),'','','');
FILE_SCHEMA(('IFC4'));
ENDSEC;
DATA;
${line}
#2=IFCUNITASSIGNMENT((#1));
#3=IFCCARTESIANPOINT((0.,0.,0.));
#4=IFCAXIS2PLACEMENT3D(#3,$,$);
#5=IFCGEOMETRICREPRESENTATIONCONTEXT($,'Model',3,1.E-05,#4,$);
#6=IFCLOCALPLACEMENT($,#4);
#7=IFCDIRECTION((1.,0.,0.));
#8=IFCDIRECTION((0.,1.,0.));
#9=IFCDIRECTION((0.,0.,1.));
#10=IFCPROJECT('1000000000000000000000',$,'Units',$,$,$,$,(#5),#2);
${bodies.join('\n')}
ENDSEC;
END-ISO-10303-21;
`;
}

describe('the unit of a model', () => {
  it('does not change its truss: millimetres, metres and inches', async () => {
    const drawn = flatTrusses(2, 0.09);
    const told = await Promise.all(
      Object.values(UNITS).map(async (of) => {
        const { result } = await runModel(Buffer.from(modelIn(of, drawn)), { extent: 'survey' });
        const marks = new Map(result.members.map(({ globalId, tag }) => [globalId, tag]));
        return {
          bars: result.bars.map(({ name, from, to, length }) => `${name} ${from} ${to} ${length.toFixed(6)}`),
          nodes: result.nodes.map(({ members }) =>
            members
              .map((id) => marks.get(id))
              .sort()
              .join('+'),
          ),
          findings: result.findings.map(({ code }) => code),
        };
      }),
    );
    expect(told[0]!.bars).toHaveLength(2 * (4 + 4 + 5 + 4) + 5);
    expect(told[1]).toEqual(told[0]);
    expect(told[2]).toEqual(told[0]);
  });
});
