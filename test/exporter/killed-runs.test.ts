import { type ChildProcess, spawn } from 'node:child_process';
import { existsSync, mkdirSync, readdirSync, readFileSync, rmSync, writeFileSync } from 'node:fs';
import { join } from 'node:path';
import { setTimeout as pause } from 'node:timers/promises';
import { fileURLToPath } from 'node:url';
import { describe, expect, it } from 'vitest';
import { TOWER, towerPhysical, worldPoint } from '../importer/analysis/truss-models.ts';
import { pinwright } from '../support/run-cli.ts';
import { temporaryFolder } from '../support/temporary-folder.ts';

const program = fileURLToPath(new URL('../../dist/cli/main.js', import.meta.url));
const folder = temporaryFolder();

const MODEL = 'tower.ifc';
const OUTPUTS = ['a.json', 'b.ifc', 'c.ifczip', 'd.xlsx', 'f.svg', 'g.csv', 'view.ifc'];
const ARGUMENTS = [
  ...['analyse', MODEL, '--brief', 'brief.yaml', '--quiet', '--view', 'view.ifc'],
  ...OUTPUTS.slice(0, -1).flatMap((name) => ['-o', name]),
];
const model = towerPhysical('IFC4');
const near = (node: number) => `{near: [${worldPoint(TOWER.nodes[node]!).join(', ')}], within: 1 mm}`;
const BRIEF = `pinwright: 1
supports: [{at: [${near(0)}, ${near(1)}], fix: xyz}, {at: ${near(2)}, fix: z}]
cases: [{name: dead, nature: permanent, loads: [{selfWeight: 1}]}]
`;

const KILLS = 50;
/** Folders in which runs are killed one after another; as many runs at once. */
const LANES = 3;

function laneFolder(name: string): string {
  const at = join(folder, name);
  mkdirSync(at);
  writeFileSync(join(at, MODEL), model, 'latin1');
  writeFileSync(join(at, 'brief.yaml'), BRIEF);
  return at;
}

const strays = (at: string) => readdirSync(at).filter((name) => name.startsWith('.pinwright-'));
const ended = (child: ChildProcess) => new Promise<void>((done) => child.once('exit', () => done()));

/** Numbers from 0 to 1, the same ones in every run of the test; what moment they hit is up to the machine. */
function* draws(seed: number): Generator<number, never> {
  for (let state = seed; ; ) {
    state = (state * 1664525 + 1013904223) % 2 ** 32;
    yield state / 2 ** 32;
  }
}

/** Kills a run: after a share of its usual time, or soon after its first temporary file is there. */
async function killedRun(at: string, usual: number, draw: () => number, whileWriting: boolean): Promise<void> {
  const before = new Set(strays(at));
  const child = spawn(process.execPath, [program, ...ARGUMENTS], { cwd: at, stdio: 'ignore' });
  const end = ended(child);
  let over = false;
  void end.then(() => {
    over = true;
  });
  if (whileWriting) {
    while (!over && !strays(at).some((name) => !before.has(name))) await pause(1);
    await pause(40 * draw());
  } else {
    await pause(1.1 * usual * draw());
  }
  child.kill('SIGKILL');
  await end;
}

describe('a run that is killed', () => {
  it('at fifty moments leaves each output absent, old or whole, the model as it was, and nothing that the next run does not sweep', async () => {
    const whole = laneFolder('whole');
    const begun = performance.now();
    // The tower sways, so that there are topics to write.
    expect(pinwright(ARGUMENTS, whole)).toMatchObject({ code: 1, stderr: '' });
    const usual = performance.now() - begun;
    const expected = new Map(OUTPUTS.map((name) => [name, readFileSync(join(whole, name))]));
    const seen = { absent: 0, old: 0, whole: 0, strays: 0 };

    const lane = async (number: number) => {
      const at = laneFolder(`lane-${number}`);
      const numbers = draws(number + 1);
      const draw = () => numbers.next().value;
      for (let kill = number; kill < KILLS; kill += LANES) {
        for (const name of OUTPUTS) {
          if (draw() < 0.5) writeFileSync(join(at, name), 'old');
          else rmSync(join(at, name), { force: true });
        }
        await killedRun(at, usual, draw, kill % 2 === 0);
        expect(readFileSync(join(at, MODEL), 'latin1')).toBe(model);
        for (const name of OUTPUTS) {
          const content = existsSync(join(at, name)) ? readFileSync(join(at, name)) : null;
          const state = content === null ? 'absent' : content.toString() === 'old' ? 'old' : 'whole';
          if (state === 'whole') expect(Buffer.compare(content!, expected.get(name)!), name).toBe(0);
          seen[state]++;
        }
        if (strays(at).length > 0) seen.strays++;
      }
      expect(
        await ended(spawn(process.execPath, [program, ...ARGUMENTS], { cwd: at, stdio: 'ignore' })),
      ).toBeUndefined();
      expect(readdirSync(at).sort()).toEqual([MODEL, 'brief.yaml', ...OUTPUTS].sort());
    };
    await Promise.all(Array.from({ length: LANES }, (_, number) => lane(number)));
    // Some were hit in the middle of writing, or the test would say little.
    expect(seen.strays).toBeGreaterThan(0);
  }, 240_000);
});
