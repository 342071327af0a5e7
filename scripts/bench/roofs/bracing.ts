import { add, cross, scale, subtract, UP, unit, type Vec3 } from '../../../src/domain/vector.ts';
import type { Chance } from './chance.ts';
import { believableGap, type Design } from './design.ts';
import type { DrawingBoard, Role } from './drawing-board.ts';
import { nodeKey } from './frame-plan.ts';
import { ANGLES, CHS, nearest, type Profile, RHS, RODS } from './profiles.ts';
import type { TrussShape } from './truss-shapes.ts';

export interface BracingPlan {
  readonly profile: Profile;
  readonly roofBays: readonly number[];
  readonly bottomBays: readonly number[];
  /** Which node of the level starts each cross, and which ends it. */
  readonly roofCrosses: readonly (readonly [string, string])[];
  readonly bottomCrosses: readonly (readonly [string, string])[];
  readonly gap: number;
  /** Height of the bracing over the chord's axis. */
  readonly level: number;
  /** One of the two is cut in the middle and joined there by a plate. */
  readonly cutCrossing: boolean;
  readonly ties: readonly string[];
  readonly tie: Profile;
  readonly tieGap: number;
  readonly eavesBeams: boolean;
}

export function bracingPlan(
  chance: Chance,
  shape: TrussShape,
  design: Design,
  frames: number,
  spacing: number,
  canPassPurlins: boolean,
): BracingPlan {
  const isRod = chance.happens(0.5);
  const profile = isRod ? chance.pick(RODS.slice(1)) : nearest(ANGLES, spacing / 75);
  const bays = frames > 3 ? [0, frames - 2] : [0];
  const tie = nearest(chance.pick([RHS, CHS]), spacing / 65);
  const inner = shape.bottomNodes.filter((n) => !shape.bearings.includes(n) && n !== 'b0' && n !== `b${shape.panels}`);
  // A rod's axis ends in a fork on a plate; the plate, not the rod, fills the gap.
  const most = isRod ? 0.12 : believableGap(profile);
  const bottomBays = chance.happens(0.4) ? bays.slice(0, 1) : [];
  const bottomCrosses = crosses(shape, inner, spacing);
  const ends = new Set(bottomCrosses.flat());
  return {
    profile,
    roofBays: canPassPurlins && chance.happens(0.75) ? bays : [],
    bottomBays,
    roofCrosses: crosses(shape, shape.topNodes, spacing),
    bottomCrosses,
    gap: chance.between(0.02, most),
    // With the distance between the two of a cross it stays within 60 mm.
    level: chance.pick([0, 0, 1, -1]) * Math.min(0.06 - apartIn(profile), 0.25 * design.topChord.profile.depth),
    cutCrossing: !isRod && chance.happens(0.4),
    // Where bottom bracing is, ties stand only at its nodes: elsewhere they would run through it.
    ties: inner.filter((n) => (bottomBays.length === 0 || ends.has(n)) && chance.happens(0.5)).slice(0, 4),
    tie,
    tieGap: chance.between(0.01, 0.06),
    eavesBeams: chance.happens(0.6),
  };
}

/** Half the distance between two that cross: rods touch, angles lie back to back. */
function apartIn(profile: Profile): number {
  return profile.shape === 'circle' ? profile.depth / 2 + 0.001 : profile.heel;
}

/** Pairs of nodes about as far apart as the frames, so that the diagonals run near 45 degrees. */
function crosses(shape: TrussShape, nodes: readonly string[], spacing: number): [string, string][] {
  const x = (name: string) => shape.nodes.get(name)![0];
  const found: [string, string][] = [];
  let start = 0;
  for (let i = 1; i < nodes.length; i++) {
    const reach = x(nodes[i]) - x(nodes[start]);
    const isRidge = shape.runs.filter((r) => r.role === 'top chord' && r.nodes.includes(nodes[i])).length > 1;
    if (reach < 0.8 * spacing && !isRidge && i < nodes.length - 1) continue;
    if (reach > 0.3 * spacing) found.push([nodes[start], nodes[i]]);
    start = i;
  }
  return found;
}

