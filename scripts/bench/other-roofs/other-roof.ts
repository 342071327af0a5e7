import { add, cross, distance, scale, subtract, UP, unit, type Vec3 } from '../../../src/domain/vector.ts';
import { type Chance, chanceOf } from '../roofs/chance.ts';
import { DrawingBoard } from '../roofs/drawing-board.ts';
import { ANGLES, CHS, HEA, IPE, nearest, type Profile, RHS, RODS, SAG_RODS, ZEDS } from '../roofs/profiles.ts';
import type { Roof } from '../roofs/random-roof.ts';
import { type Chord, PLANE_KINDS, type Plane, planeOf } from './planes.ts';
import { drawSpaceGrid } from './space-grid.ts';

export const OTHER_KINDS = [...PLANE_KINDS, 'space grid'] as const;

/** How this office draws: the same for the whole roof. */
interface Habits {
  readonly chord: Profile;
  readonly web: Profile;
  readonly purlin: Profile;
  readonly column: Profile;
  readonly rod: Profile;
  /** m from the chord's edge to where a rod ends on its gusset. */
  readonly tab: number;
  /** Chords back to back with a gusset of this thickness between; null for single ones. */
  readonly gusset: number | null;
  /** m that a web stops short of the chord's face; null where webs are drawn from centre to centre. */
  readonly gap: number | null;
  /** m that single webs lie beside the truss's plane. */
  readonly beside: number;
  /** Longest piece of a chord that a lorry takes, m; chords are cut there wherever that is. */
  readonly lorry: number;
  /** m of cleat under a purlin. */
  readonly cleat: number;
  /** m that columns run on past the truss; 0 where they stop under it. */
  readonly parapet: number;
  /** Coordinates are drawn to this, m; 0 for exact ones. */
  readonly grid: number;
}

function habitsOf(chance: Chance): Habits {
  const style = chance.pick(['tubes', 'angles', 'rolled'] as const);
  const depth = chance.between(0.1, 0.18);
  const chord = nearest({ tubes: RHS, angles: ANGLES, rolled: HEA }[style], depth);
  const web = nearest({ tubes: CHS, angles: ANGLES, rolled: RHS }[style], depth * chance.between(0.45, 0.65));
  const gusset = style === 'angles' ? chance.pick([0.01, 0.012]) : null;
  return {
    chord,
    web,
    purlin: nearest(chance.pick([IPE, ZEDS, RHS]), chance.between(0.1, 0.18)),
    column: nearest(HEA, chance.between(0.16, 0.24)),
    rod: chance.pick(RODS),
    tab: chance.between(0.03, 0.14),
    gusset,
    gap: style === 'angles' || chance.happens(0.7) ? Math.min(0.15, chance.between(0.1, 1.1) * web.depth) : null,
    beside: style === 'angles' ? chance.pick([0, 0.006 + web.back]) : 0,
    lorry: chance.pick([6, 12, 12, 40]),
    cleat: chance.pick([0, 0.005, 0.01, 0.02]),
    parapet: chance.happens(0.3) ? chance.between(0.3, 0.45) : 0,
    grid: chance.pick([0, 0.001, 0.001]),
  };
}

/** The roof of this seed, of another hand than `randomRoof`: other trusses, other habits. */
export function otherRoof(seed: number): Roof {
  const chance = chanceOf(seed * 7919 + 13);
  const kind = OTHER_KINDS[seed % OTHER_KINDS.length]!;
  const habits = habitsOf(chance);
  const board = new DrawingBoard();
  const crossings: (readonly [string, string])[] = [];
  if (kind === 'space grid') drawSpaceGrid(board, chance);
  else drawHall(board, chance, planeOf(chance, kind), habits, crossings);
  const drawn = board.drawn.map((m) => ({ ...m, from: rounded(m.from, habits.grid), to: rounded(m.to, habits.grid) }));
  return {
    seed,
    kind,
    family: habits.chord.name,
    title: `${kind}; chord ${habits.chord.name}, web ${habits.web.name}, gap ${habits.gap?.toFixed(3) ?? 'none'}, purlin ${habits.purlin.name}, chords of ${habits.lorry} m`,
    drawn,
    joints: board.joints,
    lines: board.lines,
    supports: [...board.joints.values()].filter((j) => j.supported).map((j) => j.at),
    assemblies: chance.happens(0.3),
    crossings,
  };
}

const rounded = (p: Vec3, grid: number): Vec3 =>
  grid === 0 ? p : (p.map((x) => Math.round(x / grid) * grid) as unknown as Vec3);

const key = (frame: number, node: string): string => `F${frame}/${node}`;

