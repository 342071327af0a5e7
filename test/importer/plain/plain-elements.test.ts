import { readFileSync } from 'node:fs';
import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { recordOf } from '../../../src/domain/member.ts';
import { IMPORT_DEFAULTS, type ImportOptions } from '../../../src/importer/options.ts';
import { PlainElements } from '../../../src/importer/plain/plain-elements.ts';
import { readPhysicalModel } from '../../../src/importer/read-physical-model.ts';
import type { ImportedModel } from '../../../src/importer/types.ts';
import { openStep, type StepFile } from '../../../src/step/step-file.ts';
import { fixture, PUBLIC_STEP_MODELS, publicModel } from '../../support/shared.ts';
import { COMMON, stepText } from '../support/model-text.ts';

/** Everything that a model says, as plain values; -0 is told from 0. */
const said = ({ members, findings, placeOf }: ImportedModel) => ({
  members: members.map((member) => ({ ...recordOf(member), facts: null, place: placeOf(member.axis[0]) })),
  findings,
});

/** The same file read with and without the short way; how many elements went it. */
function readBothWays(open: () => StepFile, options: Partial<ImportOptions> = {}) {
  const chosen = { ...IMPORT_DEFAULTS, ...options };
  let count = 0;
  const short = readPhysicalModel(open(), chosen, undefined, (sources) => {
    const plain = new PlainElements(sources);
    return {
      read(id) {
        const globalId = plain.read(id);
        if (globalId !== null) count++;
        return globalId;
      },
    };
  });
  const general = readPhysicalModel(open(), chosen, undefined, () => ({ read: () => null }));
  return { short: said(short), general: said(general), count };
}

describe('the short way of plain elements', () => {
  const files = [
    ...['boat-hall-a.ifc', 'boat-hall-b.ifc', 'boat-hall-faults.ifc'].map((name) => [name, fixture(name)] as const),
    ...PUBLIC_STEP_MODELS.map((name) => [name, publicModel(name)] as const),
  ];
  for (const [name, path] of files) {
    for (const axes of ['given', 'centroid'] as const) {
      it.skipIf(path === null)(`gives the very bits of the general way in ${name}, with ${axes} axes`, () => {
        const bytes = readFileSync(path!);
        const { short, general } = readBothWays(() => openStep(bytes), { axes });
        expect(short).toEqual(general);
      });
    }
  }

  it('is gone by nearly all elements of an ordinary model', () => {
    const { count, general } = readBothWays(() => openStep(readFileSync(fixture('boat-hall-a.ifc'))));
    expect(count).toBeGreaterThan(0.8 * general.members.length);
  });

  it('gives the very bits of the general way whatever numbers, directions and writings an element is made of', () => {
    let shortCount = 0;
    fc.assert(
      fc.property(fc.array(element, { minLength: 4, maxLength: 12 }), fc.boolean(), (elements, isGiven) => {
        const bytes = new TextEncoder().encode(stepText(textOf(elements)));
        const axes = isGiven ? 'given' : 'centroid';
        const { short, general, count } = readBothWays(() => openStep(bytes), { axes });
        shortCount += count;
        expect(short).toEqual(general);
      }),
      { numRuns: 150 },
    );
    expect(shortCount).toBeGreaterThan(200);
  });
});

/** As exporters write numbers, and as they should not. */
const number = fc.oneof(
  { arbitrary: fc.integer({ min: -9000, max: 9000 }).map((n) => `${n}.`), weight: 6 },
  { arbitrary: fc.double({ min: -1e4, max: 1e4, noNaN: true }).map((n) => n.toFixed(9)), weight: 4 },
  {
    arbitrary: fc.constantFrom('0.', '-0.', '1.', '-1.', '1.E-3', '2.5E+02', '7', ' 3.', '1.e2', '1E999', '$', '.5'),
    weight: 1,
  },
);
const component = fc.constantFrom('0.', '0.', '0.', '1.', '1.', '-1.', '-0.', '0.6', '0.8', '0.707106781186548');
const triple = (of: fc.Arbitrary<string>) =>
  fc.oneof(
    { arbitrary: fc.tuple(of, of, of).map((numbers) => `(${numbers.join(',')})`), weight: 30 },
    { arbitrary: fc.tuple(of, of).map((numbers) => `(${numbers.join(', ')})`), weight: 1 },
  );
const direction = fc.option(
  fc.oneof(fc.constantFrom('(0.,0.,1.)', '(1.,0.,0.)', '(0.,0.,1.)', '(0.,1.,0.)'), triple(component)),
  { freq: 4 },
);
const axes = fc.record({ location: triple(number), axis: direction, reference: direction });
const plainly = <T>(usual: T, ...rare: T[]) =>
  fc.oneof({ arbitrary: fc.constant(usual), weight: 12 }, { arbitrary: fc.constantFrom(usual, ...rare), weight: 1 });

