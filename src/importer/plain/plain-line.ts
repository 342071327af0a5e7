import type { Section } from '../../domain/member.ts';
import { hypot } from '../../domain/vector.ts';
import { FARTHEST_BESIDE, isNear, rounded, SHORTEST } from '../member-axis.ts';
import { type Known, view } from '../sections/section-book.ts';
import { Frame, firstAcrossInto, movedInto, planePointInto, positionInto, unitInto, X, Y } from './frame.ts';
import type { PlainShape } from './plain-shape.ts';

/** The second end of a line. */
const END = 3;

/**
 * The line of force of a plain shape, as `axisOfLine` and `axisOfBody` find it. Its methods say false where the general way
 * would refuse or remark on something.
 */
export class PlainLine {
  /** Both ends of the member's axis. */
  readonly ends = new Float64Array(6);
  /** Of the body's centroid line. */
  readonly centroid = new Float64Array(6);
  /** Whether the two are the same to the last digit. */
  isCentroid = false;
  readonly zAxis = new Float64Array(3);
  section: Section | null = null;

  /** The metres in one length unit. */
  private readonly length: number;
  private readonly plane = new Frame();
  private readonly along = new Float64Array(3);
  private readonly bodyAlong = new Float64Array(3);
  private readonly sweep = new Float64Array(3);
  private readonly first = new Float64Array(3);
  private readonly seen = new Float64Array(9);

  constructor(length: number) {
    this.length = length;
  }

  /** @param isGiven whether a drawn line goes before the body's */
  find(shape: PlainShape, profile: Known, isGiven: boolean): boolean {
    if (!this.findCentroid(shape, profile)) return false;
    if (isGiven && shape.hasLine) return this.followLine(shape, profile);
    const { ends, centroid, along, zAxis } = this;
    copy(ends, centroid);
    this.isCentroid = false;
    return directionInto(along, ends) && this.see(profile, along, zAxis);
  }

  private findCentroid({ world, position, direction, depth }: PlainShape, { centroid: [cx, cy] }: Known): boolean {
    const { plane, sweep, centroid } = this;
    const metres = depth * this.length;
    if (Number.isNaN(metres) || metres === 0) return false;
    if (direction.is === 'up') copy(sweep, direction.at);
    else if (!unitInto(sweep, 0, direction.at[0]!, direction.at[1]!, direction.at[2]!)) return false;
    plane.setComposed(world, position);
    planePointInto(centroid, 0, plane, cx, cy);
    movedInto(centroid, END, 0, plane, sweep[0]! * metres, sweep[1]! * metres, sweep[2]! * metres);
    putInOrder(centroid);
    return true;
  }

  private followLine({ world, from, to }: PlainShape, profile: Known): boolean {
    const { ends, centroid, along, bodyAlong, seen, zAxis, first } = this;
    positionInto(ends, 0, world, from.at[0]!, from.at[1]!, from.at[2]!);
    positionInto(ends, END, world, to.at[0]!, to.at[1]!, to.at[2]!);
    for (let i = 0; i < END; i++) first[i] = ends[i]!;
    putInOrder(ends);
    if (!directionInto(along, ends) || !directionInto(bodyAlong, centroid)) return false;
    this.isCentroid = isSame(ends, centroid);
    // Where the two are the same the body runs along the line.
    if (!this.isCentroid && (!(Math.abs(dot(bodyAlong, along)) >= ALONGSIDE) || this.isFarBeside())) return false;
    if (!this.see(profile, bodyAlong, seen)) return false;
    if (!(dot(seen, along) ** 2 < 0.99)) return false;
    firstAcrossInto(zAxis, 0, along, 0, seen[0]!, seen[1]!, seen[2]!);
    return true;
  }

  private isFarBeside(): boolean {
    const { centroid, first, along } = this;
    for (let end = 0; end <= END; end += END) {
      const x = centroid[end]! - first[0]!;
      const y = centroid[end + 1]! - first[1]!;
      const z = centroid[end + 2]! - first[2]!;
      const k = -(x * along[0]! + y * along[1]! + z * along[2]!);
      const sideways = hypot(x + k * along[0]!, y + k * along[1]!, z + k * along[2]!);
      if (!(sideways <= FARTHEST_BESIDE)) return true;
    }
    return false;
  }

  /** As `SectionBook.seenAlong`: the section of the profile across `along`, and its z axis. */
  private see(known: Known, along: Float64Array, zAxis: Float64Array): boolean {
    const { map } = known.profile;
    const { at } = this.plane;
    const { seen } = this;
    seenOnPlane(seen, 3, at, map.x, along);
    seenOnPlane(seen, 6, at, map.y, along);
    const a = seen[3]!;
    const b = seen[4]!;
    const c = seen[5]!;
    const size = hypot(seen[6]!, seen[7]!, seen[8]!);
    if (!(size > 0 && size < Number.POSITIVE_INFINITY && hypot(a, b, c) > 0)) return false;
    const k = 1 / size;
    const x = seen[6]! * k;
    const y = seen[7]! * k;
    const z = seen[8]! * k;
    zAxis[0] = x;
    zAxis[1] = y;
    zAxis[2] = z;
    const right =
      a * (y * along[2]! - z * along[1]!) + b * (z * along[0]! - x * along[2]!) + c * (x * along[1]! - y * along[0]!);
    this.section = view(known, right, a * x + b * y + c * z, size);
    return this.section.from !== 'mesh';
  }
}

/** As `alongside`: within some 25 degrees. */
const ALONGSIDE = 0.9;

function seenOnPlane(
  into: Float64Array,
  to: number,
  plane: Float64Array,
  d: readonly [number, number],
  along: Float64Array,
): void {
  const a = plane[X]! * d[0] + plane[Y]! * d[1];
  const b = plane[X + 1]! * d[0] + plane[Y + 1]! * d[1];
  const c = plane[X + 2]! * d[0] + plane[Y + 2]! * d[1];
  const lean = -(a * along[0]! + b * along[1]! + c * along[2]!);
  into[to] = a + lean * along[0]!;
  into[to + 1] = b + lean * along[1]!;
  into[to + 2] = c + lean * along[2]!;
}

/** As `directionOf`; false where that refuses. */
function directionInto(into: Float64Array, ends: Float64Array): boolean {
  for (let i = 0; i < 6; i++) if (!isNear(ends[i]!)) return false;
  const x = ends[END]! - ends[0]!;
  const y = ends[END + 1]! - ends[1]!;
  const z = ends[END + 2]! - ends[2]!;
  const length = hypot(x, y, z);
  if (!(length >= SHORTEST)) return false;
  const size = 1 / length;
  into[0] = x * size;
  into[1] = y * size;
  into[2] = z * size;
  return true;
}

/** As `inOrder`. */
function putInOrder(ends: Float64Array): void {
  let difference = 0;
  for (let i = 0; i < END && difference === 0; i++) difference = rounded(ends[i]!) - rounded(ends[END + i]!);
  if (difference <= 0) return;
  for (let i = 0; i < END; i++) {
    const coordinate = ends[i]!;
    ends[i] = ends[END + i]!;
    ends[END + i] = coordinate;
  }
}

function isSame(a: Float64Array, b: Float64Array): boolean {
  for (let i = 0; i < 6; i++) if (!Object.is(a[i], b[i])) return false;
  return true;
}

function copy(into: Float64Array, from: Float64Array): void {
  for (let i = 0; i < into.length; i++) into[i] = from[i]!;
}

const dot = (a: Float64Array, b: Float64Array): number => a[0]! * b[0]! + a[1]! * b[1]! + a[2]! * b[2]!;
