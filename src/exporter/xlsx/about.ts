import type { Result } from '../../domain/result.ts';
import { count, countCombinations, envelopeTitle, verdict } from '../../domain/verdict.ts';
import { type SheetRows, text } from './cells.ts';

/** The first sheet: what the numbers are of, how they are signed, and what they are not. */
export function aboutRows(result: Result): SheetRows {
  const { model, generator, findings, cases } = result;
  const many = (severity: string) => findings.filter((found) => found.severity === severity).length;
  const lines: readonly (readonly [head: string, says: string])[] = [
    ['Caution', result.caution],
    ['Model', `${model.file} (${model.schema})`],
    ['SHA-256', model.sha256],
    ['Program', `${generator.name} ${generator.version}`],
    ['Verdict', verdict(result)],
    [
      'Findings',
      `${count(many('error'), 'error')}, ${count(many('warning'), 'warning')}, ${count(many('note'), 'note')}`,
    ],
    ...(cases.length === 0
      ? []
      : [
          ['Load cases', `${cases.length}, and ${count(countCombinations(result), 'combination')}`] as const,
          ['Envelope over', envelopeTitle(result)] as const,
        ]),
    ['Units', 'metres, newtons and pascals, as the heads say'],
    ['Signs', 'tension positive, compression negative; a reaction is the force of the support on the truss; z is up'],
  ];
  return lines.map(([head, says]) => [
    { ...text(head), fontWeight: 'bold', alignVertical: 'top' },
    { ...text(says), wrap: true, alignVertical: 'top' },
  ]);
}
