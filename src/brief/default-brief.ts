import type { Brief } from './types.ts';

/** What holds where no brief is given: default scope, joints by the sections, no supports, no loads. */
export const DEFAULT_BRIEF: Brief = {
  title: null,
  source: null,
  axes: 'given',
  scope: { include: [], exclude: [] },
  joints: { reach: null, offset: null, crossings: 'apart', seated: 'node', pairs: 'one' },
  chords: 'pinned',
  analysis: 'first-order',
  supports: [],
  holds: [],
  materials: { default: null },
  sections: [],
  tensionOnly: [],
  compressionOnly: [],
  cases: [],
  imperfections: null,
  combinations: [],
  codeRule: null,
  site: { altitude: null, nordic: false },
};
