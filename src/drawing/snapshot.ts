import type { Result, ResultMember } from '../domain/result.ts';
import { add, between, distance, dot, scale, subtract, unit, type Vec3 } from '../domain/vector.ts';
import { millimetres } from '../domain/words.ts';
import { type Camera, inFront, seen } from './camera.ts';
import { mixed } from './colour.ts';
import { LabelBoard } from './label-board.ts';
import { PALETTE } from './palette.ts';
import { type Face, memberFaces } from './prisms.ts';
import { outlineSize, sectionOutline } from './section-outline.ts';
import { nearestOn, type Spot } from './spot.ts';
import { element, pathOf, text } from './svg.ts';
import { CAP_HEIGHT, FONT_FAMILIES, fitted, plain, textWidth } from './text.ts';

export interface SnapshotOptions {
  /** Pixels of what the camera sees; the width follows from the camera, and the two lines stand below. */
  readonly height: number;
  /** Two lines under the picture: what is the matter, and where. */
  readonly title: string;
  readonly place: string;
}

export const SNAPSHOT_DEFAULTS: SnapshotOptions = { height: 600, title: '', place: '' };

const CAPTION = 56;

/**
 * What a camera sees of the members about a spot, as drawn: those concerned in colour and named, the others grey, the gap or the
 * movement in question marked. SVG; `rasterise` makes the picture.
 */
export function drawSnapshot(
  result: Result,
  spot: Spot,
  camera: Camera,
  options: Partial<SnapshotOptions> = {},
): string {
  const { height, title, place } = { ...SNAPSHOT_DEFAULTS, ...options };
  const width = Math.round(height * camera.aspect);
  const hasCaption = title !== '' || place !== '';
  const frame: Frame = { camera, width, height, spot };
  const board = new LabelBoard(4, 4, width - 4, height - 4);
  const total = height + (hasCaption ? CAPTION : 0);
  const root = {
    xmlns: 'http://www.w3.org/2000/svg',
    width,
    height: total,
    viewBox: `0 0 ${width} ${total}`,
    'font-family': FONT_FAMILIES,
  };
  return element('svg', root, [
    element('rect', { width, height: total, fill: PALETTE.paper }),
    drawMembers(result.members, frame),
    drawMark(frame, board),
    drawNames(result.members, frame, board),
    ...(hasCaption ? [drawCaption(title, place, width, height)] : []),
  ]);
}

interface Frame {
  readonly camera: Camera;
  readonly width: number;
  readonly height: number;
  readonly spot: Spot;
}

type Pixel = readonly [number, number];

const onPicture = ({ width, height }: Frame, { x, y }: { x: number; y: number }): Pixel => [
  width / 2 + x * height,
  height / 2 + y * height,
];

/** In radii of the spot: within it members are drawn as bodies, beyond as lines; pieces sort well at this length. */
const BODIES = 7;
const PIECE = 0.6;

function drawMembers(members: readonly ResultMember[], frame: Frame): string {
  const { spot, camera } = frame;
  const named = new Set(spot.members);
  const main = spot.members[0];
  const colourOf = (globalId: string) =>
    globalId === main ? PALETTE.concerned : named.has(globalId) ? PALETTE.beside : PALETTE.context;
  const isBody = (member: ResultMember) => {
    const isNear = distance(nearestOn(member.axis, spot.centre), spot.centre) < BODIES * spot.radius;
    return (isNear || named.has(member.globalId)) && thickness(member, frame) >= THIN;
  };
  const lines = members
    .filter((member) => !isBody(member))
    .map((member) => drawLine(member, colourOf(member.globalId), frame));
  const faces = members
    .filter(isBody)
    .flatMap((member) => memberFaces(member, camera, PIECE * spot.radius))
    .filter((face) => isOnPicture(face, frame))
    .sort((a, b) => b.depth - a.depth);
  const cut = clippingDepth(spot, camera);
  const shown = faces.filter((face) => named.has(face.globalId) || face.inFront > cut);
  const concerned = faces.filter((face) => named.has(face.globalId));
  return element('g', { class: 'members', 'stroke-linejoin': 'round', 'stroke-linecap': 'round' }, [
    ...lines,
    ...shown.map((face) => drawFace(face, colourOf(face.globalId), frame)),
    // What the others hide of the members concerned shines through.
    element(
      'g',
      { class: 'through', opacity: 0.3 },
      concerned.map((face) => element('path', { d: outlineOf(face, frame), fill: colourOf(face.globalId) })),
    ),
  ]);
}

/** Pixels below which a body is not told from a line. */
const THIN = 3;

