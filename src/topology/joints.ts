import { distance, meanOf, type Vec3 } from '../domain/vector.ts';
import { pointAt } from './along-axes.ts';
import type { Axis } from './axes.ts';
import type { Contact } from './contacts.ts';
import { TOLERANCE } from './options.ts';
import type { Station } from './stations.ts';

/** Stations of different members that are one work point. */
export interface Joint {
  readonly stations: readonly Station[];
  /** Members that only sit here: their axes do not pull the work point. */
  readonly seated: ReadonlySet<number>;
}

/** A pair that touches but was kept apart because its joint would have grown beyond its bound. */
export interface Refusal {
  readonly contact: Contact;
}

/**
 * Joins stations by their contacts, cheapest first. A joint holds each member once (so a member's two ends never merge)
 * and does not grow beyond the depth of its deepest member.
 */
export function makeJoints(
  axes: readonly (Axis | null)[],
  contacts: readonly Contact[],
  stations: readonly (readonly Station[])[],
): { joints: Joint[]; refused: Refusal[] } {
  const all = stations.flat();
  const groups = new Groups(all, axes, contacts);
  const stationsOfContact = sidesOf(contacts, all);
  const left: number[] = [];
  const order = contacts.map((_, i) => i).sort((i, j) => contacts[i].cost - contacts[j].cost || i - j);
  for (const index of order) {
    const sides = stationsOfContact[index];
    if (sides.length === 2 && !groups.join(sides[0], sides[1])) left.push(index);
  }
  // The gussets of bracing stand beside the chord's: an end that nothing else takes is better a little off than loose.
  const isAlone = (side: number) => all[side].role !== 'through' && groups.sizeOf(side) === 1;
  const refused = left
    .filter((index) => {
      const [first, second] = stationsOfContact[index];
      const mayStretch = isAlone(first) || isAlone(second);
      return !groups.join(first, second, mayStretch ? STRETCHED : 1);
    })
    .map((index): Refusal => ({ contact: contacts[index] }));
  const joints = groups
    .members()
    .filter((group) => group.length > 1)
    .map((group) => group.map((i) => all[i]))
    .map((group) => ({ stations: group, seated: seatedMembers(group, contacts, axes) }));
  return { joints, refused };
}

/** Of a joint's bound, for an end that would be left loose. */
const STRETCHED = 2;

function sidesOf(contacts: readonly Contact[], stations: readonly Station[]): number[][] {
  const sides: number[][] = contacts.map(() => []);
  stations.forEach((station, index) => {
    for (const contact of station.contacts) sides[contact].push(index);
  });
  return sides;
}

/** Disjoint groups of stations with the bounds of a joint. */
class Groups {
  private readonly parent: Int32Array;
  private readonly content: number[][];
  private readonly stations: readonly Station[];
  private readonly points: Vec3[];
  private readonly sizes: number[];
  /** Half the height of a station's seats: what sits is that much farther from the joint than what meets. */
  private readonly lifts: number[];

  constructor(stations: readonly Station[], axes: readonly (Axis | null)[], contacts: readonly Contact[]) {
    this.stations = stations;
    this.parent = Int32Array.from(stations, (_, i) => i);
    this.content = stations.map((_, i) => [i]);
    this.points = stations.map((station) => meanOf(station.contacts.map((c) => contacts[c].point)));
    this.sizes = stations.map((station) => Math.max(TOLERANCE.leastJoint, axes[station.member]?.depth ?? 0));
    const lifts = contacts.map((contact) => (contact.kind === 'seat' ? seatHeight(contact, axes) / 2 : 0));
    this.lifts = stations.map((station) => station.contacts.reduce((most, c) => Math.max(most, lifts[c]), 0));
  }

  sizeOf(i: number): number {
    return this.content[this.find(i)].length;
  }

  /** False where the two may not be one joint; its bound may be stretched. */
  join(i: number, j: number, stretched = 1): boolean {
    const a = this.find(i);
    const b = this.find(j);
    if (a === b) return true;
    const [first, second] = [this.content[a], this.content[b]];
    const present = new Set(first.map((k) => this.stations[k].member));
    if (second.some((k) => present.has(this.stations[k].member))) return false;
    const size = stretched * Math.max(...[...first, ...second].map((k) => this.sizes[k]));
    for (const p of first) {
      for (const q of second) {
        const lift = Math.max(this.lifts[p], this.lifts[q]);
        if (distance(this.points[p], this.points[q]) > size + lift) return false;
      }
    }
    this.parent[b] = a;
    this.content[a] = [...first, ...second];
    this.content[b] = [];
    return true;
  }

  members(): number[][] {
    return this.content.filter((group) => group.length > 0);
  }

  private find(i: number): number {
    let root = i;
    while (this.parent[root] !== root) root = this.parent[root];
    this.parent[i] = root;
    return root;
  }
}

function seatHeight({ a, b, s, t }: Contact, axes: readonly (Axis | null)[]): number {
  const [first, second] = [axes[a], axes[b]];
  if (first === null || second === null) return 0;
  return distance(pointAt(first, s), pointAt(second, t));
}

/**
 * Of each seat in a joint, the member that sits. The other members tell which it is: they were drawn towards the one
 * that carries, so its contacts with them need less carrying of axes. Where they do not tell, the lower one carries.
 */
function seatedMembers(
  group: readonly Station[],
  contacts: readonly Contact[],
  axes: readonly (Axis | null)[],
): ReadonlySet<number> {
  const here = new Set(group.map(({ member }) => member));
  const inside = [...new Set(group.flatMap((station) => station.contacts))]
    .map((index) => contacts[index])
    .filter(({ a, b }) => here.has(a) && here.has(b));
  const seats = inside.filter(({ kind }) => kind === 'seat');
  const inSeat = new Set(seats.flatMap(({ a, b }) => [a, b]));
  const drawnTo = (member: number): number => {
    const costs = inside
      .filter(({ a, b, kind }) => kind === 'meets' && (a === member || b === member))
      .filter(({ a, b }) => !inSeat.has(a === member ? b : a))
      .map(({ cost }) => cost);
    return costs.length === 0 ? Number.POSITIVE_INFINITY : costs.reduce((sum, cost) => sum + cost, 0) / costs.length;
  };
  const sitters = seats.map(({ a, b, s, t }) => {
    const [first, second] = [drawnTo(a), drawnTo(b)];
    if (first !== second) return first > second ? a : b;
    return heightAt(axes[a], s) > heightAt(axes[b], t) ? a : b;
  });
  const framed = framedIn(group, inside);
  return new Set(sitters.filter((member) => !framed.has(member)));
}

/** Members that end on one that runs through: angles back to back on a gusset touch each other, but neither sits. */
function framedIn(group: readonly Station[], inside: readonly Contact[]): Set<number> {
  const through = new Set(group.filter(({ role }) => role === 'through').map(({ member }) => member));
  const framed = new Set<number>();
  for (const { a, b, kind } of inside) {
    if (kind !== 'meets') continue;
    if (through.has(a)) framed.add(b);
    if (through.has(b)) framed.add(a);
  }
  return framed;
}

const heightAt = (axis: Axis | null, s: number): number => (axis ? pointAt(axis, s)[2] : 0);
