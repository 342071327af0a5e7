import type { AreaRule } from '../../brief/load-rule.ts';
import type { Member } from '../../domain/member.ts';
import type { Truss } from '../../domain/truss.ts';
import { add, norm, ORIGIN, scale, type Vec3 } from '../../domain/vector.ts';
import type { NodeForces } from './node-forces.ts';
import { snowFactors } from './snow-shape.ts';
import { type Clip, makeClip, shareClipped } from './surface/clip.ts';
import { edgeShares, vectorArea } from './surface/edge-strip.ts';
import { formSurface, type NoSurface } from './surface/form-surface.ts';
import { planArea } from './surface/plan.ts';
import { type CornerShare, sharePatch } from './surface/share-patch.ts';

export type { AreaRule } from '../../brief/load-rule.ts';

/** What an area load has covered, for a reader to hold against the drawing. */
export interface AreaCoverage {
  readonly formedBy: 'bars' | 'outline';
  readonly patches: number;
  /** m2, true and in plan. */
  readonly area: number;
  readonly planArea: number;
  /** m2 in plan that the brief's outline asks for; null where it gives none. */
  readonly askedPlanArea: number | null;
  /** N, the resultant. */
  readonly force: Vec3;
  /** N, the same from the areas alone, without their shares at the nodes. */
  readonly asked: Vec3 | null;
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
  const clip = rule.outline || rule.openings ? makeClip(rule.outline ?? null, rule.openings ?? []) : null;
  if (clip === null && (rule.outline || rule.openings))
    return { fault: 'its outline or an opening is no simple polygon', nodes: [] };
  const points = truss.nodes.map((node) => node.at);
  const normals = surface.patches.map((patch) => vectorArea(patch.map((node) => points[node])));
  const factors = rule.snow === undefined ? normals.map(() => 1) : snowFactors(normals, rule.snow);
  let [area, plan, resultant] = [0, 0, ORIGIN];
  const loaded = new Set<number>();
  const put = (share: CornerShare, factor: number) => {
    const force = scale(pressOn(share, rule), factor);
    forces.add(share.node, force);
    loaded.add(share.node);
    area += share.area;
    plan += share.normalArea[2];
    resultant = add(resultant, force);
  };
  surface.patches.forEach((patch, p) => {
    const shares = clip === null ? sharePatch(points, patch) : shareClipped(points, patch, clip, !rule.outline);
    for (const share of shares) put(share, factors[p]);
  });
  const edges = rule.edge === undefined ? [] : edgeShares(points, surface.patches, normals, rule.edge);
  for (const { share, patch } of edges) put(share, factors[patch]);
  return {
    formedBy: surface.formedBy,
    patches: surface.patches.length,
    area,
    planArea: plan,
    askedPlanArea: rule.outline === undefined ? null : clip!.area,
    force: resultant,
    asked: clip === null ? askedOf(points, surface.patches, factors, edges, rule) : askedWithin(clip, rule),
    unloaded: nodes.filter((node) => !loaded.has(node)),
    openings: surface.openings.map((corners) => ({
      corners,
      planArea: planArea(corners.map((node) => points[node])),
    })),
  };
}

/** From whole patches, whatever their corners get. */
function askedOf(
  points: readonly Vec3[],
  patches: readonly (readonly number[])[],
  factors: readonly number[],
  edges: ReturnType<typeof edgeShares>,
  rule: AreaRule,
): Vec3 {
  const whole = patches.map((patch) => {
    const corners = patch.map((node) => points[node]);
    return { normalArea: vectorArea(corners), area: trueArea(corners) };
  });
  const onPatches = whole.map((one, p) => scale(pressOn(one, rule), factors[p]));
  return [...onPatches, ...edges.map(({ share, patch }) => scale(pressOn(share, rule), factors[patch]))].reduce(
    add,
    ORIGIN,
  );
}

/** An outline says what is asked where the load goes by plan area and is the same all over. */
function askedWithin({ area }: Clip, { outline, snow, per, pressure }: AreaRule): Vec3 | null {
  return outline === undefined || snow !== undefined || per !== 'plan' ? null : [0, 0, -pressure * area];
}

/** Of a polygon that may be warped: the mean over its fans of triangles. */
function trueArea(corners: readonly Vec3[]): number {
  const count = corners.length;
  let sum = 0;
  for (let apex = 0; apex < count; apex++)
    for (let k = 1; k < count - 1; k++)
      sum += norm(vectorArea([corners[apex], corners[(apex + k) % count], corners[(apex + k + 1) % count]]));
  return sum / count;
}

function pressOn(share: { readonly normalArea: Vec3; readonly area: number }, { pressure, acts, per }: AreaRule): Vec3 {
  if (acts === 'normal') return scale(share.normalArea, -pressure);
  return [0, 0, -pressure * (per === 'slope' ? share.area : share.normalArea[2])];
}
