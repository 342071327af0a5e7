// `npm run demo`: installs and builds what is missing, analyses the demo roof and says where the results are.
import { mkdirSync } from 'node:fs';
import { build, install, root, run } from './steps.mjs';

if (!install() || !build()) process.exit(1);
mkdirSync(`${root}/out/demo`, { recursive: true });
const outputs = ['boat-hall-a.analysed.ifc', 'boat-hall-a.json', 'boat-hall-a.csv/'];
const ok = run(process.execPath, [
  'dist/cli/main.js',
  'analyse',
  'fixtures/boat-hall-a.ifc',
  '--brief',
  'fixtures/boat-hall.yaml',
  ...outputs.flatMap((name) => ['-o', `out/demo/${name}`]),
]);
process.exit(ok ? 0 : 1);