function drawHall(
  board: DrawingBoard,
  chance: Chance,
  plane: Plane,
  habits: Habits,
  crossings: (readonly [string, string])[],
): void {
  const frames = chance.whole(3, 6);
  const spacing = chance.between(4.5, 7);
  const rows = purlinRows(chance, plane);
  for (let frame = 0; frame < frames; frame++) {
    const at = ([x, z]: readonly [number, number]): Vec3 => [x, frame * spacing, z];
    for (const [name, xz] of plane.nodes) board.joint(key(frame, name), at(xz));
    for (const row of rows) if (!plane.nodes.has(row.node)) board.joint(key(frame, row.node), at(row.at));
    for (const one of plane.chords) drawChord(board, frame, plane, one, rows, habits);
    for (const [a, b] of plane.webs) drawWeb(board, frame, plane, a, b, habits);
    for (const name of plane.bearings) drawColumn(board, frame, name, habits, chance.between(4, 6));
  }
  drawPurlins(board, plane, rows, frames, habits, chance);
  drawRods(board, plane, frames, habits, crossings);
}

interface Row {
  readonly node: string;
  readonly at: readonly [number, number];
  readonly chord: Chord;
}

/** Purlins at their own spacing, mostly not on panel points; on a portal's rafters nothing else is. */
function purlinRows(chance: Chance, plane: Plane): Row[] {
  const rows: Row[] = [];
  const onNodes = plane.kind !== 'portal' && chance.happens(0.5);
  const wanted = chance.between(1.3, 2);
  for (const chord of plane.chords.filter(({ role }) => role === 'top chord')) {
    const [a, b] = [chord.nodes[0]!, chord.nodes.at(-1)!].map((name) => plane.nodes.get(name)!) as [Point, Point];
    const length = Math.hypot(b[0] - a[0], b[1] - a[1]);
    if (Math.abs(b[1] - a[1]) > 0.8 * length) continue;
    const point = (s: number): Point => [a[0] + ((b[0] - a[0]) * s) / length, a[1] + ((b[1] - a[1]) * s) / length];
    if (onNodes) {
      for (const node of chord.nodes.slice(1, -1)) rows.push({ node, at: plane.nodes.get(node)!, chord });
      continue;
    }
    const stops = chord.nodes.map((name) => {
      const p = plane.nodes.get(name)!;
      return Math.hypot(p[0] - a[0], p[1] - a[1]);
    });
    const count = Math.max(1, Math.round(length / wanted) - 1);
    for (let i = 1; i <= count; i++) {
      const s = (length * i) / (count + 1);
      if (Math.min(...stops.map((stop) => Math.abs(stop - s))) < 0.35) continue;
      rows.push({ node: `p${chord.key}.${i}`, at: point(s), chord });
    }
  }
  return rows;
}

type Point = readonly [number, number];

function drawChord(
  board: DrawingBoard,
  frame: number,
  plane: Plane,
  { key: name, role, nodes }: Chord,
  rows: readonly Row[],
  { chord, gusset, lorry }: Habits,
): void {
  const start = board.at(key(frame, nodes[0]!));
  const stops = [
    ...nodes,
    ...rows.filter((row) => row.chord.key === name && !plane.nodes.has(row.node)).map((r) => r.node),
  ]
    .map((node) => ({ node, s: distance(board.at(key(frame, node)), start) }))
    .sort((a, b) => a.s - b.s);
  const length = stops.at(-1)!.s;
  const splices: number[] = [];
  for (let s = lorry; s < length - 1.5; s += lorry) {
    // A splice stands clear of the panel points by half a metre.
    const near = stops.find((stop) => Math.abs(stop.s - s) < 0.5);
    splices.push(near ? near.s + 0.6 : s);
  }
  const [first, last] = [stops[0]!, stops.at(-1)!].map(({ node }) => board.at(key(frame, node))) as [Vec3, Vec3];
  const direction = unit(subtract(last, first))!;
  const zAxis = unit(cross(direction, [0, -1, 0]))!;
  board.draw({
    key: `${name}${frame}`,
    role,
    profile: chord,
    zAxis: zAxis[2] < 0 ? scale(zAxis, -1) : zAxis,
    frame,
    joints: stops.map(({ node }) => key(frame, node)),
    cuts: [0, 0],
    splices: splices.filter((s) => stops.every((stop) => Math.abs(stop.s - s) > 0.3)),
    spliceGap: 0.004,
    pair: gusset === null ? null : [0, gusset / 2 + chord.back, 0],
  });
}

function drawWeb(board: DrawingBoard, frame: number, plane: Plane, a: string, b: string, habits: Habits): void {
  const { web, gap, beside } = habits;
  const [from, to] = [board.at(key(frame, a)), board.at(key(frame, b))];
  const direction = unit(subtract(to, from))!;
  const cut = (node: string): number => {
    if (gap === null) return 0;
    const chords = plane.chords.filter(({ nodes }) => nodes.includes(node));
    const toFace = chords.map(({ nodes }) => {
      const [p, q] = [plane.nodes.get(nodes[0]!)!, plane.nodes.get(nodes.at(-1)!)!];
      const line = unit([q[0] - p[0], 0, q[1] - p[1]])!;
      return habits.chord.depth / 2 / Math.max(0.5, Math.hypot(...cross(line, direction)));
    });
    return Math.max(0, ...toFace) + gap;
  };
  board.draw({
    key: `W${frame}-${a}${b}`,
    role: 'web',
    profile: web,
    zAxis: unit(cross(direction, [0, 1, 0]))!,
    frame,
    joints: [key(frame, a), key(frame, b)],
    cuts: [cut(a), cut(b)],
    shifts: [
      [0, beside, 0],
      [0, beside, 0],
    ],
  });
}

