import type { Member } from '../../../src/domain/member.ts';
import { cross, dot, scale, subtract, unit, type Vec3 } from '../../../src/domain/vector.ts';
import { bracingPlan, drawBracing, drawTies } from './bracing.ts';
import { chanceOf } from './chance.ts';
import { randomDesign } from './design.ts';
import { DrawingBoard, type DrawnMember, type TrueJoint, type TrueLine } from './drawing-board.ts';
import { FrameDrawing } from './frame.ts';
import { frameDetail } from './frame-plan.ts';
import { sectionOf } from './profiles.ts';
import { drawPurlins, extraStops, purlinPlan } from './purlins.ts';
import { TRUSS_KINDS, trussShape } from './truss-shapes.ts';

/** A roof as drawn, with the truth it was drawn from. World metres throughout. */
export interface Roof {
  readonly seed: number;
  readonly kind: string;
  readonly family: string;
  /** One line on what was drawn, for reports. */
  readonly title: string;
  readonly drawn: readonly DrawnMember[];
  readonly joints: ReadonlyMap<string, TrueJoint>;
  readonly lines: ReadonlyMap<string, TrueLine>;
  /** Column bases, or the trusses' bearings where no columns were drawn. */
  readonly supports: readonly Vec3[];
  readonly assemblies: boolean;
  /** Pairs of members that cross without being joined, on purpose. */
  readonly crossings: readonly (readonly [string, string])[];
}

/** The roof of this seed: the same on every machine. */
export function randomRoof(seed: number): Roof {
  const chance = chanceOf(seed);
  const kind = TRUSS_KINDS[seed % TRUSS_KINDS.length];
  const shape = trussShape(chance, kind);
  const design = randomDesign(chance, kind, shape.span);
  const frames = chance.whole(2, 6);
  const spacing = chance.between(4, 8);
  const purlins = purlinPlan(chance, shape, design, spacing);
  const bracing = bracingPlan(chance, shape, design, frames, spacing, purlins.style === 'seated');
  const columns = shape.bearing === 'beside' || chance.happens(0.75);
  const columnHeight = chance.between(4, 8);
  const inner = shape.bottomNodes.filter((n) => !shape.bearings.includes(n) && n !== 'b0' && n !== `b${shape.panels}`);
  const posts = columns && chance.happens(0.5) ? inner.filter((_, i) => i % 3 === 1) : [];
  const stub = columns && chance.happens(0.2) ? chance.between(0.8, 1.5) : 0;
  const detail = frameDetail(chance, shape);
  const board = new DrawingBoard();
  const extra = extraStops(purlins.rows);
  for (let index = 0; index < frames; index++) {
    const isGable = index === 0 || index === frames - 1;
    const plan = { index, y: index * spacing, shape, design, extra, columns, columnHeight, stub, detail };
    new FrameDrawing(board, { ...plan, gablePosts: isGable ? posts : [] }, chance).draw();
  }
  drawPurlins(board, purlins, shape, design, frames);
  drawBracing(board, bracing, design);
  const purlinNodes = purlins.rows.map((row) => row.node);
  drawTies(board, bracing, design, shape, frames, columns, purlinNodes);
  const place = placing(chance.between(0, 2 * Math.PI), [
    chance.between(-1e5, 1e5),
    chance.between(-1e5, 1e5),
    chance.between(-20, 500),
  ]);
  const { joints, drawn } = moved(board, place);
  const crossings = bracing.cutCrossing
    ? []
    : drawn.filter((m) => m.line.endsWith('x')).map((m) => [m.mark, m.mark.replace(/x$/, 'y')] as const);
  const title = [
    `${kind} ${shape.span.toFixed(1)} m, ${shape.panels} panels, ${shape.bearing}, ${frames} frames`,
    `${design.family}, ${design.fit}, e ${design.eccentricity.toFixed(2)} d`,
    `chord ${design.topChord.profile.name}, web ${design.diagonal.profile.name}, post ${design.post.profile.name}`,
    `purlins ${purlins.style} ${purlins.profile.name} ${purlins.spans} ${purlins.ends}${purlins.sagRods ? ' with sag rods' : ''}`,
  ].join('; ');
  return {
    seed,
    kind,
    family: design.family,
    title,
    drawn,
    joints,
    lines: board.lines,
    supports: [...joints.values()].filter((j) => j.supported).map((j) => j.at),
    assemblies: chance.happens(0.5),
    crossings,
  };
}