/** Pixels that a member is thick, at the distance of the spot or of its own nearest point if that is farther. */
function thickness(member: ResultMember, { camera, height, spot }: Frame): number {
  const away = Math.max(
    distance(camera.eye, spot.centre) * 0.5,
    distance(camera.eye, nearestOn(member.axis, camera.eye)),
  );
  const size = outlineSize(sectionOutline(member));
  return (size * height) / (2 * Math.tan((camera.fieldOfView * Math.PI) / 360) * away);
}

/** m in front of the eye: what stands nearer than this would hide the spot and is cut off. */
export function clippingDepth(spot: Spot, { eye, direction }: Camera): number {
  return dot(subtract(spot.centre, eye), direction) - CLIP * spot.radius;
}

/** In radii: a little more than the spot itself. */
const CLIP = 1.3;

function drawLine(member: ResultMember, colour: string, frame: Frame): string {
  const part = inFront(frame.camera, member.axis, 0.1);
  if (part === null) return '';
  const [a, b] = part.map((end) => onPicture(frame, seen(frame.camera, end)));
  if (!touches([a!, b!], frame)) return '';
  const isContext = colour === PALETTE.context;
  return element('line', {
    'data-member': member.globalId,
    x1: a![0],
    y1: a![1],
    x2: b![0],
    y2: b![1],
    stroke: isContext ? mixed(colour, PALETTE.paper, 0.4) : colour,
    'stroke-width': Math.min(THIN, Math.max(isContext ? 0.8 : 1.2, thickness(member, frame))),
  });
}

/** What lies far behind the spot fades, as in haze. */
function drawFace(face: Face, colour: string, frame: Frame): string {
  const { globalId, depth, light } = face;
  const { spot, camera } = frame;
  const behind = (depth - distance(camera.eye, spot.centre)) / (BODIES * spot.radius);
  const shaded = mixed(mixed(colour, '#000000', 0.45 * (1 - light)), PALETTE.paper, 0.45 * light ** 3);
  const haze = colour === PALETTE.context ? Math.min(0.75, Math.max(0, behind)) : 0;
  const fill = mixed(shaded, PALETTE.paper, haze);
  const d = outlineOf(face, frame);
  return element('path', { 'data-member': globalId, d, fill, stroke: fill, 'stroke-width': 0.6 });
}

function outlineOf({ corners }: Face, frame: Frame): string {
  return pathOf(
    corners.map(([x, y]) => onPicture(frame, { x, y })),
    true,
  );
}

function isOnPicture({ corners }: Face, frame: Frame): boolean {
  return touches(
    corners.map(([x, y]) => onPicture(frame, { x, y })),
    frame,
  );
}

function touches(points: readonly Pixel[], { width, height }: Frame): boolean {
  const all = (test: (point: Pixel) => boolean) => points.every(test);
  return !(all(([x]) => x < 0) || all(([x]) => x > width) || all(([, y]) => y < 0) || all(([, y]) => y > height));
}

/** A ring on the point in question, a line across the gap with its length, an arrow along the movement. */
function drawMark(frame: Frame, board: LabelBoard): string {
  const { spot, camera } = frame;
  const parts: string[] = [];
  const at = spot.at === null ? null : onPicture(frame, seen(camera, spot.at));
  if (at !== null && isFinitePixel(at)) {
    parts.push(ring(at));
    board.block({ x: at[0], y: at[1], width: 44, height: 44, angle: 0 });
    if (spot.movement !== null) parts.push(arrow(at, spot, frame));
  }
  if (spot.gap !== null) {
    const [a, b] = [spot.gap.from, spot.gap.to].map((point) => onPicture(frame, seen(camera, point)));
    parts.push(
      element('path', { d: pathOf([a!, b!]), stroke: PALETTE.paper, 'stroke-width': 5, fill: 'none' }),
      element('path', {
        d: pathOf([a!, b!]),
        stroke: PALETTE.ink,
        'stroke-width': 2,
        'stroke-dasharray': '5 3',
        fill: 'none',
      }),
      labelBeside(millimetres(spot.gap.length), a!, board, 17),
    );
  }
  return parts.length === 0 ? '' : element('g', { class: 'mark' }, parts);
}

function ring([cx, cy]: Pixel): string {
  const circle = { cx, cy, r: 18, fill: 'none' };
  return (
    element('circle', { ...circle, stroke: PALETTE.paper, 'stroke-width': 6 }) +
    element('circle', { ...circle, stroke: PALETTE.ink, 'stroke-width': 2.5 })
  );
}

const ARROW = 70;

