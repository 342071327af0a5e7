import { cross, distance, dot, norm, subtract, unit, type Vec3 } from '../../domain/vector.ts';
import type { Problem } from '../model/system.ts';
import type { Component } from './components.ts';
import type { FoundMode } from './find-modes.ts';

/** A new bar may be this many times as long as the longest that meets either of its ends. */
const LONGEST = 1.5;
/** Sine of the angle that it makes at least with every bar at its ends: less is the same bar again, or through a joint. */
const APART = 0.15;
/** Its stretch as a share of the movement that it stops: less is a bar that hardly holds. */
const GRIP = 0.25;
/** Components with more nodes or modes than these are not braced by the program: what they lack is no few bars. */
const MOST_NODES = 300;
const MOST_MODES = 60;

export type NewBar = readonly [number, number];

/**
 * For each mode of a component one bar between nodes that exist, so that none of the modes is left with all of them in place; null where no
 * bars of sensible length do that. As few as can be: a bar takes away one mode at most.
 */
export function barsAgainst(
  problem: Problem,
  component: Component,
  modes: readonly FoundMode[],
  moving: ReadonlySet<number>,
): NewBar[] | null {
  const { nodes, pivots } = component;
  if (modes.length !== pivots.length || nodes.length > MOST_NODES || modes.length > MOST_MODES) return null;
  const candidates = sensibleBars(problem, component, moving).map((bar) => ({
    bar,
    length: distance(problem.truss.nodes[bar[0]].at, problem.truss.nodes[bar[1]].at),
    row: modes.map((mode) => stretchBy(problem, bar, mode.moves)),
  }));
  const chosen: (NewBar | null)[] = modes.map(() => null);
  // Gaussian elimination with the pivot that grips best, short bars before long ones.
  for (let step = 0; step < modes.length; step++) {
    let best = 0;
    let row = -1;
    let column = -1;
    candidates.forEach((candidate, r) => {
      candidate.row.forEach((v, c) => {
        if (chosen[c] !== null || Math.abs(v) < GRIP) return;
        const merit = Math.abs(v) / candidate.length;
        if (merit > best * (1 + 1e-9)) {
          best = merit;
          row = r;
          column = c;
        }
      });
    });
    if (row < 0) return null;
    const taken = candidates.splice(row, 1)[0];
    chosen[column] = taken.bar;
    for (const candidate of candidates) {
      const k = candidate.row[column] / taken.row[column];
      if (k !== 0) candidate.row = candidate.row.map((v, c) => v - k * taken.row[c]);
    }
  }
  return chosen.filter((bar): bar is NewBar => bar !== null);
}

/** Pairs of a node of the component and another one, its own or one that stands still in every mode, that no bar joins yet. */
function sensibleBars({ truss, parts }: Problem, { nodes }: Component, moving: ReadonlySet<number>): NewBar[] {
  const own = new Set(nodes);
  const barsAt = new Map<number, { readonly direction: Vec3; readonly length: number; readonly other: number }[]>();
  const put = (node: number, other: number) => {
    const between = subtract(truss.nodes[other].at, truss.nodes[node].at);
    const direction = unit(between);
    if (direction === null) return;
    const list = barsAt.get(node) ?? [];
    list.push({ direction, length: norm(between), other });
    barsAt.set(node, list);
  };
  truss.bars.forEach(({ from, to }, b) => {
    if (!parts.liveBar[b]) return;
    put(from, to);
    put(to, from);
  });
  const longestAt = (node: number) => Math.max(0, ...(barsAt.get(node) ?? []).map((bar) => bar.length));
  const apart = (node: number, direction: Vec3) =>
    (barsAt.get(node) ?? []).every(
      (bar) => dot(bar.direction, direction) < 0 || norm(cross(bar.direction, direction)) > APART,
    );
  const out: NewBar[] = [];
  for (const a of nodes) {
    const reach = LONGEST * longestAt(a);
    truss.nodes.forEach(({ at, carriedBy }, b) => {
      if (b === a || carriedBy !== null || !parts.liveNode[b]) return;
      if (own.has(b) ? b < a : moving.has(b)) return;
      const between = subtract(at, truss.nodes[a].at);
      const direction = unit(between);
      if (direction === null || norm(between) > Math.max(reach, LONGEST * longestAt(b))) return;
      if (apart(a, direction) && apart(b, [-direction[0], -direction[1], -direction[2]])) out.push([a, b]);
    });
  }
  return out;
}

function stretchBy({ truss }: Problem, [a, b]: NewBar, moves: Float64Array): number {
  const direction = unit(subtract(truss.nodes[b].at, truss.nodes[a].at))!;
  let sum = 0;
  for (let axis = 0; axis < 3; axis++) sum += direction[axis] * (moves[3 * b + axis] - moves[3 * a + axis]);
  return sum;
}
