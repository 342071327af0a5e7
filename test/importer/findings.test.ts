import { describe, expect, it } from 'vitest';
import { runModel } from '../../src/pipeline.ts';
import { beamWith, COMMON, importText, stepText } from './support/model-text.ts';

const EXTRUDED = '#100=IFCEXTRUDEDAREASOLID(#20,$,#13,3000.);';

/** Beams with a body each and the texts given: name, object type, tag as STEP writes them. */
const beams = (body: string, ...texts: readonly (readonly [name: string, objectType: string, tag: string])[]) =>
  `${COMMON}\n${body}\n#91=IFCSHAPEREPRESENTATION(#10,'Body','SweptSolid',(#100));\n#51=IFCPRODUCTDEFINITIONSHAPE($,$,(#91));\n${texts
    .map(
      ([name, objectType, tag], i) =>
        `#${300 + i}=IFCBEAM('0bbbbbbbbbbbbbbbbbbb${String(i).padStart(2, '0')}',$,${name},$,${objectType},#16,#51,${tag},.BEAM.);`,
    )
    .join('\n')}`;

const sentence = (data: string, code: string) =>
  importText(data).findings.find((found) => found.code === code)?.message;

describe('a finding about one member calls it', () => {
  it.each([
    ['by its mark', ["'Chord'", '$', "'T-12'"], 'Member T-12 has no material'],
    ['by its name where it has no mark', ["'Chord 7'", '$', '$'], 'Member Chord 7 has no material'],
    [
      'by its name where the mark is a program’s own number',
      ["'Chord 7'", '$', "'ECA83ECB-D383-4498-946C-EDC6FC845F16'"],
      'Member Chord 7 has no material',
    ],
    ['by its GlobalId where it has neither', ['$', '$', '$'], 'Member 0bbbbbbbbbbbbbbbbbbb00 has no material'],
  ] as const)('%s', (_, texts, begins) => {
    expect(sentence(beams(EXTRUDED, texts), 'no-material')).toContain(begins);
  });

  it('and names its GlobalId beside the sentence', () => {
    const [found] = importText(beams(EXTRUDED, ["'Chord'", '$', "'T-12'"])).findings;
    expect(found!.members).toEqual(['0bbbbbbbbbbbbbbbbbbb00']);
  });
});

describe('a member without a section', () => {
  const MERE = '#100=IFCEXTRUDEDAREASOLID(#21,$,#13,3000.);';
  const named = (profile: string) => `#21=IFCPROFILEDEF(.AREA.,${profile});\n${MERE}`;

  it('is told with the designation that was tried in vain', () => {
    const text = sentence(beams(named("'XY 12'"), ["'B'", "'HEA2000-S355'", "'T1'"]), 'no-section');
    expect(text).toContain("its profile is the mere name 'XY 12'");
    expect(text).toContain("'HEA2000-S355' is no designation that is known");
  });

  it('shares one finding with the others, which lists three of the texts', () => {
    const texts = ['A 1', 'B 2', 'C 3', 'D 4'].map((text) => ["'x'", `'${text}'`, '$'] as const);
    const found = importText(beams(named('$'), ...texts)).findings.filter(({ code }) => code === 'no-section');
    expect(found).toHaveLength(1);
    expect(found[0]!.members).toHaveLength(4);
    expect(found[0]!.message).toContain("'A 1', 'B 2', 'C 3' and 1 more");
  });

  it.each([
    ['a grade behind it', "'HEA200-S355'", 'HEA 200', 53.83e-4],
    ['a pair', "'2L 80x80x8'", '2L 80x80x8', 24.5e-4],
  ])('takes one that its name calls, with %s', (_, text, name, area) => {
    const model = importText(beams(named('$'), ["'B'", text, '$']));
    expect(model.members[0]!.section).toMatchObject({ name, from: 'name' });
    expect(model.members[0]!.section!.area / area).toBeCloseTo(1, 2);
    expect(model.findings.map(({ code }) => code)).toContain('guessed-section');
  });

  it('is told once, for all, that hollow sections by name are taken as cold formed', () => {
    const texts = ['SHS 100x100x5', 'CHS 114.3x5', 'RHS 150x100x5 EN 10210', 'HEA 200'].map(
      (text) => ["'x'", `'${text}'`, '$'] as const,
    );
    const notes = importText(beams(named('$'), ...texts)).findings.filter(({ message }) =>
      message.includes('EN 10219'),
    );
    expect(notes).toHaveLength(1);
    expect(notes[0]).toMatchObject({ code: 'guessed-section', severity: 'note' });
    expect(notes[0]!.members).toHaveLength(2);
  });
});

describe('an element of a class that no schema has', () => {
  const lost = `#60=IFCMEMBR('0ddddddddddddddddddddd',$,'M7',$,$,#16,#51,'T7');
#61=IFCRELCONTAINEDINSPATIALSTRUCTURE('0eeeeeeeeeeeeeeeeeeeee',$,$,$,(#60),#62);
#62=IFCBUILDINGSTOREY('0fffffffffffffffffffff',$,'Ground',$,$,#16,$,$,.ELEMENT.,0.);`;

  it.each(['IFC2X3', 'IFC4', 'IFC4X3'])('is a finding in %s, with the class that may be meant', (schema) => {
    const model = importText(beamWith({ body: '#100', more: `${EXTRUDED}\n${lost}` }), schema);
    const found = model.findings.filter(({ code }) => code === 'unreadable-element');
    expect(found).toHaveLength(1);
    expect(found[0]).toMatchObject({ severity: 'error', members: ['0ddddddddddddddddddddd'] });
    expect(found[0]!.message).toContain('IFCMEMBR');
    expect(found[0]!.advice).toContain('IfcMember');
  });

  it('is not seen in relationships, types or resources, which are no elements', () => {
    const others = `#60=IFCRELFOO('0ddddddddddddddddddddd',$,$,$,(#50),#50);
#61=IFCFOOTYPE('0eeeeeeeeeeeeeeeeeeeee',$,'T',$,$,$,$,$,$,.BEAM.);
#62=IFCFOOPOINT((0.,0.,0.));
#63=IFCWALL('0fffffffffffffffffffff',$,'W',$,$,#16,$,$,$);`;
    const model = importText(beamWith({ body: '#100', more: `${EXTRUDED}\n${others}` }));
    expect(model.findings.filter(({ code }) => code === 'unreadable-element')).toEqual([]);
  });
});

describe('places without a grid', () => {
  it('are told from the lowest x and y of the members in scope, not of a helper line far off', async () => {
    const far = `#400=IFCCARTESIANPOINT((-1350000.,-1350000.,0.));
#401=IFCAXIS2PLACEMENT3D(#400,$,$);
#402=IFCLOCALPLACEMENT($,#401);
#403=IFCBEAM('0zzzzzzzzzzzzzzzzzzzzz',$,'Helper',$,$,#402,#51,'H',.HATSTONE.);`;
    const data = `${beams(EXTRUDED, ["'Chord'", '$', "'T-12'"])}\n${far}`;
    expect(importText(data).placeOf([0, 0, 1])).toBe('x 1350.0 m, y 1350.0 m from the lowest, +1.00');
    const { result } = await runModel(new TextEncoder().encode(stepText(data)), { extent: 'survey' });
    expect(result.members.map(({ place }) => place)).toEqual(['x 0.0 m, y 0.0 m from the lowest, +1.50']);
    const material = result.findings.find(({ code }) => code === 'no-material');
    expect(material!.place).toMatch(/from the lowest/);
  });
});
