import { readFileSync } from 'node:fs';
import { describe, expect, it } from 'vitest';
import { IFCCARTESIANPOINT, IFCCARTESIANPOINTLIST3D, IFCDIRECTION, IfcAPI } from 'web-ifc';
import { openStep } from '../../src/step/step-file.ts';
import { asList, asNumbers } from '../../src/step/values.ts';
import { publicModel } from '../support/shared.ts';

const MODELS = [
  'analysis-view-house.ifc',
  'analysis-view-portal-ifc4-inch.ifc',
  'beam-standard-case-ifc4.ifc',
  'bent-beam-ifc4x3.ifc',
  'brep-beam.ifc',
  'cardinal-points-ifc4x3.ifc',
  'clipped-beam.ifc',
  'fabrication-model.ifc',
  'grid-placement-ifc4x3.ifc',
  'gridshell-roof.ifc',
  'large-offset.ifc',
  'mapped-axis-beam.ifc',
  'mirrored-profiles-inch.ifc',
  'mixed-frame.ifc',
  'newline-in-string.ifc',
  'six-shapes.ifc',
  'steel-frame.ifc',
  'tessellated-beam-ifc4x3.ifc',
  'timber-house-ifc4.ifc',
];

/** The parser wraps measures and leaves plain reals (directions of IFC2X3) as they are. */
type Wrapped = number | { readonly value: number };

interface PointLine {
  readonly expressID: number;
  readonly Coordinates?: readonly Wrapped[];
  readonly DirectionRatios?: readonly Wrapped[];
  readonly CoordList?: readonly (readonly Wrapped[])[];
}

describe.each(MODELS)('the coordinates of the public model %s', (name) => {
  const path = publicModel(name);

  it.skipIf(path === null)('are read as the independent parser reads them, every one', async () => {
    const bytes = readFileSync(path!);
    const file = openStep(bytes);
    const api = new IfcAPI();
    await api.Init();
    api.SetLogLevel(6);
    const model = api.OpenModel(bytes);
    let compared = 0;
    const differences: string[] = [];
    for (const [type, keyword] of [
      [IFCCARTESIANPOINT, 'IFCCARTESIANPOINT'],
      [IFCDIRECTION, 'IFCDIRECTION'],
      [IFCCARTESIANPOINTLIST3D, 'IFCCARTESIANPOINTLIST3D'],
    ] as const) {
      const ids = api.GetLineIDsWithType(model, type);
      expect(ids.size()).toBe(file.idsOf(keyword).length);
      for (let i = 0; i < ids.size(); i++) {
        const line = api.GetLine(model, ids.get(i)) as PointLine;
        const theirs = (line.Coordinates ?? line.DirectionRatios ?? line.CoordList?.flat() ?? []).map((x) =>
          typeof x === 'number' ? x : x.value,
        );
        const [written] = file.args(line.expressID);
        const ours = line.CoordList === undefined ? asNumbers(written) : asList(written).flatMap(asNumbers);
        compared += theirs.length;
        // The parser rounds the last digit of long decimals; ours is the double nearest to what is written.
        const agree =
          ours.length === theirs.length && ours.every((x, k) => Math.abs(x - theirs[k]) <= 4e-16 * Math.abs(x));
        if (!agree) differences.push(`#${line.expressID}: ${ours} and ${theirs}`);
      }
    }
    api.CloseModel(model);
    api.Dispose();
    expect(differences).toEqual([]);
    expect(compared).toBeGreaterThan(0);
  });
});
