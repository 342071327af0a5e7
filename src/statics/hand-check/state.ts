import { RequestError } from '../../domain/errors.ts';
import { along, norm, ORIGIN, type Vec3 } from '../../domain/vector.ts';
import { type Solved, sumByNode } from './joints.ts';

/** Everything that acts together in one load case or combination. */
export interface State {
  readonly name: string;
  /** N, by node. */
  readonly loads: ReadonlyMap<string, Vec3>;
  readonly reactions: ReadonlyMap<string, Vec3>;
  /** N, tension positive, one per bar in the order of the result. */
  readonly axialForce: readonly (number | null)[];
  /** N, the largest force of all: what is left over is held against it. */
  readonly largest: number;
}

/**
 * A load case or a combination by its name; a combination's loads are those of its cases times their factors.
 * @throws RequestError where there is none of that name, or it was refused
 */
export function stateOf(result: Solved, name: string): State {
  const loadCase = result.cases.find((one) => one.name === name);
  const found = loadCase ?? result.combinations.find((one) => one.name === name);
  if (found === undefined)
    throw new RequestError(`there is no load case or listed combination ${name}; there are: ${namesOf(result)}`);
  if (found.refused !== undefined) throw new RequestError(`${name} has no forces to check: ${found.refused}`);
  const { axialForce, reactions } = found;
  const factors = 'factors' in found ? found.factors : { [name]: 1 };
  const loads = loadsOf(result, factors);
  const reacting = sumByNode(reactions);
  let largest = 0;
  for (const force of axialForce) largest = Math.max(largest, Math.abs(force ?? 0));
  for (const force of [...loads.values(), ...reacting.values()]) largest = Math.max(largest, norm(force));
  return { name, loads, reactions: reacting, axialForce, largest };
}

function loadsOf({ cases }: Solved, factors: Readonly<Record<string, number>>): Map<string, Vec3> {
  const sums = new Map<string, Vec3>();
  for (const one of cases) {
    const factor = factors[one.name] ?? 0;
    if (factor === 0) continue;
    for (const [node, force] of sumByNode(one.loads)) sums.set(node, along(sums.get(node) ?? ORIGIN, force, factor));
  }
  return sums;
}

const NAMED = 12;

function namesOf({ cases, combinations }: Solved): string {
  const names = [...cases, ...combinations].filter(({ refused }) => refused === undefined).map((one) => one.name);
  const more = names.length - NAMED;
  return `${names.slice(0, NAMED).join('; ')}${more > 0 ? `; and ${more} more` : ''}`;
}

/** The states that were carried: the cases, then the combinations that the result lists. */
export function carriedStates(result: Solved): State[] {
  return [...result.cases, ...result.combinations]
    .filter(({ refused }) => refused === undefined)
    .map(({ name }) => stateOf(result, name));
}