const element = fc.record({
  placement: axes,
  position: fc.oneof(fc.constant(null), axes),
  /** Of the drawn line; null where its ends are the body's. */
  line: fc.oneof(
    { arbitrary: fc.constant(null), weight: 4 },
    { arbitrary: fc.tuple(triple(number), triple(number)), weight: 1 },
  ),
  hasLine: plainly(true, false),
  depth: plainly('2000.', '-350.5', '0.', '$', '1E999', "'2'"),
  sweep: fc.option(direction, { freq: 1, nil: '(0.,0.,1.)' }),
  profile: plainly(20, 21, 22, 23, 999),
  parent: plainly('#16', '$', '#17', '#998'),
  globalId: plainly(true, false),
  name: plainly("'B'", '$', "'it''s'", "'\\X2\\00E4\\X0\\'", "'\\S\\'", "'bad \\X2\\00'"),
  material: plainly(30, 31, null),
  comma: plainly(',', ', ', ',/* here */', ',\n  '),
  body: plainly("'Body'", "'body'", "'Axis'", '$'),
  extra: plainly('', ',#20'),
});

type Element = typeof element extends fc.Arbitrary<infer T> ? T : never;

const SHARED = `${COMMON}
#17=IFCLOCALPLACEMENT(#16,#18);
#18=IFCAXIS2PLACEMENT3D(#19,#15,#13);
#19=IFCCARTESIANPOINT((100.,-200.,3000.));
#21=IFCLSHAPEPROFILEDEF(.AREA.,'L 100x65x8',$,100.,65.,8.,$,$,$);
#22=IFCCIRCLEHOLLOWPROFILEDEF(.AREA.,'CHS',#24,60.,5.);
#23=IFCCIRCLEPROFILEDEF(.AREA.,'HEA 200',$,10.);
#24=IFCAXIS2PLACEMENT2D(#25,#26);
#25=IFCCARTESIANPOINT((10.,20.));
#26=IFCDIRECTION((0.6,0.8));
#30=IFCMATERIAL('S355',$,$);
#31=IFCMATERIAL('Unknown',$,$);
`;

function textOf(elements: readonly Element[]): string {
  return SHARED + elements.map(elementText).join('');
}

function elementText(e: Element, index: number): string {
  const n = 1000 + 100 * index;
  const axesText = (at: number, { location, axis, reference }: Element['placement']) =>
    `#${at}=IFCAXIS2PLACEMENT3D(#${at + 1}${e.comma}${axis === null ? '$' : `#${at + 2}`},${reference === null ? '$' : `#${at + 3}`});
#${at + 1}=IFCCARTESIANPOINT(${location});
${axis === null ? '' : `#${at + 2}=IFCDIRECTION(${axis});\n`}${reference === null ? '' : `#${at + 3}=IFCDIRECTION(${reference});\n`}`;
  const [from, to] = e.line ?? ['(0.,0.,0.)', `(0.,0.,${e.depth})`];
  const globalId = e.globalId ? `'0${String(index).padStart(21, 'b')}'` : '$';
  return `#${n}=IFCBEAM(${globalId}${e.comma}$,${e.name},$,$,#${n + 1},#${n + 2},'T${index}',.BEAM.);
#${n + 1}=IFCLOCALPLACEMENT(${e.parent},#${n + 20});
${axesText(n + 20, e.placement)}#${n + 2}=IFCPRODUCTDEFINITIONSHAPE($,$,(${e.hasLine ? `#${n + 3}${e.comma}` : ''}#${n + 4}));
#${n + 3}=IFCSHAPEREPRESENTATION(#10,'Axis','Curve3D',(#${n + 5}));
#${n + 4}=IFCSHAPEREPRESENTATION(#10,${e.body},'SweptSolid',(#${n + 6}${e.extra}));
#${n + 5}=IFCPOLYLINE((#${n + 7},#${n + 8}));
#${n + 7}=IFCCARTESIANPOINT(${from});
#${n + 8}=IFCCARTESIANPOINT(${to});
#${n + 6}=IFCEXTRUDEDAREASOLID(#${e.profile},${e.position === null ? '$' : `#${n + 30}`},${e.sweep === null ? '$' : `#${n + 9}`},${e.depth});
${e.sweep === null ? '' : `#${n + 9}=IFCDIRECTION(${e.sweep});\n`}${e.position === null ? '' : axesText(n + 30, e.position)}${
  e.material === null ? '' : `#${n + 50}=IFCRELASSOCIATESMATERIAL('0${n}',$,$,$,(#${n}),#${e.material});\n`
}`;
}
