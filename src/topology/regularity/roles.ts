import type { SectionShape } from '../../domain/member.ts';
import { cross, dot, norm, subtract, UP, type Vec3 } from '../../domain/vector.ts';
import type { Axis } from '../axes.ts';
import type { Station } from '../stations.ts';
import { straightLines } from '../straight-lines.ts';
import { isFreeEnd, type VertexGraph } from '../vertices.ts';

/** What a member does in the roof, told by geometry alone. Up (+Z) tells columns from posts and webs from roof bracing. */
export type MemberRole = 'column' | 'chord' | 'purlin' | 'post' | 'diagonal' | 'bracing' | 'beam';

/** Sine of 60 degrees: steeper members stand. */
const STEEP = Math.sin(Math.PI / 3);
/** Sine of 20 degrees: flatter members lie. */
const FLAT = Math.sin(Math.PI / 9);
/** A member that ends lower than this below a column's foot is what the column stands on, m. */
const BELOW = 0.3;
/** Cosine of 15 degrees: a web member this square to its chord is a post. */
const SQUARE = Math.sin((75 * Math.PI) / 180);
/** A plane of chord and web leaning more than this from the vertical (its normal's upward part) is a roof or floor plane. */
const LYING_PLANE = 0.8;
/** Solid rods and flats up to this size, m, only pull. */
const ROD = 0.1;
const RODS: ReadonlySet<SectionShape> = new Set(['circle', 'rectangle']);

/** The role of each member, in the members' order; null for those without an axis of their own. */
export function rolesOf(axes: readonly (Axis | null)[], graph: VertexGraph): (MemberRole | null)[] {
  const lines = straightLines(graph, axes);
  const seated = seatedMembers(axes, graph);
  const chords = chordLines(axes, graph, lines);
  const roles = axes.map((axis, member): MemberRole | null => {
    if (axis === null) return null;
    if (isSteep(axis) && stands(axis, graph, lines)) return 'column';
    if (seated.has(member)) return 'purlin';
    if (isRod(axis)) return 'bracing';
    if (chords.has(lines[member])) return 'chord';
    return webRole(axis, member);
  });
  for (const axis of axes) for (const other of axis?.also ?? []) roles[other] = roles[axis?.member ?? other];
  return likeTheirKind(roles, axes, graph);

  function webRole(axis: Axis, member: number): MemberRole {
    const met = chordsAt(member);
    const planes = met
      .filter((chord) => !isSteep(chord))
      .map((chord) => planeOf(axis, chord))
      .filter((plane) => plane !== null);
    if (planes.length === 0) return isSteep(axis) ? 'post' : lies(axis) ? 'beam' : 'bracing';
    const steepest = Math.min(...planes.map((normal) => Math.abs(dot(normal, UP))));
    const isSquare = met.every((chord) => norm(cross(axis.direction, chord.direction)) > SQUARE);
    if (steepest > LYING_PLANE) return isSquare ? 'beam' : 'bracing';
    return isSquare || isSteep(axis) ? (lies(axis) ? 'beam' : 'post') : 'diagonal';
  }

  /** The chords and columns that a member ends on. */
  function chordsAt(member: number): Axis[] {
    const chain = graph.chains[member];
    const ends = [chain[0], chain[chain.length - 1]].filter((vertex) => vertex !== undefined);
    return ends.flatMap((vertex) =>
      graph.vertices[vertex].stations.flatMap(({ member: other }) => {
        const axis = axes[other];
        return axis !== null && other !== member && (chords.has(lines[other]) || isSteep(axis)) ? [axis] : [];
      }),
    );
  }
}

/** Share of a section's members that tells what one with a free end is: an end that went astray hides it. */
const MOSTLY = 0.75;

/** A member with a free end takes the role of nearly all others of its section. */
function likeTheirKind(
  roles: readonly (MemberRole | null)[],
  axes: readonly (Axis | null)[],
  { vertices, chains }: VertexGraph,
): (MemberRole | null)[] {
  const counts = new Map<string, Map<MemberRole, number>>();
  roles.forEach((role, member) => {
    const section = axes[member]?.sectionName;
    if (role === null || !section) return;
    const ofSection = counts.get(section) ?? new Map<MemberRole, number>();
    counts.set(section, ofSection.set(role, (ofSection.get(role) ?? 0) + 1));
  });
  return roles.map((role, member) => {
    const [axis, chain] = [axes[member], chains[member]];
    const ofSection = axis?.sectionName ? counts.get(axis.sectionName) : undefined;
    if (!ofSection || ![chain[0], chain[chain.length - 1]].some((end) => isFreeEnd(vertices[end]))) return role;
    const total = [...ofSection.values()].reduce((sum, n) => sum + n, 0);
    return [...ofSection].find(([, n]) => n > MOSTLY * total)?.[0] ?? role;
  });
}

