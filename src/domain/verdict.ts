import type { Result } from './result.ts';

/** Whether the structure stands, in one or two sentences: the same words in every output. */
export function verdict(result: Result): string {
  if (result.bars.length === 0) return 'There is no truss to judge: no bar was found.';
  return [judgement(result), aside(result), carried(result)].filter((sentence) => sentence !== null).join(' ');
}

/** How many of the ways it can move are not motions of the whole: the ones that a free body should not have. */
export function innerMechanisms(stability: Result['stability']): number {
  const whole = stability.modes.filter((mode) => mode.kind === 'whole').length;
  return Math.max(0, stability.mechanisms - whole);
}

/** How often something stands: "1 bar", "no bars", "12 bars". */
export function count(number: number, one: string, many = `${one}s`): string {
  return number === 1 ? `1 ${one}` : `${number === 0 ? 'no' : number} ${many}`;
}

/** What the envelope runs over, which every output has to say. */
export function envelopeTitle(result: Result): string {
  if (countCombinations(result) === 0) return 'unfactored, case by case';
  const { combining } = result;
  return `strength and accidental combinations${combining === undefined ? '' : ` of ${combining.rule}`}`;
}

/** Those solved, listed in full or not. */
export function countCombinations({ combinations, combining }: Result): number {
  return combinations.length + (combining?.notGoverning.length ?? 0);
}

function judgement(result: Result): string {
  const { stability } = result;
  const stress = count(stability.selfStressStates, 'state of self-stress', 'states of self-stress').replace(
    /^no states/,
    'no state',
  );
  if (stability.freeBody) {
    const inner = innerMechanisms(stability);
    if (inner === 0) return `Judged without supports, it keeps its shape: no mechanism of its own, ${stress}.`;
    return `Judged without supports, it does not keep its shape: it moves within itself in ${count(inner, 'way')}.`;
  }
  if (stability.mechanisms > 0) {
    const ways = count(stability.mechanisms, 'independent way');
    return `It does not stand by itself: it moves freely in ${ways}; ${stress}.${unclear(result)}`;
  }
  const determinate = stability.selfStressStates === 0 ? ' (statically determinate)' : '';
  const barely = result.findings.some(({ code }) => code === 'nearly-moves');
  const stands = barely ? 'It barely stands, by small dimensions only' : 'It stands';
  return `${stands}: no mechanism, ${stress}${determinate}.${unclear(result)}`;
}

function unclear({ stability }: Result): string {
  if (stability.gap !== null) return '';
  return ' The stiffness spectrum shows no clear gap, so this count is the one at the threshold and not a certainty.';
}

function aside({ stability }: Result): string | null {
  const bars = stability.setAside.length;
  if (bars === 0) return null;
  return `${count(bars, 'bar')} of parts that nothing supports ${bars === 1 ? 'is' : 'are'} left out, with the loads on them.`;
}

function carried({ cases, combinations, stability }: Result): string | null {
  if (cases.length === 0) return null;
  const refused = cases.filter((loadCase) => loadCase.refused !== undefined).length;
  if (refused > 0) return `${refused} of ${count(cases.length, 'load case')} cannot be carried.`;
  const all = cases.length === 1 ? 'The load case is carried' : 'All load cases are carried';
  const last = combinations.length > 0 ? combinations : cases;
  const unstable = last.filter((one) => one.unstable !== undefined).length;
  if (unstable > 0) {
    const what = combinations.length > 0 ? 'combination' : 'load case';
    return `${all}, but the balance is not stable in ${unstable} of ${count(last.length, what)}: the bar forces do not bring back what moves freely.`;
  }
  if (innerMechanisms(stability) === 0) return `${all}.`;
  return `${all}: none of them pushes it that way, and the bar forces bring it back where it moves.`;
}