interface Placing {
  readonly point: (p: Vec3) => Vec3;
  readonly direction: (d: Vec3) => Vec3;
}

function placing(turn: number, to: Vec3): Placing {
  const [c, s] = [Math.cos(turn), Math.sin(turn)];
  const direction = ([x, y, z]: Vec3): Vec3 => [c * x - s * y, s * x + c * y, z];
  const point = (p: Vec3): Vec3 => {
    const [x, y, z] = direction(p);
    return [x + to[0], y + to[1], z + to[2]];
  };
  return { point, direction };
}

function moved(board: DrawingBoard, { point, direction }: Placing) {
  const joints = new Map([...board.joints].map(([key, joint]) => [key, { ...joint, at: point(joint.at) }]));
  const drawn = board.drawn.map((m) => ({
    ...m,
    from: point(m.from),
    to: point(m.to),
    zAxis: direction(m.zAxis),
    opens: m.opens && direction(m.opens),
  }));
  return { joints, drawn };
}

/** The members of a roof in an order and drawn in directions of chance. */
export function membersOf(roof: Roof): Member[] {
  const chance = chanceOf(roof.seed + 77_777);
  return chance.shuffled(roof.drawn).map((drawn) => memberOf(drawn, chance.happens(0.5), roof.assemblies));
}

function memberOf(drawn: DrawnMember, isReversed: boolean, hasAssembly: boolean): Member {
  const axis: readonly [Vec3, Vec3] = isReversed ? [drawn.to, drawn.from] : [drawn.from, drawn.to];
  const direction = unit(subtract(axis[1], axis[0]))!;
  const up = sectionUp(drawn, direction);
  const square = subtract(up, scale(direction, dot(up, direction)));
  const isTruss = drawn.frame !== null && ['top chord', 'bottom chord', 'web'].includes(drawn.role);
  const ifcClass =
    { column: 'IfcColumn', purlin: 'IfcBeam', 'eaves beam': 'IfcBeam' }[drawn.role as string] ?? 'IfcMember';
  return {
    globalId: drawn.mark,
    part: 0,
    name: drawn.mark,
    tag: null,
    class: ifcClass,
    predefinedType: null,
    type: null,
    assembly: hasAssembly && isTruss ? `Truss ${drawn.frame! + 1}` : null,
    partOf: null,
    storey: null,
    layer: null,
    axisFrom: 'extrusion',
    axis,
    zAxis: unit(square) ?? unit(cross(direction, [0, 0, 1]))!,
    section: sectionOf(drawn.profile),
    material: STEEL,
  };
}

/**
 * The section's z axis for a member drawn in `direction`: its y axis is z x direction, so drawing a member the other way
 * round would turn its flanges to the other side. A channel is then turned over, an equal angle by a quarter.
 */
function sectionUp({ profile, zAxis, opens }: DrawnMember, direction: Vec3): Vec3 {
  if (!opens || dot(cross(zAxis, direction), opens) >= 0) return zAxis;
  if (profile.shape === 'L') return opens;
  return profile.shape === 'U' ? scale(zAxis, -1) : zAxis;
}

const STEEL = {
  name: 'S355',
  elasticModulus: 2.1e11,
  density: 7850,
  expansion: 1.2e-5,
  yieldStrength: 3.55e8,
  ultimateStrength: 4.9e8,
  from: 'name',
} as const;
