import type { Result } from '../../domain/result.ts';
import type { Cell, Table } from '../table.ts';
import { BEARING_KINDS, bearings } from './bearings.ts';

/** The base and bearing table: per support the greatest down, uplift and horizontal, each with the reaction that acts together with it. */
export function bearingsTable(result: Result): Table {
  const nodeOf = new Map(result.nodes.map((node) => [node.id, node]));
  function* rows(): Generator<readonly Cell[]> {
    for (const bearing of bearings(result)) {
      const node = nodeOf.get(bearing.node);
      for (const kind of BEARING_KINDS) {
        const most = bearing[kind];
        if (most === null || node === undefined) continue;
        yield [node.id, node.place, ...node.at, node.fixed, kind, most.force, ...most.reaction, most.from];
      }
    }
  }
  const heads = [
    'node',
    'place',
    'x (m)',
    'y (m)',
    'z (m)',
    'fixed',
    'greatest',
    'force (N)',
    'Rx (N)',
    'Ry (N)',
    'Rz (N)',
    'from',
  ];
  return { heads, rows: rows() };
}
