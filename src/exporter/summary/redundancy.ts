import type { Result } from '../../domain/result.ts';
import { count } from '../../domain/verdict.ts';

/** Bars that a sentence names one by one, and parts that it counts one by one. */
const FEW = 6;

/** What the loss of one bar would do, and how much each part has to spare where there are several. */
export function redundancyWords({ stability, bars }: Pick<Result, 'stability' | 'bars'>): string[] {
  const { criticalBars, redundancy = [], selfStressStates } = stability;
  const lines: string[] = [];
  if (redundancy.length > 1 && selfStressStates > 0) {
    const alike = new Map<string, number>();
    for (const part of redundancy) {
      const words = `${part.selfStressStates} in ${count(part.bars, 'bar')}`;
      alike.set(words, (alike.get(words) ?? 0) + 1);
    }
    const told = [...alike].slice(0, FEW).map(([words, parts]) => (parts === 1 ? words : `${words} (${parts} parts)`));
    const more = redundancy.length - [...alike.values()].slice(0, FEW).reduce((sum, parts) => sum + parts, 0);
    lines.push(`self-stress by part: ${told.join(', ')}${more > 0 ? ` and ${count(more, 'more part')}` : ''}`);
  }
  if (criticalBars === undefined) return lines;
  const moves = stability.mechanisms > 0 ? 'something more moves' : 'something moves';
  if (selfStressStates === 0) lines.push(`no bar can be lost: without any one of them ${moves}`);
  else if (criticalBars.length === 0) lines.push('any one bar can be lost: all take part in self-stress');
  else {
    const names = new Map(bars.map(({ id, name }) => [id, name]));
    const told = criticalBars.slice(0, FEW).map((id) => names.get(id) ?? id);
    const more = criticalBars.length - told.length;
    const which = `${told.join(', ')}${more > 0 ? ` and ${more} more` : ''}`;
    lines.push(
      `${count(criticalBars.length, 'bar')} of ${stability.bars} cannot be lost: without any one of them ${moves} (${which})`,
    );
  }
  return lines;
}
