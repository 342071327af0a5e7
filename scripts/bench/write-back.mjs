// Writing results into a model against copying the same bytes with a plain stream, both brought to the disk; and what the
// writing step takes in memory beyond the model and the result, which must not grow with the model.
import { createReadStream, createWriteStream, mkdtempSync, readFileSync, rmSync, writeFileSync } from 'node:fs';
import { open } from 'node:fs/promises';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { pipeline } from 'node:stream/promises';
import { contentOf } from '../../dist/exporter/content.js';
import { planOutputs } from '../../dist/exporter/outputs.js';
import { writeOutputs } from '../../dist/exporter/write-outputs.js';
import { openStep } from '../../dist/index.js';
import { race, seconds } from './measure.mjs';
import { syntheticModel } from './synthetic-model.mjs';

/** Elements that results are written on, the same in every model: what grows is the model around them. */
const WITH_RESULTS = 5_000;

export async function run() {
  const folder = mkdtempSync(join(tmpdir(), 'pinwright-bench-'));
  console.log('members   bytes      writes      copies    ratio   memory of the writing step');
  try {
    for (const [count, rounds] of [
      [5_000, 5],
      [50_000, 3],
      [460_000, 3],
    ]) {
      const input = join(folder, 'model.ifc');
      writeFileSync(input, syntheticModel(count));
      console.log((await compared(folder, input, count, rounds)).join('  '));
    }
  } finally {
    rmSync(folder, { recursive: true });
  }
}

async function compared(folder, input, count, rounds) {
  const file = openStep(readFileSync(input));
  const result = resultFor(file);
  const output = join(folder, 'annotated.ifc');
  const plan = planOutputs([output], input);
  const memory = memoryWatch();
  const [ours, theirs] = await race(
    [
      async () => {
        memory.begin();
        await writeOutputs(plan, contentOf(result, file));
        memory.end();
      },
      () => copy(input, join(folder, 'copy.ifc')),
    ],
    rounds,
  );
  return [
    String(count).padEnd(8),
    `${(file.bytes.length / 1e6).toFixed(0)} MB`.padStart(7),
    seconds(ours).padStart(10),
    seconds(theirs).padStart(10),
    (ours / theirs).toFixed(2).padStart(7),
    `${(memory.most / 1e6).toFixed(0)} MB`.padStart(10),
  ];
}

async function copy(from, to) {
  await pipeline(createReadStream(from), createWriteStream(to));
  const handle = await open(to, 'r+');
  await handle.sync();
  await handle.close();
}

function memoryWatch() {
  const watch = { most: 0, begin, end };
  let before = 0;
  let timer = null;
  const look = () => {
    watch.most = Math.max(watch.most, process.memoryUsage().rss - before);
  };
  function begin() {
    before = process.memoryUsage().rss;
    timer = setInterval(look, 5);
  }
  function end() {
    look();
    clearInterval(timer);
  }
  return watch;
}

/** A bar for each of the first elements, with forces of two cases. */
function resultFor(file) {
  const globalIds = file
    .idsOf('IFCMEMBER')
    .slice(0, WITH_RESULTS)
    .map((id) => file.stringAt(id, 0));
  const force = (k) => 1000 * Math.sin(k);
  const runOf = (name, factor) => ({
    name,
    nature: 'permanent',
    loads: [],
    loadSum: [0, 0, 0],
    axialForce: globalIds.map((_, k) => factor * force(k)),
    displacement: [],
    reactions: [],
    residual: 0,
  });
  const extreme = (value) => (value === 0 ? null : { force: value, from: 'dead' });
  return {
    generator: { name: 'pinwright', version: 'bench' },
    caution: 'made up for a benchmark',
    model: { file: 'model.ifc', sha256: '', schema: 'IFC4', lengthUnit: 'mm', source: 'physical' },
    members: globalIds.map((globalId) => ({
      globalId,
      class: 'IfcMember',
      axis: [
        [0, 0, 0],
        [1, 0, 0],
      ],
      shift: 0,
    })),
    nodes: [],
    bars: globalIds.map((member, k) => ({ id: `b${k}`, name: `M${k}`, member, from: 'n1', to: 'n2', length: 1 })),
    findings: [],
    stability: { modes: [], mechanisms: 0, selfStressStates: 0, setAside: [], freeBody: false, gap: 1 },
    cases: [runOf('dead', 1), runOf('wind', -1)],
    combinations: [],
    envelope: globalIds.map((_, k) => ({
      bar: `b${k}`,
      tension: extreme(Math.max(0, force(k))),
      compression: extreme(Math.min(0, force(k))),
    })),
    checks: [],
  };
}
