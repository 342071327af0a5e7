import type { Truss } from '../../domain/truss.ts';
import type { Vec3 } from '../../domain/vector.ts';
import { addCondition, type Followers, fillFollowers, type Term, throughFollowers } from '../engine/constraints.ts';
import type { Freedoms } from '../engine/system.ts';
import type { Restraint } from '../types.ts';
import { leverShares } from './carriage.ts';
import type { Parts } from './parts.ts';

export const STRIDE = 3;

/** Sine of the angle below which a restraint is taken to repeat the ones before it. */
const DEPENDENT = 1e-6;

/** A restraint on a carried node: a condition on several real nodes, met by making one freedom follow the others. */
export interface CarriedRestraint {
  readonly node: number;
  readonly direction: Vec3;
  /** The condition over the freedoms of the real nodes. */
  readonly terms: readonly Term[];
  /** The freedom that follows. */
  readonly follower: number;
}

/**
 * How the truss's nodes move with the unknowns. Each real node has an orthonormal frame: first its free directions (its unknowns),
 * then those its restraints hold. Carried nodes have no unknowns of their own.
 */
export interface Movement {
  readonly truss: Truss;
  readonly freedoms: Freedoms;
  /** 1 for nodes that are judged and solved. */
  readonly live: Uint8Array;
  readonly shares: ReturnType<typeof leverShares>;
  /** frame[9 node + 3 c + axis]: component of direction c. */
  readonly frame: Float64Array;
  readonly freeCount: Uint8Array;
  /** Freedoms that follow others because of restraints on carried nodes. */
  readonly followers: Followers;
  readonly carriedRestraints: readonly CarriedRestraint[];
  /** Independent restraints on what is judged. */
  readonly restraintCount: number;
}

/** Restraints that repeat others are merged; those on nodes set aside are left out. */
export function mapMovement(truss: Truss, parts: Parts, restraints: readonly Restraint[]): Movement {
  const count = truss.nodes.length;
  const held: Vec3[][] = Array.from({ length: count }, () => []);
  const onCarried: Restraint[] = [];
  let restraintCount = 0;
  for (const restraint of restraints) {
    const { node, direction } = restraint;
    if (!parts.liveNode[node]) continue;
    if (truss.nodes[node].carriedBy !== null) onCarried.push(restraint);
    else if (addIndependent(held[node], direction)) restraintCount++;
  }
  const frame = new Float64Array(9 * count);
  const freeCount = new Uint8Array(count);
  const active = new Uint8Array(STRIDE * count);
  for (let node = 0; node < count; node++) {
    const free = complement(held[node]);
    [...free, ...held[node]].forEach((direction, c) => {
      frame.set(direction, 9 * node + 3 * c);
    });
    if (!parts.liveNode[node] || truss.nodes[node].carriedBy !== null) continue;
    freeCount[node] = free.length;
    active.fill(1, STRIDE * node, STRIDE * node + free.length);
  }
  const movement = {
    truss,
    freedoms: { blocks: count, stride: STRIDE, active },
    live: parts.liveNode,
    shares: leverShares(truss),
    frame,
    freeCount,
    followers: new Map<number, readonly Term[]>(),
    carriedRestraints: [] as CarriedRestraint[],
    restraintCount,
  };
  for (const restraint of onCarried) if (holdCarried(movement, restraint)) movement.restraintCount++;
  return movement;
}

/** Puts the terms of `factor` times the movement of a node along a direction. */
export function spread(
  movement: Movement,
  node: number,
  direction: Vec3,
  factor: number,
  put: (unknown: number, value: number) => void,
): void {
  spreadOwn(movement, node, direction, factor, (unknown, value) => {
    throughFollowers(movement.followers, unknown, value, put);
  });
}

/** As `spread`, over the freedoms of the real nodes before any follows others. */
function spreadOwn(
  movement: Movement,
  node: number,
  direction: Vec3,
  factor: number,
  put: (unknown: number, value: number) => void,
): void {
  const { frame, freeCount, shares } = movement;
  for (const [real, share] of shares[node])
    for (let c = 0; c < freeCount[real]; c++) {
      const at = 9 * real + 3 * c;
      const along = direction[0] * frame[at] + direction[1] * frame[at + 1] + direction[2] * frame[at + 2];
      if (along !== 0) put(STRIDE * real + c, factor * share * along);
    }
}

