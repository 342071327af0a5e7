import { execFileSync } from 'node:child_process';
import { writeFileSync } from 'node:fs';
import { join } from 'node:path';
import { describe, expect, it } from 'vitest';
import { IFCBUILDINGELEMENTPROXY, IfcAPI } from 'web-ifc';
import { PALETTE } from '../../../../src/drawing/palette.ts';
import { joinChunks } from '../../../../src/exporter/chunks.ts';
import { writePicture } from '../../../../src/exporter/ifc/picture/write-picture.ts';
import { checker } from '../../../support/shared.ts';
import { temporaryFolder } from '../../../support/temporary-folder.ts';
import { someResult } from '../../support.ts';

const IDS = ['a', 'b', 'c'].map((letter) => letter.padStart(22, '0'));

function resultIn(schema: string) {
  const result = someResult(IDS);
  result.model.schema = schema;
  // One bar pulls, one pushes, the others carry nothing.
  result.envelope = result.bars.map(({ id }, k) => ({
    bar: id,
    tension: k === 0 ? { force: 4e4, from: 'dead' } : null,
    compression: k === 1 ? { force: -1e4, from: 'dead' } : null,
  }));
  return result;
}

interface Drawn {
  readonly colour: string;
  /** Extents along x, y (depth) and z (up) in the world, m. */
  readonly least: readonly number[];
  readonly most: readonly number[];
}

const hex = (x: number) =>
  Math.round(255 * x)
    .toString(16)
    .padStart(2, '0');

/** What an independent parser draws of a file: by element, its colour and where it is. */
async function drawn(bytes: Uint8Array): Promise<Map<string, Drawn>> {
  const api = new IfcAPI();
  await api.Init();
  api.SetLogLevel(6);
  const id = api.OpenModel(bytes);
  const found = new Map<string, Drawn>();
  const elements = api.GetLineIDsWithType(id, IFCBUILDINGELEMENTPROXY);
  for (let k = 0; k < elements.size(); k++) {
    const element = elements.get(k);
    const name = api.GetLine(id, element).Name.value as string;
    const { geometries } = api.GetFlatMesh(id, element);
    const { color, flatTransformation: m, geometryExpressID } = geometries.get(0);
    const geometry = api.GetGeometry(id, geometryExpressID);
    const numbers = api.GetVertexArray(geometry.GetVertexData(), geometry.GetVertexDataSize());
    const least = [Infinity, Infinity, Infinity];
    const most = [-Infinity, -Infinity, -Infinity];
    for (let v = 0; v < numbers.length; v += 6) {
      const at = [0, 1, 2].map(
        (r) => m[r]! * numbers[v]! + m[4 + r]! * numbers[v + 1]! + m[8 + r]! * numbers[v + 2]! + m[12 + r]!,
      );
      // The parser turns the model's z up into its own y.
      const world = [at[0]!, -at[2]!, at[1]!];
      for (const axis of [0, 1, 2]) {
        least[axis] = Math.min(least[axis]!, world[axis]!);
        most[axis] = Math.max(most[axis]!, world[axis]!);
      }
    }
    found.set(name, { colour: `#${hex(color.x)}${hex(color.y)}${hex(color.z)}`, least, most });
  }
  api.CloseModel(id);
  return found;
}

const check = checker('check_ifc.py');
const folder = temporaryFolder();

describe.each(['IFC2X3', 'IFC4', 'IFC4X3_ADD2'])('the picture of a truss in %s', (schema) => {
  it('draws every bar along its line, blue where it pulls, orange where it pushes, grey where it does neither', async () => {
    const result = resultIn(schema);
    const found = await drawn(joinChunks(writePicture(result)));
    const at = new Map(result.nodes.map((node) => [node.id, node.at]));
    for (const [k, bar] of result.bars.entries()) {
      const { colour, least, most } = found.get(bar.name)!;
      expect(colour).toBe(k === 0 ? PALETTE.tension : k === 1 ? PALETTE.compression : PALETTE.idle);
      const [from, to] = [at.get(bar.from)!, at.get(bar.to)!];
      for (const axis of [0, 1, 2]) {
        expect(Math.abs(least[axis]! - Math.min(from[axis]!, to[axis]!))).toBeLessThan(0.11);
        expect(Math.abs(most[axis]! - Math.max(from[axis]!, to[axis]!))).toBeLessThan(0.11);
      }
    }
    const thickness = (name: string) => found.get(name)!.most[1]! - found.get(name)!.least[1]!;
    expect(thickness(result.bars[0]!.name)).toBeGreaterThan(thickness(result.bars[1]!.name));
    const marks = [...found.keys()].filter((name) => /^\d+\. (error|warning|note)/.test(name));
    expect(marks.length).toBe(result.findings.filter((finding) => finding.at !== null).length);
  });

  it.skipIf(check === null)('has no fault that an independent checker finds', () => {
    const path = join(folder, `${schema}.ifc`);
    writeFileSync(path, joinChunks(writePicture(resultIn(schema))));
    expect(execFileSync('python3', [check!, path], { encoding: 'utf8' })).toMatch(/^0 problems in \d{2}/);
  });
});
