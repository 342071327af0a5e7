import { writeFileSync } from 'node:fs';
import { join } from 'node:path';
import { describe, expect, it } from 'vitest';
import type { Vec3 } from '../../src/domain/vector.ts';
import { randomFrom } from '../statics/support/trusses.ts';
import { runChecker } from '../support/run-cli.ts';
import { checker } from '../support/shared.ts';
import { temporaryFolder } from '../support/temporary-folder.ts';
import { DrawnModel } from './support/drawn-model.ts';

/** A Pratt truss of six panels, chord by chord piece by piece, every work point up to `hair` m out of the plane it is drawn in. */
async function drawn(angle: number, hair: number, load = '[0, 0, -5 kN]') {
  const random = randomFrom(7);
  const points = new Map<string, Vec3>();
  const at = (i: number, top: boolean): Vec3 => {
    const key = `${i} ${top}`;
    const out = hair * (2 * random() - 1);
    const [c, s] = [Math.cos(angle), Math.sin(angle)];
    if (!points.has(key)) points.set(key, [3 * i * c - out * s, 3 * i * s + out * c, top ? 2 : 0]);
    return points.get(key)!;
  };
  const model = new DrawnModel();
  const bar = (mark: string, from: Vec3, to: Vec3) => model.member({ mark, from, to });
  for (let i = 0; i < 6; i++) {
    bar(`low${i}`, at(i, false), at(i + 1, false));
    bar(`top${i}`, at(i, true), at(i + 1, true));
    bar(`web${i}`, at(i, true), at(i + 1, false));
  }
  for (let i = 0; i <= 6; i++) bar(`post${i}`, at(i, false), at(i, true));
  const [x, y] = [18 * Math.cos(angle), 18 * Math.sin(angle)];
  return model.run(`
supports:
  - {at: {near: [0, 0, 0], within: 50 mm}, fix: xyz}
  - {at: {near: [${x}, ${y}, 0], within: 50 mm}, fix: xyz}
cases:
  - {name: dead, nature: permanent, loads: [{selfWeight: 1.0}, {point: ${load}, at: {top: true}}]}`);
}

const resultChecker = checker('check_result.py');
const folder = temporaryFolder();

describe.each([0, 0.3])('a truss drawn a hair off its plane, at %f in plan', (angle) => {
  it('carries a load in its plane, every joint in balance, and its nodes are moved by that hair', async () => {
    const { result } = await drawn(angle, 5e-5);
    expect(result.stability.mechanisms).toBe(12);
    expect(result.stability.gap!).toBeGreaterThan(1e6);
    const [dead] = result.cases;
    expect(dead.refused).toBeUndefined();
    expect(dead.residual!).toBeLessThan(1e-12);
    const shifts = result.members.map(({ shift }) => shift);
    expect(Math.max(...shifts)).toBeGreaterThan(1e-5);
    expect(Math.max(...shifts)).toBeLessThan(1.1e-4);
  });

  it.skipIf(resultChecker === null)('as an independent checker finds too', async () => {
    const { result } = await drawn(angle, 5e-5);
    const file = join(folder, `hair-${angle}.json`);
    writeFileSync(file, JSON.stringify(result));
    expect(runChecker(resultChecker!, [file])).toMatchObject({ code: 0 });
  });

  it('is refused a load out of it', async () => {
    const { result } = await drawn(angle, 5e-5, '[1 kN, 2 kN, 0]');
    expect(result.cases[0].refused).toContain('does work on a mechanism');
  });
});

it('a truss bent out of its plane by 50 mm stays as it is drawn', async () => {
  const { result } = await drawn(0, 0.05);
  expect(Math.max(...result.nodes.map(({ at }) => Math.abs(at[1])))).toBeGreaterThan(0.04);
});
