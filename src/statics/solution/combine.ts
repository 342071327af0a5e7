import type { CombinationRule } from '../../brief/types.ts';
import type { Vec3 } from '../../domain/vector.ts';
import type { NodalForce, SolvedCase, SolvedCombination } from '../types.ts';

interface Term {
  readonly factor: number;
  readonly solved: Listed;
}

/** Sums of solved cases times their factors, movements when they are first asked for. A combination with a refused or unknown case in it is refused, naming it. */
export function combine(
  cases: readonly SolvedCase[],
  rules: readonly Omit<CombinationRule, 'line'>[],
): SolvedCombination[] {
  const byName = new Map(cases.map((one) => [one.name, listed(one)]));
  const bars = cases[0]?.axialForce.length ?? 0;
  const nodes = cases[0]?.displacement.length ?? 0;
  return rules.map(({ name, limit, factors }): SolvedCombination => {
    const terms: Term[] = [];
    let refused: string | null = null;
    for (const [caseName, factor] of Object.entries(factors)) {
      const solved = byName.get(caseName);
      if (solved === undefined) refused ??= `there is no load case ${caseName}`;
      else if (solved.one.refused !== null) refused ??= `load case ${caseName} is refused`;
      else terms.push({ factor, solved });
    }
    if (refused !== null) {
      return {
        name,
        limit,
        factors,
        refused,
        axialForce: new Array<null>(bars).fill(null),
        displacement: new Array<null>(nodes).fill(null),
        reactions: [],
      };
    }
    let movements: (Vec3 | null)[] | null = null;
    return {
      name,
      limit,
      factors,
      refused: null,
      axialForce: sumForces(terms, bars),
      // Most combinations are only asked for their forces; a list of points a combination costs more than all the rest.
      get displacement() {
        movements ??= sumMovements(terms, nodes);
        return movements;
      },
      reactions: sumReactions(terms),
    };
  });
}

/** Numbers without their nulls, which would have to be asked for again in every combination. */
interface Flat {
  readonly values: Float64Array;
  readonly unknown: readonly number[];
}

/** A case as combinations want it, each list made when it is first wanted. */
interface Listed {
  readonly one: SolvedCase;
  readonly forces: () => Flat;
  readonly movements: () => Flat;
}

function listed(one: SolvedCase): Listed {
  let forces: Flat | null = null;
  let movements: Flat | null = null;
  return {
    one,
    forces: () => {
      forces ??= flatForces(one);
      return forces;
    },
    movements: () => {
      movements ??= flatMovements(one);
      return movements;
    },
  };
}

function flatForces({ axialForce }: SolvedCase): Flat {
  const values = new Float64Array(axialForce.length);
  const unknown: number[] = [];
  for (let b = 0; b < axialForce.length; b++) {
    const force = axialForce[b];
    if (force === null) unknown.push(b);
    else values[b] = force;
  }
  return { values, unknown };
}

function flatMovements({ displacement }: SolvedCase): Flat {
  const values = new Float64Array(3 * displacement.length);
  const unknown: number[] = [];
  for (let n = 0; n < displacement.length; n++) {
    const moved = displacement[n];
    if (moved === null) unknown.push(n);
    else for (let axis = 0; axis < 3; axis++) values[3 * n + axis] = moved[axis];
  }
  return { values, unknown };
}

/** Case by case through whole lists, which is several times faster than bar by bar. */
function sumForces(terms: readonly Term[], bars: number): (number | null)[] {
  const sum = weigh(
    bars,
    terms.map(({ factor, solved }) => ({ factor, values: solved.forces().values })),
  );
  const out = new Array<number | null>(bars);
  for (let b = 0; b < bars; b++) out[b] = sum[b];
  for (const { solved } of terms) for (const b of solved.forces().unknown) out[b] = null;
  return out;
}

function sumMovements(terms: readonly Term[], nodes: number): (Vec3 | null)[] {
  const sum = weigh(
    3 * nodes,
    terms.map(({ factor, solved }) => ({ factor, values: solved.movements().values })),
  );
  const out = new Array<Vec3 | null>(nodes);
  for (let n = 0; n < nodes; n++) out[n] = [sum[3 * n], sum[3 * n + 1], sum[3 * n + 2]];
  for (const { solved } of terms) for (const n of solved.movements().unknown) out[n] = null;
  return out;
}

function weigh(
  size: number,
  terms: readonly { readonly factor: number; readonly values: Float64Array }[],
): Float64Array {
  const sum = new Float64Array(size);
  for (const { factor, values } of terms) for (let i = 0; i < size; i++) sum[i] = sum[i] + factor * values[i];
  return sum;
}

function sumReactions(terms: readonly Term[]): NodalForce[] {
  const first = terms[0]?.solved.one.reactions ?? [];
  // Cases of one truss list the same supports, unless parts of it were without load.
  const isAlike = terms.every(({ solved }) => sameNodes(solved.one.reactions, first));
  const nodes = isAlike
    ? first.map(({ node }) => node)
    : [...new Set(terms.flatMap(({ solved }) => solved.one.reactions.map(({ node }) => node)))].sort((a, b) => a - b);
  const place = isAlike ? null : new Map(nodes.map((node, i) => [node, i]));
  const sum = new Float64Array(3 * nodes.length);
  for (const { factor, solved } of terms) {
    const { reactions } = solved.one;
    for (let i = 0; i < reactions.length; i++) {
      const { node, force } = reactions[i];
      const at = 3 * (place === null ? i : place.get(node)!);
      for (let axis = 0; axis < 3; axis++) sum[at + axis] = sum[at + axis] + factor * force[axis];
    }
  }
  return nodes.map((node, i) => ({ node, force: [sum[3 * i], sum[3 * i + 1], sum[3 * i + 2]] }));
}

function sameNodes(reactions: readonly NodalForce[], others: readonly NodalForce[]): boolean {
  if (reactions.length !== others.length) return false;
  for (let i = 0; i < others.length; i++) if (reactions[i].node !== others[i].node) return false;
  return true;
}
