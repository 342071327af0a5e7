import { readFileSync } from 'node:fs';
import { describe, expect, it } from 'vitest';
import { between, norm, subtract } from '../../src/domain/vector.ts';
import { openModel } from '../../src/importer/files/open-model.ts';
import { IMPORT_DEFAULTS, type ImportOptions } from '../../src/importer/options.ts';
import { readPhysicalModel } from '../../src/importer/read-physical-model.ts';
import type { ImportedModel } from '../../src/importer/types.ts';
import { openStep } from '../../src/step/step-file.ts';
import { publicModel } from '../support/shared.ts';

const read = (path: string | null, options: Partial<ImportOptions> = {}): ImportedModel =>
  readPhysicalModel(openStep(readFileSync(path!)), { ...IMPORT_DEFAULTS, ...options });

function expectSound(model: ImportedModel): void {
  for (const member of model.members) {
    const d = subtract(member.axis[1], member.axis[0]);
    expect(norm(member.zAxis)).toBeCloseTo(1, 9);
    const lean = member.zAxis[0] * d[0] + member.zAxis[1] * d[1] + member.zAxis[2] * d[2];
    expect(Math.abs(lean) / norm(d)).toBeLessThan(1e-9);
    expect(model.placeOf(between(...member.axis, 0.5))).not.toBeNull();
    if (member.section !== null) {
      expect(member.section.area).toBeGreaterThan(0);
      expect(member.section.inertiaMinor).toBeGreaterThan(0);
    }
  }
}

/** File, elements, members read, members with a section, finding codes. */
const MODELS: readonly (readonly [string, number, number, number, readonly string[]])[] = [
  ['analysis-view-house.ifc', 0, 0, 0, []],
  ['analysis-view-portal-ifc4-inch.ifc', 0, 0, 0, []],
  ['beam-standard-case-ifc4.ifc', 18, 18, 18, ['axis-moved']],
  ['bent-beam-ifc4x3.ifc', 2, 2, 2, ['axis-moved']],
  ['brep-beam.ifc', 1, 1, 1, ['guessed-section']],
  ['cardinal-points-ifc4x3.ifc', 18, 18, 18, ['axis-moved']],
  ['clipped-beam.ifc', 1, 1, 1, ['axis-moved']],
  ['fabrication-model.ifc', 2203, 2202, 2202, ['bent-axis', 'guessed-section', 'no-axis']],
  ['grid-placement-ifc4x3.ifc', 35, 35, 35, []],
  ['gridshell-roof.ifc', 5178, 5178, 5178, []],
  ['large-id.ifc', 0, 0, 0, ['units-missing', 'unreadable-element']],
  ['large-offset.ifc', 0, 0, 0, []],
  ['mapped-axis-beam.ifc', 1, 1, 1, ['axis-moved']],
  ['mirrored-profiles-inch.ifc', 6, 6, 6, ['no-material', 'section-disagrees']],
  ['mixed-frame.ifc', 85, 85, 85, ['axis-moved']],
  ['newline-in-string.ifc', 1, 1, 1, ['no-material']],
  ['six-shapes.ifc', 6, 6, 6, ['material-implausible', 'no-material']],
  ['steel-frame.ifc', 21, 21, 21, []],
  ['tessellated-beam-ifc4x3.ifc', 1, 1, 1, ['guessed-section', 'no-material']],
  ['timber-house-ifc4.ifc', 46, 46, 46, ['guessed-section', 'no-material']],
];

for (const [name, elements, members, sections, codes] of MODELS) {
  const path = publicModel(name);
  describe.skipIf(path === null)(`public model ${name}`, () => {
    it(`gives ${members} members of ${elements} elements, and a finding for each of the rest`, () => {
      const model = read(path);
      expect(model.elementCount).toBe(elements);
      expect(model.members).toHaveLength(members);
      expect(model.members.filter((m) => m.section !== null)).toHaveLength(sections);
      expect([...new Set(model.findings.map((f) => f.code))].sort()).toEqual([...codes].sort());
      expectSound(model);
      const named = new Set([...model.members.map((m) => m.globalId), ...model.findings.flatMap((f) => f.members)]);
      expect(named.size).toBe(elements);
    });
  });
}

