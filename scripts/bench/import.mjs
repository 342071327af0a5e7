// Importing a model (index, axes, sections, materials, context) against what the bare parser takes merely to open it,
// warm, both in one run. What is looked up only when it is asked for is asked for within the time. Memory is the greatest
// that a process of its own holds, less what the loaded program takes and less the file.
import { execFileSync } from 'node:child_process';
import { mkdtempSync, rmSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { fileURLToPath } from 'node:url';
import { IfcAPI } from 'web-ifc';
import { importModel, openStep } from '../../dist/index.js';
import { race, seconds } from './measure.mjs';
import { syntheticModel } from './synthetic-model.mjs';

const SIZES = [
  [1_000, 8],
  [10_000, 8],
  [50_000, 8],
  [300_000, 3],
];

export async function run() {
  const parser = new IfcAPI();
  await parser.Init();
  parser.SetLogLevel(6);
  console.log('members   bytes      import    parser opens   ratio   import per 10k members   peak beyond the file');
  for (const [count, rounds] of SIZES) {
    const bytes = syntheticModel(count);
    let said = 0;
    const [ours, theirs] = await race(
      [
        async () => {
          said = everythingSaid((await importModel(openStep(bytes))).members);
        },
        () => parser.CloseModel(parser.OpenModel(bytes)),
      ],
      rounds,
    );
    if (said !== count) throw new Error(`${said} members read whole of ${count}`);
    const cells = [
      String(count).padEnd(8),
      `${(bytes.length / 1e6).toFixed(1)} MB`.padStart(9),
      seconds(ours).padStart(10),
      seconds(theirs).padStart(12),
      (ours / theirs).toFixed(2).padStart(10),
      seconds((ours / count) * 10_000).padStart(14),
      `${peakBeyond(bytes, count).toFixed(0)} B a member`.padStart(24),
    ];
    console.log(cells.join('  '));
  }
}

/** How many members say all that they must; every value is read. */
function everythingSaid(members) {
  let whole = 0;
  for (const member of members) {
    const { name, tag, type, storey, predefinedType, section, material, assembly, layer } = member;
    const texts = [member.globalId, name, tag, type, storey, predefinedType, member.class];
    const numbers = [...member.axis[0], ...member.axis[1], ...member.zAxis, section.area, material.density];
    const isWhole = texts.every((text) => text.length > 0) && numbers.every(Number.isFinite);
    if (isWhole && assembly === null && layer === null) whole++;
  }
  return whole;
}

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
