import { readFileSync } from 'node:fs';
import { describe, expect, it } from 'vitest';
import { IFCCARTESIANPOINT, IFCDIRECTION, IfcAPI } from 'web-ifc';
import { openStep } from '../../src/step/step-file.ts';
import { asNumbers } from '../../src/step/values.ts';
import { publicModel } from '../support/shared.ts';

const MODELS = [
  'analysis-view-house.ifc',
  'beam-standard-case-ifc4.ifc',
  'clipped-beam.ifc',
  'fabrication-model.ifc',
  'grid-placement-ifc4x3.ifc',
  'gridshell-roof.ifc',
  'large-offset.ifc',
  'mapped-axis-beam.ifc',
  'mirrored-profiles-inch.ifc',
  'mixed-frame.ifc',
  'six-shapes.ifc',
  'steel-frame.ifc',
  'timber-house-ifc4.ifc',
];

/** The parser wraps measures and leaves plain reals (directions of IFC2X3) as they are. */
type Wrapped = number | { readonly value: number };

interface PointLine {
  readonly expressID: number;
  readonly Coordinates?: readonly Wrapped[];
  readonly DirectionRatios?: readonly Wrapped[];
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
    ] as const) {
      const ids = api.GetLineIDsWithType(model, type);
      expect(ids.size()).toBe(file.idsOf(keyword).length);
      for (let i = 0; i < ids.size(); i++) {
        const line = api.GetLine(model, ids.get(i)) as PointLine;
        const theirs = (line.Coordinates ?? line.DirectionRatios ?? []).map((x) =>
          typeof x === 'number' ? x : x.value,
        );
        const ours = asNumbers(file.args(line.expressID)[0]);
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
