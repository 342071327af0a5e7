import type { Result } from '../domain/result.ts';
import type { Vec3 } from '../domain/vector.ts';
import { count } from '../domain/verdict.ts';
import type { CutCheck } from '../statics/hand-check/check-cut.ts';
import type { JointCheck } from '../statics/hand-check/check-joint.ts';
import type { WholeCheck } from '../statics/hand-check/check-whole.ts';
import { type Column, columns, harmless, kilonewtons, wrapped } from './summary/layout.ts';

/** Hand checks as tables for a terminal: every number that a sum by hand needs, then the sum. */

const WIDTH = 80;

/** N. */
const NO_FORCE = 1e-3;

/** Share of the largest force that no one adds up to by hand. */
const ROUNDING = 1e-12;

const right = (head: string): Column => ({ head, align: 'right' });
const name = (head: string, most: number): Column => ({ head, align: 'left', most });
const metres = (v: Vec3): string => v.map((x) => x.toFixed(3)).join(' ');

export function jointTable(check: JointCheck, from: string): string[] {
  const { bars, load, reaction, sum } = check;
  const force = kilonewtons([...bars.map(({ axialForce }) => axialForce), ...load, ...reaction]);
  const row = (words: string, v: Vec3) => [words, '', '', '', '', ...v.map(force)];
  const rows = [
    ...bars.map((bar) => [
      harmless(bar.name),
      ...bar.unit.map((x) => x.toFixed(4).replace(/^-(0\.0+)$/, '$1')),
      force(bar.axialForce),
      ...bar.force.map(force),
    ]),
    row('load', load),
    row('reaction', reaction),
    row(check.carriedBy === null ? 'sum' : 'handed on', sum),
  ];
  const heads = [name('bar', 14), ...['ux', 'uy', 'uz', 'N kN', 'Fx kN', 'Fy kN', 'Fz kN'].map(right)];
  const place = check.place === null ? '' : ` (${harmless(check.place)})`;
  return [
    ...wrapped(`Joint ${check.node} at ${metres(check.at)}${place}, in ${harmless(from)}`, WIDTH, '', '  '),
    ...columns(heads, rows),
    ...(check.carriedBy === null
      ? [leftOver(check.outOfBalance)]
      : wrapped(
          `Bar ${check.carriedBy} carries this node between its ends: it takes the last line, in bending.`,
          WIDTH,
          '  ',
        )),
    ...partly(check),
  ];
}

function partly({ bars }: JointCheck): string[] {
  const some = bars.filter(({ share }) => share < 1);
  if (some.length === 0) return [];
  const words = some.map((bar) => `${harmless(bar.name)} ${bar.share.toFixed(3)}`).join(', ');
  return wrapped(`Bars that end between joints hand only a share of their force to this one: ${words}.`, WIDTH, '  ');
}

export function cutTable(check: CutCheck, words: string, from: string): string[] {
  const { bars, load, reaction, handed, sum } = check;
  const force = kilonewtons([...bars.map(({ axialForce }) => axialForce), ...load, ...reaction, ...handed]);
  const turning = kilonewtons(
    [check.loadMoment, check.reactionMoment, check.handedMoment, ...bars.map(({ moment }) => moment)].flat(),
  );
  const row = (label: string, f: Vec3, m: Vec3) => [label, '', ...f.map(force), ...m.map(turning)];
  // A wide roof has many bars without force in a section: nothing to add up.
  const silent = bars.filter((bar) => Math.abs(bar.axialForce) < NO_FORCE);
  const rows = [
    ...bars
      .filter((bar) => !silent.includes(bar))
      .map((bar) => [harmless(bar.name), force(bar.axialForce), ...bar.force.map(force), ...bar.moment.map(turning)]),
    row('loads', load, check.loadMoment),
    row('reactions', reaction, check.reactionMoment),
    ...(handed.some((v) => v !== 0) ? [row('handed on', handed, check.handedMoment)] : []),
    row('sum', sum, check.moment),
  ];
  const heads = [name('bar', 14), ...['N kN', 'Fx kN', 'Fy kN', 'Fz kN', 'Mx kNm', 'My kNm', 'Mz kNm'].map(right)];
  const about = bars.length === 0 ? '' : `; moments about ${metres(check.about)}`;
  return [
    ...wrapped(`Cut at ${words}, in ${harmless(from)}`, WIDTH, '', '  '),
    ...wrapped(`All that acts on the ${check.kept} joints before the plane${about}.`, WIDTH, '  '),
    ...columns(heads, rows),
    ...(silent.length === 0 ? [] : [`  ${count(silent.length, 'bar')} cut without force`]),
    leftOver(check.outOfBalance),
  ];
}

export function wholeTable(checks: readonly WholeCheck[]): string[] {
  const force = kilonewtons(checks.flatMap(({ loads, reactions }) => [...loads, ...reactions]));
  const spelled = (v: Vec3) => v.map(force).join(' ');
  const rows = checks.map((one) => [
    harmless(one.name),
    spelled(one.loads),
    spelled(one.reactions),
    one.outOfBalance.toExponential(0),
  ]);
  const heads = [name('case or combination', 24), right('loads kN'), right('reactions kN'), right('left over')];
  return [
    'Balance of the whole',
    ...columns(heads, rows),
    ...wrapped(
      'Left over: of forces, or of moments about the middle of the truss, as a share of all of them; the larger of the two.',
      WIDTH,
      '  ',
    ),
  ];
}

const leftOver = (share: number): string =>
  `  left over: ${share < ROUNDING ? 'less than 1e-12' : share.toExponential(0)} of the largest force`;

/** What a combination is made of. */
export function factorsOf({ combinations }: Result, from: string): string {
  const one = combinations.find((each) => each.name === from);
  if (one === undefined) return from;
  return `${from} = ${Object.entries(one.factors)
    .map(([loadCase, factor]) => `${Number(factor.toFixed(4))} ${loadCase}`)
    .join(' + ')}`;
}
