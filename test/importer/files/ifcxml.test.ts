import { describe, expect, it } from 'vitest';
import { ModelError } from '../../../src/domain/errors.ts';
import { type OpenedModel, openModel } from '../../../src/importer/files/open-model.ts';
import type { OpenOptions } from '../../../src/importer/files/options.ts';
import { StepEnum, StepRef, StepTyped } from '../../../src/step/values.ts';

const XSI = 'xmlns:xsi="http://www.w3.org/2001/XMLSchema-instance"';
const newer = (inside: string, schema = 'IFC4/ADD2_TC1') =>
  `<ifcXML xmlns="https://standards.buildingsmart.org/IFC/RELEASE/${schema}" ${XSI}>${inside}</ifcXML>`;
const older = (inside: string) =>
  `<ex:iso_10303_28 xmlns:ex="urn:iso.org:standard:10303:part(28):version(2):xmlschema:common" ${XSI}><ex:uos xmlns="http://www.iai-tech.org/ifcXML/IFC2x3/FINAL">${inside}</ex:uos></ex:iso_10303_28>`;
const open = (text: string | Uint8Array, options: Partial<OpenOptions> = {}) =>
  openModel(Buffer.from(text as string), options);
const argsOf = async (inside: string, id = 1) => (await open(newer(inside))).file.args(id);
const nameOf = async (xml: string | Uint8Array) => {
  const { file } = await open(xml);
  return file.args(file.idsOf('IFCMATERIAL')[0]!)[0];
};
const messages = ({ findings }: OpenedModel) => findings.map(({ code, message }) => `${code}: ${message}`);