const fabrication = publicModel('fabrication-model.ifc');
describe.skipIf(fabrication === null)('public model fabrication-model.ifc in detail', () => {
  it('reads split anchors and joggled plates by their names, and refuses the wall', () => {
    const { members, findings } = read(fabrication);
    const [refused, ...others] = findings.filter(({ code }) => code === 'no-axis');
    expect(others).toEqual([]);
    // PL200*3200, 6.4 m long.
    expect(refused!.members).toEqual(['1BZFet000BfJ4oDZSrCpWu']);
    const short = findings.find(({ code, message }) => code === 'bent-axis' && message.includes('approximate'))!;
    const byId = new Map(members.map((member) => [member.globalId, member]));
    expect(short.members).toHaveLength(56);
    for (const globalId of short.members) {
      const { section, axis } = byId.get(globalId)!;
      expect(['Flat 60x6', 'Flat 80x10']).toContain(section!.name);
      expect(norm(subtract(...axis))).toBeGreaterThan(0.08);
      expect(norm(subtract(...axis))).toBeLessThan(0.14);
    }
    expect(short.gap).toBeGreaterThan(0.01);
    expect(short.gap).toBeLessThan(0.06);
  });

  it('counts in its findings the members whose sections are measured, and no others', () => {
    const { members, findings } = read(fabrication);
    const measured = members.filter(({ section }) => section!.from === 'mesh').map(({ globalId }) => globalId);
    const told = findings.filter(({ code }) => code === 'guessed-section');
    expect(told.flatMap((found) => found.members).sort()).toEqual(measured.sort());
    for (const found of told) expect(found.message).toContain(`${found.members.length} members`);
  });
});

const lintels = publicModel('brep-lintels.ifczip');
describe.skipIf(lintels === null)('public model brep-lintels.ifczip in detail', () => {
  it('gives each of its 35 elements one member with the section of an angle, a slice of 5 mm too', async () => {
    const { file } = await openModel(readFileSync(lintels!));
    const { members, findings } = readPhysicalModel(file);
    expect(new Set(members.map(({ globalId }) => globalId)).size).toBe(35);
    expect(members).toHaveLength(35);
    // Thin angles 150 x 90 and 200 x 90, drawn with the same legs throughout.
    const areas = members.map(({ section }) => Math.round(section!.area * 1e6));
    expect(new Set(areas)).toEqual(new Set([771, 937]));
    const slice = members.find(({ globalId }) => globalId === '0KNmVKmh519eKhcfjdm0L1')!;
    expect(norm(subtract(...slice.axis))).toBeCloseTo(0.005, 6);
    expect(findings.filter(({ severity }) => severity === 'error')).toEqual([]);
  });
});

const gridshell = publicModel('gridshell-roof.ifc');
describe.skipIf(gridshell === null)('public model gridshell-roof.ifc in detail', () => {
  it('has one hollow rectangle and the ends that its placements give by hand', () => {
    const { members } = read(gridshell);
    for (const { section } of members) {
      expect(section?.shape).toBe('RHS');
      expect(section?.area).toBeCloseTo(0.1 * 0.2 - (0.1 - 0.0126) * (0.2 - 0.0126), 12);
    }
    // #31: from (-36.625, -51.125, 19.709999), 3.16962433181174 m along (0.68217, 0.68944, 0.24356).
    const second = members.find((m) => Math.abs(norm(subtract(...m.axis)) - 3.16962433181174) < 1e-9)!;
    expect(second.axis[0]).toEqual([-36.625, -51.125, 19.709999]);
    const length = Math.hypot(0.682167908133166, 0.689438485838138, 0.243560093936661);
    expect(second.axis[1][0]).toBeCloseTo(-36.625 + (3.16962433181174 * 0.682167908133166) / length, 9);
    expect(second.axis[1][2]).toBeCloseTo(19.709999 + (3.16962433181174 * 0.243560093936661) / length, 9);
    // Its x lies level, so the 200 mm side stands in the vertical plane of the member.
    expect(second.section?.depth).toBeCloseTo(0.2, 12);
    expect(second.zAxis[2]).toBeGreaterThan(0.9);
  });
});

