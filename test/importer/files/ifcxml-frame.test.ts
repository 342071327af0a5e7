import { describe, expect, it } from 'vitest';
import { type Member, recordOf } from '../../../src/domain/member.ts';
import { openModel } from '../../../src/importer/files/open-model.ts';
import { importModel } from '../../../src/importer/import-model.ts';
import { FRAME_IFC2X3_STEP, FRAME_IFC2X3_XML, FRAME_IFC4_STEP, FRAME_IFC4_XML } from './support/frame.ts';

async function membersOf(text: string): Promise<readonly Member[]> {
  const { file } = await openModel(Buffer.from(text));
  const { members, findings, lengthUnit } = await importModel(file);
  expect(findings).toEqual([]);
  expect(lengthUnit).toBe('mm');
  return members.map(recordOf);
}

describe('one frame written as STEP text and as ifcXML', () => {
  it('has the beam and the brace that were drawn', async () => {
    const [chord, brace] = [...(await membersOf(FRAME_IFC4_XML))].sort((a, b) => b.axis[0][2] - a.axis[0][2]);
    expect(chord).toMatchObject({
      globalId: '0beamaaaaaaaaaaaaaaaaa',
      name: 'Chord ä',
      tag: 'C1',
      class: 'IfcBeam',
      predefinedType: 'BEAM',
      type: 'IPE 200',
      assembly: 'Truss 1',
      axis: [
        [1, 2, 3.5],
        [7, 2, 3.5],
      ],
      material: { name: 'S355', yieldStrength: 355e6 },
    });
    // Euronorm 19-57: 28.5 cm2, 1943 cm4.
    expect(chord!.section!.area / 28.5e-4).toBeCloseTo(1, 2);
    expect(chord!.section!.inertiaY / 1943e-8).toBeCloseTo(1, 2);
    expect(brace).toMatchObject({ name: 'Brace', class: 'IfcMember', storey: 'Eaves' });
    expect(brace!.axis[1][0]).toBeCloseTo(1 + 0.6 * 4.25025, 9);
    expect(brace!.axis[1][2]).toBeCloseTo(0.0005 + 0.8 * 4.25025, 9);
    expect(brace!.section!.area).toBeCloseTo(Math.PI * (0.0889 - 0.004) * 0.004, 12);
  });

  it.each([
    ['IFC2X3', FRAME_IFC2X3_STEP, FRAME_IFC2X3_XML],
    ['IFC4', FRAME_IFC4_STEP, FRAME_IFC4_XML],
  ])('gives the same members in %s', async (_schema, step, xml) => {
    const members = await membersOf(step);
    expect(members).toHaveLength(2);
    expect(await membersOf(xml)).toEqual(members);
  });

  it('gives the same axes, sections and materials in both schemas', async () => {
    const essence = ({ globalId, name, tag, axis, zAxis, section, material, storey, assembly }: Member) => ({
      globalId,
      name,
      tag,
      axis,
      zAxis,
      section,
      material,
      storey,
      assembly,
    });
    const newer = (await membersOf(FRAME_IFC4_XML)).map(essence);
    expect((await membersOf(FRAME_IFC2X3_XML)).map(essence)).toEqual(newer);
  });

  it.each([
    ['IFC2X3', FRAME_IFC2X3_XML],
    ['IFC4', FRAME_IFC4_XML],
  ])('says in the STEP text of %s what the header said', async (schema, xml) => {
    const { file, container, isConverted } = await openModel(Buffer.from(xml));
    expect({ container, isConverted }).toEqual({ container: 'ifcxml', isConverted: true });
    expect(file.schema).toBe(schema);
    expect(file.timeStamp).toBe('2024-05-06T07:08:09');
    expect(file.fileName[0]).toBe('frame');
    expect(file.problems).toEqual([]);
  });
});
