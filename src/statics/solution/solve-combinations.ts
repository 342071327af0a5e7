import type { Finding } from '../../domain/finding.ts';
import { pushTo } from '../../domain/group.ts';
import type { Vec3 } from '../../domain/vector.ts';
import type { NamedCombination } from '../combinations/generate.ts';
import type { BarStretch, LoadCase, NodalForce, Settlement, SolvedCombination } from '../types.ts';
import type { Solver } from './solver.ts';

/**
 * Combinations solved from their combined loads, each for itself: with bars that only pull or only push, forces of cases do not add up.
 */
export function solveCombinations(
  solver: Solver,
  cases: readonly LoadCase[],
  rules: readonly NamedCombination[],
): { readonly combinations: readonly SolvedCombination[]; readonly findings: readonly Finding[] } {
  const byName = new Map(cases.map((one) => [one.name, one]));
  const combined = rules.map((rule) => combineLoads(byName, rule));
  const { cases: solved, findings } = solver.solve(combined);
  const combinations = solved.map(
    ({ refused, axialForce, displacement, reactions, slack }, i): SolvedCombination => ({
      ...rules[i],
      refused,
      axialForce,
      displacement,
      reactions,
      ...(slack === undefined ? {} : { slack }),
    }),
  );
  return { combinations, findings: [...firstOfKind(findings), ...looseIn(solver, combinations)] };
}

function combineLoads(byName: ReadonlyMap<string, LoadCase>, { name, factors }: NamedCombination): LoadCase {
  const forces = new Map<number, Vec3>();
  const freeStretch: BarStretch[] = [];
  const settlements = new Map<number, Vec3>();
  const incomplete: string[] = [];
  const add = (sum: Map<number, Vec3>, node: number, v: Vec3, factor: number) => {
    const before = sum.get(node) ?? [0, 0, 0];
    sum.set(node, [before[0] + factor * v[0], before[1] + factor * v[1], before[2] + factor * v[2]]);
  };
  for (const [caseName, factor] of Object.entries(factors)) {
    const one = byName.get(caseName);
    if (one === undefined) incomplete.push(`there is no load case ${caseName}`);
    else if (one.incomplete !== undefined) incomplete.push(`${caseName}: ${one.incomplete}`);
    for (const { node, force } of one?.loads ?? []) add(forces, node, force, factor);
    for (const { bar, by } of one?.freeStretch ?? []) freeStretch.push({ bar, by: factor * by });
    for (const { node, movement } of one?.settlements ?? []) add(settlements, node, movement, factor);
  }
  return {
    name,
    nature: 'permanent',
    loads: [...forces].toSorted(([a], [b]) => a - b).map(([node, force]): NodalForce => ({ node, force })),
    freeStretch,
    settlements: [...settlements].map(([node, movement]): Settlement => ({ node, movement })),
    ...(incomplete.length === 0 ? {} : { incomplete: incomplete.join('; ') }),
  };
}

/** Combinations fail by the dozen for one reason: it is said of the first, with how many more. Loads left out were said with their cases. */
function firstOfKind(findings: readonly Finding[]): Finding[] {
  const failed = findings.filter(({ code }) => code !== 'no-load');
  if (failed.length === 0) return [];
  const more = failed.length - 1;
  const [first] = failed;
  return [more === 0 ? first : { ...first, message: `${first.message} So do ${more} more combinations.` }];
}

/** Each set of loose bars once, in the first combination that shows it. */
function looseIn(solver: Solver, combinations: readonly SolvedCombination[]): Finding[] {
  const byWords = new Map<string, Finding[]>();
  for (const one of combinations) {
    if (one.limit !== 'strength' && one.limit !== 'equilibrium' && one.limit !== 'accidental') continue;
    const found = solver.looseIn(one);
    if (found !== null) pushTo(byWords, found.nodes.join(' '), found);
  }
  return [...byWords.values()].map(([first]) => first);
}