/** Movement of every node, three components each, carried ones included. */
export function nodeMovements(movement: Movement, q: Float64Array): Float64Array {
  const { truss, frame, freeCount, followers, shares } = movement;
  const full = fillFollowers(followers, q);
  const own = new Float64Array(3 * truss.nodes.length);
  for (let node = 0; node < truss.nodes.length; node++)
    for (let c = 0; c < freeCount[node]; c++)
      for (let axis = 0; axis < 3; axis++)
        own[3 * node + axis] = own[3 * node + axis] + full[STRIDE * node + c] * frame[9 * node + 3 * c + axis];
  return carryMovements(truss, shares, own);
}

/** Forces on the unknowns that do the work of forces on the nodes, three components a node. */
export function gatherForces(movement: Movement, forces: Float64Array): Float64Array {
  const out = new Float64Array(movement.freedoms.active.length);
  const put = (unknown: number, value: number) => {
    out[unknown] = out[unknown] + value;
  };
  for (let node = 0; 3 * node < forces.length; node++) {
    const force: Vec3 = [forces[3 * node], forces[3 * node + 1], forces[3 * node + 2]];
    if (force[0] !== 0 || force[1] !== 0 || force[2] !== 0) spread(movement, node, force, 1, put);
  }
  return out;
}

/** Direction c of a node's frame. */
export function frameDirection({ frame }: Movement, node: number, c: number): Vec3 {
  const at = 9 * node + 3 * c;
  return [frame[at], frame[at + 1], frame[at + 2]];
}

/** Fills in the movement of the carried nodes from that of the real ones. */
export function carryMovements(truss: Truss, shares: Movement['shares'], own: Float64Array): Float64Array {
  truss.nodes.forEach((node, i) => {
    if (node.carriedBy === null) return;
    for (let axis = 0; axis < 3; axis++) {
      let sum = 0;
      for (const [real, share] of shares[i]) sum += share * own[3 * real + axis];
      own[3 * i + axis] = sum;
    }
  });
  return own;
}

function holdCarried(
  movement: Movement & { followers: Map<number, readonly Term[]>; carriedRestraints: CarriedRestraint[] },
  restraint: Restraint,
): boolean {
  const { node, direction } = restraint;
  const terms: Term[] = [];
  spreadOwn(movement, node, direction, 1, (unknown, factor) => terms.push({ unknown, factor }));
  const follower = addCondition(movement.followers, movement.freedoms.active, terms);
  if (follower < 0) return false;
  movement.carriedRestraints.push({ node, direction, terms, follower });
  return true;
}

/** Adds the part of `direction` at right angles to those there are; false where there is none. */
function addIndependent(directions: Vec3[], direction: Vec3): boolean {
  const rest = withoutParts(direction, directions);
  const size = Math.hypot(...rest);
  if (size < DEPENDENT) return false;
  directions.push([rest[0] / size, rest[1] / size, rest[2] / size]);
  return true;
}

/** Orthonormal directions at right angles to `held`, along the axes where they can be. */
function complement(held: readonly Vec3[]): Vec3[] {
  const all: Vec3[] = [...held];
  const free: Vec3[] = [];
  while (all.length < 3) {
    let best: Vec3 = [0, 0, 0];
    let size = 0;
    for (const axis of AXES) {
      const rest = withoutParts(axis, all);
      const length = Math.hypot(...rest);
      if (length > size + 1e-12) {
        best = rest;
        size = length;
      }
    }
    const direction: Vec3 = [best[0] / size, best[1] / size, best[2] / size];
    all.push(direction);
    free.push(direction);
  }
  return free;
}

const AXES: readonly Vec3[] = [
  [1, 0, 0],
  [0, 1, 0],
  [0, 0, 1],
];

function withoutParts(vector: Vec3, directions: readonly Vec3[]): Vec3 {
  let rest = vector;
  // Twice, so that nothing is left of the parts taken out.
  for (let pass = 0; pass < 2; pass++)
    for (const d of directions) {
      const k = rest[0] * d[0] + rest[1] * d[1] + rest[2] * d[2];
      rest = [rest[0] - k * d[0], rest[1] - k * d[1], rest[2] - k * d[2]];
    }
  return rest;
}
