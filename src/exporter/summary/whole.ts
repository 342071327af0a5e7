import type { Result } from '../../domain/result.ts';
import { harmless, wrapped } from './layout.ts';

/** Factors from here on are told as being beyond it. */
const FAR = 1000;

/** How near the truss as a whole is to buckling, and by which order of theory it is balanced. */
export function asAWhole({ buckling, analysis, combinations }: Result, width: number): string[] {
  const lines: string[] = [];
  if (buckling !== undefined) {
    const { factor } = buckling.modes[0];
    const times = factor >= FAR ? `beyond ${FAR} times` : `at ${factor.toPrecision(3)} times`;
    const words =
      factor === 0
        ? `no load at all is stable in ${harmless(buckling.from)}: its bar forces do not bring back what moves freely`
        : `nearest to buckling as a whole: ${harmless(buckling.from)}, ${times} its load`;
    lines.push(...wrapped(words, width, '  ', '    '));
  }
  if (analysis === 'second-order') {
    const what = combinations.length > 0 ? 'combinations' : 'cases';
    lines.push(...wrapped(`second order: ${what} are balanced at the moved nodes`, width, '  ', '    '));
  }
  return lines;
}
