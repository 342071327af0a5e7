import { add, scale, subtract, unit, type Vec3 } from '../../../src/domain/vector.ts';
import type { Chance } from './chance.ts';
import { type Design, faceTowards } from './design.ts';
import type { DrawingBoard } from './drawing-board.ts';
import { type ExtraStops, nodeKey, partFor, upright, zAxisOf } from './frame-plan.ts';
import { CHANNELS, IPE, nearest, type Profile, RHS, SAG_RODS, ZEDS } from './profiles.ts';
import type { Run, TrussShape } from './truss-shapes.ts';

/** A line of purlins from gable to gable: over a work point of the trusses or between two of them. */
export interface PurlinRow {
  readonly node: string;
  /** Run of the top chord it lies on. */
  readonly run: Run;
  readonly x: number;
}

export interface PurlinPlan {
  readonly style: 'seated' | 'flush';
  readonly profile: Profile;
  readonly rows: readonly PurlinRow[];
  /** `lapped`: each runs past the frame beside the next. */
  readonly ends: 'short' | 'lapped';
  readonly spans: 'single' | 'two bays' | 'staggered';
  /** Gap between two purlins over a chord, or how far each runs past it where they lap. */
  readonly endSize: number;
  readonly verge: number;
  /** How far beside the work points, up the slope, the cleats stand. */
  readonly cleatShift: number;
  /** A cleat lifts the purlin clear of the chord. */
  readonly lift: number;
  readonly sagRods: boolean;
  /** Rods on the two sides of a purlin stand this far apart. */
  readonly stagger: number;
}

/** Tubes used as purlins stand upright: square ones are chords and webs. */
const TUBES = RHS.filter((profile) => profile.depth > profile.width);

export function purlinPlan(chance: Chance, shape: TrussShape, design: Design, spacing: number): PurlinPlan {
  const depth = Math.min((spacing / 33) * chance.between(0.85, 1.2), 1.7 * design.topChord.profile.depth);
  const profile = nearest(chance.pick([IPE, IPE, CHANNELS, ZEDS, TUBES]), depth);
  const style = chance.happens(0.15) ? 'flush' : 'seated';
  const lapped = style === 'seated' && (profile.shape === 'U' || profile.shape === 'I') && chance.happens(0.3);
  const chord = design.topChord;
  const bearingWidth = (chord.turned ? chord.profile.depth : chord.profile.width) * (chord.pairGap === null ? 1 : 2);
  const rows = purlinRows(chance, shape, Math.max(0.4, 2.2 * (chord.profile.depth + profile.depth) * 0.5));
  const slope = shape.nodes.get(shape.topNodes[1])![1] - shape.nodes.get(shape.topNodes[0])![1];
  return {
    style,
    profile,
    rows,
    ends: lapped ? 'lapped' : 'short',
    spans: style === 'flush' ? 'single' : chance.pick(['single', 'two bays', 'staggered'] as const),
    endSize: lapped ? chance.between(0.06, 0.2) : chance.between(0.002, Math.min(0.06, 0.4 * bearingWidth)),
    verge: style === 'flush' ? 0 : chance.happens(0.25) ? chance.between(0.5, 1) : chance.between(0, 0.1),
    cleatShift: style === 'seated' && chance.happens(0.3) ? chance.between(-0.3, 0.3) * chord.profile.depth : 0,
    lift: chance.pick([0, 0, 0.005, 0.01]),
    sagRods: style === 'seated' && slope > 0.05 && rows.length > 2 && chance.happens(0.4),
    stagger: chance.pick([0, 0.04, 0.06]),
  };
}