describe('values of ifcXML', () => {
  it('reads lists of measures, whole numbers, enumerations and truth values', async () => {
    expect(await argsOf('<IfcCartesianPoint id="i1" Coordinates="1 -2.5E-3\n 1e3"/>')).toEqual([[1, -0.0025, 1000]]);
    expect(await argsOf('<IfcTriangulatedFaceSet id="i1" Closed="true" CoordIndex="1 2 3 3 2 4"/>')).toEqual([
      null,
      null,
      true,
      [
        [1, 2, 3],
        [3, 2, 4],
      ],
      null,
    ]);
    const [unit] = (await argsOf('<IfcConversionBasedUnit id="i1" UnitType="planeangleunit" Name="DEGREE"/>')).slice(1);
    expect(unit).toEqual(new StepEnum('PLANEANGLEUNIT'));
    expect(
      (await argsOf('<IfcPolyline id="i1"/><IfcBSplineCurve id="i2" ClosedCurve="unknown" Degree="3"/>', 2)).slice(
        0,
        4,
      ),
    ).toEqual([3, null, null, new StepEnum('U')]);
  });

  it('keeps each digit of a number', async () => {
    const [numbers] = await argsOf(
      '<IfcDirection id="i1" DirectionRatios="0.1234567890123456 1.7976931348623157E308 -0"/>',
    );
    expect(numbers).toEqual([0.1234567890123456, Number.MAX_VALUE, 0]);
  });

  it('reads a choice of types with its type, and keeps arcs and lines in their order', async () => {
    const curve = `<IfcIndexedPolyCurve id="i1"><Points xsi:type="IfcCartesianPointList2D" id="i2" CoordList="0 0 1 0 2 1 1 2"/>
      <Segments><IfcLineIndex-wrapper>1 2</IfcLineIndex-wrapper><IfcArcIndex-wrapper>2 3 4</IfcArcIndex-wrapper><IfcLineIndex-wrapper>4 1</IfcLineIndex-wrapper></Segments></IfcIndexedPolyCurve>`;
    expect(await argsOf(curve)).toEqual([
      new StepRef(2),
      [
        new StepTyped('IFCLINEINDEX', [1, 2]),
        new StepTyped('IFCARCINDEX', [2, 3, 4]),
        new StepTyped('IFCLINEINDEX', [4, 1]),
      ],
      null,
    ]);
    expect(await argsOf(curve, 2)).toEqual([
      [
        [0, 0],
        [1, 0],
        [2, 1],
        [1, 2],
      ],
    ]);
    const faces =
      '<IfcIndexedPolygonalFaceWithVoids id="i1" CoordIndex="1 2 3"><InnerCoordIndices><Seq-IfcPositiveInteger-wrapper>4 5 6</Seq-IfcPositiveInteger-wrapper><Seq-IfcPositiveInteger-wrapper>7 8 9 10</Seq-IfcPositiveInteger-wrapper></InnerCoordIndices></IfcIndexedPolygonalFaceWithVoids>';
    expect((await argsOf(faces))[1]).toEqual([
      [4, 5, 6],
      [7, 8, 9, 10],
    ]);
  });

  it('puts items of a list where `pos` says', async () => {
    const { file } = await open(
      older(
        '<IfcDirection id="i7"><DirectionRatios ex:cType="list"><ex:double-wrapper pos="2">0.5</ex:double-wrapper><ex:double-wrapper pos="0">1.</ex:double-wrapper><ex:double-wrapper pos="1">-3</ex:double-wrapper></DirectionRatios></IfcDirection>',
      ),
    );
    expect(file.args(7)).toEqual([[1, -3, 0.5]]);
  });

  it('writes derived attributes as such', async () => {
    const { file } = await open(newer('<IfcSIUnit id="i1" UnitType="lengthunit" Name="metre"/>'));
    expect(Buffer.from(file.bytes).toString()).toContain('#1=IFCSIUNIT(*,.LENGTHUNIT.,$,.METRE.);');
  });

  it.each([
    ['named and numbered characters', '&lt;&amp;&gt; &quot;&apos; &#xE4;&#228;&#x1F600;', '<&> "\' ää😀'],
    ['an ampersand written twice', '&amp;amp;', '&amp;'],
    ['an entity that nothing defines', '&nbsp;', '&nbsp;'],
  ])('decodes %s', async (_what, written, read) => {
    expect(await nameOf(newer(`<IfcMaterial Name="${written}"/>`))).toBe(read);
    expect(await nameOf(older(`<IfcMaterial id="i1"><Name>${written}</Name></IfcMaterial>`))).toBe(read);
  });

  it('takes CDATA as it stands and passes over comments and processing instructions', async () => {
    const text =
      '<?app go?><!-- <IfcMaterial/> --><IfcMaterial id="i1"><Name>S<!-- steel -->355 <![CDATA[<&amp;>]]></Name></IfcMaterial>';
    const opened = await open(older(text));
    expect(opened.file.size).toBe(1);
    expect(opened.file.args(1)[0]).toBe('S355 <&amp;>');
  });

  it('does not mind which prefixes names have', async () => {
    const text = `<q:ifcXML xmlns:q="http://www.buildingsmart-tech.org/ifcXML/IFC4/Add2" xmlns:i="http://www.w3.org/2001/XMLSchema-instance"><q:IfcLocalPlacement id="i1"><q:RelativePlacement i:type="q:IfcAxis2Placement2D" id="i2"/></q:IfcLocalPlacement></q:ifcXML>`;
    const { file } = await open(text);
    expect(file.typeOf(2)).toBe('IFCAXIS2PLACEMENT2D');
    expect(file.args(1)).toEqual([null, new StepRef(2)]);
  });

  it.each([
    ['UTF-8 with a mark', Buffer.from(`\ufeff${newer('<IfcMaterial Name="Träger"/>')}`)],
    ['UTF-16, little end first', Buffer.from(`\ufeff${newer('<IfcMaterial Name="Träger"/>')}`, 'utf16le')],
    ['UTF-16, big end first', Buffer.from(`\ufeff${newer('<IfcMaterial Name="Träger"/>')}`, 'utf16le').swap16()],
    [
      'ISO 8859-1, declared',
      Buffer.from(`<?xml version="1.0" encoding="ISO-8859-1"?>${newer('<IfcMaterial Name="Träger"/>')}`, 'latin1'),
    ],
    [
      'UTF-8, declared as UTF-16',
      Buffer.from(`<?xml version="1.0" encoding="utf-16"?>${newer('<IfcMaterial Name="Träger"/>')}`),
    ],
  ])('reads %s', async (_encoding, bytes) => {
    expect((await open(bytes)).container).toBe('ifcxml');
    expect(await nameOf(bytes)).toBe('Träger');
  });

  it('reads bytes that are no UTF-8 as Windows-1252, and says so', async () => {
    const bytes = Buffer.from(newer('<IfcMaterial Name="Träger"/>'), 'latin1');
    expect(await nameOf(bytes)).toBe('Träger');
    expect(messages(await open(bytes))).toEqual([expect.stringMatching(/^encoding-broken: .*Windows-1252/)]);
  });
});

