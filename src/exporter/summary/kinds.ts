import { count } from '../../domain/verdict.ts';
import { columns, harmless } from './layout.ts';
import type { SummaryOptions } from './options.ts';

/** What was read by section and material, in scope or not, so that a scope can be written. */
export function memberKinds({ extras, kinds: shown }: SummaryOptions): string[] {
  const kinds = extras.kinds ?? [];
  if (kinds.length === 0) return [];
  const rows = kinds
    .slice(0, shown)
    .map((kind) => [
      String(kind.count),
      kind.inScope === 0 ? '-' : String(kind.inScope),
      harmless(kind.class),
      harmless(kind.section ?? 'no section'),
      harmless(kind.material),
      kind.length.toFixed(1),
    ]);
  const table = columns(
    [
      { head: 'read', align: 'right' },
      { head: 'in scope', align: 'right' },
      { head: 'class', align: 'left', most: 17 },
      { head: 'section', align: 'left', most: 17 },
      { head: 'material', align: 'left', most: 14 },
      { head: 'm', align: 'right' },
    ],
    rows,
  );
  const rest = kinds.slice(shown);
  const members = rest.reduce((sum, kind) => sum + kind.count, 0);
  return [
    'Members by section and material',
    ...table,
    ...(rest.length > 0 ? [`  and ${rest.length} more, ${count(members, 'member')}`] : []),
  ];
}