/** A row on every panel point of the roof and, in wide panels of some roofs, more between them. */
function purlinRows(chance: Chance, shape: TrussShape, clear: number): PurlinRow[] {
  const chords = shape.runs.filter((run) => run.role === 'top chord');
  const x = (name: string) => shape.nodes.get(name)![0];
  const runOf = (at: number) =>
    chords.find((run) => x(run.nodes[0]) <= at + 1e-9 && at <= x(run.nodes.at(-1)!) + 1e-9)!;
  const skipsEaves = shape.bearing === 'beside' || chance.happens(0.5);
  const inner = shape.topNodes.slice(skipsEaves ? 1 : 0, skipsEaves ? -1 : undefined);
  const rows = inner.map((node) => ({ node, run: runOf(x(node)), x: x(node) }));
  const ridge = inner.find((node) => chords.filter((run) => run.nodes.includes(node)).length > 1);
  if (shape.kind !== 'bowstring' && ridge && chance.happens(0.4)) doubleRidge(rows, ridge, chords, clear);
  const hasMore = chance.happens(0.5);
  const target = chance.between(1.2, 2.4);
  for (let i = 0; hasMore && i + 1 < shape.topNodes.length; i++) {
    const [a, b] = [x(shape.topNodes[i]), x(shape.topNodes[i + 1])];
    const between = Math.min(3, Math.round((b - a) / target) - 1);
    const taken = rows.filter((row) => row.x > a && row.x < b);
    for (let k = 1; k <= between; k++) {
      const at = a + ((b - a) * k) / (between + 1);
      if (Math.min(at - a, b - at, ...taken.map((row) => Math.abs(row.x - at))) < clear) continue;
      rows.push({ node: `p${i}.${k}`, run: runOf(at), x: at });
    }
  }
  return rows.sort((a, b) => a.x - b.x);
}

/** Two purlins, one on each side of the ridge, in place of one on it. */
function doubleRidge(rows: PurlinRow[], ridge: string, chords: readonly Run[], clear: number): void {
  const index = rows.findIndex((row) => row.node === ridge);
  const [left, right] = chords as [Run, Run];
  const { x } = rows[index];
  rows.splice(index, 1, { node: 'pL', run: left, x: x - clear }, { node: 'pR', run: right, x: x + clear });
}

/** The rows between panel points, as stops on the runs they lie on. */
export function extraStops(rows: readonly PurlinRow[]): ExtraStops {
  const stops = new Map<string, { name: string; x: number }[]>();
  for (const row of rows) {
    if (!row.node.startsWith('p')) continue;
    stops.set(row.run.key, [...(stops.get(row.run.key) ?? []), { name: row.node, x: row.x }]);
  }
  return stops;
}

const BETWEEN_FRAMES: Vec3 = [0, 1, 0];

export function drawPurlins(
  board: DrawingBoard,
  plan: PurlinPlan,
  shape: TrussShape,
  design: Design,
  frames: number,
): void {
  const seats = plan.rows.map((row) => seatOf(plan, row, shape, design));
  if (plan.sagRods) {
    for (const [r, row] of plan.rows.entries()) {
      for (let bay = 0; bay + 1 < frames; bay++) {
        const middle = scale(add(board.at(nodeKey(bay, row.node)), board.at(nodeKey(bay + 1, row.node))), 0.5);
        const bounds = boundsOf(plan, r, frames);
        const run = bounds.findLastIndex((bound) => bound <= bay);
        board.joint(sagKey(r, bay), add(middle, axisShift(plan, seats[r], run)));
      }
    }
  }
  for (const [r, row] of plan.rows.entries()) drawRow(board, plan, r, row, seats[r], design, frames);
  if (plan.sagRods) drawSagRods(board, plan, frames);
}

const sagKey = (row: number, bay: number): string => `R${row}/sag${bay}`;

interface Seat {
  readonly lift: Vec3;
  readonly zAxis: Vec3;
  readonly slope: Vec3;
  /** How far up the slope its cleat stands beside the work point. */
  readonly aside: number;
}

/** Purlins stand square to the roof on the chord's upper face; flush ones have their top at the chord's top. */
function seatOf(plan: PurlinPlan, row: PurlinRow, shape: TrussShape, design: Design): Seat {
  const [a, b] = [row.run.nodes[0], row.run.nodes.at(-1)!].map((n) => shape.nodes.get(n)!);
  const slope = unit([b![0] - a![0], 0, b![1] - a![1]])!;
  const chords = shape.runs.filter((run) => run.role === 'top chord' && run.nodes.includes(row.node));
  const isRidge = chords.length > 1 && shape.kind !== 'bowstring';
  const up = isRidge ? ([0, 0, 1] as const) : upright(slope);
  const part = partFor(design, row.run);
  const face = faceTowards(part.profile, zAxisOf(row.run, part, slope), upright(slope));
  // On a ridge the purlin stands on the edge where the two chords' upper faces meet.
  const top = isRidge ? face / Math.abs(slope[0]) : face;
  const size = plan.style === 'flush' ? top - plan.profile.depth / 2 : top + plan.lift + plan.profile.heel;
  return { lift: scale(up, size), zAxis: up, slope, aside: isRidge ? 0 : plan.cleatShift };
}