describe('references of ifcXML', () => {
  it('lets a relationship that stands inside an object refer to it, once', async () => {
    const { file } = await open(
      newer(`<IfcBeam id="i1" GlobalId="a"><HasOpenings GlobalId="b" id="i2"><RelatedOpeningElement xsi:type="IfcOpeningElement" id="i3" GlobalId="c"/></HasOpenings>
        <IsDefinedBy><IfcRelDefinesByProperties id="i4" GlobalId="d"><RelatedObjects><IfcBeam xsi:nil="true" ref="i1"/></RelatedObjects></IfcRelDefinesByProperties></IsDefinedBy></IfcBeam>
        <IfcBeam id="i5" GlobalId="e"><IsDefinedBy><IfcRelDefinesByProperties xsi:nil="true" href="#i4"/></IsDefinedBy></IfcBeam>
        <IfcGeometricRepresentationContext id="i6"><HasSubContexts><IfcGeometricRepresentationSubContext id="i7" TargetView="graph_view"/></HasSubContexts></IfcGeometricRepresentationContext>`),
    );
    expect(file.args(2).slice(4)).toEqual([new StepRef(1), new StepRef(3)]);
    expect(file.args(4)[4]).toEqual([new StepRef(1), new StepRef(5)]);
    expect(file.args(7)[6]).toEqual(new StepRef(6));
  });

  it('lets very many objects share one relationship', async () => {
    const count = 5000;
    const beam = (i: number) =>
      `<IfcBeam id="b${i}"><HasAssociations><IfcRelAssociatesMaterial xsi:nil="true" href="r"/></HasAssociations></IfcBeam>`;
    const beams = Array.from({ length: count }, (_, i) => beam(i)).join('');
    const { file } = await open(newer(`${beams}<IfcRelAssociatesMaterial id="r" GlobalId="s"/>`));
    const related = file.args(file.idsOf('IFCRELASSOCIATESMATERIAL')[0]!)[4];
    expect(new Set((related as StepRef[]).map(({ id }) => id)).size).toBe(count);
    expect(related).toHaveLength(count);
  });

  it('keeps the numbers of ids and gives the others higher ones', async () => {
    const { file } = await open(
      newer(
        '<IfcMaterial id="i12" Name="a"/><IfcMaterial Name="b"/><IfcMaterial id="x12" Name="c"/><IfcMaterial id="i99999999999" Name="d"/>',
      ),
    );
    expect([...file.ids()]).toEqual([12, 13, 14, 15]);
    expect([...file.ids()].map((id) => file.args(id)[0])).toEqual(['a', 'b', 'c', 'd']);
  });

  it('leaves a reference to nothing to be found as one', async () => {
    const { file } = await open(
      newer('<IfcLocalPlacement id="i1"><PlacementRelTo xsi:nil="true" href="i7"/></IfcLocalPlacement>'),
    );
    const [parent] = file.args(1);
    expect(parent).toBeInstanceOf(StepRef);
    expect(file.has((parent as StepRef).id)).toBe(false);
  });

  it('has the STEP reader say that an id is doubled', async () => {
    const { file } = await open(newer('<IfcMaterial id="i1" Name="a"/><IfcMaterial id="i1" Name="b"/>'));
    expect(file.args(1)[0]).toBe('a');
    expect(file.problems.map(({ kind }) => kind)).toEqual(['doubled-id']);
  });

  it('counts what it leaves out, and leaves empty what referred to it', async () => {
    const opened = await open(
      newer(`<IfcTask id="i1" GlobalId="a"><Deep><IfcMaterial id="i2" Name="S355"/></Deep></IfcTask><IfcTask/>
        <IfcRelAggregates id="i3" GlobalId="b"><RelatingObject xsi:type="IfcTask" xsi:nil="true" href="i1"/><RelatedObjects><IfcTask xsi:nil="true" href="i1"/><IfcBeam xsi:nil="true" href="i4"/></RelatedObjects></IfcRelAggregates><IfcBeam id="i4" GlobalId="c"/>`),
    );
    expect(opened.file.args(3).slice(4)).toEqual([null, [new StepRef(4)]]);
    expect(opened.file.args(2)[0]).toBe('S355');
    expect(messages(opened)).toEqual([
      'out-of-scope: The ifcXML holds instances that are not read (2 IfcTask); an .ifc written of it is without them.',
    ]);
  });
});