const cardinal = publicModel('cardinal-points-ifc4x3.ifc');
describe.skipIf(cardinal === null)('public model cardinal-points-ifc4x3.ifc in detail', () => {
  const byTag = (options: Partial<ImportOptions>) => new Map(read(cardinal, options).members.map((m) => [m.tag, m]));

  it('has the drawn axis where it is asked for, with the section of an IPE 220', () => {
    const first = byTag({}).get('A-1')!;
    expect(first.axis).toEqual([
      [0, 0, 0],
      [2, 0, 0],
    ]);
    // Euronorm 19-57: 33.37 cm2, 2772 cm4, 204.9 cm4.
    expect(first.section!.area).toBeCloseTo(33.37e-4, 6);
    expect(first.section!.inertiaY / 2772e-8).toBeCloseTo(1, 3);
    expect(first.section!.inertiaZ / 204.9e-8).toBeCloseTo(1, 3);
    expect(first.material).toMatchObject({ name: 'S275J2', yieldStrength: 275e6 });
  });

  it('has the centroid line half the width and depth from cardinal point 1, bottom left', () => {
    const first = byTag({ axes: 'centroid' }).get('A-1')!;
    // Bottom left, seen against the beam: the local x is world y, of which the body lies on the negative side.
    for (const [i, c] of [0, -0.055, 0.11].entries()) expect(first.axis[0][i]).toBeCloseTo(c, 12);
    for (const [i, c] of [2, -0.055, 0.11].entries()) expect(first.axis[1][i]).toBeCloseTo(c, 12);
    expect(first.zAxis).toEqual([0, 0, 1]);
  });
});

const mapped = publicModel('mapped-axis-beam.ifc');
describe.skipIf(mapped === null)('public model mapped-axis-beam.ifc in detail', () => {
  it('has the 700 mm of its profile upright, turned there by the profile position', () => {
    const [member] = read(mapped).members;
    expect(member?.section?.depth).toBeCloseTo(0.7, 9);
    expect(member?.section?.width).toBeCloseTo(0.3, 9);
    expect(Math.abs(member!.zAxis[2])).toBeCloseTo(1, 6);
    // Two flanges, the web between them, and four fillets.
    const area = 2 * 0.3 * 0.024 + 0.652 * 0.013 + (4 - Math.PI) * 0.018 ** 2;
    expect(member!.section!.area).toBeCloseTo(area, 9);
  });

  it('joins its three bodies in line to one: 4 m and 0.9 m at either end', () => {
    const [member, ...others] = read(mapped, { axes: 'centroid' }).members;
    expect(others).toEqual([]);
    expect(norm(subtract(...member!.axis))).toBeCloseTo(5.8, 6);
    expect(member?.section?.name).toBe('2G2');
  });
});

const clipped = publicModel('clipped-beam.ifc');
describe.skipIf(clipped === null)('public model clipped-beam.ifc in detail', () => {
  it('is shorter than its extrusion where a half-space crosses its centroid line', () => {
    const [whole] = read(clipped).members;
    const [cut] = read(clipped, { axes: 'centroid' }).members;
    expect(norm(subtract(...whole!.axis))).toBeCloseTo(11.92, 9);
    expect(norm(subtract(...cut!.axis))).toBeLessThan(8.829);
  });
});

const inches = publicModel('mirrored-profiles-inch.ifc');
describe.skipIf(inches === null)('public model mirrored-profiles-inch.ifc in detail', () => {
  it('has the sections that the American tables give', () => {
    const { members, lengthUnit } = read(inches);
    expect(lengthUnit).toBe('in');
    const area = (name: string) => members.find((m) => m.name === name)!.section!.area / 0.0254 ** 2;
    // AISC Manual: W8x18 5.26 in2, WT8x25 7.37 in2, L6x4x1/2 4.75 in2.
    expect(area('W8x18') / 5.26).toBeCloseTo(1, 1);
    expect(area('WT8x25') / 7.37).toBeCloseTo(1, 1);
    expect(area('L6x4x1/2') / 4.75).toBeCloseTo(1, 1);
    expect(area('FB1/4"x1"')).toBeCloseTo(0.25, 9);
  });
});
