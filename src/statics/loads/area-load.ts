import type { LoadRule } from '../../brief/types.ts';
import type { Member } from '../../domain/member.ts';
import type { Truss } from '../../domain/truss.ts';
import { add, ORIGIN, scale, type Vec3 } from '../../domain/vector.ts';
import type { NodeForces } from './node-forces.ts';
import { formSurface, type NoSurface } from './surface/form-surface.ts';
import { planArea } from './surface/plan.ts';
import { sharePatch } from './surface/share-patch.ts';

export type AreaRule = Extract<LoadRule, { kind: 'area' }>;

/** What an area load has covered, for a reader to hold against the drawing. */
export interface AreaCoverage {
  readonly formedBy: 'bars' | 'outline';
  readonly patches: number;
  /** m2, true and in plan. */
  readonly area: number;
  readonly planArea: number;
  /** N, the resultant. */
  readonly force: Vec3;
  /** Chosen nodes at no corner of the surface: nothing was put on them. */
  readonly unloaded: readonly number[];
  /** Cells taken as openings: corners and m2 in plan. */
  readonly openings: readonly { readonly corners: readonly number[]; readonly planArea: number }[];
}

/**
 * Puts an area load on the surface that the nodes form, or says why they form none. Force and moment of the evenly spread load
 * are kept, patch by patch.
 */
export function addAreaLoad(
  forces: NodeForces,
  truss: Truss,
  members: readonly Member[],
  nodes: readonly number[],
  rule: AreaRule,
): AreaCoverage | NoSurface {
  const surface = formSurface(truss, members, nodes);
  if ('fault' in surface) return surface;
  const points = truss.nodes.map((node) => node.at);
  const shares = surface.patches.flatMap((patch) => sharePatch(points, patch));
  let [area, plan, resultant] = [0, 0, ORIGIN];
  const loaded = new Set<number>();
  for (const share of shares) {
    const force = pressOn(share, rule);
    forces.add(share.node, force);
    loaded.add(share.node);
    area += share.area;
    plan += share.normalArea[2];
    resultant = add(resultant, force);
  }
  const unloaded = nodes.filter((node) => !loaded.has(node));
  return {
    formedBy: surface.formedBy,
    patches: surface.patches.length,
    area,
    planArea: plan,
    force: resultant,
    unloaded,
    openings: surface.openings.map((corners) => ({
      corners,
      planArea: planArea(corners.map((node) => points[node])),
    })),
  };
}

function pressOn(share: { readonly normalArea: Vec3; readonly area: number }, { pressure, acts, per }: AreaRule): Vec3 {
  if (acts === 'normal') return scale(share.normalArea, -pressure);
  return [0, 0, -pressure * (per === 'slope' ? share.area : share.normalArea[2])];
}
