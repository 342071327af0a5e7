import type { Result } from '../../domain/result.ts';
import { add, along, ORIGIN, subtract, unit, type Vec3 } from '../../domain/vector.ts';

/** What a check by hand wants of a result. */
export type Solved = Pick<Result, 'nodes' | 'bars' | 'cases' | 'combinations'>;

/** A result as joints and the forces on them, with what carried nodes get handed to the joints at the ends of their bars. */
export interface Frame {
  readonly result: Solved;
  readonly at: ReadonlyMap<string, Vec3>;
  /** Of each node the joints that stand for it, by the lever rule: itself, or of a carried node the ends of its bar. */
  readonly shares: ReadonlyMap<string, readonly (readonly [joint: string, share: number])[]>;
}

export function frameOf(result: Solved): Frame {
  const at = new Map(result.nodes.map((node): [string, Vec3] => [node.id, node.at]));
  const nodes = new Map(result.nodes.map((node) => [node.id, node]));
  const bars = new Map(result.bars.map((bar) => [bar.id, bar]));
  const shares = new Map<string, readonly (readonly [string, number])[]>();
  const sharesOf = (id: string): readonly (readonly [string, number])[] => {
    const known = shares.get(id);
    if (known !== undefined) return known;
    const carriage = nodes.get(id)?.carriedBy ?? null;
    const bar = carriage === null ? undefined : bars.get(carriage.bar);
    let own: readonly (readonly [string, number])[] = [[id, 1]];
    if (carriage !== null && bar !== undefined) {
      const sum = new Map<string, number>();
      for (const [end, weight] of [
        [bar.from, 1 - carriage.t],
        [bar.to, carriage.t],
      ] as const)
        for (const [joint, share] of sharesOf(end)) sum.set(joint, (sum.get(joint) ?? 0) + weight * share);
      own = [...sum].filter(([, share]) => share !== 0);
    }
    shares.set(id, own);
    return own;
  };
  for (const { id } of result.nodes) sharesOf(id);
  return { result, at, shares };
}

/** Unit vector from the bar's first node to its last. */
export function directionOf({ at }: Frame, { from, to }: Result['bars'][number]): Vec3 {
  return unit(subtract(at.get(to) ?? ORIGIN, at.get(from) ?? ORIGIN)) ?? ORIGIN;
}

/** The sum of forces by node. */
export function sumByNode(
  forces: readonly { readonly node: string; readonly force: Vec3 }[],
  factor = 1,
): Map<string, Vec3> {
  const sums = new Map<string, Vec3>();
  for (const { node, force } of forces) sums.set(node, along(sums.get(node) ?? ORIGIN, force, factor));
  return sums;
}

export const sumOf = (vectors: Iterable<Vec3>): Vec3 => {
  let sum: Vec3 = ORIGIN;
  for (const vector of vectors) sum = add(sum, vector);
  return sum;
};
