// Importing a model (index, axes, sections, materials, context) against what the bare parser takes merely to open the same
// bytes, in turn in one run. Within the time every member is asked for all that it says, since names and tags are looked up only
// when asked for. Both sides are warm: rounds before those that count let the engine compile ours, as the parser comes
// compiled; no collection is forced in between, which would throw that code away. Wall clock and processor time (of all the
// process's threads) are the least of the rounds; on a busy machine only the second means much. Memory is the greatest that a
// process of its own holds, less what the loaded program takes and less the file.
import { execFileSync } from 'node:child_process';
import { mkdtempSync, rmSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { fileURLToPath } from 'node:url';
import { IfcAPI } from 'web-ifc';
import { importModel, openStep } from '../../dist/index.js';
import { seconds } from './measure.mjs';
import { syntheticModel } from './synthetic-model.mjs';

/** Members, rounds that count, rounds before them. */
const SIZES = [
  [1_000, 8, 40],
  [10_000, 8, 8],
  [50_000, 8, 3],
  [300_000, 3, 1],
];

export async function run() {
  const parser = new IfcAPI();
  await parser.Init();
  parser.SetLogLevel(6);
  console.log(
    'members   bytes      import    parser opens   ratio   processor time: import    parser   ratio   import per 10k   peak beyond the file',
  );
  for (const [count, rounds, before] of SIZES) {
    const bytes = syntheticModel(count);
    const ours = async () => {
      const said = everythingSaid((await importModel(openStep(bytes))).members);
      if (said !== count) throw new Error(`${said} members read whole of ${count}`);
    };
    const theirs = () => parser.CloseModel(parser.OpenModel(bytes));
    const [own, bare] = await inTurn([ours, theirs], rounds, before);
    const cells = [
      String(count).padEnd(8),
      `${(bytes.length / 1e6).toFixed(1)} MB`.padStart(9),
      seconds(own.wall).padStart(10),
      seconds(bare.wall).padStart(12),
      (own.wall / bare.wall).toFixed(2).padStart(10),
      seconds(own.processor).padStart(24),
      seconds(bare.processor).padStart(9),
      (own.processor / bare.processor).toFixed(2).padStart(6),
      seconds((own.processor / count) * 10_000).padStart(14),
      `${peakBeyond(bytes, count).toFixed(0)} B a member`.padStart(20),
    ];
    console.log(cells.join('  '));
  }
}

/** Least wall clock and processor time of each side, seconds. */
async function inTurn(sides, rounds, before) {
  const least = sides.map(() => ({ wall: Number.POSITIVE_INFINITY, processor: Number.POSITIVE_INFINITY }));
  for (let round = -before; round < rounds; round++) {
    for (const [i, side] of sides.entries()) {
      const began = performance.now();
      const used = process.cpuUsage();
      await side();
      const { user, system } = process.cpuUsage(used);
      if (round < 0) continue;
      least[i].wall = Math.min(least[i].wall, (performance.now() - began) / 1000);
      least[i].processor = Math.min(least[i].processor, (user + system) / 1e6);
    }
  }
  return least;
}

/** How many members say all that they must; every value is read. */
function everythingSaid(members) {
  let whole = 0;
  for (const member of members) {
    const { globalId, name, tag, type, storey, predefinedType, section, material, assembly, layer } = member;
    const [from, to] = member.axis;
    const sum = from[0] + from[1] + from[2] + to[0] + to[1] + to[2] + sumOf(member.zAxis) + section.area;
    const isNamed = globalId.length > 0 && name.length > 0 && tag.length > 0 && member.class.length > 0;
    const isPlaced = type.length > 0 && storey.length > 0 && predefinedType.length > 0;
    const isBare = assembly === null && layer === null;
    if (isNamed && isPlaced && isBare && Number.isFinite(sum) && material.density > 0) whole++;
  }
  return whole;
}

const sumOf = ([x, y, z]) => x + y + z;

function peakBeyond(bytes, count) {
  const folder = mkdtempSync(join(tmpdir(), 'pinwright-bench-'));
  try {
    const file = join(folder, 'model.ifc');
    writeFileSync(file, bytes);
    const script = fileURLToPath(new URL('import-memory.mjs', import.meta.url));
    const found = JSON.parse(execFileSync(process.execPath, [script, file], { encoding: 'utf8' }));
    if (found.members !== count) throw new Error(`${found.members} members read of ${count}`);
    return (found.bytes - bytes.length) / count;
  } finally {
    rmSync(folder, { recursive: true });
  }
}
