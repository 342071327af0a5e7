import type { Result } from '../domain/result.ts';
import { distance } from '../domain/vector.ts';
import { bearingsTable } from './schedules/bearings-table.ts';
import { jointsTable } from './schedules/joints-table.ts';
import { type Cell, coordinates, each, joined, type Table } from './table.ts';

/** Every table of the result by its name, in the order in which one reads them. */
export const TABLES = {
  bars: barsTable,
  members: membersTable,
  nodes: nodesTable,
  reactions: reactionsTable,
  bearings: bearingsTable,
  joints: jointsTable,
  envelope: envelopeTable,
  forces: forcesTable,
  displacements: displacementsTable,
  cases: casesTable,
  combinations: combinationsTable,
  findings: findingsTable,
} as const satisfies Record<string, (result: Result) => Table>;

export type TableName = keyof typeof TABLES;

export const TABLE_NAMES = Object.keys(TABLES) as readonly TableName[];

/** The bars with their members and their greatest forces: what goes to whoever designs the connections. */
function barsTable(result: Result): Table {
  const memberOf = new Map(result.members.map((member) => [member.globalId, member]));
  const envelopeOf = new Map(result.envelope.map((entry) => [entry.bar, entry]));
  const heads = [
    'bar',
    'name',
    'member',
    'member name',
    'tag',
    'all members',
    'from node',
    'to node',
    'length (m)',
    'section',
    'material',
    'tension (N)',
    'tension from',
    'compression (N)',
    'compression from',
  ];
  const rows = each(result.bars, (bar) => {
    const member = memberOf.get(bar.member);
    const envelope = envelopeOf.get(bar.id);
    return [
      bar.id,
      bar.name,
      bar.member,
      member?.name ?? null,
      member?.tag ?? null,
      joined(bar.members ?? [bar.member]),
      bar.from,
      bar.to,
      bar.length,
      member?.section?.name ?? null,
      member?.material?.name ?? null,
      envelope?.tension?.force ?? null,
      envelope?.tension?.from ?? null,
      envelope?.compression?.force ?? null,
      envelope?.compression?.from ?? null,
    ];
  });
  return { heads, rows };
}

function membersTable(result: Result): Table {
  const heads = [
    'id',
    'global id',
    'part',
    'name',
    'tag',
    'class',
    'predefined type',
    'type',
    'assembly',
    'storey',
    'place',
    'axis from',
    'x1 (m)',
    'y1 (m)',
    'z1 (m)',
    'x2 (m)',
    'y2 (m)',
    'z2 (m)',
    'length (m)',
    'shift (m)',
    'turn (rad)',
    'section',
    'shape',
    'area (m2)',
    'inertia y (m4)',
    'inertia z (m4)',
    'section from',
    'material',
    'elastic modulus (Pa)',
    'density (kg/m3)',
    'yield strength (Pa)',
    'material from',
  ];
  const rows = each(result.members, (member) => [
    member.id,
    member.globalId,
    member.part,
    member.name,
    member.tag,
    member.class,
    member.predefinedType,
    member.type,
    member.assembly,
    member.storey,
    member.place,
    member.axisFrom,
    ...member.axis[0],
    ...member.axis[1],
    distance(member.axis[0], member.axis[1]),
    member.shift,
    member.turn,
    member.section?.name ?? null,
    member.section?.shape ?? null,
    member.section?.area ?? null,
    member.section?.inertiaY ?? null,
    member.section?.inertiaZ ?? null,
    member.section?.from ?? null,
    member.material?.name ?? null,
    member.material?.elasticModulus ?? null,
    member.material?.density ?? null,
    member.material?.yieldStrength ?? null,
    member.material?.from ?? null,
  ]);
  return { heads, rows };
}

function nodesTable(result: Result): Table {
  const heads = [
    'node',
    'x (m)',
    'y (m)',
    'z (m)',
    'fixed',
    'place',
    'carried by bar',
    'fraction along bar',
    'members',
  ];
  const rows = each(result.nodes, (node) => [
    node.id,
    ...node.at,
    node.fixed,
    node.place,
    node.carriedBy?.bar ?? null,
    node.carriedBy?.t ?? null,
    joined(node.members),
  ]);
  return { heads, rows };
}

function reactionsTable(result: Result): Table {
  const placeOf = new Map(result.nodes.map((node) => [node.id, node.place]));
  function* rows(): Generator<readonly Cell[]> {
    for (const { kind, run } of runs(result)) {
      for (const { node, force } of run.reactions) yield [kind, run.name, node, placeOf.get(node) ?? null, ...force];
    }
  }
  return { heads: ['kind', 'of', 'node', 'place', 'Rx (N)', 'Ry (N)', 'Rz (N)'], rows: rows() };
}

function envelopeTable(result: Result): Table {
  const heads = ['bar', 'tension (N)', 'tension from', 'compression (N)', 'compression from'];
  const rows = each(result.envelope, ({ bar, tension, compression }) => [
    bar,
    tension?.force ?? null,
    tension?.from ?? null,
    compression?.force ?? null,
    compression?.from ?? null,
  ]);
  return { heads, rows };
}

/** One row a bar, one column a case or combination. */
function forcesTable(result: Result): Table {
  const all = [...runs(result)];
  const heads = ['bar', 'name', ...all.map(({ kind, run }) => `${kind} ${run.name} (N)`)];
  const rows = each(result.bars, (bar, index) => [
    bar.id,
    bar.name,
    ...all.map(({ run }) => run.axialForce[index] ?? null),
  ]);
  return { heads, rows };
}

function displacementsTable(result: Result): Table {
  function* rows(): Generator<readonly Cell[]> {
    for (const { kind, run } of runs(result)) {
      for (const [index, node] of result.nodes.entries()) {
        yield [kind, run.name, node.id, ...coordinates(run.displacement[index] ?? null)];
      }
    }
  }
  return { heads: ['kind', 'of', 'node', 'ux (m)', 'uy (m)', 'uz (m)'], rows: rows() };
}

function casesTable(result: Result): Table {
  const heads = [
    'case',
    'nature',
    'refused',
    'loaded nodes',
    'load sum x (N)',
    'load sum y (N)',
    'load sum z (N)',
    'residual',
  ];
  const rows = each(result.cases, (loadCase) => [
    loadCase.name,
    loadCase.nature,
    loadCase.refused ?? null,
    loadCase.loads.length,
    ...loadCase.loadSum,
    loadCase.residual,
  ]);
  return { heads, rows };
}

function combinationsTable(result: Result): Table {
  const rows = each(result.combinations, ({ name, limit, factors, refused }) => [
    name,
    limit,
    joined(Object.entries(factors).map(([loadCase, factor]) => `${factor} ${loadCase};`)),
    refused ?? null,
  ]);
  return { heads: ['combination', 'limit', 'factors', 'refused'], rows };
}

function findingsTable(result: Result): Table {
  const heads = [
    'code',
    'severity',
    'message',
    'place',
    'x (m)',
    'y (m)',
    'z (m)',
    'gap (m)',
    'members',
    'nodes',
    'advice',
  ];
  const rows = each(result.findings, (found) => [
    found.code,
    found.severity,
    found.message,
    found.place,
    ...coordinates(found.at),
    found.gap,
    joined(found.members),
    joined(found.nodes),
    found.advice,
  ]);
  return { heads, rows };
}

function* runs(result: Result) {
  for (const run of result.cases) yield { kind: 'case', run } as const;
  for (const run of result.combinations) yield { kind: 'combination', run } as const;
}