describe('values that ifcXML does not allow', () => {
  it('reads a decimal comma as a point, and says so', async () => {
    const opened = await open(
      newer('<IfcCircle id="i1" Radius="0,25"/><IfcCartesianPoint id="i2" Coordinates="1,5 2,5 0"/>'),
    );
    expect(opened.file.args(1)[1]).toBe(0.25);
    expect(opened.file.args(2)).toEqual([[1.5, 2.5, 0]]);
    expect(messages(opened)).toEqual([
      'encoding-broken: Numbers with a decimal comma (3, the first 0,25) are read as if it were a point.',
    ]);
  });

  it.each([
    ['a word', '<IfcCircle id="i1" Radius="wide"/>', '"wide" in Radius of an IfcCircle'],
    ['NaN', '<IfcCircle id="i1" Radius="NaN"/>', '"NaN" in Radius'],
    ['infinity', '<IfcCircle id="i1" Radius="1e400"/>', '"1e400" in Radius'],
    ['a list that commas part', '<IfcCartesianPoint id="i1" Coordinates="100,200"/>', '"100,200" in Coordinates'],
    [
      'an odd row of coordinates',
      '<IfcCartesianPointList3D id="i1" CoordList="1 2 3 4"/>',
      '"a list of 4" in CoordList',
    ],
    [
      'a value without its type',
      '<IfcPropertySingleValue id="i1" Name="a"><NominalValue>7</NominalValue></IfcPropertySingleValue>',
      '"7" in NominalValue',
    ],
    ['an enumeration with a blank', '<IfcSIUnit id="i1" Name="square metre"/>', '"square metre" in Name'],
  ])('leaves %s empty and says so', async (_what, xml, told) => {
    const opened = await open(newer(xml));
    const read = opened.file.args(1).flat();
    expect(read.filter((value) => typeof value === 'number')).toEqual([]);
    expect(opened.findings).toEqual([expect.objectContaining({ code: 'unreadable-element', severity: 'warning' })]);
    expect(opened.findings[0]!.message).toContain(told);
  });
});

