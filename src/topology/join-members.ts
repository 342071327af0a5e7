import type { NamedPlace } from '../brief/named-places.ts';
import { type Finding, finding } from '../domain/finding.ts';
import type { Member } from '../domain/member.ts';
import type { PlaceNamer } from '../domain/place.ts';
import type { Joining, Truss } from '../domain/truss.ts';
import { between } from '../domain/vector.ts';
import { millimetres } from '../domain/words.ts';
import type { Evidence } from '../importer/evidence/types.ts';
import { drawnPieces } from './along-axes.ts';
import { type Axis, makeAxes } from './axes.ts';
import { bentFindings } from './bent-findings.ts';
import { buildTruss } from './build-truss.ts';
import { findCarriers } from './carriers.ts';
import { type Contact, findContacts } from './contacts.ts';
import { resolveDoubles } from './doubles.ts';
import { eccentricitiesOf, offsetJointFindings } from './eccentricity.ts';
import { type PairEvidence, relatedMembers, touchingPlates, united } from './evidence.ts';
import { flattened } from './flat-patches.ts';
import { carriedFindings, closeJointFindings, crossingFindings, crowdedFindings } from './joint-findings.ts';
import { makeJoints, type Refusal } from './joints.ts';
import { labelOf } from './labels.ts';
import { withoutLaps } from './laps.ts';
import { type JoinLimits, limitsUsed } from './limits.ts';
import { findLooseEnds, looseEndFinding, overhangFindings } from './loose-ends.ts';
import { nearMissFindings } from './near-misses.ts';
import { noneTwice } from './none-twice.ts';
import { JOIN_DEFAULTS, type JoinOptions } from './options.ts';
import { cutOverhangs } from './overhangs.ts';
import { partFindings, partsAside } from './parts.ts';
import { cutPieces, joinSplices } from './pieces.ts';
import { reasonsFor } from './reasons.ts';
import { type Family, findFamilies } from './regularity/families.ts';
import { rolesOf } from './regularity/roles.ts';
import { findSplices, namedSplices } from './splices.ts';
import { findStations } from './stations.ts';
import { withoutTwisting } from './twisted.ts';
import { makeVertices, type Vertex, type VertexGraph } from './vertices.ts';

export interface JoinContext {
  readonly placeOf: PlaceNamer;
  /** Nodes of a truss that stand on supports: a free end there is a bearing, not a fault. */
  readonly supportedNodes: (truss: Truss) => ReadonlySet<number>;
  /** Plates and relationships in the file that say what is joined. */
  readonly evidence: (Pick<Evidence, 'plates' | 'related'> & Partial<Pick<Evidence, 'assemblies'>>) | null;
  /** Places that supports and loads name: a splice there stays a node. */
  readonly namedPlaces: readonly NamedPlace[];
}

const NO_CONTEXT: JoinContext = {
  placeOf: () => null,
  supportedNodes: () => new Set(),
  evidence: null,
  namedPlaces: [],
};

export interface Joined {
  readonly truss: Truss;
  readonly findings: Finding[];
  readonly families: Family[];
  readonly limits: JoinLimits;
}

/**
 * Makes a truss of members: finds where axes meet, joins them into work points, and splits members into bars.
 * Nodes and bars come in the order of geometry; the members' indices in the truss are those of `members`.
 */
export function joinMembers(
  members: readonly Member[],
  options: Partial<JoinOptions> = {},
  context: Partial<JoinContext> = {},
): Joined {
  const chosen = { ...JOIN_DEFAULTS, ...options };
  const known = { ...NO_CONTEXT, ...context };
  const { placeOf, supportedNodes, evidence } = known;
  const drawn = makeAxes(members, chosen, evidence?.assemblies);
  const doubles = resolveDoubles(members, drawn, chosen, placeOf);
  const { axes } = doubles;

  const contacts = findContacts(axes, chosen, pairEvidence(members, axes, evidence));
  const { truss: whole, refused, graph } = trussOf(members, axes, contacts, chosen, known);
  const { truss: cut, cut: tails } = cutOverhangs(whole, supportedNodes(whole));
  const supported = supportedNodes(cut);
  const roles = rolesOf(axes, graph);
  const { misses, loose } = findLooseEnds(cut, axes, supported, chosen);
  const aside = partsAside(cut, supported, misses);
  const findings = [
    ...zeroLengthFindings(members, drawn, placeOf),
    ...doubles.findings,
    ...overhangFindings(withoutLaps(tails, axes), members, placeOf),
    ...nearMissFindings(aside.otherMisses, members, { axes, graph, roles }, placeOf),
    ...loose.map((end) => looseEndFinding(end, members, placeOf)),
    ...partFindings(aside.parts, cut, members, axes, placeOf),
    ...crossingFindings(contacts, members, axes, cut, placeOf),
    ...crowdedFindings(refused, members, cut, placeOf),
    ...closeJointFindings(cut, members, axes, placeOf),
    ...offsetJointFindings(cut, members),
    ...carriedFindings(cut, members),
    ...bentFindings(cut, members, placeOf),
    ...axisMovedFindings(members, cut, placeOf),
  ];
  return {
    truss: cut,
    findings: noneTwice(findings),
    families: findFamilies(members, roles),
    limits: limitsUsed(axes, contacts),
  };
}

