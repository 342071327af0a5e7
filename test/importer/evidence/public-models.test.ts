import { readFileSync } from 'node:fs';
import { describe, expect, it } from 'vitest';
import { IFCDISCRETEACCESSORY, IFCPLATE, IfcAPI } from 'web-ifc';
import { dot, subtract, type Vec3 } from '../../../src/domain/vector.ts';
import { openStep } from '../../../src/step/step-file.ts';
import { fixture, publicModel } from '../../support/shared.ts';
import { evidenceOfFile } from './evidence-of.ts';

/** The corners of each element's mesh, world metres, z up, by GlobalId. */
async function meshCorners(bytes: Uint8Array, type: number): Promise<Map<string, Vec3[]>> {
  const api = new IfcAPI();
  await api.Init();
  api.SetLogLevel(6);
  const model = api.OpenModel(bytes, { COORDINATE_TO_ORIGIN: false });
  const corners = new Map<string, Vec3[]>();
  const ids = api.GetLineIDsWithType(model, type);
  for (let i = 0; i < ids.size(); i++) {
    const line = api.GetLine(model, ids.get(i)) as { GlobalId: { value: string } };
    const points: Vec3[] = [];
    const parts = api.GetFlatMesh(model, ids.get(i)).geometries;
    for (let k = 0; k < parts.size(); k++) {
      const { geometryExpressID, flatTransformation: m } = parts.get(k);
      const geometry = api.GetGeometry(model, geometryExpressID);
      const data = api.GetVertexArray(geometry.GetVertexData(), geometry.GetVertexDataSize());
      for (let v = 0; v < data.length; v += 6) {
        const row = (r: number) => m[r]! * data[v]! + m[4 + r]! * data[v + 1]! + m[8 + r]! * data[v + 2]! + m[12 + r]!;
        // The parser's own world has y up.
        points.push([row(0), -row(2), row(1)]);
      }
      geometry.delete();
    }
    corners.set(line.GlobalId.value, points);
  }
  api.CloseModel(model);
  api.Dispose();
  return corners;
}

/** A millimetre: the meshes are single precision, circles are polygons. */
const CLOSE = 1e-3;

async function compare(bytes: Uint8Array, type: number): Promise<{ count: number; tight: number }> {
  const { plates, unreadPlates } = evidenceOfFile(openStep(bytes));
  expect(unreadPlates).toEqual([]);
  const meshes = await meshCorners(bytes, type);
  expect(plates.length).toBe(meshes.size);
  let tight = 0;
  for (const plate of plates) {
    const points = meshes.get(plate.globalId)!;
    expect(points.length).toBeGreaterThan(0);
    let isTight = true;
    plate.axes.forEach((axis, k) => {
      const heights = points.map((p) => dot(subtract(p, plate.centre), axis));
      const half = plate.halfSizes[k]!;
      expect(Math.max(...heights)).toBeLessThan(half + CLOSE);
      expect(Math.min(...heights)).toBeGreaterThan(-half - CLOSE);
      if (Math.max(...heights) < half - CLOSE || Math.min(...heights) > CLOSE - half) isTight = false;
    });
    if (isTight) tight++;
  }
  return { count: plates.length, tight };
}

describe('the boxes of plates, against the meshes of an independent parser', () => {
  it('fit the gusset plates of the demo roof on all sides', async () => {
    const { count, tight } = await compare(readFileSync(fixture('boat-hall-a.ifc')), IFCPLATE);
    expect([count, tight]).toEqual([112, 112]);
  });

  const fabrication = publicModel('fabrication-model.ifc');
  it.skipIf(fabrication === null)('fit all accessories of the public fabrication model on all sides', async () => {
    const { count, tight } = await compare(readFileSync(fabrication!), IFCDISCRETEACCESSORY);
    expect([count, tight]).toEqual([409, 409]);
  });
});

describe('the relationships of public models', () => {
  for (const [name, wanted] of [
    ['analysis-view-house.ifc', 12],
    ['mixed-frame.ifc', 3],
    ['timber-house-ifc4.ifc', 16],
  ] as const) {
    const path = publicModel(name);
    it.skipIf(path === null)(`are all read from ${name}`, () => {
      const { related } = evidenceOfFile(openStep(readFileSync(path!)));
      expect(related.filter(({ by }) => by === 'IfcRelConnectsPathElements')).toHaveLength(wanted);
    });
  }
});
