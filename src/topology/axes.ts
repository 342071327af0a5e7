import { developedLength, type Member, type SectionShape } from '../domain/member.ts';
import { add, along, cross, dot, norm, scale, subtract, unit, type Vec3 } from '../domain/vector.ts';
import type { Assembly } from '../importer/evidence/types.ts';
import { type JoinOptions, TOLERANCE, valueFor } from './options.ts';

/** A member's axis made ready for joining. */
export interface Axis {
  /** Index into the members. */
  readonly member: number;
  /** The other member of a pair that is one axis. */
  readonly also: readonly number[];
  readonly start: Vec3;
  readonly finish: Vec3;
  /** Unit, from start to finish. */
  readonly direction: Vec3;
  /** m, along the bow of a bent member. */
  readonly length: number;
  /**
   * Of a bent member the straight pieces that its line is read as, in a row: each is an axis whose own line is the piece's and
   * on which places count from the start of the whole member. Null where the member is straight.
   */
  readonly facets: readonly Axis[] | null;
  /** From where to where along the member it follows this line; without end where the member ends on it. */
  readonly span: readonly [number, number];
  /** The greater extent of the section. */
  readonly depth: number;
  /** Of which it is part; two of one name are two. */
  readonly assembly: Assembly | null;
  readonly sectionName: string | null;
  readonly shape: SectionShape;
  /** Half the section's extent in a unit direction. */
  readonly halfExtent: (direction: Vec3) => number;
  /** How far the centroid may lie from the middle of the section, as a share of the half extent. */
  readonly lean: number;
  /** m, as the brief sets them for this member; null where the sections decide. */
  readonly reach: number | null;
  readonly offset: number | null;
}

/** The axes of all members that have a length, in the members' order; null for the others. */
export function makeAxes(
  members: readonly Member[],
  { reach, offset }: Pick<JoinOptions, 'reach' | 'offset'> = { reach: null, offset: null },
  assemblies: ReadonlyMap<string, Assembly> | null = null,
): (Axis | null)[] {
  return members.map((member, index) => {
    const [start, finish] = member.axis;
    const line = subtract(finish, start);
    const direction = unit(line);
    if (direction === null || norm(line) < TOLERANCE.zeroLength) return null;
    const length = member.bow ? developedLength(member) : norm(line);
    const axis: Axis = {
      member: index,
      also: [],
      start,
      finish,
      direction,
      length,
      facets: null,
      span: ENDLESS,
      depth: member.section ? Math.max(member.section.depth, member.section.width) : TOLERANCE.unknownDepth,
      assembly: assemblies?.get(member.globalId) ?? assemblyByName(member),
      sectionName: member.section?.name ?? null,
      shape: member.section?.shape ?? 'other',
      halfExtent: halfExtentOf(member, direction, member.zAxis),
      lean: LEANING.has(member.section?.shape ?? 'other') ? 0.5 : 0,
      reach: valueFor(reach, index),
      offset: valueFor(offset, index),
    };
    return member.bow ? { ...axis, facets: facetsAlong(member.bow, axis, member) } : axis;
  });
}

const ENDLESS: readonly [number, number] = [Number.NEGATIVE_INFINITY, Number.POSITIVE_INFINITY];

function facetsAlong(bow: readonly Vec3[], axis: Axis, member: Member): Axis[] {
  let passed = 0;
  const facets = bow.slice(1).flatMap((to, i): Axis[] => {
    const line = subtract(to, bow[i]);
    const direction = unit(line);
    if (direction === null) return [];
    const from = passed;
    passed += norm(line);
    const start = along(bow[i], direction, -from);
    const halfExtent = halfExtentOf(member, direction, turnedWith(member.zAxis, axis.direction, direction));
    const finish = along(start, direction, axis.length);
    return [{ ...axis, start, finish, direction, halfExtent, span: [from, passed] }];
  });
  return facets.map((facet, i) => ({
    ...facet,
    span: [i === 0 ? ENDLESS[0] : facet.span[0], i === facets.length - 1 ? ENDLESS[1] : facet.span[1]],
  }));
}

/** A direction square to `from`, turned as `from` is turned by the shortest way into `to`; all unit. */
function turnedWith(z: Vec3, from: Vec3, to: Vec3): Vec3 {
  const cosine = dot(from, to);
  const pivot = cross(from, to);
  // Half a turn has no shortest way: straight back, z may stay.
  if (1 + cosine < 1e-9) return z;
  const turned = add(scale(z, cosine), cross(pivot, z));
  return along(turned, pivot, dot(pivot, z) / (1 + cosine));
}

/** Without the file's own word, what bears one name is taken for one assembly. */
function assemblyByName({ partOf, assembly }: Member): Assembly | null {
  return partOf === 'IfcElementAssembly' && assembly !== null ? { globalId: assembly, name: assembly } : null;
}

/** Sections whose centroid lies off their middle: an equal angle's at 0.28 of its leg, a tee's at about 0.25 of its depth. */
const LEANING: ReadonlySet<SectionShape> = new Set(['L', 'T', 'U', 'C', 'Z', 'other']);

function halfExtentOf(member: Member, axis: Vec3, z: Vec3): (direction: Vec3) => number {
  const section = member.section;
  if (section === null) return () => TOLERANCE.unknownDepth / 2;
  if (section.shape === 'CHS' || section.shape === 'circle') return () => section.depth / 2;
  const y = cross(z, axis);
  return (direction) => (Math.abs(dot(direction, y)) * section.width + Math.abs(dot(direction, z)) * section.depth) / 2;
}

/** Where the lines of two axes come nearest: distances along each from its start, the distance and its direction. */
export interface Approach {
  readonly s: number;
  readonly t: number;
  readonly distance: number;
  /** Unit, from the first to the second; null where the lines meet. */
  readonly normal: Vec3 | null;
}

/** Nearest points of two lines that are not parallel. */
export function approach(a: Axis, b: Axis): Approach {
  const w = subtract(b.start, a.start);
  const uv = dot(a.direction, b.direction);
  const wu = dot(w, a.direction);
  const wv = dot(w, b.direction);
  const sine2 = 1 - uv * uv;
  const s = (wu - uv * wv) / sine2;
  const t = (uv * wu - wv) / sine2;
  const gap: Vec3 = [0, 1, 2].map((k) => w[k] + t * b.direction[k] - s * a.direction[k]) as unknown as Vec3;
  return { s, t, distance: norm(gap), normal: unit(gap) };
}

export const sineBetween = (a: Axis, b: Axis): number => norm(cross(a.direction, b.direction));

/** Whether two members cross as what sits and what carries do: 64 degrees or more, purlins on the skew lie no more slanting. */
export const liesSquare = (a: Axis, b: Axis): boolean => sineBetween(a, b) > 0.9;

/** Direction in which `a` comes at `b`: the part of a's direction that is square to b. Not for parallel axes. */
export function approachDirection(a: Axis, b: Axis): Vec3 {
  const square = subtract(a.direction, scale(b.direction, dot(a.direction, b.direction)));
  return unit(square) as Vec3;
}

/** Two members alike that cross near the middle of both, at `s` and `t` along them, are crossed bracing laid back to back. */
export function looksCrossed(a: Axis, b: Axis, s: number, t: number): boolean {
  const alike = a.sectionName === b.sectionName && Math.abs(a.depth - b.depth) < 1e-6;
  const nearMiddle = (x: number, axis: Axis) => Math.abs(x / axis.length - 0.5) < 0.2;
  return alike && nearMiddle(s, a) && nearMiddle(t, b);
}