function arrow(at: Pixel, { at: point, movement, radius }: Spot, frame: Frame): string {
  const way = unit(movement as Vec3);
  if (way === null) return '';
  const tip = onPicture(frame, seen(frame.camera, add(point as Vec3, scale(way, 0.2 * radius))));
  const [dx, dy] = [tip[0] - at[0], tip[1] - at[1]];
  const length = Math.hypot(dx, dy);
  if (!(length > 1)) return '';
  const [u, v] = [dx / length, dy / length];
  const reach = 20 + ARROW;
  const end: Pixel = [at[0] + u * reach, at[1] + v * reach];
  const barb = (side: number): Pixel => [end[0] - 13 * u - side * 6 * v, end[1] - 13 * v + side * 6 * u];
  const shaft = pathOf([
    [at[0] + u * 20, at[1] + v * 20],
    [end[0] - 11 * u, end[1] - 11 * v],
  ]);
  const head = pathOf([barb(1), end, barb(-1)], true);
  return [
    element('path', { d: shaft, stroke: PALETTE.paper, 'stroke-width': 7 }),
    element('path', { d: head, fill: PALETTE.ink, stroke: PALETTE.paper, 'stroke-width': 3, 'paint-order': 'stroke' }),
    element('path', { d: shaft, stroke: PALETTE.ink, 'stroke-width': 3 }),
  ].join('');
}

const MOST_NAMES = 8;

/** Names of the members concerned, at the middle of what is seen of each. */
function drawNames(members: readonly ResultMember[], frame: Frame, board: LabelBoard): string {
  const { spot } = frame;
  const order = new Map(spot.members.map((globalId, k) => [globalId, k]));
  const named = members
    .filter(({ globalId }) => order.has(globalId))
    .sort((a, b) => order.get(a.globalId)! - order.get(b.globalId)!);
  const labels = named.slice(0, MOST_NAMES).map((member) => {
    const words = fitted(plain(member.tag || member.name || member.globalId), 15, 220);
    const at = middleSeen(member, frame);
    return words === '' || at === null ? '' : labelBeside(words, at, board, 15);
  });
  return element('g', { class: 'names' }, labels);
}

/** The middle of the part of a member that is on the picture; null where none is. */
function middleSeen({ axis }: ResultMember, frame: Frame): Pixel | null {
  const part = inFront(frame.camera, axis, 0.1);
  if (part === null) return null;
  const seenPoints = Array.from({ length: 41 }, (_, k) =>
    onPicture(frame, seen(frame.camera, between(...part, k / 40))),
  );
  const inside = seenPoints.filter((point) => touches([point], frame));
  return inside[Math.floor(inside.length / 2)] ?? null;
}

/** Words as near to a point as there is room for them; none where there is no room. */
function labelBeside(words: string, [x, y]: Pixel, board: LabelBoard, size: number): string {
  const width = textWidth(words, size) + 8;
  const height = size * CAP_HEIGHT + 8;
  for (const away of [12, 26, 44, 66, 92]) {
    for (const [i, j] of DIRECTIONS) {
      const box = { x: x + i * (away + width / 2), y: y + j * (away + height / 2), width, height, angle: 0 };
      if (!board.take(box)) continue;
      const look = { 'font-size': size, 'text-anchor': 'middle', fill: PALETTE.ink, ...HALO };
      return text(words, { x: box.x, y: box.y + (CAP_HEIGHT * size) / 2, ...look });
    }
  }
  return '';
}

const HALO = { 'paint-order': 'stroke', stroke: PALETTE.paper, 'stroke-width': 4, 'stroke-linejoin': 'round' };
const DIRECTIONS = [
  [1, -0.4],
  [-1, -0.4],
  [1, 0.6],
  [-1, 0.6],
  [0, -1],
  [0, 1],
] as const;

function drawCaption(title: string, place: string, width: number, height: number): string {
  const y = height;
  return element('g', { class: 'caption' }, [
    element('rect', { x: 0, y, width, height: CAPTION, fill: PALETTE.paper }),
    element('line', { x1: 0, y1: y, x2: width, y2: y, stroke: PALETTE.faint, 'stroke-width': 1 }),
    text(fitted(plain(title), 17, width - 32, true), {
      x: 16,
      y: y + 24,
      'font-size': 17,
      'font-weight': 'bold',
      fill: PALETTE.ink,
    }),
    text(fitted(plain(place), 14, width - 32), { x: 16, y: y + 44, 'font-size': 14, fill: PALETTE.quiet }),
  ]);
}

const isFinitePixel = ([x, y]: Pixel): boolean => Number.isFinite(x) && Number.isFinite(y);
