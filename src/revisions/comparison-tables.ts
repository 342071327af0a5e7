import type { ResultFinding } from '../domain/result.ts';
import { coordinates, each, joined, type Table } from '../exporter/table.ts';
import type { Comparison } from './comparison.ts';

/** The comparison's tables: heads carry the unit, SI, GlobalIds name the members. */
export const COMPARISON_TABLES = {
  forces: ({ forces }: Comparison): Table => ({
    heads: [
      'old member',
      'new member',
      'tension before (N)',
      'tension (N)',
      'compression before (N)',
      'compression (N)',
      'change (N)',
      'utilisation before',
      'utilisation',
    ],
    rows: each(forces, ({ old, new: now, from, to, change, utilisation }) => [
      old,
      now,
      from.tension,
      to.tension,
      from.compression,
      to.compression,
      change,
      utilisation?.[0] ?? null,
      utilisation?.[1] ?? null,
    ]),
  }),
  members: (comparison: Comparison): Table => ({
    heads: [
      'old member',
      'new member',
      'found by',
      'what',
      'moved (m)',
      'aside (m)',
      'section before',
      'section',
      'material before',
      'material',
      'rejoined',
    ],
    rows: memberRows(comparison),
  }),
  supports: ({ supports }: Comparison): Table => ({
    heads: ['place', 'x (m)', 'y (m)', 'z (m)', 'held before', 'held'],
    rows: each(supports, ({ place, at, old, new: now }) => [place, ...coordinates(at), old, now]),
  }),
  loads: ({ loads }: Comparison): Table => ({
    heads: [
      'case',
      ...['x', 'y', 'z'].map((axis) => `sum before ${axis} (N)`),
      ...['x', 'y', 'z'].map((axis) => `sum ${axis} (N)`),
      'elsewhere (N)',
    ],
    rows: each(loads, ({ case: name, old, new: now, elsewhere }) => [
      name,
      ...coordinates(old),
      ...coordinates(now),
      elsewhere,
    ]),
  }),
  findings: ({ findings }: Comparison): Table => ({
    heads: ['what', 'severity', 'code', 'message', 'advice', 'members', 'place', 'x (m)', 'y (m)', 'z (m)', 'gap (m)'],
    rows: [
      ...findings.new.map((one) => findingRow('new', one)),
      ...findings.gone.map((one) => findingRow('gone', one)),
      ...findings.standing.map((one) => findingRow('standing', one)),
    ],
  }),
} as const;

export type ComparisonTableName = keyof typeof COMPARISON_TABLES;
export const COMPARISON_TABLE_NAMES = Object.keys(COMPARISON_TABLES) as readonly ComparisonTableName[];

function memberRows({ matched, added, removed, changed }: Comparison): Table['rows'] {
  const changes = new Map(changed.map((change) => [change.new, change]));
  return [
    ...removed.map((id) => [id, null, null, 'removed', null, null, null, null, null, null, null]),
    ...added.map((id) => [null, id, null, 'added', null, null, null, null, null, null, null]),
    ...matched.map(({ old, new: now, by }) => {
      const change = changes.get(now);
      return [
        old,
        now,
        by,
        change === undefined ? 'as it was' : 'changed',
        change?.moved ?? null,
        change?.aside ?? null,
        ...(change?.section ?? [null, null]),
        ...(change?.material ?? [null, null]),
        change?.rejoined ? 'yes' : null,
      ];
    }),
  ];
}

const findingRow = (what: string, { severity, code, message, advice, members, place, at, gap }: ResultFinding) => [
  what,
  severity,
  code,
  message,
  advice,
  joined(members),
  place,
  ...coordinates(at),
  gap,
];
