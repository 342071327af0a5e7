// Importing a model (index, axes, sections, materials, context) against what the bare parser takes merely to open it,
// warm, both in one run.
import { IfcAPI } from 'web-ifc';
import { importModel, openStep } from '../../dist/index.js';
import { race, seconds } from './measure.mjs';
import { syntheticModel } from './synthetic-model.mjs';

export async function run() {
  const parser = new IfcAPI();
  await parser.Init();
  parser.SetLogLevel(6);
  console.log('members   bytes      import    parser opens   ratio   import per 10k members');
  for (const [count, rounds] of [
    [1_000, 8],
    [10_000, 6],
    [50_000, 4],
    [300_000, 2],
  ]) {
    const bytes = syntheticModel(count);
    let members = 0;
    const [ours, theirs] = await race(
      [
        async () => {
          members = (await importModel(openStep(bytes))).members.length;
        },
        () => parser.CloseModel(parser.OpenModel(bytes)),
      ],
      rounds,
    );
    if (members !== count) throw new Error(`${members} members read of ${count}`);
    const cells = [
      String(count).padEnd(8),
      `${(bytes.length / 1e6).toFixed(1)} MB`.padStart(9),
      seconds(ours).padStart(10),
      seconds(theirs).padStart(12),
      (ours / theirs).toFixed(2).padStart(10),
      seconds((ours / count) * 10_000).padStart(14),
    ];
    console.log(cells.join('  '));
  }
}