export function drawBracing(board: DrawingBoard, plan: BracingPlan, design: Design): void {
  for (const bay of plan.roofBays)
    for (const pair of plan.roofCrosses) drawCross(board, plan, design, 'roof bracing', bay, pair);
  for (const bay of plan.bottomBays)
    for (const pair of plan.bottomCrosses) drawCross(board, plan, design, 'bottom bracing', bay, pair);
}

function drawCross(
  board: DrawingBoard,
  plan: BracingPlan,
  design: Design,
  role: Role,
  bay: number,
  [a, b]: readonly [string, string],
): void {
  const [near, far] = [bay, bay + 1];
  const one = [nodeKey(near, a), nodeKey(far, b)] as const;
  const other = [nodeKey(near, b), nodeKey(far, a)] as const;
  const direction = unit(subtract(board.at(one[1]), board.at(one[0])))!;
  const along = unit(subtract(board.at(other[0]), board.at(one[0])))!;
  const normal = unit(cross(along, [0, 1, 0]))!;
  const up = normal[2] < 0 ? scale(normal, -1) : normal;
  const chord = role === 'roof bracing' ? design.topChord : design.bottomChord;
  const halfWidth = chord.turned ? chord.profile.depth / 2 : chord.profile.width / 2;
  // Bracing lies on the outstanding legs of paired angles; elsewhere it stops short of the chord's edge.
  const edge =
    chord.pairGap === null
      ? halfWidth
      : chord.pairGap / 2 + chord.profile.width * (chord.profile.shape === 'L' ? 0.5 : 1);
  const toFace = edge / Math.max(0.3, Math.abs(direction[1]));
  const cut = toFace + plan.gap;
  const apart = plan.cutCrossing ? 0 : apartIn(plan.profile);
  const key = `${role === 'roof bracing' ? 'RB' : 'BB'}${bay}-${a}${b}`;
  const shift = (side: number): readonly [Vec3, Vec3] => {
    const off = scale(up, plan.level + side * apart);
    return [off, off];
  };
  const draw = (suffix: string, joints: readonly string[], side: number, cuts: readonly [number, number]) =>
    board.draw({
      key: key + suffix,
      role,
      profile: plan.profile,
      zAxis: up,
      frame: null,
      joints,
      cuts,
      shifts: shift(side),
    });
  if (!plan.cutCrossing) {
    draw('x', one, 1, [cut, cut]);
    draw('y', other, -1, [cut, cut]);
    return;
  }
  const middle = scale(add(add(board.at(one[0]), board.at(one[1])), add(board.at(other[0]), board.at(other[1]))), 0.25);
  const centre = board.joint(`${key}/centre`, middle);
  const inner = plan.profile.depth / 2 + 0.02;
  draw('x', [one[0], centre, one[1]], 0, [cut, cut]);
  draw('y', [other[0], centre], 0, [cut, inner]);
  draw('z', [centre, other[1]], 0, [inner, cut]);
}

export function drawTies(
  board: DrawingBoard,
  plan: BracingPlan,
  design: Design,
  shape: TrussShape,
  frames: number,
  columns: boolean,
  purlinNodes: readonly string[],
): void {
  const { profile, pairGap, turned } = design.bottomChord;
  const half = pairGap === null ? (turned ? profile.depth : profile.width) / 2 : profile.width + pairGap / 2;
  const atColumn = design.column.width / 2;
  for (let bay = 0; bay + 1 < frames; bay++) {
    const draw = (prefix: string, role: Role, node: string, cut: number) =>
      board.draw({
        key: `${prefix}${bay}-${node}`,
        role,
        profile: plan.tie,
        zAxis: UP,
        frame: null,
        joints: [nodeKey(bay, node), nodeKey(bay + 1, node)],
        cuts: [cut, cut],
      });
    for (const node of plan.ties) draw('BT', 'tie', node, half + plan.tieGap);
    if (!plan.eavesBeams || !columns) continue;
    for (const bearing of shape.bearings) {
      const node = shape.bearing === 'beside' ? bearing.replace('b', 't') : bearing;
      // A purlin over the column's head is the eaves beam.
      if (!purlinNodes.includes(node)) draw('EB', 'eaves beam', node, Math.max(half, atColumn) + plan.tieGap);
    }
  }
}