function trussOf(
  members: readonly Member[],
  axes: readonly (Axis | null)[],
  contacts: readonly Contact[],
  options: JoinOptions,
  { placeOf, namedPlaces }: JoinContext,
): { truss: Truss; refused: readonly Refusal[]; graph: VertexGraph } {
  const joining = contacts.filter(({ kind }) => kind !== 'crossing' || options.crossings === 'joined');
  const { graph, refused, contacts: kept } = untwisted(axes, joining);
  const pieces = cutPieces(graph, findCarriers(graph, axes, options));
  const splices = findSplices(pieces, graph.vertices, axes);
  const runs = joinSplices(pieces, splices, namedSplices(splices, graph.vertices, namedPlaces), options.chords);
  const joiningOf = (vertex: Vertex): Joining => ({
    by: reasonsFor(vertex, kept),
    eccentricities: eccentricitiesOf(vertex, axes),
  });
  return { truss: buildTruss(flattened(graph, runs), runs, members, axes, placeOf, joiningOf), refused, graph };
}

function zeroLengthFindings(
  members: readonly Member[],
  axes: readonly (Axis | null)[],
  placeOf: PlaceNamer,
): Finding[] {
  return members.flatMap((member, index) => {
    if (axes[index] !== null) return [];
    const at = member.axis[0];
    const label = labelOf(member);
    return finding(
      'zero-length',
      `${label} has an axis of less than ${millimetres(0.001)} and is left out.`,
      `Delete ${label}, or draw it with its real length.`,
      { members: [member.globalId], at, place: placeOf(at) },
    );
  });
}

/** Joints, without those that would turn a member far from its drawn axis. */
function untwisted(axes: readonly (Axis | null)[], contacts: readonly Contact[]) {
  let joining = contacts;
  for (;;) {
    const { joints, refused } = makeJoints(axes, joining, findStations(axes, joining));
    const graph = makeVertices(axes, joints);
    const fewer = withoutTwisting(joining, axes, graph);
    if (fewer === null) return { graph, refused, contacts: joining };
    joining = fewer;
  }
}

function pairEvidence(
  members: readonly Member[],
  axes: readonly (Axis | null)[],
  evidence: JoinContext['evidence'],
): PairEvidence {
  if (evidence === null) return new Map();
  const globalIds = members.map((member) => member.globalId);
  const lines = axes.map((axis) => (axis?.facets ? { ...axis, pieces: drawnPieces(axis) } : axis));
  return united(touchingPlates(evidence.plates, lines), relatedMembers(evidence.related, globalIds));
}

/** Beyond this turn (5 degrees) the truss is no longer what was drawn. */
const MUCH_TURNED = Math.PI / 36;

/** Beyond its own depth and this, m, an axis was moved farther than a seat on a deep chord explains. */
const MUCH_SHIFTED = 0.3;

function axisMovedFindings(members: readonly Member[], truss: Truss, placeOf: PlaceNamer): Finding[] {
  return members.flatMap((member, index) => {
    const { shift, turn } = truss.faith[index];
    const depth = Math.max(member.section?.depth ?? 0, member.section?.width ?? 0);
    if (turn <= MUCH_TURNED && shift <= depth + MUCH_SHIFTED) return [];
    const at = between(member.axis[0], member.axis[1], 0.5);
    const degrees = ((turn * 180) / Math.PI).toFixed(0);
    return finding(
      'axis-moved',
      `Joining turned the axis of ${labelOf(member)} by ${degrees} degrees and moved it by ${millimetres(shift)}.`,
      `Look whether ${labelOf(member)} belongs to these joints; a smaller reach or offset in the brief keeps it apart.`,
      { members: [member.globalId], at, place: placeOf(at), gap: shift },
    );
  });
}
