import { FAULT_KINDS, type FaultKind, JOINED_FAULTS } from './fault-tools.ts';
import type { Score } from './score.ts';

const share = (part: number, whole: number): string => (whole === 0 ? '-' : (part / whole).toFixed(3));
const row = (...cells: (string | number)[]): string =>
  cells.map((cell, i) => (i === 0 ? String(cell).padEnd(24) : String(cell).padStart(11))).join('');

/**
 * Of all that is said under the codes that tell a kind, the share that is right; false findings count for every kind
 * whose codes they bear.
 */
function precisionOf(kind: FaultKind, { findings, codes }: Score): string {
  let [right, all] = [0, 0];
  for (const code of codes[kind]) {
    const count = findings.get(code);
    right += count?.right ?? 0;
    all += (count?.right ?? 0) + (count?.wrong ?? 0);
  }
  return share(right, all);
}

/** The score as a table for the terminal. */
export function tableOf(score: Score): string {
  const kinds = FAULT_KINDS.map((kind) => ({ kind, ...score.planted[kind] }));
  const line = ({ kind, planted, found }: (typeof kinds)[number]) =>
    row(kind, planted, found, share(found, planted), precisionOf(kind, score));
  const shown = ({ kind, planted, found, byMechanism, byLength }: (typeof kinds)[number]) =>
    row(kind, planted, found, byMechanism, byLength);
  const clean = score.sound.filter((one) => one.differences.length === 0).length;
  const count = (kinds: readonly string[]) =>
    score.sound.reduce((sum, one) => sum + one.differences.filter((d) => kinds.includes(d.kind)).length, 0);
  const total = (of: 'nodes' | 'bars') => score.sound.reduce((sum, one) => sum + one[of], 0);
  return [
    row('fault', 'planted', 'found', 'recall', 'precision'),
    ...kinds.filter(({ kind }) => !JOINED_FAULTS.includes(kind)).map(line),
    '',
    row('nothing left unjoined', 'planted', 'found', 'mechanism', 'odd length'),
    ...kinds.filter(({ kind }) => JOINED_FAULTS.includes(kind)).map(shown),
    '',
    row('finding', 'right', 'false', 'precision'),
    ...[...score.findings]
      .sort()
      .map(([code, { right, wrong }]) => row(code, right, wrong, share(right, right + wrong))),
    '',
    `roofs without faults: ${clean} of ${score.roofs} as drawn by hand; ${score.sound.filter((s) => s.findings.length === 0).length} without a false finding`,
    `told twice under two codes: ${score.toldTwice.length}`,
    `nodes ${total('nodes')}: ${count(['node missing'])} missing, ${count(['node too many'])} too many, ${count(['carried wrongly'])} carried wrongly`,
    `bars ${total('bars')}: ${count(['bar missing'])} missing, ${count(['bar too many'])} too many`,
  ].join('\n');
}
