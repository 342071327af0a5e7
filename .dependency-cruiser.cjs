/** The stages flow one way: each may use the domain and the stages before it, never one after it. */
const STAGES = [
  'domain',
  'step',
  'importer',
  'brief',
  'topology',
  'statics',
  'checks',
  'drawing',
  'bcf',
  'exporter',
  'revisions',
];
const ENTRANCES = ['service', 'viewer', 'cli'];

const oneWay = STAGES.map((stage, index) => ({
  name: `${stage}-looks-back-only`,
  severity: 'error',
  from: { path: `^src/${stage}/` },
  to: {
    path: [`^src/(${[...STAGES.slice(index + 1), ...ENTRANCES].join('|')})/`, '^src/(pipeline|index)\\.ts$'],
  },
}));

module.exports = {
  forbidden: [
    ...oneWay,
    {
      name: 'pipeline-serves-the-entrances',
      severity: 'error',
      from: { path: '^src/(pipeline|index)\\.ts$' },
      to: { path: `^src/(${ENTRANCES.join('|')})/` },
    },
    { name: 'no-circles', severity: 'error', from: {}, to: { circular: true } },
    { name: 'no-tests-in-source', severity: 'error', from: { path: '^src/' }, to: { path: '^(test|scripts)/' } },
  ],
  options: {
    tsConfig: { fileName: 'tsconfig.json' },
    tsPreCompilationDeps: true,
    doNotFollow: { path: 'node_modules' },
    exclude: { path: '\\.as\\.ts$' },
  },
};