/** Frames over which the purlins of a row end. */
function boundsOf(plan: PurlinPlan, row: number, frames: number): number[] {
  const step = plan.spans === 'single' ? 1 : 2;
  const first = plan.spans === 'staggered' && row % 2 === 1 ? 1 : step;
  const bounds = [0];
  for (let next = first; next < frames - 1; next += step) bounds.push(next);
  return [...bounds, frames - 1];
}

/** From the chord's work line to the purlin's axis. Lapped ones lie side by side, channels back to back. */
function axisShift(plan: PurlinPlan, seat: Seat, run: number): Vec3 {
  const half = plan.profile.shape === 'U' ? plan.profile.back : plan.profile.width / 2;
  const aside = plan.ends === 'lapped' ? (run % 2 === 0 ? half : -half) : 0;
  return add(seat.lift, scale(seat.slope, seat.aside + aside));
}

function drawRow(
  board: DrawingBoard,
  plan: PurlinPlan,
  r: number,
  row: PurlinRow,
  seat: Seat,
  design: Design,
  frames: number,
): void {
  const bounds = boundsOf(plan, r, frames);
  const chord = design.topChord;
  const half = (chord.turned ? chord.profile.depth : chord.profile.width) / 2 + (chord.pairGap ?? 0) + 0.01;
  for (let i = 0; i + 1 < bounds.length; i++) {
    const [from, to] = [bounds[i], bounds[i + 1]];
    const joints: string[] = [];
    for (let f = from; f <= to; f++) {
      joints.push(nodeKey(f, row.node));
      if (plan.sagRods && f < to) joints.push(sagKey(r, f));
    }
    const cut = (frame: number): number => {
      if (plan.style === 'flush') return half;
      if (frame === 0 || frame === frames - 1) return -plan.verge;
      return plan.ends === 'lapped' ? -plan.endSize : plan.endSize / 2;
    };
    const cuts: [number, number] = [cut(from), cut(to)];
    for (const end of [0, 1] as const) {
      if (cuts[end] > -0.45) continue;
      const at = board.at(joints.at(end === 0 ? 0 : -1)!);
      const free = `P${r}/${end}/free`;
      board.joint(free, add(add(at, seat.lift), scale(BETWEEN_FRAMES, (end === 0 ? 1 : -1) * cuts[end])), {
        free: true,
      });
      if (end === 0) joints.unshift(free);
      else joints.push(free);
      cuts[end] = 0;
    }
    const shift = axisShift(plan, seat, i);
    drawBetween(board, plan, `P${r}-${from}${to}`, joints, cuts, shift, {
      ...seat,
      slope: scale(seat.slope, i % 2 === 0 ? 1 : -1),
    });
  }
}

/** Free ends are given on the purlin's own line, seats on the chord's. */
function drawBetween(
  board: DrawingBoard,
  plan: PurlinPlan,
  key: string,
  joints: readonly string[],
  cuts: readonly [number, number],
  shift: Vec3,
  { lift, zAxis, slope }: Seat,
): void {
  const off = (joint: string): Vec3 => (board.joints.get(joint)!.free ? subtract(shift, lift) : shift);
  board.draw({
    key,
    role: 'purlin',
    profile: plan.profile,
    zAxis,
    frame: null,
    joints,
    cuts,
    shifts: [off(joints[0]), off(joints.at(-1)!)],
    seated: plan.style === 'seated',
    opens: slope,
  });
}

/** From purlin to purlin in the middle of each bay, through their webs. */
function drawSagRods(board: DrawingBoard, plan: PurlinPlan, frames: number): void {
  for (let bay = 0; bay + 1 < frames; bay++) {
    for (let r = 0; r + 1 < plan.rows.length; r++) {
      const side = scale(BETWEEN_FRAMES, (r % 2 === 0 ? 0.5 : -0.5) * plan.stagger);
      board.draw({
        key: `SR${bay}-${r}`,
        role: 'sag rod',
        profile: SAG_RODS[0],
        zAxis: [0, 1, 0],
        frame: null,
        joints: [sagKey(r, bay), sagKey(r + 1, bay)],
        cuts: plan.stagger > 0 ? [-0.03, -0.03] : [0.003, 0.003],
        shifts: [side, side],
      });
    }
  }
}
