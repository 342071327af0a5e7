import { isValueNotYetAvailable } from '../../brief/not-yet.ts';
import { type Finding, finding } from '../../domain/finding.ts';
import { pushTo } from '../../domain/group.ts';
import type { Truss } from '../../domain/truss.ts';
import type { Mode } from '../types.ts';
import { AT_REST } from './localise.ts';
import type { Names } from './names.ts';
import { acrossOf } from './statements.ts';
import { count } from './words.ts';

/** Cosine of the angle within which two bars of one member run straight on. */
const STRAIGHT = 0.996;
/** Rise over length from which a bar counts as a column, and up to which as a beam. */
const STEEP = 0.85;
const SHALLOW = 0.5;
/** A member bends where the kink is no less than this share of the movement, in a mode of no more nodes: in larger ones all bends a little. */
const KINK = 0.3;
const MOST_NODES = 12;

/**
 * Says which of the modes are no fault of a truss but of taking a frame for one: those that would bend a member that runs through a joint, and
 * those that turn bars of no triangle where beams meet columns.
 */
export function worksInBending(truss: Truss, names: Names, modes: readonly Mode[]): Finding | null {
  const frame = new FrameView(truss);
  const bent = modes.flatMap((mode) => {
    // Out of the plane of a flat truss nodes want holding, not bending.
    const across = acrossOf(truss, [mode]);
    if (across !== null && Math.abs(across[2]) < SHALLOW) return [];
    const members = frame.membersInBending(mode);
    return members.length === 0 ? [] : [{ mode, members }];
  });
  if (bent.length === 0 || !names.knowsMembers) return null;
  const members = [...new Set(bent.flatMap((one) => one.members))].sort((a, b) => a - b);
  const nodes = [...new Set(bent.flatMap((one) => one.mode.nodes))].sort((a, b) => a - b);
  const { at, place } = truss.nodes[nodes[0]];
  const of = modes.length === bent.length ? 'It moves' : `Of the ${modes.length} ways listed, it moves`;
  const ways = modes.length === bent.length ? 'only because' : `in ${count(bent.length, 'way')} only because`;
  const continuous = isValueNotYetAvailable(['chords'], 'continuous')
    ? []
    : ['keep the members continuous (`chords: continuous`)'];
  const advice = [
    ...continuous,
    'say under `holds:` what keeps the nodes',
    'leave the columns out of the scope and take the bearings of the trusses as supports',
  ];
  return finding(
    'works-in-bending',
    `${of} ${ways} every joint is a pin: ${count(members.length, 'member')} (${names.marks(members)}) would have to bend there, running on through joints or meeting as beams and columns without triangles. A pin-jointed truss does not carry loads that way.`,
    `If it is a frame, judge it as one: ${advice.join('; or ')}. If it is a truss, bracing is missing.`,
    { nodes, at, place, severity: 'warning' },
  );
}

class FrameView {
  private readonly truss: Truss;
  private readonly barsAt = new Map<number, number[]>();
  private readonly joined = new Map<number, Set<number>>();

  constructor(truss: Truss) {
    this.truss = truss;
    truss.bars.forEach(({ from, to }, b) => {
      for (const [node, other] of [
        [from, to],
        [to, from],
      ] as const) {
        pushTo(this.barsAt, node, b);
        this.joined.set(node, (this.joined.get(node) ?? new Set()).add(other));
      }
    });
  }

  /** Members that would bend in the mode; none where it is a matter of the truss. */
  membersInBending(mode: Mode): number[] {
    const moves = new Map(mode.nodes.map((node, i) => [node, mode.movement[i]]));
    const main = mode.nodes.filter((node) => Math.hypot(...moves.get(node)!) > AT_REST);
    if (main.length > MOST_NODES) return [];
    const kinked = main.flatMap((node) => this.kinkedAt(node, moves));
    if (kinked.length > 0) return kinked;
    const near = [...new Set(mode.nodes.flatMap((node) => this.barsAt.get(node) ?? []))];
    const turned = near.filter((b) => this.turns(b, moves));
    if (turned.length === 0 || turned.some((b) => this.isInTriangle(b))) return [];
    const corners = mode.nodes.filter((node) => {
      const rises = (this.barsAt.get(node) ?? []).map((b) => this.rise(b));
      return moves.has(node) && rises.some((r) => r > STEEP) && rises.some((r) => r < SHALLOW);
    });
    const bars = corners.flatMap((node) => this.barsAt.get(node) ?? []);
    return [...new Set(bars.flatMap((b) => this.truss.bars[b].members))];
  }

  /** Members that run straight on through the node and are kinked there by the movement. */
  private kinkedAt(node: number, moves: ReadonlyMap<number, readonly number[]>): number[] {
    const bars = this.barsAt.get(node) ?? [];
    const out: number[] = [];
    for (const [i, a] of bars.entries())
      for (const b of bars.slice(i + 1)) {
        const common = this.truss.bars[a].members.filter((member) => this.truss.bars[b].members.includes(member));
        if (common.length === 0) continue;
        const [p, q] = [this.awayFrom(a, node), this.awayFrom(b, node)];
        if (
          p.direction[0] * q.direction[0] + p.direction[1] * q.direction[1] + p.direction[2] * q.direction[2] >
          -STRAIGHT
        )
          continue;
        const still = [0, 0, 0];
        const [own, u, v] = [node, p.other, q.other].map((n) => moves.get(n) ?? still);
        const kink = own.map((w, k) => w - (q.length * u[k] + p.length * v[k]) / (p.length + q.length));
        const along = kink[0] * p.direction[0] + kink[1] * p.direction[1] + kink[2] * p.direction[2];
        if (Math.hypot(...kink.map((w, k) => w - along * p.direction[k])) > KINK) out.push(...common);
      }
    return out;
  }

  private awayFrom(bar: number, node: number) {
    const { from, to, length } = this.truss.bars[bar];
    const other = from === node ? to : from;
    const [p, q] = [this.truss.nodes[node].at, this.truss.nodes[other].at];
    return { other, length, direction: [0, 1, 2].map((k) => (q[k] - p[k]) / (length || 1)) };
  }

  private turns(bar: number, moves: ReadonlyMap<number, readonly number[]>): boolean {
    const { from, to } = this.truss.bars[bar];
    const [u, v] = [moves.get(from), moves.get(to)];
    return Math.hypot(...[0, 1, 2].map((k) => (v?.[k] ?? 0) - (u?.[k] ?? 0))) > AT_REST * 10;
  }

  private isInTriangle(bar: number): boolean {
    const { from, to } = this.truss.bars[bar];
    const others = this.joined.get(to)!;
    return [...this.joined.get(from)!].some((node) => node !== to && others.has(node));
  }

  private rise(bar: number): number {
    const { from, to, length } = this.truss.bars[bar];
    return Math.abs(this.truss.nodes[to].at[2] - this.truss.nodes[from].at[2]) / (length || 1);
  }
}
