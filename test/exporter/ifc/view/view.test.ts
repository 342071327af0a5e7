import { execFileSync } from 'node:child_process';
import { mkdtempSync, readFileSync, rmSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { afterAll, describe, expect, it } from 'vitest';
import {
  IFCMEMBER,
  IFCRELASSIGNSTOPRODUCT,
  IFCSTRUCTURALCURVEMEMBER,
  IFCSTRUCTURALCURVEREACTION,
  IFCSTRUCTURALPOINTCONNECTION,
  IFCSTRUCTURALRESULTGROUP,
} from 'web-ifc';
import { joinChunks } from '../../../../src/exporter/chunks.ts';
import { writeView } from '../../../../src/exporter/ifc/view/write-view.ts';
import { TOWER, towerPhysical, worldPoint } from '../../../importer/analysis/truss-models.ts';
import { reopened } from '../../../support/ifc-parser.ts';
import { checker, fixture } from '../../../support/shared.ts';
import { thereAndBack, told } from './support.ts';

const near = (node: number) => `{near: [${worldPoint(TOWER.nodes[node]!).join(', ')}], within: 1 mm}`;
const LOADS = `
cases:
  - {name: "dead 'G' Ελλάδα 屋根 🏗 \\\\", nature: permanent, loads: [{selfWeight: 1}]}
  - {name: warm, nature: thermal, loads: [{temperature: 25 K, on: {class: IfcMember}}, {misfit: 2 mm, on: {name: "bar 11"}}]}
  - {name: wind, nature: wind, loads: [{point: [12000, 3000, -500], at: ${near(5)}}]}
combinations: [{name: most, limit: equilibrium, factors: {"dead 'G' Ελλάδα 屋根 🏗 \\\\": 1.35, wind: 1.5}}]
`;
const PINNED = `pinwright: 1
supports: [{at: [${near(0)}, ${near(1)}], fix: xyz}, {at: ${near(2)}, fix: z}]${LOADS}`;
const LEANING = `pinwright: 1
supports:
  - {at: [${near(0)}, ${near(1)}], fix: xyz, settle: {z: -4 mm}}
  - {at: ${near(2)}, fix: {along: [1, 2, 3]}}
  - {at: ${near(2)}, spring: {x: 5 MN/m, z: 2 MN/m}}
holds: [{nodes: {near: [${worldPoint(TOWER.nodes[3]!).join(', ')}], within: 1 mm}, along: [0, 1, 0.5], because: a wall}]
tensionOnly: [{name: "bar 10"}]${LOADS}`;

const check = checker('check_ifc.py');
const folder = mkdtempSync(join(tmpdir(), 'pinwright-view-'));
afterAll(() => rmSync(folder, { recursive: true }));

function problems(name: string, view: Uint8Array): string {
  const path = join(folder, `${name}.ifc`);
  writeFileSync(path, view);
  try {
    return execFileSync('python3', [check!, path], { encoding: 'utf8' });
  } catch (error) {
    return String((error as { stdout?: string }).stdout ?? error);
  }
}

const SCHEMAS = ['IFC2X3', 'IFC4', 'IFC4X3'] as const;

describe.each(SCHEMAS)('the view of a truss in %s', (schema) => {
  it('is read back to the same truss, loads and forces', async () => {
    const { there, back } = await thereAndBack(towerPhysical(schema), PINNED);
    expect(told(back, there)).toEqual(told(there, there));
    expect(back.model.source).toBe('analysis');
    const material = there.members[0]!.material!;
    for (const member of back.members) {
      expect(member.section?.area).toBeCloseTo(there.members[0]!.section!.area, 9);
      expect(member.material).toMatchObject({ ...material, from: 'properties' });
    }
  });

  it('is read back with leaning supports, springs, holds, settlements, temperature, misfit and bars that only pull', async () => {
    const { there, back, text } = await thereAndBack(towerPhysical(schema), LEANING);
    expect(told(back, there)).toEqual(told(there, there));
    expect(back.oneWay?.tensionOnly).toHaveLength(1);
    // What leans cannot be said in IFC2X3.
    expect(text).toContain(`FILE_SCHEMA(('${{ IFC2X3: 'IFC4', IFC4: 'IFC4', IFC4X3: 'IFC4X3_ADD2' }[schema]}'))`);
  });

  it.skipIf(check === null)('has no fault that an independent checker finds in the whole file', async () => {
    const pinned = await thereAndBack(towerPhysical(schema), PINNED);
    expect(problems(`${schema}-pinned`, pinned.view)).toMatch(/^0 problems in \d{3}/);
    const leaning = await thereAndBack(towerPhysical(schema), LEANING);
    expect(problems(`${schema}-leaning`, leaning.view)).toMatch(/^0 problems in \d{3}/);
  });

  it('is the same for the same result, whatever the name of the file', async () => {
    const { there, view } = await thereAndBack(towerPhysical(schema), PINNED);
    const renamed = { ...there, model: { ...there.model, file: 'other.ifc' } };
    expect(Buffer.compare(joinChunks(writeView(renamed)), view)).toBe(0);
  });
});

describe('the view of the demo roof', () => {
  it('is read back to the same forces in every case, with the sections it was drawn with', async () => {
    // Forces of combinations are told above; here every case is.
    const given = readFileSync(fixture('boat-hall.yaml'), 'utf8');
    const brief = given.replace(/^combinations:.*$/m, 'combinations: none');
    expect(brief).not.toBe(given);
    const { there, view, back } = await thereAndBack(readFileSync(fixture('boat-hall-a.ifc')), brief);
    expect(told(back, there)).toEqual(told(there, there));
    const sections = (result: typeof there) => [
      ...new Set(result.members.map(({ section }) => `${section?.name} ${section?.shape}`)),
    ];
    expect(sections(back).sort()).toEqual(sections(there).sort());
    const solved = there.cases.length + there.combinations.length;
    await reopened(view, ({ count, lines }) => {
      expect(count(IFCSTRUCTURALCURVEMEMBER)).toBe(there.bars.length);
      expect(count(IFCSTRUCTURALPOINTCONNECTION)).toBe(there.nodes.length);
      expect(count(IFCSTRUCTURALRESULTGROUP)).toBe(solved);
      expect(count(IFCSTRUCTURALCURVEREACTION)).toBe(solved * there.bars.length);
      expect(count(IFCRELASSIGNSTOPRODUCT)).toBe(there.members.length);
      const globalIds = new Set(lines(IFCMEMBER).map((line) => (line.GlobalId as { value: string }).value));
      expect(
        there.members.filter((member) => member.class === 'IfcMember').every(({ globalId }) => globalIds.has(globalId)),
      ).toBe(true);
    });
  }, 60_000);
});