function drawColumn(board: DrawingBoard, frame: number, name: string, habits: Habits, height: number): void {
  const head = key(frame, name);
  const at = board.at(head);
  const base = board.joint(`${head}/base`, [at[0], at[1], at[2] - height], { supported: true });
  const joints = [base, head];
  if (habits.parapet > 0) joints.push(board.joint(`${head}/top`, add(at, scale(UP, habits.parapet)), { free: true }));
  board.draw({
    key: `C${frame}${name}`,
    role: 'column',
    profile: habits.column,
    zAxis: [1, 0, 0],
    frame,
    joints,
    cuts: [0, habits.parapet > 0 ? 0 : habits.chord.depth / 2 + 0.01],
  });
}

function drawPurlins(
  board: DrawingBoard,
  plane: Plane,
  rows: readonly Row[],
  frames: number,
  habits: Habits,
  chance: Chance,
): void {
  const hasRods = chance.happens(0.5);
  const sag = (r: number, bay: number) => `S${r}/${bay}`;
  const lifts = rows.map(({ chord }) => {
    const [p, q] = [plane.nodes.get(chord.nodes[0]!)!, plane.nodes.get(chord.nodes.at(-1)!)!];
    const [dx, dz] = [Math.abs(q[0] - p[0]), (q[1] - p[1]) * Math.sign(q[0] - p[0])];
    const up = unit([-dz, 0, dx])!;
    const top = habits.gusset === null ? habits.chord.depth / 2 : habits.chord.depth - habits.chord.heel;
    return { up, lift: scale(up, top + habits.cleat + habits.purlin.depth / 2) };
  });
  const together = (r: number) => r + 1 < rows.length && rows[r]!.chord.key === rows[r + 1]!.chord.key;
  const wantsRod = (r: number) => hasRods && (together(r) || (r > 0 && together(r - 1)));
  for (const [r, row] of rows.entries()) {
    for (let bay = 0; bay + 1 < frames; bay++) {
      const [near, far] = [board.at(key(bay, row.node)), board.at(key(bay + 1, row.node))];
      if (wantsRod(r)) board.joint(sag(r, bay), add(scale(add(near, far), 0.5), lifts[r]!.lift));
      board.draw({
        key: `P${r}-${bay}${bay + 1}`,
        role: 'purlin',
        profile: habits.purlin,
        zAxis: lifts[r]!.up,
        frame: null,
        joints: [key(bay, row.node), ...(wantsRod(r) ? [sag(r, bay)] : []), key(bay + 1, row.node)],
        cuts: [0.005, 0.005],
        shifts: [lifts[r]!.lift, lifts[r]!.lift],
        seated: true,
      });
    }
  }
  for (const r of rows.keys()) {
    for (let bay = 0; hasRods && together(r) && bay + 1 < frames; bay++) {
      board.draw({
        key: `SR${bay}-${r}`,
        role: 'sag rod',
        profile: SAG_RODS[0]!,
        zAxis: [0, 1, 0],
        frame: null,
        joints: [sag(r, bay), sag(r + 1, bay)],
        cuts: [0.003, 0.003],
      });
    }
  }
}

/** Rods crossed between the upper chords of the first and the last bay, from gusset to gusset. */
function drawRods(
  board: DrawingBoard,
  { ridgeLine, nodes }: Plane,
  frames: number,
  { rod, chord, tab }: Habits,
  crossings: (readonly [string, string])[],
): void {
  const flat = ridgeLine.slice(1).flatMap((name, i) => {
    const [p, q] = [nodes.get(ridgeLine[i]!)!, nodes.get(name)!];
    const run = Math.hypot(q[0] - p[0], q[1] - p[1]);
    return run > 1.5 && Math.abs(q[1] - p[1]) < 0.8 * run ? [[ridgeLine[i]!, name] as const] : [];
  });
  for (const bay of new Set([0, frames - 2])) {
    for (const [a, b] of flat) {
      const marks = [`RB${bay}-${a}${b}x`, `RB${bay}-${a}${b}y`] as const;
      const lines = [
        [key(bay, a), key(bay + 1, b)],
        [key(bay, b), key(bay + 1, a)],
      ] as const;
      const across = unit(subtract(board.at(key(bay, b)), board.at(key(bay, a))))!;
      const up = unit(cross(across, [0, 1, 0]))!;
      for (const i of [0, 1] as const) {
        const off = scale(up, (i === 0 ? 1 : -1) * (rod.depth / 2 + 0.001));
        board.draw({
          key: marks[i],
          role: 'roof bracing',
          profile: rod,
          zAxis: up,
          frame: null,
          joints: lines[i],
          cuts: [chord.width / 2 + tab, chord.width / 2 + tab],
          shifts: [off, off],
        });
      }
      crossings.push(marks);
    }
  }
}