describe('ifcXML that is refused', () => {
  const bomb = `<!DOCTYPE x [<!ENTITY a "aaaaaaaaaa"><!ENTITY b "&a;&a;&a;&a;&a;&a;&a;&a;&a;&a;">]>${newer('<IfcMaterial Name="&b;"/>')}`;
  const nested = (depth: number) => newer('<A>'.repeat(depth - 1) + '</A>'.repeat(depth - 1));

  it.each([
    ['a document type declaration', bomb, /document type declaration/],
    ['one in lower case', bomb.replace('DOCTYPE', 'doctype'), /document type declaration/],
    ['a web page', '<!DOCTYPE html><html><br></html>', /no ifcXML/],
    ['ifcXML inside something else', `<mail>${newer('')}</mail>`, /no ifcXML/],
    ['other XML', '<gpx><wpt/></gpx>', /no ifcXML/],
    ['text that is cut off', newer('<IfcBeam GlobalId="a"/>').slice(0, -12), /damaged or cut off/],
    ['tags that cross', newer('<IfcBeam><Name></IfcBeam></Name>'), /damaged or cut off, line 1/],
    [
      'text that is cut off within a tag, with the line where it ends',
      newer('\n<IfcBeam GlobalId="a"/>\n').replace(/\n<\/.*$/s, '\n<IfcColumn Glob'),
      /line \d+: the text ends there with elements still open\. Export it again\.$/,
    ],
    [
      'tags that cross, with what is wrong',
      newer('<IfcBeam><Name></IfcBeam></Name>'),
      /not the one last opened\. Export/,
    ],
    ['a bare &', newer('\n<IfcBeam Name="x"><Tag>a & b</Tag></IfcBeam>'), /line 2: a character such as & /],
    ['an attribute twice', newer('\n\n<IfcBeam id="i1" id="i2"/>'), /line 3: an attribute has no value/],
    ['a bare <', newer('<Name>a < b</Name>'), /a < stands there that begins no element/],
    ['nothing but a declaration', '<?xml version="1.0"?>', /no ifcXML/],
    ['no schema', `<ifcXML ${XSI}><IfcBeam/></ifcXML>`, /does not say which schema/],
    ['an older schema', newer('').replace('IFC4/ADD2_TC1', 'IFC2x2_FINAL'), /IFC2X2/],
    ['a later schema', newer('', 'IFC5'), /IFC5/],
    ['an unknown encoding', `<?xml version="1.0" encoding="klingon"?>${newer('')}`, /klingon/],
    ['257 elements inside one another', nested(257), /deeper than 256/],
  ])('%s', async (_what, text, told) => {
    const error = await open(text).then(
      () => null,
      (problem: unknown) => problem,
    );
    expect(error).toBeInstanceOf(ModelError);
    expect((error as Error).message).toMatch(told);
    expect((error as Error).message).toMatch(/^[\x20-\x7e]+$/);
    // The words are ours, whatever the parser's are.
    expect((error as Error).message).not.toMatch(/readTagExp|position \d|Context|jPath|\[ /);
  });

  it('goes as deep as 256 elements', async () => {
    expect((await open(nested(256))).file.size).toBe(0);
  });

  it('refuses one beyond its limit of size', async () => {
    await expect(open(newer(''), { largestXml: 50 })).rejects.toThrow(/larger than the limit/);
  });

  it.each([
    ['http://www.iai-tech.org/ifcXML/IFC2x3/FINAL', 'IFC2X3'],
    ['http://www.buildingsmart-tech.org/ifcXML/IFC4/final', 'IFC4'],
    ['http://www.buildingsmart-tech.org/ifcXML/IFC4_ADD2', 'IFC4'],
    ['https://standards.buildingsmart.org/IFC/RELEASE/IFC4_3', 'IFC4X3'],
    ['http://standards.buildingsmart.org/IFC/RELEASE/IFC4X3/', 'IFC4X3'],
    ['https://standards.buildingsmart.org/IFC/RELEASE/IFC4/3/DEV/1', 'IFC4X3'],
    ['http://www.buildingsmart-tech.org/ifcXML/IFC4x1/final', 'IFC4X1'],
    ['http://example.org/IFC4x3_RC4', 'IFC4X3_RC4'],
  ])('takes %s for %s', async (namespace, schema) => {
    expect((await open(`<ifcXML xmlns="${namespace}"/>`)).file.schema).toBe(schema);
  });
});
