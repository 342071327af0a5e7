import { describe, expect, it } from 'vitest';
import { applyScope } from '../../src/brief/scope.ts';
import { selectMembers } from '../../src/brief/selectors/select-members.ts';
import type { MemberSelector } from '../../src/brief/types.ts';
import { beamWith, importText } from './support/model-text.ts';

const BODY = '#100=IFCEXTRUDEDAREASOLID(#20,$,#13,3000.);';

/** Groups, a property set and a quantity set on the beam, another property set on its type. */
const FACTS = `
#400=IFCGROUP('0g0aaaaaaaaaaaaaaaaaaa',$,'Roof bracing',$,$);
#401=IFCSYSTEM('0g1aaaaaaaaaaaaaaaaaaa',$,'Bay 3',$,$);
#402=IFCRELASSIGNSTOGROUP('0g2aaaaaaaaaaaaaaaaaaa',$,$,$,(#50),$,#400);
#403=IFCRELASSIGNSTOGROUP('0g3aaaaaaaaaaaaaaaaaaa',$,$,$,(#50),$,#401);
#410=IFCPROPERTYSET('0p0aaaaaaaaaaaaaaaaaaa',$,'Pset_BeamCommon',$,(#411,#412,#413,#414,#415));
#411=IFCPROPERTYSINGLEVALUE('LoadBearing',$,IFCBOOLEAN(.T.),$);
#412=IFCPROPERTYSINGLEVALUE('Span',$,IFCPOSITIVELENGTHMEASURE(3000.),$);
#413=IFCPROPERTYSINGLEVALUE('Width',$,IFCLENGTHMEASURE(2.5),#430);
#414=IFCPROPERTYENUMERATEDVALUE('Status',$,(IFCLABEL('NEW'),IFCLABEL('TEMPORARY')),$);
#415=IFCPROPERTYSINGLEVALUE('Phase.No',$,IFCINTEGER(4),$);
#416=IFCRELDEFINESBYPROPERTIES('0p1aaaaaaaaaaaaaaaaaaa',$,$,$,(#50),#410);
#417=IFCELEMENTQUANTITY('0p2aaaaaaaaaaaaaaaaaaa',$,'Qto_BeamBaseQuantities',$,$,(#418,#419));
#418=IFCQUANTITYLENGTH('Length',$,$,3000.,$);
#419=IFCQUANTITYWEIGHT('NetWeight',$,$,471.,$);
#420=IFCRELDEFINESBYPROPERTIES('0p3aaaaaaaaaaaaaaaaaaa',$,$,$,(#50),#417);
#421=IFCRELDEFINESBYTYPE('0p4aaaaaaaaaaaaaaaaaaa',$,$,$,(#50),#422);
#422=IFCBEAMTYPE('0p5aaaaaaaaaaaaaaaaaaa',$,'IPE',$,$,(#423),$,$,$,.JOIST.);
#423=IFCPROPERTYSET('0p6aaaaaaaaaaaaaaaaaaa',$,'Pset_BeamCommon',$,(#424,#425));
#424=IFCPROPERTYSINGLEVALUE('FireRating',$,IFCLABEL('R 30'),$);
#425=IFCPROPERTYSINGLEVALUE('Span',$,IFCPOSITIVELENGTHMEASURE(9999.),$);
#430=IFCSIUNIT(*,.LENGTHUNIT.,.CENTI.,.METRE.);`;

const plain = beamWith({ body: '#100', more: BODY });

describe.each(['IFC2X3', 'IFC4', 'IFC4X3'])('what %s says of an element', (schema) => {
  const [member] = importText(plain + FACTS, schema).members;

  it('are the names of its groups', () => {
    expect(member?.facts?.groups).toEqual(['Roof bracing', 'Bay 3']);
  });

  it.each([
    ['Pset_BeamCommon.LoadBearing', [true]],
    ['pset_beamcommon.loadbearing', [true]],
    ['Pset_BeamCommon.Span', [3]],
    ['Pset_BeamCommon.Width', [0.025]],
    ['Pset_BeamCommon.Status', ['NEW', 'TEMPORARY']],
    ['Pset_BeamCommon.Phase.No', [4]],
    ['Pset_BeamCommon.FireRating', ['R 30']],
    ['*.FireRating', ['R 30']],
    ['Qto_BeamBaseQuantities.Length', [3]],
    ['Qto_BeamBaseQuantities.NetWeight', [471]],
    ['Pset_BeamCommon.Colour', []],
    ['Pset_Other.Span', []],
  ])('are the values of %s, numbers in SI, the own before those of the type', (name, values) => {
    const found = member!.facts!.property(name);
    expect(found).toEqual(values.map((value) => (typeof value === 'number' ? expect.closeTo(value, 12) : value)));
  });

  it('is nothing where the file says nothing', () => {
    const [bare] = importText(plain, schema).members;
    expect(bare?.facts?.groups).toEqual([]);
    expect(bare?.facts?.property('Pset_BeamCommon.Span')).toEqual([]);
  });

  it.each([
    [{ group: 'roof*' }, true],
    [{ group: 'bay 4' }, false],
    [{ property: { 'Pset_BeamCommon.LoadBearing': true } }, true],
    [{ property: { 'Pset_BeamCommon.LoadBearing': false } }, false],
    [{ property: { 'Pset_BeamCommon.Span': 3 } }, true],
    [{ property: { 'Pset_BeamCommon.Span': [2, 3] } }, true],
    [{ property: { 'Pset_BeamCommon.Span': [3.1, null] } }, false],
    [{ property: { 'Pset_BeamCommon.Status': 'temp*' } }, true],
    [{ property: { '*.FireRating': 'R 60' } }, false],
    [{ property: { 'Pset_BeamCommon.Span': 3, 'Pset_BeamCommon.Width': 1 } }, false],
  ] as readonly (readonly [Omit<MemberSelector, 'line'>, boolean])[])(
    'are met by the selector %j: %s',
    (keys, isMet) => {
      expect(selectMembers([member!], [{ line: 1, ...keys }])).toEqual(isMet ? [0] : []);
    },
  );

  it('can make a scope', () => {
    const scope = { include: [], exclude: [{ line: 2, group: 'Roof*' }] };
    const { members, findings } = applyScope([member!], scope);
    expect(members).toEqual([]);
    expect(findings[0]?.message).toContain('{group: Roof*}');
  });
});

it('is not part of what a result says of a member', async () => {
  const { runModel } = await import('../../src/pipeline.ts');
  const { stepText } = await import('./support/model-text.ts');
  const { result } = await runModel(new TextEncoder().encode(stepText(plain + FACTS)), { extent: 'survey' });
  expect(result.members[0]).not.toHaveProperty('facts');
});