/** The vertices of a straight row of members; one object for all of them. */
type Line = readonly number[];

const isSteep = (axis: Axis): boolean => Math.abs(axis.direction[2]) > STEEP;
const lies = (axis: Axis): boolean => Math.abs(axis.direction[2]) < FLAT;
const isRod = (axis: Axis): boolean => RODS.has(axis.shape) && axis.depth < ROD;

/** Unit normal of the plane that two axes span; null where they are nearly parallel. */
function planeOf(a: Axis, b: Axis): Vec3 | null {
  const normal = cross(a.direction, b.direction);
  const sine = norm(normal);
  return sine < FLAT ? null : [normal[0] / sine, normal[1] / sine, normal[2] / sine];
}

/** Members that sit on others somewhere; what rests on a column's head is not a purlin for it. */
function seatedMembers(axes: readonly (Axis | null)[], { vertices }: VertexGraph): Set<number> {
  const seated = new Set<number>();
  for (const vertex of vertices) {
    const isOnLyingMember = vertex.stations.some(({ member }) => {
      const axis = axes[member];
      return axis !== null && !vertex.seated.has(member) && !isSteep(axis);
    });
    if (isOnLyingMember) for (const member of vertex.seated) seated.add(member);
  }
  return seated;
}

/**
 * Lines that a web frames into away from their ends: twice, or once where they do not
 * themselves end on members that run through (a web that a strut props in its middle stays a web).
 */
function chordLines(
  axes: readonly (Axis | null)[],
  { vertices, chains }: VertexGraph,
  lines: readonly Line[],
): Set<Line> {
  const splits = new Map<Line, number>();
  const ended = new Map<Line, number>();
  vertices.forEach(({ stations, seated }) => {
    const framing = stations.filter(({ member, role }) => role !== 'through' && !seated.has(member));
    const passing = new Set(stations.filter((one) => runsOn(one, stations)).map(({ member }) => lines[member]));
    for (const line of passing) {
      if (framing.some(({ member }) => lines[member] !== line && isWeb(axes[member]))) raise(splits, line);
    }
    for (const line of new Set(framing.map(({ member }) => lines[member]))) {
      if (!passing.has(line) && passing.size > 0) raise(ended, line);
    }
  });
  const chords = new Set<Line>();
  axes.forEach((axis, member) => {
    const line = lines[member];
    if (axis === null || chains[member].length === 0 || isSteep(axis) || isRod(axis)) return;
    const least = (ended.get(line) ?? 0) > 1 ? 2 : 1;
    if ((splits.get(line) ?? 0) >= least) chords.add(line);
  });
  return chords;

  /** Neither a rod that hangs there nor a purlin or a strut that lies between frames. */
  function isWeb(axis: Axis | null): boolean {
    return axis !== null && !isRod(axis) && !lies(axis);
  }

  function runsOn({ member, role }: Station, stations: readonly Station[]): boolean {
    if (role === 'through') return true;
    return stations.some((other) => other.member !== member && lines[other.member] === lines[member]);
  }
}

const raise = (counts: Map<Line, number>, line: Line): void => {
  counts.set(line, (counts.get(line) ?? 0) + 1);
};

/** Whether a steep member's lower end is a foot: nothing lies or hangs there. */
function stands(axis: Axis, { vertices, chains }: VertexGraph, lines: readonly (readonly number[])[]): boolean {
  const chain = chains[axis.member];
  const foot = axis.direction[2] > 0 ? chain[0] : chain[chain.length - 1];
  const vertex = vertices[foot];
  if (isFreeEnd(vertex)) return true;
  return vertex.stations.every(({ member }) => {
    if (lines[member] === lines[axis.member]) return true;
    const other = chains[member];
    const lowest = Math.min(...[other[0], other[other.length - 1]].map((end) => vertices[end].at[2]));
    const far = Math.max(
      ...[other[0], other[other.length - 1]].map((end) => norm(subtract(vertices[end].at, vertex.at))),
    );
    const rises = Math.max(...[other[0], other[other.length - 1]].map((end) => vertices[end].at[2])) - vertex.at[2];
    return lowest > vertex.at[2] - BELOW && rises > FLAT * far;
  });
}
