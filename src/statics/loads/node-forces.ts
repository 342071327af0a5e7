import { add, ORIGIN, scale, type Vec3 } from '../../domain/vector.ts';
import type { NodalForce } from '../types.ts';

/** Forces gathered node by node, N. */
export class NodeForces {
  readonly #forces = new Map<number, Vec3>();

  add(node: number, force: Vec3): void {
    this.#forces.set(node, add(this.#forces.get(node) ?? ORIGIN, force));
  }

  addAll(other: NodeForces): void {
    for (const [node, force] of other.#forces) this.add(node, force);
  }

  /** Half of a force to each end of a bar. */
  addToEnds(bar: { readonly from: number; readonly to: number }, force: Vec3): void {
    this.add(bar.from, scale(force, 0.5));
    this.add(bar.to, scale(force, 0.5));
  }

  /** The sum of all. */
  sum(): Vec3 {
    return [...this.#forces.values()].reduce<Vec3>((total, force) => add(total, force), ORIGIN);
  }

  /** One entry a loaded node, nodes ascending; nodes whose forces cancel are left out. */
  toLoads(): NodalForce[] {
    return [...this.#forces]
      .filter(([, force]) => force.some((component) => component !== 0))
      .toSorted(([a], [b]) => a - b)
      .map(([node, force]) => ({ node, force }));
  }
}
